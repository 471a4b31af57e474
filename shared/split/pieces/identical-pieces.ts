import { congruence } from './congruence';
import { couldBeAlike, traitsReader } from './piece-traits';
import type { PieceShape, PieceTraits } from './piece-traits';
import { UNTURNED } from './rigid-motion';
import type { Motion } from './rigid-motion';

/** How a piece is like the first one of its group. */
export type PieceLikeness = {
  /** Index into the groups. */
  group: number;
  /** `same`: the first piece turned · `mirror`: only its mirror image. */
  kind: 'same' | 'mirror';
  /** Which hand it is, in a group that has both; the first piece is the left one. */
  hand: 'left' | 'right' | null;
  /** Brings the first piece to where this one lies in the drawing. */
  motion: Motion;
  /** For each joint of this piece the joint of the first one that it is. */
  joints: number[];
  /** For each strut of this piece the strut of the first one that it is. */
  struts: number[];
  /** The farthest that a joint lies from its place, mm. */
  worstMm: number;
};

/** Pieces that are made from one drawing. */
export type PieceGroup = {
  first: number;
  /** All of them, rising, the first included. */
  pieces: number[];
  /** Those that are the mirror image of the first. */
  mirrored: number[];
  /** Whether the piece differs from its own mirror image; a flat piece never does: it is turned over. */
  handed: boolean;
};

/** Joints this near their place, mm, make two pieces one pattern when nothing else is said. */
export const ALIKE_WITHIN_MM = 0.5;

const counting = (count: number): number[] => Array.from({ length: count }, (_, at) => at);

/**
 * Groups of pieces that are identical up to turning, mirror images marked as left and right.
 * @param pieces any number of pieces, joints in mm; `strutKinds` where struts differ in more than length
 * @param withinMm how far a joint may lie from its place, mm, above 0 and usually from 0.1 to 1
 * @returns groups in the order of their first pieces, and one likeness per piece. Every piece is within the tolerance of the first of
 *   its group; a piece that is both a turned and a mirrored copy is `same`.
 * @throws RangeError when the tolerance is not above 0
 * Source: own; see `congruence`.
 */
export function identicalPieces(
  pieces: readonly PieceShape[],
  withinMm: number = ALIKE_WITHIN_MM,
): { groups: PieceGroup[]; likenesses: PieceLikeness[] } {
  if (!(withinMm > 0)) throw new RangeError('The tolerance for identical pieces must be above 0 mm.');
  const read = traitsReader();
  const groups: (PieceGroup & { traits: PieceTraits })[] = [];
  const byKey = new Map<string, number[]>();

  const likenesses = pieces.map((piece, index): PieceLikeness => {
    const traits = read(piece);
    const known = byKey.get(traits.key) ?? [];
    for (const group of known) {
      const { traits: first, pieces: members, mirrored } = groups[group]!;
      if (!couldBeAlike(first, traits, withinMm)) continue;
      const turned = congruence(first, traits, false, withinMm);
      const found = turned ?? congruence(first, traits, true, withinMm);
      if (!found) continue;
      members.push(index);
      if (!turned) mirrored.push(index);
      return { group, kind: turned ? 'same' : 'mirror', hand: null, ...found };
    }
    byKey.set(traits.key, [...known, groups.length]);
    groups.push({ first: index, pieces: [index], mirrored: [], handed: false, traits });
    return {
      group: groups.length - 1,
      kind: 'same',
      hand: null,
      motion: { rotation: UNTURNED, offset: { x: 0, y: 0, z: 0 } },
      joints: counting(piece.frame.joints.length),
      struts: counting(piece.frame.struts.length),
      worstMm: 0,
    };
  });

  for (const group of groups) {
    group.handed =
      group.mirrored.length > 0 ||
      (group.traits.frame.joints.length > 0 &&
        congruence(group.traits, group.traits, true, withinMm) === null);
    if (group.mirrored.length > 0)
      for (const piece of group.pieces) {
        const likeness = likenesses[piece]!;
        likeness.hand = likeness.kind === 'same' ? 'left' : 'right';
      }
  }
  return {
    groups: groups.map(({ first, pieces: members, mirrored, handed }) => ({
      first,
      pieces: members,
      mirrored,
      handed,
    })),
    likenesses,
  };
}
