import type { Frame } from '../../frames/frame';
import { strutLengths } from '../../frames/frame';
import { boxOf, subtract } from '../../frames/vector';

/** A drawing and the piece of each strut. It is never changed: each hand edit gives a new one. */
export type SplitState = {
  frame: Frame;
  /** For each strut its piece, from 0. */
  pieceOf: readonly number[];
  /** How many pieces there are; one may be without struts. */
  pieces: number;
};

/** What counts for a piece besides struts and joints. */
export type SplitWeights = {
  /** Minutes per strut of the drawing; 1 each when left out. */
  minutes?: readonly number[];
  /** Minutes for each joint of a piece, 0 when left out. */
  minutesPerJoint?: number;
  /** Grams per strut of the drawing; 0 when left out. */
  grams?: readonly number[];
};

/** What can be counted and measured on a piece of a split. */
export type PieceFigures = {
  struts: number;
  joints: number;
  /** Joints of it where other pieces meet it. */
  fieldJoints: number;
  minutes: number;
  massKg: number;
  strutMm: number;
  /** Extent along x, y and z of the drawing, the longest first, mm. */
  sizeMm: [number, number, number];
  /** Parts that do not touch each other: 1 for a piece that can be carried. */
  parts: number;
};

export type SplitFigures = {
  pieces: PieceFigures[];
  /** Over all joints the pieces that meet there less one: each is glued on site. */
  fieldJoints: number;
  /** Farthest that the minutes of a piece with struts lie from their mean, per cent of it. */
  imbalancePct: number;
};

const GRAMS = 1000;

/** Parts of one piece, each a list of its struts that hang together. */
function partsOf(frame: Frame, struts: readonly number[]): number[][] {
  const at = new Map<number, number[]>();
  for (const strut of struts)
    for (const joint of frame.struts[strut]!) {
      const list = at.get(joint);
      if (list) list.push(strut);
      else at.set(joint, [strut]);
    }
  const seen = new Set<number>();
  return struts.flatMap((start) => {
    if (seen.has(start)) return [];
    seen.add(start);
    const part = [start];
    for (const strut of part)
      for (const joint of frame.struts[strut]!)
        for (const next of at.get(joint)!)
          if (!seen.has(next)) {
            seen.add(next);
            part.push(next);
          }
    return [part.sort((a, b) => a - b)];
  });
}

/** The struts of each piece, rising. */
export function strutsOfPieces({ pieceOf, pieces }: SplitState): number[][] {
  const struts: number[][] = Array.from({ length: pieces }, () => []);
  pieceOf.forEach((piece, strut) => struts[piece]?.push(strut));
  return struts;
}

/**
 * Parts of each piece that do not touch each other.
 * @param split a split
 * @returns per piece its parts as rising lists of struts, the part of the lowest strut first; empty for a piece without struts
 */
export const pieceParts = (split: SplitState): number[][][] =>
  strutsOfPieces(split).map((struts) => partsOf(split.frame, struts));

/**
 * The figures of a split, counted anew.
 * @param split every strut in exactly one piece, `pieceOf` from 0 to `pieces` less one
 * @param weights minutes per strut and joint, grams per strut
 * @returns per piece and in all; a piece without struts has zeros
 * Source: connectivity metric (lambda less one) of hypergraph partitioning, struts as vertices and joints as hyperedges.
 */
export function splitFigures(split: SplitState, weights: SplitWeights = {}): SplitFigures {
  const { frame } = split;
  const lengths = strutLengths(frame);
  const at: Set<number>[] = frame.joints.map(() => new Set<number>());
  frame.struts.forEach((ends, strut) => {
    for (const joint of ends) at[joint]!.add(split.pieceOf[strut]!);
  });
  const parts = pieceParts(split);
  const sum = (struts: readonly number[], of: (strut: number) => number): number =>
    struts.reduce((total, strut) => total + of(strut), 0);
  const pieces = strutsOfPieces(split).map((struts, piece): PieceFigures => {
    const joints = [...new Set(struts.flatMap((strut) => frame.struts[strut]!))];
    const { least, most } = boxOf(joints.map((joint) => frame.joints[joint]!));
    const size = subtract(most, least);
    const [long, middle, short] = [size.x, size.y, size.z].sort((a, b) => b - a) as [number, number, number];
    return {
      struts: struts.length,
      joints: joints.length,
      fieldJoints: joints.filter((joint) => at[joint]!.size > 1).length,
      minutes:
        sum(struts, (strut) => weights.minutes?.[strut] ?? 1) +
        (weights.minutesPerJoint ?? 0) * joints.length,
      massKg: sum(struts, (strut) => weights.grams?.[strut] ?? 0) / GRAMS,
      strutMm: sum(struts, (strut) => lengths[strut]!),
      sizeMm: [long, middle, short],
      parts: parts[piece]!.length,
    };
  });
  const worked = pieces.filter(({ struts }) => struts > 0).map(({ minutes }) => minutes);
  const mean = worked.reduce((total, minutes) => total + minutes, 0) / Math.max(1, worked.length);
  return {
    pieces,
    fieldJoints: at.reduce((total, list) => total + Math.max(0, list.size - 1), 0),
    imbalancePct:
      mean === 0 ? 0 : Math.max(0, ...worked.map((minutes) => (100 * Math.abs(minutes - mean)) / mean)),
  };
}
