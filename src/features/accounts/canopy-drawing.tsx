import { useMemo } from 'react';
import { canopyLines, type DrawnLine } from './canopy-geometry';

const WIDTH = 700;
const LEVELS = 6;

interface Stroke {
  d: string;
  width: number;
  opacity: number;
}

/** Lines of about the same nearness in one path each: far ones thin and pale, as a pencil draws them. */
function strokesOf(lines: readonly DrawnLine[]): Stroke[] {
  const strokes: Stroke[] = [];
  for (let level = 0; level < LEVELS; level++)
    for (const rib of [false, true]) {
      const here = lines.filter(
        (line) => line.rib === rib && Math.min(Math.floor(line.near * LEVELS), LEVELS - 1) === level,
      );
      if (here.length === 0) continue;
      const share = (level + 1) / LEVELS;
      strokes.push({
        d: here
          .map(({ x1, y1, x2, y2 }) => `M${x1.toFixed(1)} ${y1.toFixed(1)}L${x2.toFixed(1)} ${y2.toFixed(1)}`)
          .join(''),
        width: (rib ? 0.9 : 0.5) + share * (rib ? 1.1 : 0.5),
        opacity: 0.28 + 0.72 * share,
      });
    }
  return strokes;
}

/** What many hands make in a day: a canopy with lanterns, computed from the same geometry as every frame. */
export function CanopyDrawing() {
  const { strokes, height } = useMemo(() => {
    const canopy = canopyLines(WIDTH);
    return { strokes: strokesOf(canopy.lines), height: canopy.height };
  }, []);
  const y = height + 18;
  const ticks = Array.from({ length: 71 }, (_, i) => {
    const x = 2 + (i * (WIDTH - 4)) / 70;
    return `M${x.toFixed(1)} ${y}v${i % 5 === 0 ? 10 : 5}`;
  });
  return (
    <svg
      className="canopy"
      viewBox={`0 0 ${WIDTH} ${Math.ceil(y + 12)}`}
      role="img"
      aria-label="A canopy of lattice bays with lanterns hung below it, drawn as sticks and joints."
    >
      {strokes.map(({ d, width, opacity }) => (
        <path key={`${width} ${opacity}`} d={d} strokeWidth={width} opacity={opacity} />
      ))}
      <path className="canopy-rule" d={`M2 ${y}H${WIDTH - 2}${ticks.join('')}`} strokeWidth="1" />
    </svg>
  );
}
