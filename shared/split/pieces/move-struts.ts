import { ok, refuse } from '../../kernel/result';
import type { Result } from '../../kernel/result';
import { pieceParts, splitFigures } from './split-figures';
import type { SplitFigures, SplitState, SplitWeights } from './split-figures';

/** What a piece must not exceed; what is left out is no limit. */
export type PieceLimits = {
  struts?: number;
  minutes?: number;
  massKg?: number;
  /** Box a piece must pass, turned by quarter turns, the sides in any order, mm. */
  boxMm?: readonly [number, number, number];
};

/** What a hand edit leaves to be put right. Pieces and struts are indexes from 0. */
export type SplitProblem =
  | { code: 'PIECE_IN_PARTS'; piece: number; parts: number[][]; message: string }
  | { code: 'PIECE_EMPTY'; piece: number; message: string }
  | {
      code: 'PIECE_OVER_LIMIT';
      piece: number;
      limit: 'struts' | 'minutes' | 'mass' | 'box';
      is: number;
      most: number;
      message: string;
    };

/** Why struts cannot be moved at all. */
export type MoveRefusal = { code: 'STRUT_UNKNOWN' | 'PIECE_UNKNOWN' | 'NOTHING_TO_MOVE'; message: string };

export type StrutMove = {
  split: SplitState;
  /** The piece the struts are in now; a new one when none was named. */
  piece: number;
  before: SplitFigures;
  after: SplitFigures;
  /** Problems of the pieces that the move touched, old ones of theirs included. */
  problems: SplitProblem[];
  /** Puts every strut back where it was: the split from before the move. */
  undo: SplitState;
};

export type MoveOptions = SplitWeights & {
  limits?: PieceLimits;
  /** What people call the pieces; `piece 3` where there is no code. */
  codes?: readonly string[];
};

const rounded = (value: number): string => String(Math.round(value * 10) / 10);
const strutNumbers = (struts: readonly number[]): string => {
  const most = 8;
  const shown = struts
    .slice(0, most)
    .map((strut) => strut + 1)
    .join(', ');
  return struts.length > most ? `${shown} and ${struts.length - most} more` : shown;
};
const count = (number: number, one: string): string => `${number} ${one}${number === 1 ? '' : 's'}`;

/**
 * What is wrong with some pieces of a split.
 * @param split a split
 * @param figures its figures (see `splitFigures`)
 * @param pieces the pieces to look at
 * @param options limits, and the codes that the messages name
 * @returns piece by piece: without struts, in several parts (the struts of each part), over a limit (with both numbers)
 */
export function splitProblems(
  split: SplitState,
  figures: SplitFigures,
  pieces: readonly number[],
  { limits = {}, codes = [] }: Pick<MoveOptions, 'limits' | 'codes'>,
): SplitProblem[] {
  const parts = pieceParts(split);
  return pieces.flatMap((piece): SplitProblem[] => {
    const is = figures.pieces[piece]!;
    const name = codes[piece] ?? `Piece ${piece + 1}`;
    if (is.struts === 0)
      return [
        { code: 'PIECE_EMPTY', piece, message: `${name} has no struts left. It goes when this is kept.` },
      ];
    const problems: SplitProblem[] = [];
    const own = parts[piece]!;
    if (own.length > 1) {
      const [, ...loose] = [...own].sort((a, b) => b.length - a.length || a[0]! - b[0]!);
      problems.push({
        code: 'PIECE_IN_PARTS',
        piece,
        parts: own,
        message: `${name} falls into ${own.length} parts that do not touch; nobody can carry it as one. Give ${count(loose.flat().length, 'strut')} (${strutNumbers(loose.flat())}) to a piece that they touch.`,
      });
    }
    const over = (
      limit: 'struts' | 'minutes' | 'mass',
      value: number,
      most: number | undefined,
      unit: string,
    ) => {
      if (most !== undefined && value > most + 1e-9)
        problems.push({
          code: 'PIECE_OVER_LIMIT',
          piece,
          limit,
          is: value,
          most,
          message: `${name} has ${rounded(value)} ${unit}, ${rounded(value - most)} over the limit of ${rounded(most)}. Give some of its struts to a neighbour.`,
        });
    };
    over('struts', is.struts, limits.struts, 'struts');
    over('minutes', is.minutes, limits.minutes, 'minutes');
    over('mass', is.massKg, limits.massKg, 'kg');
    const box = limits.boxMm && [...limits.boxMm].sort((a, b) => b - a);
    const side = box ? is.sizeMm.findIndex((value, at) => value > box[at]! + 1e-9) : -1;
    if (box && side >= 0)
      problems.push({
        code: 'PIECE_OVER_LIMIT',
        piece,
        limit: 'box',
        is: is.sizeMm[side]!,
        most: box[side]!,
        message: `${name} measures ${is.sizeMm.map((mm) => Math.round(mm)).join(' x ')} mm and does not fit the box of ${box.map((mm) => Math.round(mm)).join(' x ')} mm. Give struts at its ends to a neighbour.`,
      });
    return problems;
  });
}

/**
 * Gives struts to another piece by hand; nothing is changed, a new split comes back.
 * @param split the split as it is
 * @param struts indexes of the struts, from 0
 * @param toPiece index of the piece that gets them, or null for a new one
 * @param options minutes and grams for the figures, limits and codes for the problems
 * @returns the new split, the figures before and after, the problems of all pieces that gave or got struts, and the way back; or why
 *   not: a strut or piece that does not exist, or struts that are all there already
 * Source: own.
 */
export function moveStruts(
  split: SplitState,
  struts: readonly number[],
  toPiece: number | null,
  options: MoveOptions = {},
): Result<StrutMove, MoveRefusal> {
  const unknown = struts.find((strut) => split.pieceOf[strut] === undefined);
  if (unknown !== undefined)
    return refuse({
      code: 'STRUT_UNKNOWN',
      message: `There is no strut ${unknown + 1}; the drawing has struts 1 to ${split.pieceOf.length}. Choose one of those.`,
    });
  if (toPiece !== null && (!Number.isInteger(toPiece) || toPiece < 0 || toPiece >= split.pieces))
    return refuse({
      code: 'PIECE_UNKNOWN',
      message: `There is no piece ${toPiece + 1}; the split has pieces 1 to ${split.pieces}. Choose one of those, or a new piece.`,
    });
  const piece = toPiece ?? split.pieces;
  const moving = new Set(struts.filter((strut) => split.pieceOf[strut] !== piece));
  if (moving.size === 0)
    return refuse({
      code: 'NOTHING_TO_MOVE',
      message:
        struts.length === 0
          ? 'No strut is chosen. Choose the struts first.'
          : `All ${struts.length} chosen struts are in that piece already. Choose others, or another piece.`,
    });
  const next: SplitState = {
    ...split,
    pieceOf: split.pieceOf.map((of, strut) => (moving.has(strut) ? piece : of)),
    pieces: Math.max(split.pieces, piece + 1),
  };
  const touched = [...new Set([piece, ...[...moving].map((strut) => split.pieceOf[strut]!)])].sort(
    (a, b) => a - b,
  );
  const after = splitFigures(next, options);
  return ok({
    split: next,
    piece,
    before: splitFigures(split, options),
    after,
    problems: splitProblems(next, after, touched, options),
    undo: split,
  });
}
