import { useMemo } from 'react';
import { flatDrawing } from '../../../shared/frames/flat-drawing';
import type { FlatDrawing } from '../../../shared/frames/flat-drawing';
import type { Dimension } from '../../../shared/frames/dimensions';
import type { Frame } from '../../../shared/frames/frame';
import type { View } from '../../../shared/frames/projection';
import { formatLength } from '../../../shared/kernel/lengths';
import type { LengthUnit } from '../../../shared/kernel/lengths';
import { textWidth } from './time-axis';
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
const MOST_HIGH = 400;
const EDGE_PX = 10;

/** Takes the empty paper above and below off a drawing. */
function trimmed(drawing: FlatDrawing): FlatDrawing {
  const heights = [
    ...drawing.points.flatMap(({ y, label }) => [y, label.y]),
    ...drawing.lines.map(({ label }) => label.y),
    ...drawing.dimensions.flatMap(({ line, extensions }) =>
      [line, ...extensions].flatMap(({ y1, y2 }) => [y1, y2]),
    ),
  ];
  if (heights.length === 0) return { ...drawing, height: 0 };
  const top = Math.max(Math.min(...heights) - EDGE_PX, 0);
  const foot = Math.min(Math.max(...heights) + EDGE_PX, drawing.height);
  const up = <P extends { y: number }>(place: P): P => ({ ...place, y: place.y - top });
  const lift = <S extends { y1: number; y2: number }>(line: S): S => ({
    ...line,
    y1: line.y1 - top,
    y2: line.y2 - top,
  });
  return {
    ...drawing,
    height: Math.ceil(foot - top),
    points: drawing.points.map((point) => ({ ...up(point), label: up(point.label) })),
    lines: drawing.lines.map((line) => ({ ...lift(line), label: up(line.label) })),
    dimensions: drawing.dimensions.map((dimension) => ({
      ...dimension,
      line: lift(dimension.line),
      extensions: [lift(dimension.extensions[0]), lift(dimension.extensions[1])],
      label: up(dimension.label),
    })),
  };
}

export type UnrolledDrawingProps = DrawnProps & {
  frame: Frame;
  view?: View;
  /** px; left out, it follows the width. */
  height?: number;
};

/** A piece flat: joints filled when glued, open joints numbered, dimension lines; drawn anew for every width. */
export function UnrolledDrawing({ frame, view, height, ...drawn }: UnrolledDrawingProps) {
  const [ref, width] = useWidth<HTMLDivElement>(350);
  const drawing = useMemo(() => {
    const page = { width, view, margin: width < 500 ? 50 : 56, labelPx: LABEL_PX };
    return height === undefined
      ? trimmed(flatDrawing(frame, { ...page, height: MOST_HIGH }))
      : flatDrawing(frame, { ...page, height });
  }, [frame, width, height, view]);
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

/** A dimension line with slanted ticks; its figure stands on paper so that the line does not run through it. */
function DimensionLine({ dimension, unit }: { dimension: Dimension; unit: LengthUnit }) {
  const { mm, line, extensions, label } = dimension;
  const room = Math.hypot(line.x2 - line.x1, line.y2 - line.y1) - 20;
  const full = formatLength(mm, unit);
  const text = textWidth(full, LABEL_PX) < room ? full : full.replace(/ (mm|in)$/, '');
  const half = textWidth(text, LABEL_PX) / 2 + 2;
  return (
    <g className="drawn-dimension">
      <line {...line} />
      {extensions.map((extension, i) => (
        <line key={i} {...extension} />
      ))}
      <path d={`M${line.x1 - 4} ${line.y1 + 4}l8 -8M${line.x2 - 4} ${line.y2 + 4}l8 -8`} />
      <g transform={`translate(${label.x} ${label.y}) rotate(${label.angle})`}>
        <rect x={-half} y={-9} width={half * 2} height={18} />
        <text fontSize={LABEL_PX}>{text}</text>
      </g>
    </g>
  );
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
        const made = glued?.has(from) === true && glued.has(to);
        return (
          <line
            key={strut}
            {...{ x1, y1, x2, y2 }}
            className="drawn-strut"
            data-made={made ? '' : undefined}
          />
        );
      })}
      {drawing.dimensions.map((dimension) => (
        <DimensionLine key={dimension.kind} dimension={dimension} unit={unit} />
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
          <text
            key={strut}
            x={label.x}
            y={label.y}
            fontSize={LABEL_PX}
            className="drawn-number"
            data-of={withJoints ? 'strut' : undefined}
          >
            {strut}
          </text>
        ))}
      {withJoints &&
        drawing.points
          .filter(({ joint }) => glued?.has(joint) !== true)
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
