import type { Frame } from '../../frames/frame';
import { ALIKE_WITHIN_MM, identicalPieces } from './identical-pieces';
import type { PieceGroup, PieceLikeness } from './identical-pieces';
import { pieceFrame, pieceFrames } from './piece-frame';
import type { PieceFrame } from './piece-frame';

/** A split whose identical pieces carry the same numbers at the same joints and struts. */
export type NumberedPieces = {
  pieces: PieceFrame[];
  groups: PieceGroup[];
  /** Per piece; its `joints` and `struts` count up from 0, because the numbering is already the first piece's. */
  likenesses: PieceLikeness[];
};

/** For each place in the first piece's order what stands there in this piece. */
function inOrderOfFirst(own: readonly number[], partner: readonly number[]): number[] {
  const order = new Array<number>(own.length);
  partner.forEach((first, at) => (order[first] = own[at]!));
  return order;
}

/**
 * Cuts a drawing into its pieces and numbers identical ones alike, so that one drawing and one list of moves serve all of a group.
 * @param drawing all joints (mm), struts and faces
 * @param pieceOf for each strut of the drawing the index of its piece, from 0
 * @param options `withinMm`: tolerance of `identicalPieces`; `strutKinds`: per strut of the drawing what identical pieces must agree in
 * @returns per piece its frame; joint k of any piece of a group is joint k of the group's first piece
 * @throws RangeError as `identicalPieces`
 * Source: own.
 */
export function numberedPieces(
  drawing: Frame,
  pieceOf: readonly number[],
  options: { withinMm?: number; strutKinds?: readonly (string | number)[] } = {},
): NumberedPieces {
  const cut = pieceFrames(drawing, pieceOf);
  const kinds = options.strutKinds;
  const { groups, likenesses } = identicalPieces(
    cut.map(({ frame, struts }) => ({
      frame,
      ...(kinds ? { strutKinds: struts.map((strut) => kinds[strut]!) } : {}),
    })),
    options.withinMm ?? ALIKE_WITHIN_MM,
  );
  const firsts = new Set(groups.map(({ first }) => first));
  return {
    groups,
    pieces: cut.map((piece, index) => {
      const likeness = likenesses[index]!;
      if (firsts.has(index)) return piece;
      const joints = inOrderOfFirst(piece.joints, likeness.joints);
      const renumbered = pieceFrame(
        { ...drawing, faces: [] },
        inOrderOfFirst(piece.struts, likeness.struts),
        joints,
      );
      // Faces go with the first piece's, which have the same numbers now.
      const { faces } = cut[groups[likeness.group]!.first]!.frame;
      return { ...renumbered, frame: { ...renumbered.frame, faces } };
    }),
    likenesses: likenesses.map((likeness) => ({
      ...likeness,
      joints: likeness.joints.map((_, at) => at),
      struts: likeness.struts.map((_, at) => at),
    })),
  };
}
