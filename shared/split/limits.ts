import type { Joint, Strut } from '../frames/frame';
import { partition, type Control } from './partition';

/** What a piece must not exceed; a limit that is null does not count. */
export interface SplitLimits {
  mostStruts: number | null;
  /** Crew-minutes, by the minutes per cut and per joint. */
  mostMinutes: number | null;
  minutesPerCut: number;
  minutesPerJoint: number;
  /** What it must fit on or through, mm; the piece may be turned by quarter turns. */
  box: { x: number; y: number; z: number } | null;
  mostKg: number | null;
}

export interface SplitInput {
  /** mm. */
  joints: readonly Joint[];
  struts: readonly Strut[];
  /** Mass of each strut, kg. */
  massKg: readonly number[];
  limits: SplitLimits;
  /** How many pieces in all; null for as few as the limits allow. */
  pieces: number | null;
  /** Pieces that stay as they are, each a list of struts. */
  kept: readonly (readonly number[])[];
  seed: number;
  /** Wall clock for the whole, ms. */
  milliseconds: number;
}

/** How a piece stands against the limits. */
export interface PieceAgainstLimits {
  struts: number;
  minutes: number;
  massKg: number;
  /** Longest, middle and shortest side of the box that holds it, mm. */
  sizeMm: [number, number, number];
  /** Limits that it breaks, in words. */
  breaks: string[];
}

export interface SplitByLimits {
  /** Per strut its piece; kept pieces come first, in their order. */
  pieceOf: Int32Array;
  pieces: number;
  figures: PieceAgainstLimits[];
  /** Field joints that the two simple ways would have needed on the shapes that were split; null where nothing was. */
  baseline: { randomGrowth: number; coordinateBisection: number } | null;
  /** Farthest that a piece of a split shape lies from the mean of its shape, per cent; null where nothing was split. */
  imbalancePct: number | null;
  /** What could not be met, in words. */
  notes: string[];
}

/** Why a split is impossible, for people. */
export class SplitRefusal extends Error {}

/** Rounds of asking for more pieces until all fit. */
const MOST_ROUNDS = 12;

/**
 * Figures of one piece.
 * @param input joints (mm), struts, masses and limits
 * @param struts indexes of its struts
 */
export function againstLimits(
  { joints, struts: all, massKg, limits }: Pick<SplitInput, 'joints' | 'struts' | 'massKg' | 'limits'>,
  struts: readonly number[],
): PieceAgainstLimits {
  const own = new Set(struts.flatMap((strut) => all[strut]!));
  const low = { x: Infinity, y: Infinity, z: Infinity };
  const high = { x: -Infinity, y: -Infinity, z: -Infinity };
  for (const joint of own) {
    const place = joints[joint]!;
    for (const axis of ['x', 'y', 'z'] as const) {
      low[axis] = Math.min(low[axis], place[axis]);
      high[axis] = Math.max(high[axis], place[axis]);
    }
  }
  const sides = (['x', 'y', 'z'] as const).map((axis) => Math.max(0, high[axis] - low[axis]));
  const [a = 0, b = 0, c = 0] = sides.sort((p, q) => q - p);
  const figures: PieceAgainstLimits = {
    struts: struts.length,
    minutes: limits.minutesPerCut * struts.length + limits.minutesPerJoint * own.size,
    massKg: struts.reduce((sum, strut) => sum + massKg[strut]!, 0),
    sizeMm: [a, b, c],
    breaks: [],
  };
  figures.breaks = broken(figures, limits);
  return figures;
}

const ROUNDING = 1e-6;

function broken(figures: PieceAgainstLimits, limits: SplitLimits): string[] {
  const breaks: string[] = [];
  if (limits.mostStruts !== null && figures.struts > limits.mostStruts)
    breaks.push(`${figures.struts} struts of at most ${limits.mostStruts}`);
  if (limits.mostMinutes !== null && figures.minutes > limits.mostMinutes + ROUNDING)
    breaks.push(`${Math.round(figures.minutes)} minutes of at most ${Math.round(limits.mostMinutes)}`);
  if (limits.mostKg !== null && figures.massKg > limits.mostKg + ROUNDING)
    breaks.push(`${figures.massKg.toFixed(1)} kg of at most ${limits.mostKg} kg`);
  if (limits.box && !fits(figures.sizeMm, limits.box))
    breaks.push(`${figures.sizeMm.map(Math.round).join(' by ')} mm does not fit the box`);
  return breaks;
}

function fits(size: readonly number[], box: { x: number; y: number; z: number }): boolean {
  const room = [box.x, box.y, box.z].sort((p, q) => q - p);
  return size.every((side, at) => side <= room[at]! + ROUNDING);
}

