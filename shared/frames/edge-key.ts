/** Room for joint indexes in a key: far above any frame that is allowed, far below what a number can hold. */
const STRIDE = 2 ** 24;

/** One number for a pair of joints, the same in both directions. */
export const edgeKey = (a: number, b: number): number => Math.min(a, b) * STRIDE + Math.max(a, b);

/** The pairs of joints round a face, the closing one included. */
export const ringEdges = (face: readonly number[]): [number, number][] =>
  face.map((joint, at) => [joint, face[(at + 1) % face.length]!]);
