import type { ShownState } from '../../../shared/travellers/step';
import { joinedParts, STATE_COLOUR, stickLabel, stickParts } from './strut-geometry';
import { Part } from './strut-glyph';

export type StickStep = { name: string; state: ShownState; share?: number };

export type MarkedStickProps = {
  /** The piece's code; starts the words for those who do not see the stick. */
  code: string;
  steps: readonly StickStep[];
  /** Length of one step, px: 56 on a desk, 84 on a phone. */
  pitch?: number;
  height?: number;
  /** Thickness unit, px. */
  unit?: number;
  pad?: number;
  /** Other words than those made from the steps. */
  label?: string;
};

/** A traveller as one marked stick: lengths that wait or have passed are parted by cut marks, the worked one has joints. */
export function MarkedStick({
  code,
  steps,
  pitch = 56,
  height = 30,
  unit = 1,
  pad = 8,
  label,
}: MarkedStickProps) {
  const { width, parts } = stickParts(steps, { pitch, height, unit, pad });
  return (
    <svg
      className="stick"
      data-glyph="stick"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={label ?? stickLabel(code, steps)}
    >
      {joinedParts(parts).map((part, i) => (
        <Part key={i} part={part} colour={STATE_COLOUR[part.state]} />
      ))}
    </svg>
  );
}
