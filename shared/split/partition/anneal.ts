import type { Random } from '../../kernel/random';
import type { Net } from './net';

/** What an annealing run is held to. */
export interface AnnealTask {
  pieces: number;
  /** Least and most weight of a piece. */
  least: number;
  most: number;
  /** Struts that stay where they are. */
  fixed: Uint8Array | null;
  random: Random;
  /** Asked every few thousand tries, with the share of the run that is over. */
  goOn(share: number): boolean;
}

/** One stretch of cooling. */
export interface Cooling {
  from: number;
  to: number;
  tries: number;
}

/** What a unit of weight (a mean strut) over or under the limits costs, in field joints. */
const OVERWEIGHT = 0.6;
const ASK_EVERY = 4096;

/**
 * Pieces under change: counts per joint and piece, so that a move's cost is known at once, and the joints where pieces meet.
 */
export class Pieces {
  readonly pieceOf: Int32Array;
  readonly weight: Float64Array;
  cost = 0;
  private readonly count: Uint16Array;
  /** Pieces at each joint. */
  private readonly meets: Uint16Array;
  private readonly border: Int32Array;
  private readonly place: Int32Array;
  private borders = 0;
  private readonly mark: Int32Array;
  private stamp = 0;
  private readonly queue: Int32Array;

  constructor(
    private readonly net: Net,
    private readonly task: AnnealTask,
    start: ArrayLike<number>,
  ) {
    const { pieces } = task;
    this.pieceOf = Int32Array.from(start);
    this.weight = new Float64Array(pieces);
    this.count = new Uint16Array(net.joints * pieces);
    this.meets = new Uint16Array(net.joints);
    this.border = new Int32Array(net.joints);
    this.place = new Int32Array(net.joints).fill(-1);
    this.mark = new Int32Array(net.joints);
    this.queue = new Int32Array(net.joints);
    for (let s = 0; s < net.struts; s += 1) {
      const piece = this.pieceOf[s]!;
      this.weight[piece]! += net.weight[s]!;
      this.enter(net.a[s]!, piece);
      this.enter(net.b[s]!, piece);
    }
  }

  private enter(joint: number, piece: number): void {
    const at = joint * this.task.pieces + piece;
    if (this.count[at]! === 0) {
      this.meets[joint]! += 1;
      if (this.meets[joint]! > 1) this.cost += 1;
      if (this.meets[joint]! === 2) {
        this.place[joint] = this.borders;
        this.border[this.borders] = joint;
        this.borders += 1;
      }
    }
    this.count[at]! += 1;
  }

  private leave(joint: number, piece: number): void {
    const at = joint * this.task.pieces + piece;
    this.count[at]! -= 1;
    if (this.count[at]! > 0) return;
    this.meets[joint]! -= 1;
    if (this.meets[joint]! > 0) this.cost -= 1;
    if (this.meets[joint]! === 1) {
      this.borders -= 1;
      const last = this.border[this.borders]!;
      const hole = this.place[joint]!;
      this.border[hole] = last;
      this.place[last] = hole;
      this.place[joint] = -1;
    }
  }

  move(strut: number, to: number): void {
    const { net } = this;
    const from = this.pieceOf[strut]!;
    this.pieceOf[strut] = to;
    this.weight[from]! -= net.weight[strut]!;
    this.weight[to]! += net.weight[strut]!;
    this.leave(net.a[strut]!, from);
    this.enter(net.a[strut]!, to);
    this.leave(net.b[strut]!, from);
    this.enter(net.b[strut]!, to);
  }

  /** What a move adds to the field joints. */
  change(strut: number, to: number): number {
    const { count, net } = this;
    const { pieces } = this.task;
    const from = this.pieceOf[strut]!;
    const a = net.a[strut]! * pieces;
    const b = net.b[strut]! * pieces;
    return (
      (count[a + to] === 0 ? 1 : 0) -
      (count[a + from] === 1 ? 1 : 0) +
      (count[b + to] === 0 ? 1 : 0) -
      (count[b + from] === 1 ? 1 : 0)
    );
  }

  /** Whether a piece stays in one bit without one of its struts; it must keep at least one. */
  holdsWithout(strut: number): boolean {
    const { net, pieceOf } = this;
    const piece = pieceOf[strut]!;
    const { pieces } = this.task;
    const from = net.a[strut]!;
    const to = net.b[strut]!;
    const alone = this.count[from * pieces + piece] === 1;
    const aloneThere = this.count[to * pieces + piece] === 1;
    if (alone && aloneThere) return false;
    if (alone || aloneThere) return true;
    // From one end to the other through the piece, without the strut.
    this.stamp += 1;
    const { stamp, mark, queue } = this;
    mark[from] = stamp;
    queue[0] = from;
    let end = 1;
    for (let read = 0; read < end; read += 1) {
      const joint = queue[read]!;
      for (let k = net.start[joint]!; k < net.start[joint + 1]!; k += 1) {
        const other = net.at[k]!;
        if (other === strut || pieceOf[other] !== piece) continue;
        const next = net.a[other] === joint ? net.b[other]! : net.a[other]!;
        if (next === to) return true;
        if (mark[next] === stamp) continue;
        mark[next] = stamp;
        queue[end] = next;
        end += 1;
      }
    }
    return false;
  }

  /** How far weights lie outside the limits, in mean struts. */
  excess(): number {
    const unit = this.net.total / this.net.struts;
    let sum = 0;
    for (const weight of this.weight) sum += this.outside(weight) / unit;
    return sum;
  }

  private outside(weight: number): number {
    const { least, most } = this.task;
    return weight > most ? weight - most : weight < least ? least - weight : 0;
  }

  /**
   * Cool from the present pieces: struts at joints where pieces meet go over to another piece that is there.
   * @param best copies the pieces whenever they are within the limits and no assignment so far has fewer field joints
   * @returns false when it was told to stop
   */
  cool({ from, to, tries }: Cooling, best: (cost: number) => void): boolean {
    const { net, task, border, pieceOf, weight } = this;
    const { random, fixed } = task;
    const unit = net.total / net.struts;
    const fall = Math.pow(to / from, ASK_EVERY / tries);
    let heat = from;
    let known = Infinity;
    for (let turn = 0; turn < tries; turn += 1) {
      if (turn % ASK_EVERY === 0) {
        heat = turn === 0 ? from : heat * fall;
        if (!task.goOn(turn / tries)) return false;
      }
      if (this.borders === 0) return true;
      const joint = border[(random() * this.borders) | 0]!;
      const first = net.start[joint]!;
      const degree = net.start[joint + 1]! - first;
      const strut = net.at[first + ((random() * degree) | 0)]!;
      const target = pieceOf[net.at[first + ((random() * degree) | 0)]!]!;
      const source = pieceOf[strut]!;
      if (source === target || fixed?.[strut]) continue;
      const mass = net.weight[strut]!;
      const [out, into] = [weight[source]!, weight[target]!];
      const shift =
        this.outside(out - mass) - this.outside(out) + this.outside(into + mass) - this.outside(into);
      const rise = this.change(strut, target) + (OVERWEIGHT * shift) / unit;
      if (rise > 0 && random() >= Math.exp(-rise / heat)) continue;
      if (!this.holdsWithout(strut)) continue;
      this.move(strut, target);
      if (this.cost < known && this.excess() === 0) {
        known = this.cost;
        best(known);
      }
    }
    return true;
  }
}