/**
 * Splits a drawing into pieces within limits: a separate shape is one piece unless it breaks a limit; what breaks one is cut into connected
 * pieces of about equal minutes with few field joints.
 * @param input the drawing, the limits, and how many pieces are wanted in all
 * @param control how far it is, and whether to stop: then it returns what it has
 * @returns each strut in exactly one piece, every piece connected; pieces that break a limit all the same are named in `notes`
 * @throws SplitRefusal in words when no split can do: a strut that breaks a limit by itself, more pieces than struts
 * Source: own; the cut itself by `partition`.
 */
export function splitByLimits(input: SplitInput, control: Control = {}): SplitByLimits {
  return new Splitting(input, control).run();
}

interface Shape {
  struts: number[];
  weight: number;
  /** Pieces it is cut into. */
  count: number;
  result: {
    lists: number[][];
    baseline: { randomGrowth: number; coordinateBisection: number } | null;
    imbalancePct: number;
  };
}

class Splitting {
  private readonly weights: number[];
  private readonly end: number;
  private readonly keptSet: Set<number>;
  private stopped = false;

  constructor(
    private readonly input: SplitInput,
    private readonly control: Control,
  ) {
    const { joints, struts, limits } = input;
    const degree = new Int32Array(joints.length);
    for (const [a, b] of struts) {
      degree[a]! += 1;
      degree[b]! += 1;
    }
    // A joint's minutes are shared by the struts that meet there, so that the weights of a piece add up to about its minutes.
    const minutes = struts.map(
      ([a, b]) => limits.minutesPerCut + limits.minutesPerJoint * (1 / degree[a]! + 1 / degree[b]!),
    );
    this.weights = minutes.every((value) => value > 0) ? minutes : struts.map(() => 1);
    this.end = performance.now() + input.milliseconds;
    this.keptSet = new Set(input.kept.flat());
  }

  run(): SplitByLimits {
    const { struts, pieces, kept } = this.input;
    this.refuse();
    const shapes = this.shapes();
    const wanted = pieces === null ? null : pieces - kept.length;
    if (wanted !== null && wanted > struts.length - this.keptSet.size) {
      throw new SplitRefusal(
        `${struts.length - this.keptSet.size} struts cannot make ${wanted} pieces. Ask for fewer pieces.`,
      );
    }
    for (const shape of shapes) shape.count = Math.max(1, this.leastPieces(shape.struts));
    const notes: string[] = [];
    if (wanted !== null) this.share(shapes, wanted, notes);
    shapes.forEach((shape, at) => this.cut(shape, wanted === null, at, shapes.length));
    return this.outcome(shapes, notes);
  }

  /** Limits that a single strut breaks can never be met. */
  private refuse(): void {
    const { struts } = this.input;
    if (struts.length === 0) throw new SplitRefusal('The drawing has no struts. Draw something first.');
    for (let strut = 0; strut < struts.length; strut += 1) {
      if (this.keptSet.has(strut)) continue;
      const { breaks } = againstLimits(this.input, [strut]);
      if (breaks.length > 0) {
        const [a, b] = struts[strut]!;
        throw new SplitRefusal(
          `Strut ${strut + 1}, from joint ${a + 1} to joint ${b + 1}, breaks a limit by itself: ${breaks.join(', ')}. Widen the limit or shorten the strut.`,
        );
      }
    }
  }

  /** Connected bits of what is not kept. */
  private shapes(): Shape[] {
    const { joints, struts } = this.input;
    const root = Int32Array.from(joints, (_, joint) => joint);
    const find = (joint: number): number => {
      let at = joint;
      while (root[at] !== at) {
        root[at] = root[root[at]!]!;
        at = root[at]!;
      }
      return at;
    };
    struts.forEach(([a, b], strut) => {
      if (!this.keptSet.has(strut)) root[find(a)] = find(b);
    });
    const lists = new Map<number, number[]>();
    struts.forEach(([a], strut) => {
      if (this.keptSet.has(strut)) return;
      const key = find(a);
      const list = lists.get(key);
      if (list) list.push(strut);
      else lists.set(key, [strut]);
    });
    return [...lists.values()].map((list) => ({
      struts: list,
      weight: list.reduce((sum, strut) => sum + this.weights[strut]!, 0),
      count: 1,
      result: { lists: [list], baseline: null, imbalancePct: 0 },
    }));
  }

