import type { Frame, Strut } from '../../frames/frame';
import { edgeKey, ringEdges } from '../../frames/edge-key';

/** A piece cut out of a drawing, with its own numbering. */
export type PieceFrame = {
  frame: Frame;
  /** For each joint of the piece its index in the drawing. */
  joints: number[];
  /** For each strut of the piece its index in the drawing. */
  struts: number[];
};

/**
 * One piece as a frame of its own.
 * @param drawing all joints (mm), struts and faces
 * @param struts indexes of the piece's struts in the drawing, in the order in which the piece shall have them
 * @param joints the order in which the piece shall have its joints, indexes in the drawing; ascending when left out
 * @returns the struts keep their direction; faces are those whose every edge is a strut of the piece
 * Source: own.
 */
export function pieceFrame(
  drawing: Frame,
  struts: readonly number[],
  joints?: readonly number[],
): PieceFrame {
  const ends = struts.map((strut) => drawing.struts[strut]!);
  const order = joints ? [...joints] : [...new Set(ends.flat())].sort((a, b) => a - b);
  const local = new Map(order.map((joint, at) => [joint, at]));
  const own = new Set(ends.map(([a, b]) => edgeKey(a, b)));
  return {
    frame: {
      joints: order.map((joint) => drawing.joints[joint]!),
      struts: ends.map(([a, b]): Strut => [local.get(a)!, local.get(b)!]),
      faces: drawing.faces
        .filter((face) => face.length > 2 && ringEdges(face).every(([a, b]) => own.has(edgeKey(a, b))))
        .map((face) => face.map((joint) => local.get(joint)!)),
    },
    joints: order,
    struts: [...struts],
  };
}

/**
 * All pieces of a split as frames of their own.
 * @param drawing all joints (mm), struts and faces
 * @param pieceOf for each strut of the drawing the index of its piece, from 0
 * @returns one per piece from 0 to the highest index; struts and joints ascending; a piece without struts is empty
 * Source: own.
 */
export function pieceFrames(drawing: Frame, pieceOf: readonly number[]): PieceFrame[] {
  const struts: number[][] = [];
  pieceOf.forEach((piece, strut) => {
    while (struts.length <= piece) struts.push([]);
    struts[piece]!.push(strut);
  });
  const pieces = struts.map((own) => pieceFrame({ ...drawing, faces: [] }, own));
  // A face belongs to a piece only when all its edges do: each is looked at once, not once per piece.
  const pieceOfEdge = new Map(drawing.struts.map(([a, b], strut) => [edgeKey(a, b), pieceOf[strut]!]));
  const local = pieces.map(({ joints }) => new Map(joints.map((joint, at) => [joint, at])));
  for (const face of drawing.faces) {
    const around = new Set(ringEdges(face).map(([a, b]) => pieceOfEdge.get(edgeKey(a, b))));
    const [piece] = around;
    if (around.size === 1 && piece !== undefined && face.length > 2)
      pieces[piece]!.frame.faces.push(face.map((joint) => local[piece]!.get(joint)!));
  }
  return pieces;
}
