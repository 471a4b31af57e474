import type { ReactNode } from 'react';
import { usePageTitle } from '../../lib/page-title';
import { BrokenStrut } from '../ui/strut-glyph';
import { Gauge } from '../ui/gauge';

export type ProjectorFrameProps = {
  /** The installation's name: the page's h1. */
  title: string;
  /** Local time, `14:07`. */
  time: string;
  /** Share done by planned minutes, 0 to 1. */
  share: number;
  /** `no news since 14:03`; then everything is drawn as old. */
  stale?: string;
  /** The installation, two thirds of the picture. */
  picture: ReactNode;
  /** The marks and their words. */
  legend: ReactNode;
  /** Forecast, hands wanted, counts. */
  column: ReactNode;
  /** Covers everything. */
  stop?: ReactNode;
};

/** The projector's picture: night, 16:9, everything in the unit `--p`, a 1080th of its height. */
export function ProjectorFrame(props: ProjectorFrameProps) {
  const { title, time, share, stale, picture, legend, column, stop } = props;
  usePageTitle(title);
  const percent = `${Math.round(share * 100)}% done`;
  return (
    <div className="wall" data-theme="night" data-stale={stale === undefined ? undefined : ''}>
      <main id="main" className="wall-sheet">
        <header className="wall-head">
          {/* The name stays for those who do not see the picture when old news takes its place. */}
          <h1 className={stale === undefined ? undefined : 'sr-only'}>
            <span className="wall-title">{title}</span>, <strong>{time}</strong>
          </h1>
          {stale !== undefined && (
            <p className="wall-stale" role="status">
              <BrokenStrut height={40} />
              <span>{stale}</span>
            </p>
          )}
          <p className="wall-share">{percent}</p>
        </header>
        <div className="wall-picture">{picture}</div>
        <div className="wall-legend">{legend}</div>
        <div className="wall-gauge">
          <Gauge label="share done" share={share} stale={stale !== undefined} />
        </div>
        <div className="wall-column">{column}</div>
        {stop}
      </main>
    </div>
  );
}

/** One thing to read in the projector's column, under a line: a large line with a figure at its end, a smaller one below. */
export function WallLine({
  children,
  figure,
  detail,
}: {
  children: ReactNode;
  figure?: ReactNode;
  detail?: ReactNode;
}) {
  return (
    <div className="wall-line">
      <p className="wall-line-head">
        <span>{children}</span>
        {figure !== undefined && <span>{figure}</span>}
      </p>
      {detail !== undefined && <p className="wall-line-detail">{detail}</p>}
    </div>
  );
}
