import type { Joint, Strut } from '../../frames/frame';

/**
 * A drawing as the partitioner walks it: struts are the vertices of a hypergraph, joints its hyperedges.
 * `at[start[j]]` to `at[start[j + 1] - 1]` are the struts of joint j.
 */
export interface Net {
  struts: number;
  joints: number;
  a: Int32Array;
  b: Int32Array;
  start: Int32Array;
  at: Int32Array;
  weight: Float64Array;
  /** Sum of the weights. */
  total: number;
  /** Midpoints of the struts, mm, one after the other: x, y, z. */
  middle: Float64Array;
}

/**
 * Reads struts into the form that the partitioner walks.
 * @param joints places, mm
 * @param struts pairs of joints
 * @param weights one per strut, above 0: minutes, or 1
 */
export function netOf(joints: readonly Joint[], struts: readonly Strut[], weights: readonly number[]): Net {
  const count = struts.length;
  const a = Int32Array.from(struts, ([from]) => from);
  const b = Int32Array.from(struts, ([, to]) => to);
  const start = new Int32Array(joints.length + 1);
  for (let s = 0; s < count; s += 1) {
    start[a[s]! + 1]! += 1;
    start[b[s]! + 1]! += 1;
  }
  for (let j = 0; j < joints.length; j += 1) start[j + 1]! += start[j]!;
  const fill = start.slice();
  const at = new Int32Array(2 * count);
  const middle = new Float64Array(3 * count);
  for (let s = 0; s < count; s += 1) {
    at[fill[a[s]!]!++] = s;
    at[fill[b[s]!]!++] = s;
    const [from, to] = [joints[a[s]!]!, joints[b[s]!]!];
    middle[3 * s] = (from.x + to.x) / 2;
    middle[3 * s + 1] = (from.y + to.y) / 2;
    middle[3 * s + 2] = (from.z + to.z) / 2;
  }
  const weight = Float64Array.from(weights);
  return {
    struts: count,
    joints: joints.length,
    a,
    b,
    start,
    at,
    weight,
    total: weight.reduce((sum, one) => sum + one, 0),
    middle,
  };
}

/**
 * Field joints of an assignment: over all joints the pieces that meet there less one, since each is glued on site.
 * @param net the drawing
 * @param pieceOf per strut its piece, from 0
 * Source: the connectivity (lambda minus one) metric of hypergraph partitioning.
 */
export function fieldJointsOf(net: Net, pieceOf: ArrayLike<number>): number {
  let sum = 0;
  const seen: number[] = [];
  for (let j = 0; j < net.joints; j += 1) {
    seen.length = 0;
    for (let k = net.start[j]!; k < net.start[j + 1]!; k += 1) {
      const piece = pieceOf[net.at[k]!]!;
      if (!seen.includes(piece)) seen.push(piece);
    }
    if (seen.length > 1) sum += seen.length - 1;
  }
  return sum;
}

/**
 * Connected bits of each piece, as lists of struts.
 * @param net the drawing
 * @param pieceOf per strut its piece, from 0
 * @returns bits in the order of their first strut
 */
export function bitsOf(net: Net, pieceOf: ArrayLike<number>): { piece: number; struts: number[] }[] {
  const seen = new Uint8Array(net.struts);
  const bits: { piece: number; struts: number[] }[] = [];
  for (let first = 0; first < net.struts; first += 1) {
    if (seen[first]) continue;
    const piece = pieceOf[first]!;
    const struts = [first];
    seen[first] = 1;
    for (let read = 0; read < struts.length; read += 1) {
      for (const joint of [net.a[struts[read]!]!, net.b[struts[read]!]!]) {
        for (let k = net.start[joint]!; k < net.start[joint + 1]!; k += 1) {
          const other = net.at[k]!;
          if (seen[other] || pieceOf[other] !== piece) continue;
          seen[other] = 1;
          struts.push(other);
        }
      }
    }
    bits.push({ piece, struts });
  }
  return bits;
}

/** Weight of each piece. */
export function weightsOf(net: Net, pieceOf: ArrayLike<number>, pieces: number): Float64Array {
  const sums = new Float64Array(pieces);
  for (let s = 0; s < net.struts; s += 1) sums[pieceOf[s]!]! += net.weight[s]!;
  return sums;
}
