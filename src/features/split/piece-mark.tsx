import { PIECE_PATTERNS, type PieceMark as Mark } from '../../../shared/split/pieces/piece-marks';

/** Strokes and gaps of a mark's line, px. */
export const dashOf = (mark: Mark): readonly number[] =>
  PIECE_PATTERNS.find(({ name }) => name === mark.pattern)?.dash ?? [];

/** What tells a piece from its neighbours: a letter, a line pattern, a colour. */
export function PieceMark({ mark }: { mark: Mark }) {
  return (
    <span className="piece-mark">
      <svg width="34" height="10" viewBox="0 0 34 10" aria-hidden="true">
        <line
          x1="1"
          y1="5"
          x2="33"
          y2="5"
          stroke={`var(--${mark.colour})`}
          strokeWidth="3"
          strokeDasharray={dashOf(mark).join(' ') || undefined}
        />
      </svg>
      {mark.letter}
    </span>
  );
}
