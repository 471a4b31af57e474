import type { Joint, Strut } from '../../frames/frame';
import { seededRandom } from '../../kernel/random';
import { Pieces } from './anneal';
import { coordinateBisection, randomGrowth } from './baselines';
import { bitsOf, fieldJointsOf, netOf, weightsOf, type Net } from './net';

/** Share by which a piece may lie over or under the mean weight. */
export const BALANCE = 0.1;

export interface PartitionInput {
  /** mm. */
  joints: readonly Joint[];
  struts: readonly Strut[];
  /** One per strut, above 0: crew-minutes, or 1. */
  weights: readonly number[];
  /** How many pieces, 1 to the number of struts. */
  pieces: number;
  /** Most weight of a piece, where that is less than the balance allows. */
  most?: number | undefined;
  seed: number;
  /** Wall clock after which it ends with the best so far, ms; the number of tries ends it before on most machines. */
  milliseconds?: number | undefined;
}

/** How a long computation is watched and stopped. */
export interface Control {
  shouldStop?: () => boolean;
  /** How far it is, 0 to 1. */
  progress?: (share: number) => void;
}

export interface Partition {
  /** Per strut its piece, from 0. */
  pieceOf: Int32Array;
  fieldJoints: number;
  /** Farthest that a piece's weight lies from the mean, per cent. */
  imbalancePct: number;
  /** Bits beyond one for each piece; 0 for every connected drawing. */
  disconnected: number;
  /** Every piece lies within the balance and the most weight. */
  balanced: boolean;
  /** Field joints of the two simple ways, for comparison; they need not be connected or balanced. */
  baseline: { randomGrowth: number; coordinateBisection: number };
}

/** Tries of one cooling for each strut, and their least and most. Measured: more tries gain under one per cent. */
const TRIES_PER_STRUT = 1000;
const LEAST_TRIES = 60_000;
const MOST_TRIES = 6_000_000;
/** Coolings, each from another start; more for small drawings, which cool in no time. */
const ROUNDS = 5;
const ROUNDS_OF_SMALL = 14;
const SMALL = 150;
const ROUNDS_OF_LARGE = 3;
const LARGE = 2000;
/** Heats in field joints. A hotter start forgets where it came from, which a large drawing has not the time to make good. */
const HOT = 0.75;
const WARM = 0.45;
const COLD = 0.1;

/**
 * Cuts a connected drawing into connected pieces of about equal weight with few field joints.
 *
 * Hypergraph partitioning with struts as vertices, joints as hyperedges and the connectivity (lambda minus one) metric: annealing over
 * the joints where pieces meet, the change of cost in constant time from counts per joint and piece, connectedness looked at only
 * after acceptance. It starts from coordinate bisection, from random growth and from its own best, and never returns a worse
 * assignment than a connected and balanced one of the two.
 *
 * @param input the drawing and what is wanted; a drawing in several bits is cut with pieces that may lie in two of them
 * @param control asked every few thousand tries, so it stops within milliseconds
 * @returns the same for the same input and seed, unless the time ran out
 * @throws RangeError when there are more pieces than struts, or none
 * Source: simulated annealing, S. Kirkpatrick, C. D. Gelatt and M. P. Vecchi, Science 220 (1983) 671-680; moves and schedule own.
 */
export function partition(input: PartitionInput, control: Control = {}): Partition {
  const { pieces, seed } = input;
  const net = netOf(input.joints, input.struts, input.weights);
  if (!Number.isInteger(pieces) || pieces < 1 || pieces > net.struts) {
    throw new RangeError(`${net.struts} struts cannot make ${pieces} pieces. Ask for 1 to ${net.struts}.`);
  }
  const bisected = coordinateBisection(net, pieces);
  const grown = randomGrowth(net, pieces, seed);
  const search = new Search(net, input, control);
  for (const start of [bisected, grown]) search.consider(start);
  if (pieces > 1) search.run(bisected, grown);
  const pieceOf = search.best;
  return {
    pieceOf,
    fieldJoints: fieldJointsOf(net, pieceOf),
    imbalancePct: imbalance(net, pieceOf, pieces),
    disconnected: bitsOf(net, pieceOf).length - new Set(pieceOf).size,
    balanced: search.balanced(pieceOf),
    baseline: { randomGrowth: fieldJointsOf(net, grown), coordinateBisection: fieldJointsOf(net, bisected) },
  };
}

