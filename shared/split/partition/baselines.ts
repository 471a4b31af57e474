import { seededRandom } from '../../kernel/random';
import type { Net } from './net';

/**
 * Coordinate bisection: what somebody does with a saw and a tape. Struts by their midpoints; k pieces are split as floor(k / 2) and the
 * rest, cut across the longest side of the bounding box at that share of the weight.
 * @param net the drawing
 * @param pieces how many, 1 to the number of struts
 * @returns per strut its piece; pieces may fall apart
 */
export function coordinateBisection(net: Net, pieces: number): Int32Array {
  const pieceOf = new Int32Array(net.struts);
  const cut = (struts: number[], count: number, first: number): void => {
    if (count <= 1) {
      for (const strut of struts) pieceOf[strut] = first;
      return;
    }
    const axis = longestSide(net, struts);
    const sorted = [...struts].sort((p, q) => net.middle[3 * p + axis]! - net.middle[3 * q + axis]! || p - q);
    const half = Math.floor(count / 2);
    const wanted = (sorted.reduce((sum, strut) => sum + net.weight[strut]!, 0) * half) / count;
    let taken = 0;
    let size = 0;
    // A strut goes to the side on which more than half of it lies; each side keeps a strut for each of its pieces.
    while (size < sorted.length - (count - half)) {
      const next = net.weight[sorted[size]!]!;
      if (size >= half && taken + next / 2 > wanted) break;
      taken += next;
      size += 1;
    }
    cut(sorted.slice(0, size), half, first);
    cut(sorted.slice(size), count - half, first + half);
  };
  cut(
    Array.from({ length: net.struts }, (_, strut) => strut),
    pieces,
    0,
  );
  return pieceOf;
}

function longestSide(net: Net, struts: readonly number[]): 0 | 1 | 2 {
  let longest: 0 | 1 | 2 = 0;
  let length = -1;
  for (const axis of [0, 1, 2] as const) {
    let [low, high] = [Infinity, -Infinity];
    for (const strut of struts) {
      const value = net.middle[3 * strut + axis]!;
      if (value < low) low = value;
      if (value > high) high = value;
    }
    // Sides that differ by rounding only count as equal, or the cut would turn with the last digit.
    if (high - low > length * (1 + 1e-9) + 1e-9) [longest, length] = [axis, high - low];
  }
  return longest;
}

/**
 * Random growth: pieces grow from random struts, the lightest next, by a random strut that touches it.
 * @param net the drawing
 * @param pieces how many, 1 to the number of struts
 * @param seed of the random numbers
 * @returns per strut its piece; every piece is connected, except that bits no seed reached join the lightest piece
 */
export function randomGrowth(net: Net, pieces: number, seed: number): Int32Array {
  const random = seededRandom(seed);
  const pieceOf = new Int32Array(net.struts).fill(-1);
  const weight = new Float64Array(pieces);
  const edge: number[][] = Array.from({ length: pieces }, () => []);
  const take = (strut: number, piece: number): void => {
    pieceOf[strut] = piece;
    weight[piece]! += net.weight[strut]!;
    for (const joint of [net.a[strut]!, net.b[strut]!]) {
      for (let k = net.start[joint]!; k < net.start[joint + 1]!; k += 1)
        if (pieceOf[net.at[k]!] === -1) edge[piece]!.push(net.at[k]!);
    }
  };
  for (let piece = 0; piece < pieces; piece += 1) {
    let strut = Math.floor(random() * net.struts);
    while (pieceOf[strut] !== -1) strut = (strut + 1) % net.struts;
    take(strut, piece);
  }
  for (let left = net.struts - pieces; left > 0;) {
    let lightest = -1;
    for (let piece = 0; piece < pieces; piece += 1)
      if (edge[piece]!.length > 0 && (lightest < 0 || weight[piece]! < weight[lightest]!)) lightest = piece;
    if (lightest < 0) {
      const strut = pieceOf.indexOf(-1);
      take(strut, weight.indexOf(Math.min(...weight)));
      left -= 1;
      continue;
    }
    const open = edge[lightest]!;
    const at = Math.floor(random() * open.length);
    const strut = open[at]!;
    open[at] = open[open.length - 1]!;
    open.pop();
    if (pieceOf[strut] !== -1) continue;
    take(strut, lightest);
    left -= 1;
  }
  return pieceOf;
}
