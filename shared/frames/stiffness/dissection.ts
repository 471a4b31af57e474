import type { Joint } from '../frame';
import type { RigidityMatrix } from './rigidity-matrix';

/** Joints that are worked off together, after those of its children and before those of its border. */
export type Front = {
  own: number[];
  /** Joints of later fronts that struts of this one, or of its children, lead to; rising. */
  border: number[];
  /** Struts that are read here, rising. */
  struts: number[];
  children: number[];
  /** First front of its tree of children; they and it stand in one stretch of the list. */
  first: number;
};

/** Fewer joints than this are worked off at once. */
const LEAF = 14;
/** Where a set of joints may be cut, as a share of its joints. */
const CUTS = [0.5, 0.44, 0.56, 0.38, 0.62, 0.32, 0.68];
/** A cut that takes more than this share of the joints away parts nothing. */
const MOST_CUT = 0.5;

type Cut = { between: number[]; low: number[]; high: number[] };

/** The best of some straight cuts through a set of joints: few joints between two halves that no strut links. */
function bestCut(set: readonly number[], joints: readonly Joint[], near: readonly number[][]): Cut | null {
  let best: { cost: number; order: number[]; at: number; fromLow: boolean } | null = null;
  const inSet = new Set(set);
  for (const axis of ['x', 'y', 'z'] as const) {
    const order = [...set].sort((a, b) => joints[a]![axis] - joints[b]![axis] || a - b);
    const place = new Map(order.map((joint, at) => [joint, at]));
    for (const share of CUTS) {
      const at = Math.round(share * order.length);
      const touches = (joint: number, low: boolean): boolean =>
        near[joint]!.some(
          (other) => inSet.has(other) && (low ? place.get(other)! >= at : place.get(other)! < at),
        );
      const counts = [0, 0];
      order.forEach((joint, k) => {
        const low = k < at;
        if (touches(joint, low)) counts[low ? 0 : 1]!++;
      });
      const fromLow = counts[0]! <= counts[1]!;
      const between = Math.min(counts[0]!, counts[1]!);
      // Work grows with the cube of what is cut out, and an uneven cut leaves more of it for later.
      const cost = between * (1 + Math.abs(share - 0.5));
      if (!best || cost < best.cost) best = { cost, order, at, fromLow };
    }
  }
  if (!best) return null;
  const { order, at, fromLow } = best;
  const [lower, upper] = [order.slice(0, at), order.slice(at)];
  const across = new Set(fromLow ? upper : lower);
  const linked = (joint: number): boolean => near[joint]!.some((other) => across.has(other));
  const between = (fromLow ? lower : upper).filter(linked);
  if (between.length > MOST_CUT * set.length) return null;
  const cut = new Set(between);
  const rest = (side: number[]): number[] => side.filter((joint) => !cut.has(joint));
  return { between, low: rest(lower), high: rest(upper) };
}

/**
 * An order in which the joints of a frame are worked off so that little fills up: fronts, children before parents.
 * @param joints mm
 * @param matrix the rigidity matrix of the same joints
 * @returns every joint in exactly one front, every strut in exactly one, in post-order
 * Source: nested dissection, A. George 1973, with straight cuts through the coordinates; fronts after Duff & Reid 1983.
 */
export function dissection(joints: readonly Joint[], { struts, ends }: RigidityMatrix): Front[] {
  const near: number[][] = joints.map(() => []);
  for (let s = 0; s < struts; s++) {
    near[ends[2 * s]!]!.push(ends[2 * s + 1]!);
    near[ends[2 * s + 1]!]!.push(ends[2 * s]!);
  }
  const fronts: Front[] = [];
  const visit = (set: readonly number[]): number => {
    const first = fronts.length;
    const cut = set.length > LEAF ? bestCut(set, joints, near) : null;
    const children = cut ? [cut.low, cut.high].filter((half) => half.length > 0).map(visit) : [];
    fronts.push({ own: cut ? cut.between : [...set], border: [], struts: [], children, first });
    return fronts.length - 1;
  };
  visit(joints.map((_, joint) => joint));
  const frontOf = new Int32Array(joints.length);
  fronts.forEach(({ own }, front) => own.forEach((joint) => (frontOf[joint] = front)));
  for (let s = 0; s < struts; s++)
    fronts[Math.min(frontOf[ends[2 * s]!]!, frontOf[ends[2 * s + 1]!]!)]!.struts.push(s);
  fronts.forEach((front, at) => {
    const border = new Set(front.children.flatMap((child) => fronts[child]!.border));
    for (const joint of front.own) for (const other of near[joint]!) border.add(other);
    front.border = [...border].filter((joint) => frontOf[joint]! > at).sort((a, b) => a - b);
  });
  return fronts;
}

/**
 * About how many operations and numbers the fronts ask for.
 * @param fronts as `dissection` gives them
 * @returns operations of the elimination, and the largest count of numbers held at once by one front
 */
export function workOf(fronts: readonly Front[]): { operations: number; largestFront: number } {
  let operations = 0;
  let largestFront = 0;
  const left: number[] = [];
  for (const { own, border, struts, children } of fronts) {
    const rows = struts.length + children.reduce((sum, child) => sum + left[child]!, 0);
    const [inside, outside] = [3 * own.length, 3 * border.length];
    const steps = Math.min(rows, inside);
    operations += 4 * steps * rows * (inside + outside) + 4 * rows * outside * Math.min(rows, outside);
    largestFront = Math.max(largestFront, rows * (inside + outside));
    left.push(Math.min(rows, outside));
  }
  return { operations, largestFront };
}
