import { useMemo } from 'react';
import { flatDrawing } from '../../../shared/frames/flat-drawing';
import type { FlatDrawing } from '../../../shared/frames/flat-drawing';
import type { Frame } from '../../../shared/frames/frame';
import type { View } from '../../../shared/frames/projection';
import { formatLength } from '../../../shared/kernel/lengths';
import type { LengthUnit } from '../../../shared/kernel/lengths';
import { useWidth } from './use-width';

type Numbers = 'joints' | 'struts' | 'both' | 'none';

type DrawnProps = {
  unit: LengthUnit;
  /** What is drawn, for those who do not see it: `V-09, South bay 2, flat`. */
  label: string;
  numbers?: Numbers;
  /** Numbers of the joints that are glued, from 1; the others are then drawn open. Left out, no joint is. */
  glued?: ReadonlySet<number>;
};

const LABEL_PX = 16;

export type UnrolledDrawingProps = DrawnProps & {
  frame: Frame;
  view?: View;
  /** px; left out, it follows the width. */
  height?: number;
};

/** A piece flat: joints filled when glued, open joints numbered, dimension lines; drawn anew for every width. */
export function UnrolledDrawing({ frame, view, height, ...drawn }: UnrolledDrawingProps) {
  const [ref, width] = useWidth<HTMLDivElement>(350);
  const high = height ?? Math.round(Math.min(Math.max(width * 0.62, 200), 420));
  const drawing = useMemo(
    () => flatDrawing(frame, { width, height: high, view, labelPx: LABEL_PX }),
    [frame, width, high, view],
  );
  return (
    <div ref={ref} className="unrolled">
      <DrawnFrame drawing={drawing} {...drawn} />
    </div>
  );
}

function words(drawing: FlatDrawing, { label, unit, glued }: DrawnProps): string {
  const measures = drawing.dimensions.map(({ kind, mm }) => `${kind} ${formatLength(mm, unit)}`);
  const counts = `${drawing.points.length} joints, ${drawing.lines.length} struts`;
  const open = glued && drawing.points.filter(({ joint }) => !glued.has(joint)).map(({ joint }) => joint);
  return [
    label,
    counts,
    ...measures,
    ...(open === undefined ? [] : [open.length > 0 ? `open joints ${open.join(', ')}` : 'every joint glued']),
  ].join(', ');
}

/** A flat drawing as SVG, in the px it was laid out for. */
export function DrawnFrame({ drawing, ...props }: DrawnProps & { drawing: FlatDrawing }) {
  const { unit, numbers = 'joints', glued } = props;
  const withJoints = numbers === 'joints' || numbers === 'both';
  const withStruts = numbers === 'struts' || numbers === 'both';
  const isGlued = (joint: number): boolean => glued === undefined || glued.has(joint);
  return (
    <svg
      width={drawing.width}
      height={drawing.height}
      viewBox={`0 0 ${drawing.width} ${drawing.height}`}
      role="img"
      aria-label={words(drawing, props)}
      className="drawn-frame"
    >
      {drawing.lines.map(({ strut, x1, y1, x2, y2, from, to }) => {
        const made = glued !== undefined && glued.has(from) && glued.has(to);
        return (
          <line
            key={strut}
            {...{ x1, y1, x2, y2 }}
            className="drawn-strut"
            data-made={made ? '' : undefined}
          />
        );
      })}
      {drawing.dimensions.map(({ kind, mm, line, extensions, label }) => (
        <g key={kind} className="drawn-dimension">
          <line {...line} />
          {extensions.map((extension, i) => (
            <line key={i} {...extension} />
          ))}
          {[
            [line.x1, line.y1],
            [line.x2, line.y2],
          ].map(([x = 0, y = 0], i) => (
            <path key={i} d={`M${x - 4} ${y + 4}l8 -8`} />
          ))}
          <text
            x={label.x}
            y={label.y}
            transform={`rotate(${label.angle} ${label.x} ${label.y})`}
            fontSize={LABEL_PX}
          >
            {formatLength(mm, unit)}
          </text>
        </g>
      ))}
      {drawing.points.map(({ joint, x, y }) => (
        <circle
          key={joint}
          cx={x}
          cy={y}
          r={4}
          className="drawn-joint"
          data-open={isGlued(joint) ? undefined : ''}
        />
      ))}
      {withStruts &&
        drawing.lines.map(({ strut, label }) => (
          <text key={strut} x={label.x} y={label.y} fontSize={LABEL_PX} className="drawn-number">
            {strut}
          </text>
        ))}
      {withJoints &&
        drawing.points
          .filter(({ joint }) => glued === undefined || !glued.has(joint))
          .map(({ joint, label }) => (
            <text
              key={joint}
              x={label.x}
              y={label.y}
              fontSize={LABEL_PX}
              className="drawn-number"
              data-open={isGlued(joint) ? undefined : ''}
            >
              {joint}
            </text>
          ))}
    </svg>
  );
}

/** The small sketch of a piece in a row; `path` comes from wireframeThumbnail for this size. */
export function WireSketch({ path, width, height }: { path: string; width: number; height: number }) {
  return (
    <svg
      className="wire-sketch"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      aria-hidden="true"
    >
      <path d={path} stroke="var(--pencil)" strokeWidth="1" strokeLinejoin="round" fill="none" />
    </svg>
  );
}
