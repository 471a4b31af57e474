/** How a board is laid out for the width it has, px. */
export interface BoardLayout {
  /** `wide` as on a desk, `mid` without a column for the crew, `narrow` with each traveller in three lines. */
  kind: 'wide' | 'mid' | 'narrow';
  /** Room for the chain; all groups have the same, so that their columns stand in line. */
  chain: number;
}

const CODE = 56;
const PIECE = { wide: 190, mid: 150 };
const NOW = { wide: 366, mid: 220 };
/** Longest step: further apart the lengths do not read as one stick. */
export const MOST_PITCH = 60;
/** Room beside the stick for the joints at its ends, both sides. */
export const STICK_PAD = 16;

/**
 * The layout for a width.
 * @param width of the board, px
 * @param mostSteps of any traveller
 */
export function boardLayout(width: number, mostSteps: number): BoardLayout {
  const wanted = Math.max(mostSteps, 1) * MOST_PITCH;
  if (width < 720) return { kind: 'narrow', chain: Math.max(width - STICK_PAD, 120) };
  const kind = width >= 1040 ? 'wide' : 'mid';
  const room = width - CODE - PIECE[kind] - NOW[kind] - STICK_PAD - 14;
  return { kind, chain: Math.min(wanted, Math.max(room, 200)) };
}

/** The length of one of so many steps, px. */
export const pitchFor = (chain: number, steps: number): number =>
  Math.min(MOST_PITCH, Math.floor(chain / Math.max(steps, 1)));
