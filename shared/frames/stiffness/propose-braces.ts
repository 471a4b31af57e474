import { ok, refuse } from '../../kernel/result';
import type { Result } from '../../kernel/result';
import { edgeKey } from '../edge-key';
import type { Frame } from '../frame';
import { distance } from '../vector';
import { analyseStiffness, countStiffness } from './analyse-stiffness';
import type { Stiffness, StiffnessRefusal } from './analyse-stiffness';
import { hasRoom } from './clearance';
import { settle } from './flatness';

/** A brace that holds less of a way of moving than this is no help: it would pull at a hair. */
const LEAST_HELP = 1e-4;

export type BraceOptions = {
  /** Longest brace at hand, mm; left out: any. */
  longestMm?: number;
  /**
   * Least distance of a brace from a joint that it does not end at, and from a strut, between centre lines, mm; 0 lets it cross. Common
   * practice, no source: twice the diameter of the sticks.
   */
  clearanceMm?: number;
};

export type ProposedBrace = { joints: [number, number]; lengthMm: number };

/** Why a frame stays loose: every further strut between its joints is of no use, or the limits leave out those that are. */
export type BraceShortfall = {
  code: 'BRACES_ALL_IN_ONE_PLANE' | 'BRACES_ALL_IN_ONE_LINE' | 'BRACES_BEYOND_LIMITS';
  message: string;
};

export type BraceProposal = {
  mechanisms: number;
  /** Shortest first. */
  braces: ProposedBrace[];
  totalMm: number;
  /** Ways of moving that stay with the braces in. */
  left: number;
  /** Null when nothing stays. */
  shortfall: BraceShortfall | null;
};

export type BraceRefusal = StiffnessRefusal | { code: 'BRACES_TOO_MANY'; message: string };

type Pair = { a: number; b: number; lengthMm: number };

/** All pairs of joints without a strut that a brace may join, the shortest first. */
function openPairs({ joints, struts }: Frame, longestMm: number): Pair[] {
  const closed = new Set(struts.map(([a, b]) => edgeKey(a, b)));
  const pairs: Pair[] = [];
  for (let a = 0; a < joints.length; a++)
    for (let b = a + 1; b < joints.length; b++) {
      const lengthMm = distance(joints[a]!, joints[b]!);
      if (lengthMm > 0 && lengthMm <= longestMm && !closed.has(edgeKey(a, b))) pairs.push({ a, b, lengthMm });
    }
  return pairs.sort((p, q) => p.lengthMm - q.lengthMm || p.a - q.a || p.b - q.b);
}

/** Which braces stop something that those before them left loose. */
class Loose {
  /** Ways of moving that are left. */
  ways: number;
  private readonly stride: number;
  /** What the three directions of each joint do in each way of moving, way after way. */
  private readonly movements: Float64Array;

  constructor(
    private readonly joints: Frame['joints'],
    basis: readonly Float64Array[],
  ) {
    this.ways = this.stride = basis.length;
    this.movements = new Float64Array(3 * joints.length * this.stride);
    basis.forEach((movement, way) =>
      movement.forEach((value, at) => (this.movements[at * this.stride + way] = value)),
    );
  }

  /** How far a brace would have to stretch in each way that is left; null when it is too little to hold anything. */
  stretch({ a, b, lengthMm }: Pair): Float64Array | null {
    const { ways, stride, movements } = this;
    const [from, to] = [this.joints[a]!, this.joints[b]!];
    const along = [(from.x - to.x) / lengthMm, (from.y - to.y) / lengthMm, (from.z - to.z) / lengthMm];
    const stretch = new Float64Array(ways);
    for (let axis = 0; axis < 3; axis++) {
      const [p, q, share] = [(3 * a + axis) * stride, (3 * b + axis) * stride, along[axis]!];
      if (share !== 0)
        for (let way = 0; way < ways; way++)
          stretch[way]! += share * (movements[p + way]! - movements[q + way]!);
    }
    let square = 0;
    for (let way = 0; way < ways; way++) square += stretch[way]! ** 2;
    return Math.sqrt(square) > LEAST_HELP ? stretch : null;
  }

  /** Turns the ways so that a brace stretches only in the last of them, and lets that one go. */
  stop(stretch: Float64Array): void {
    const { ways, stride, movements } = this;
    const mirror = stretch.slice();
    const last = ways - 1;
    let square = 0;
    for (let way = 0; way < ways; way++) square += mirror[way]! ** 2;
    mirror[last]! += mirror[last]! > 0 ? Math.sqrt(square) : -Math.sqrt(square);
    square = 0;
    for (let way = 0; way < ways; way++) square += mirror[way]! ** 2;
    for (let row = 0; row < movements.length; row += stride) {
      let share = 0;
      for (let way = 0; way < ways; way++) share += movements[row + way]! * mirror[way]!;
      share *= 2 / square;
      if (share !== 0) for (let way = 0; way < last; way++) movements[row + way]! -= share * mirror[way]!;
    }
    this.ways = last;
  }
}