/** Farthest that a piece's weight lies from the mean, per cent. */
export function imbalance(net: Net, pieceOf: ArrayLike<number>, pieces: number): number {
  const mean = net.total / pieces;
  const farthest = weightsOf(net, pieceOf, pieces).reduce(
    (most, weight) => Math.max(most, Math.abs(weight - mean)),
    0,
  );
  return (100 * farthest) / mean;
}

class Search {
  best: Int32Array;
  private readonly least: number;
  private readonly most: number;
  /** Balanced before few field joints, whatever they cost. */
  private bestExcess = Infinity;
  private bestCost = Infinity;
  private readonly end: number;

  constructor(
    private readonly net: Net,
    private readonly input: PartitionInput,
    private readonly control: Control,
  ) {
    const mean = net.total / input.pieces;
    const [least, most] = reachable(net, mean, input.most);
    this.least = least;
    this.most = most;
    this.best = new Int32Array(net.struts);
    this.end = input.milliseconds === undefined ? Infinity : performance.now() + input.milliseconds;
  }

  balanced(pieceOf: ArrayLike<number>): boolean {
    return this.excessOf(pieceOf) === 0;
  }

  /** Keep an assignment where it is better than what there was. */
  consider(start: Int32Array): void {
    const pieceOf = joined(this.net, start, this.input.pieces);
    this.keep(pieceOf, this.excessOf(pieceOf), fieldJointsOf(this.net, pieceOf));
  }

  run(bisected: Int32Array, grown: Int32Array): void {
    const { net, input, control } = this;
    const large = net.struts > LARGE;
    const rounds = net.struts <= SMALL ? ROUNDS_OF_SMALL : large ? ROUNDS_OF_LARGE : ROUNDS;
    const tries = Math.min(MOST_TRIES, Math.max(LEAST_TRIES, TRIES_PER_STRUT * net.struts));
    for (let round = 0; round < rounds; round += 1) {
      const random = seededRandom(input.seed * 7919 + round);
      const goOn = (share: number): boolean => {
        control.progress?.((round + share) / rounds);
        return !control.shouldStop?.() && performance.now() < this.end;
      };
      // Its own best is warmed up every other time; the starts in between keep it from circling in one place.
      const again = round > 0 && (large || round % 2 === 0);
      const from = again ? this.best : round === 0 ? bisected : this.another(round, grown);
      const pieces = new Pieces(
        net,
        { pieces: input.pieces, least: this.least, most: this.most, fixed: null, random, goOn },
        joined(net, from, input.pieces),
      );
      const over = !pieces.cool({ from: again || large ? WARM : HOT, to: COLD, tries }, (cost) =>
        this.keep(pieces.pieceOf, 0, cost),
      );
      if (this.bestExcess > 0) this.keep(pieces.pieceOf, pieces.excess(), pieces.cost);
      if (over) return;
    }
  }

  private another(round: number, grown: Int32Array): Int32Array {
    return round === 1 ? grown : randomGrowth(this.net, this.input.pieces, this.input.seed * 31 + round);
  }

  private keep(pieceOf: Int32Array, excess: number, cost: number): void {
    if (excess > this.bestExcess || (excess === this.bestExcess && cost >= this.bestCost)) return;
    this.best = pieceOf.slice();
    this.bestExcess = excess;
    this.bestCost = cost;
  }

  private excessOf(pieceOf: ArrayLike<number>): number {
    return weightsOf(this.net, pieceOf, this.input.pieces).reduce(
      (sum, weight) => sum + Math.max(0, weight - this.most, this.least - weight),
      0,
    );
  }
}

/** Rounding of sums of weights must not make a whole number of struts too heavy. */
const ROUNDING = 1e-9;