  /** Pieces that the sums alone ask for. */
  private leastPieces(struts: readonly number[]): number {
    const { limits } = this.input;
    const figures = againstLimits(this.input, struts);
    if (figures.breaks.length === 0) return 1;
    return Math.max(
      2,
      limits.mostStruts === null ? 1 : Math.ceil(figures.struts / limits.mostStruts),
      limits.mostMinutes === null ? 1 : Math.ceil(figures.minutes / limits.mostMinutes - ROUNDING),
      limits.mostKg === null ? 1 : Math.ceil(figures.massKg / limits.mostKg - ROUNDING),
    );
  }

  /** Give the wanted pieces to the shapes: each at least what its limits need, the rest to whichever has most in a piece. */
  private share(shapes: Shape[], wanted: number, notes: string[]): void {
    const needed = shapes.reduce((sum, shape) => sum + shape.count, 0);
    if (needed > wanted) {
      notes.push(
        `${wanted} pieces were asked for, and the ${shapes.length === 1 ? 'shape needs' : `${shapes.length} separate shapes need`} at least ${needed}.`,
      );
      return;
    }
    for (let left = wanted - needed; left > 0; left -= 1) {
      const open = shapes.filter((shape) => shape.count < shape.struts.length);
      const [first, ...rest] = open;
      if (!first) return;
      const most = rest.reduce(
        (best, shape) => (shape.weight / shape.count > best.weight / best.count ? shape : best),
        first,
      );
      most.count += 1;
    }
  }

  private cut(shape: Shape, mayGrow: boolean, at: number, of: number): void {
    const { limits, seed } = this.input;
    if (shape.count === 1) return;
    const index = new Map<number, number>();
    const joints: Joint[] = [];
    const local = (joint: number): number => {
      let known = index.get(joint);
      if (known === undefined) {
        known = joints.length;
        index.set(joint, known);
        joints.push(this.input.joints[joint]!);
      }
      return known;
    };
    const struts = shape.struts.map((strut): Strut => {
      const [a, b] = this.input.struts[strut]!;
      return [local(a), local(b)];
    });
    const weights = shape.struts.map((strut) => this.weights[strut]!);
    for (let round = 0; round < MOST_ROUNDS; round += 1) {
      const left = this.end - performance.now();
      const found = partition(
        {
          joints,
          struts,
          weights,
          pieces: shape.count,
          most: limits.mostMinutes ?? undefined,
          seed: seed + round,
          milliseconds: Math.max(50, left),
        },
        {
          shouldStop: () => this.askStop(),
          progress: (share) => this.control.progress?.((at + share) / of),
        },
      );
      const lists: number[][] = Array.from({ length: shape.count }, () => []);
      found.pieceOf.forEach((piece, strut) => lists[piece]!.push(shape.struts[strut]!));
      shape.result = { lists, baseline: found.baseline, imbalancePct: found.imbalancePct };
      const over = lists.filter((list) => againstLimits(this.input, list).breaks.length > 0).length;
      const most = shape.struts.length;
      if (over === 0 || !mayGrow || this.stopped || shape.count >= most || performance.now() > this.end)
        return;
      // Not as many more as break a limit: one cut often mends two neighbours.
      shape.count = Math.min(most, shape.count + Math.max(1, Math.floor(over / 2)));
    }
  }

  private askStop(): boolean {
    if (!this.stopped && this.control.shouldStop?.()) this.stopped = true;
    return this.stopped;
  }

  private outcome(shapes: readonly Shape[], notes: string[]): SplitByLimits {
    const { struts, kept } = this.input;
    const lists = [...kept.map((list) => [...list]), ...shapes.flatMap((shape) => shape.result.lists)].filter(
      (list) => list.length > 0,
    );
    const pieceOf = new Int32Array(struts.length);
    lists.forEach((list, piece) => {
      for (const strut of list) pieceOf[strut] = piece;
    });
    const figures = lists.map((list) => againstLimits(this.input, list));
    const over = figures.filter((one) => one.breaks.length > 0).length;
    if (over > 0) {
      notes.push(
        `${over} ${over === 1 ? 'piece breaks' : 'pieces break'} a limit. Ask for more pieces, or for as few as the limits allow.`,
      );
    }
    const cut = shapes.filter((shape) => shape.result.baseline !== null);
    const sum = (of: 'randomGrowth' | 'coordinateBisection') =>
      cut.reduce((all, shape) => all + (shape.result.baseline?.[of] ?? 0), 0);
    return {
      pieceOf,
      pieces: lists.length,
      figures,
      baseline:
        cut.length === 0
          ? null
          : { randomGrowth: sum('randomGrowth'), coordinateBisection: sum('coordinateBisection') },
      imbalancePct: cut.length === 0 ? null : Math.max(...cut.map((shape) => shape.result.imbalancePct)),
      notes,
    };
  }
}