/** Ways of moving that no strut between joints of one plane or line can stop. */
function outOfReach({ extent, joints }: Stiffness): number {
  if (extent === 'plane') return joints - 3;
  return extent === 'line' ? 2 * joints - 4 : 0;
}

function chooseBraces(
  frame: Frame,
  stiffness: Stiffness,
  basis: readonly Float64Array[],
  { longestMm = Infinity, clearanceMm = 0 }: BraceOptions,
): Pair[] {
  const loose = new Loose(settle(frame.joints).joints, basis);
  const stay = outOfReach(stiffness);
  const chosen: Pair[] = [];
  if (loose.ways <= stay) return chosen;
  for (const pair of openPairs(frame, longestMm)) {
    const stretch = loose.stretch(pair);
    if (!stretch || (clearanceMm > 0 && !hasRoom(frame, [pair.a, pair.b], clearanceMm))) continue;
    loose.stop(stretch);
    chosen.push(pair);
    if (loose.ways <= stay) break;
  }
  return chosen;
}

const mm = (value: number): string => `${Math.ceil(value).toLocaleString('en')} mm`;

function shortfallOf(
  frame: Frame,
  stiffness: Stiffness,
  basis: readonly Float64Array[],
  left: number,
  options: BraceOptions,
): BraceShortfall | null {
  if (left === 0) return null;
  const waysOf = (count: number): string =>
    `${count.toLocaleString('en')} ${count === 1 ? 'way' : 'ways'} of moving`;
  const never = outOfReach(stiffness);
  if (left <= never)
    return stiffness.extent === 'plane'
      ? {
          code: 'BRACES_ALL_IN_ONE_PLANE',
          message: `The frame is flat, and ${waysOf(left)} out of its plane stay: no strut between joints of one plane stops them. Tape it to a board, or join it to a joint off its plane, such as a tip above it.`,
        }
      : {
          code: 'BRACES_ALL_IN_ONE_LINE',
          message: `All joints lie in one line, and ${waysOf(left)} across it stay: no strut along the line stops them. Join them to joints off the line.`,
        };
  const { longestMm, clearanceMm = 0 } = options;
  const reaching = chooseBraces(frame, stiffness, basis, { clearanceMm });
  const longest = Math.max(0, ...reaching.map(({ lengthMm }) => lengthMm));
  const enough = stiffness.mechanisms - reaching.length <= never;
  const why =
    longestMm !== undefined && enough
      ? `Braces of up to ${mm(longestMm)} do not reach; with ${mm(longest)} they would.`
      : `What would help passes nearer than ${mm(clearanceMm)} to a strut or a joint.`;
  return {
    code: 'BRACES_BEYOND_LIMITS',
    message: `${waysOf(left - never)} stay that braces could stop. ${why} Allow longer braces or less room beside them, or tape the piece to a board.`,
  };
}

/**
 * The fewest struts between existing joints that stop all ways of moving, and of those the shortest in sum.
 * @param frame joints in mm
 * @param options limits; see `BraceOptions`
 * @param known the frame's stiffness where it has been computed
 * @returns braces, the shortest first, each of which stops one way more; what stays where joints are all in one plane or line or the limits
 *   leave nothing, and why. Braces are checked against struts and joints, not against each other: taped outside they pass each other.
 *   Refuses what `analyseStiffness` refuses, and frames with too many ways of moving to list.
 * Source: the rows of a rigidity matrix are a linear matroid, and so is what the limits leave of it; greedy by length gives a basis, which is of
 *   the fewest struts, and of least total length, whose longest brace is as short as can be (R. Rado 1957; J. Edmonds, Mathematical
 *   Programming 1 (1971) 127-136).
 */
export function proposeBraces(
  frame: Frame,
  options: BraceOptions = {},
  known?: Stiffness,
): Result<BraceProposal, BraceRefusal> {
  const found = known ? ok(known) : analyseStiffness(frame);
  if (!found.ok) return found;
  const stiffness = found.value;
  const { mechanisms, basis } = stiffness;
  if (!basis)
    return refuse({
      code: 'BRACES_TOO_MANY',
      message: `The frame moves in ${mechanisms.toLocaleString('en')} ways, too many to look for braces at once. Split it and ask for each piece.`,
    });
  const chosen = chooseBraces(frame, stiffness, basis, options);
  const braces = chosen.map(({ a, b, lengthMm }): ProposedBrace => ({ joints: [a, b], lengthMm }));
  const braced = { ...frame, struts: [...frame.struts, ...braces.map(({ joints }) => joints)] };
  const after = braces.length > 0 ? countStiffness(braced) : found;
  if (!after.ok) return after;
  const left = after.value.mechanisms;
  return ok({
    mechanisms,
    braces,
    totalMm: braces.reduce((sum, { lengthMm }) => sum + lengthMm, 0),
    left,
    shortfall: shortfallOf(frame, stiffness, basis, left, options),
  });
}