/** The weights between which a piece must lie: the balance, at least wide enough for one whole strut either way. */
function reachable(net: Net, mean: number, most: number | undefined): [number, number] {
  const slack = ROUNDING * net.total;
  const lightest = net.weight.reduce((least, weight) => Math.min(least, weight), Infinity);
  let low = mean * (1 - BALANCE);
  let high = mean * (1 + BALANCE);
  // With few struts in a piece no whole number of them may lie within the balance: then the nearest ones do.
  if (Math.floor(high / lightest) * lightest < low) [low, high] = [mean - lightest, mean + lightest];
  return [low - slack, Math.min(high, most ?? Infinity) + slack];
}

/**
 * The same assignment with every piece in one bit: smaller bits go to the neighbour that they share most joints with, and a piece that
 * has no strut gets one from the heaviest.
 */
function joined(net: Net, start: ArrayLike<number>, pieces: number): Int32Array {
  const pieceOf = Int32Array.from(start);
  for (let round = 0; round < net.struts; round += 1) {
    const loose = looseBits(net, pieceOf);
    if (loose.length === 0) break;
    let moved = false;
    for (const struts of loose) {
      const target = neighbourOf(net, pieceOf, struts);
      if (target < 0) continue;
      for (const strut of struts) pieceOf[strut] = target;
      moved = true;
      break;
    }
    if (!moved) break;
  }
  fillEmpty(net, pieceOf, pieces);
  return pieceOf;
}

/** All bits but the heaviest of each piece, the smallest first. */
function looseBits(net: Net, pieceOf: Int32Array): number[][] {
  const heaviest = new Map<number, { struts: number[]; weight: number }>();
  const loose: number[][] = [];
  for (const { piece, struts } of bitsOf(net, pieceOf)) {
    const weight = struts.reduce((sum, strut) => sum + net.weight[strut]!, 0);
    const known = heaviest.get(piece);
    if (!known) heaviest.set(piece, { struts, weight });
    else if (weight > known.weight) {
      loose.push(known.struts);
      heaviest.set(piece, { struts, weight });
    } else loose.push(struts);
  }
  return loose.sort((p, q) => p.length - q.length || p[0]! - q[0]!);
}

function neighbourOf(net: Net, pieceOf: Int32Array, struts: readonly number[]): number {
  const own = pieceOf[struts[0]!]!;
  const inside = new Set(struts);
  const shared = new Map<number, number>();
  for (const joint of new Set(struts.flatMap((strut) => [net.a[strut]!, net.b[strut]!]))) {
    const there = new Set<number>();
    for (let k = net.start[joint]!; k < net.start[joint + 1]!; k += 1) {
      const other = net.at[k]!;
      if (!inside.has(other) && pieceOf[other] !== own) there.add(pieceOf[other]!);
    }
    for (const piece of there) shared.set(piece, (shared.get(piece) ?? 0) + 1);
  }
  let best = -1;
  for (const [piece, joints] of shared)
    if (best < 0 || joints > shared.get(best)! || (joints === shared.get(best)! && piece < best))
      best = piece;
  return best;
}

/** Give a strut to each piece that has none: an outer one of the piece with most struts. */
function fillEmpty(net: Net, pieceOf: Int32Array, pieces: number): void {
  const sizes = new Int32Array(pieces);
  for (const piece of pieceOf) sizes[piece]! += 1;
  for (let piece = 0; piece < pieces; piece += 1) {
    if (sizes[piece]! > 0) continue;
    const largest = sizes.indexOf(Math.max(...sizes));
    const strut = outerStrut(net, pieceOf, largest);
    pieceOf[strut] = piece;
    sizes[largest]! -= 1;
    sizes[piece]! += 1;
  }
}

/** A strut without which a piece of two or more stays in one bit: the last one that a walk through it reaches. */
function outerStrut(net: Net, pieceOf: Int32Array, piece: number): number {
  const bit = bitsOf(net, pieceOf).find((found) => found.piece === piece);
  const last = bit?.struts.at(-1);
  if (last === undefined) throw new Error(`Piece ${piece} has no strut.`);
  return last;
}
