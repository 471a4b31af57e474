import type { ReactNode } from 'react';
import { usePageTitle } from '../../lib/page-title';
import { BeeMark } from '../ui/bee-mark';
import { SkipLink } from './skip-link';

export type OpenFrameProps = {
  /** The page's one h1; the product's own name stands large beside its mark. */
  title: string;
  lead?: ReactNode;
  /** What is drawn beside the form on a desk and below it on a phone. */
  drawing?: ReactNode;
  children: ReactNode;
};

/** The frame of pages for whoever is not signed in: the mark, one column of things to fill in, a drawing. */
export function OpenFrame({ title, lead, drawing, children }: OpenFrameProps) {
  usePageTitle(title);
  const isFront = title === 'Strutbee';
  return (
    <div className="open">
      <SkipLink />
      <main id="main" className="open-main" tabIndex={-1}>
        <div className="open-column">
          <div className="open-brand">
            <BeeMark height={isFront ? 38 : 26} />
            {isFront ? (
              <h1 className="open-name" tabIndex={-1}>
                Strutbee
              </h1>
            ) : (
              <span className="text-t1">Strutbee</span>
            )}
          </div>
          {!isFront && (
            <h1 className="page-title" tabIndex={-1}>
              {title}
            </h1>
          )}
          {lead !== undefined && <p className="open-lead">{lead}</p>}
          {children}
        </div>
        {drawing !== undefined && <div className="open-drawing">{drawing}</div>}
      </main>
    </div>
  );
}
