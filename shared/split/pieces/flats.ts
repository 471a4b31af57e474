import type { Frame } from '../../frames/frame';
import type { LinearProgram, LinearSolver, ProgramColumn, ProgramRow } from '../../kernel/linear-program';
import { isBetter, searchFlats, valueOf } from './flats-search';
import type { RingChoice } from './flats-search';
import { planarRings, RING_LIMITS } from './planar-rings';
import { areLinked, ringPlane } from './ring-plane';
import type { Ring } from './ring-plane';

/** Which rings of a piece are glued flat on the bench before it is raised. */
export type Flats = {
  /** Without a common strut; the largest first, then the lowest. */
  flats: Ring[];
  /** How many struts stand in them, of how many. */
  strutsInFlats: number;
  struts: number;
  /** Whether no other choice among the rings found has more struts in flats; false says that it may be improved. */
  proven: boolean;
  /** Whether all planar rings of the piece were found; false for large flat nets (`RING_LIMITS`). */
  allRings: boolean;
};

export type FlatsOptions = {
  /** Solves it exactly; without one a short search says itself whether it is proven. */
  solver?: LinearSolver;
  /** How far a joint may lie off the plane of its ring, mm. */
  withinMm?: number;
  /** Time for the solver to prove the struts in flats, seconds of wall clock; half as much each for fewest and largest flats. */
  seconds?: number;
};

const SECONDS = 10;
/** Rings that the search without a solver looks at: a few tenths of a second. */
const LOOKS = 60_000;
/** Rings that hang in each other are found one choice at a time; far more rounds than any frame was seen to need. */
const ROUNDS = 40;
/** More than any sum of tilts can reach, so that size decides before tilt. */
const SIZE_BEFORE_TILT = 10_000;
const TILT_STEPS = 100;

/**
 * What decides between choices that have as many struts in as many flats. Larger rings first: an outline carries what is added, two
 * middling ones carry each other. Then rings that lie level in the drawing: the piece is built standing, and such a flat stays where
 * it was glued.
 */
function scoreOf(ring: Ring, frame: Frame): number {
  const { normal } = ringPlane(ring.joints.map((joint) => frame.joints[joint]!));
  const tilt = Math.round(TILT_STEPS * (1 - Math.abs(normal.z)));
  return SIZE_BEFORE_TILT * ring.struts.length ** 2 - tilt;
}

/** Each strut in at most one ring, of rings that hang in each other at most one. */
function program(
  rings: readonly Ring[],
  apart: readonly [number, number][],
  costs: readonly number[],
): LinearProgram {
  const rows: ProgramRow[] = [];
  const entries: [number, number][][] = rings.map(() => []);
  const atMost = (upper: number, members: Iterable<number>): void => {
    for (const ring of members) entries[ring]!.push([rows.length, 1]);
    rows.push({ lower: -Infinity, upper });
  };
  const ringsOf = new Map<number, Set<number>>();
  const ringsAt = new Map<number, Set<number>>();
  const strutsAt = new Map<number, Set<number>>();
  const note = (map: Map<number, Set<number>>, key: number, value: number): void => {
    const list = map.get(key);
    if (list) list.add(value);
    else map.set(key, new Set([value]));
  };
  rings.forEach(({ joints, struts }, ring) => {
    struts.forEach((strut, at) => {
      note(ringsOf, strut, ring);
      for (const joint of [joints[at]!, joints[(at + 1) % joints.length]!]) note(strutsAt, joint, strut);
    });
    for (const joint of joints) note(ringsAt, joint, ring);
  });
  for (const members of ringsOf.values()) atMost(1, members);
  // A ring takes two struts of a joint, so of an odd number one is left: follows from the above only in whole numbers, and saves
  // the solver most of its branching.
  for (const [joint, members] of ringsAt) {
    const struts = strutsAt.get(joint)!.size;
    if (struts % 2 === 1) atMost((struts - 1) / 2, members);
  }
  for (const pair of apart) atMost(1, pair);
  const columns = entries.map((own, ring): ProgramColumn => ({
    cost: costs[ring]!,
    lower: 0,
    upper: 1,
    integer: true,
    entries: own,
  }));
  return { sense: 'maximise', rows, columns };
}

/** The program with one more condition on the sum of a figure over the chosen rings. */
function where(base: LinearProgram, figures: readonly number[], lower: number, upper: number): LinearProgram {
  return {
    ...base,
    rows: [...base.rows, { lower, upper }],
    columns: base.columns.map((column, ring) => ({
      ...column,
      entries: [...column.entries, [base.rows.length, figures[ring]!] as const],
    })),
  };
}

const withCosts = (base: LinearProgram, costs: readonly number[]): LinearProgram => ({
  ...base,
  columns: base.columns.map((column, ring) => ({ ...column, cost: costs[ring]! })),
});

/** First as many struts as possible, then as few flats, then the best score; each keeps what was reached before it. */
function solveInTurn(
  rings: readonly Ring[],
  scores: readonly number[],
  apart: readonly [number, number][],
  solver: LinearSolver,
  seconds: number,
): RingChoice | null {
  const sizes = rings.map(({ struts }) => struts.length);
  const ones = rings.map(() => 1);
  const pick = (values: readonly number[]): number[] =>
    values.flatMap((value, ring) => (value > 0.5 ? [ring] : []));
  const sum = (chosen: readonly number[], of: readonly number[]): number =>
    chosen.reduce((total, ring) => total + of[ring]!, 0);

  const base = program(rings, apart, sizes);
  const first = solver.solve(base, { seconds });
  if (first.values.length === 0) return null;
  let chosen = pick(first.values);
  const proven = first.status === 'optimal';
  const kept = where(base, sizes, sum(chosen, sizes), Infinity);
  const second = solver.solve(
    withCosts(
      kept,
      ones.map((one) => -one),
    ),
    { seconds: seconds / 2 },
  );
  if (second.values.length > 0) chosen = pick(second.values);
  const third = solver.solve(withCosts(where(kept, ones, -Infinity, chosen.length), scores), {
    seconds: seconds / 2,
  });
  if (third.values.length > 0) chosen = pick(third.values);
  return { chosen, proven };
}

/** The first two chosen rings that hang in each other. */
function linkedPair(
  chosen: readonly number[],
  linked: (a: number, b: number) => boolean,
): [number, number] | undefined {
  for (const [at, a] of chosen.entries())
    for (const b of chosen.slice(at + 1)) if (linked(a, b)) return [a, b];
  return undefined;
}

function solved(
  rings: readonly Ring[],
  scores: readonly number[],
  linked: (a: number, b: number) => boolean,
  solver: LinearSolver,
  seconds: number,
): RingChoice | null {
  const apart: [number, number][] = [];
  for (let round = 0; round < ROUNDS; round++) {
    const choice = solveInTurn(rings, scores, apart, solver, seconds);
    if (!choice) return null;
    const pair = linkedPair(choice.chosen, linked);
    if (!pair) return choice;
    apart.push(pair);
  }
  return null;
}

/**
 * The flats of a piece: planar rings without a common strut that hold as many struts as possible.
 * @param frame a valid frame, mm
 * @param options the solver (a port; the server brings it), the tolerance, the time
 * @returns a choice with as many struts in flats as possible; among those the fewest flats, because each costs a laying out, a wait
 *   and a lift; then the largest rings, then those level in the drawing. Rings that hang in each other like links of a chain are
 *   never both chosen: closed ones could not be put together.
 * Source: own; set packing as an integer program. Rings take an even number of struts at each joint (O. Veblen, Annals of Mathematics 14
 *   (1912) 86-94), so at least half as many struts as there are joints with an odd number stay out of flats.
 */
export function chooseFlats(frame: Frame, options: FlatsOptions = {}): Flats {
  const { rings, complete } = planarRings(frame, options.withinMm ?? RING_LIMITS.withinMm);
  const scores = rings.map((ring) => scoreOf(ring, frame));
  const known = new Map<number, boolean>();
  const linked = (a: number, b: number): boolean => {
    const key = Math.min(a, b) * rings.length + Math.max(a, b);
    let found = known.get(key);
    if (found === undefined) {
      found = areLinked(rings[a]!, rings[b]!, frame.joints);
      known.set(key, found);
    }
    return found;
  };
  const { solver, seconds = SECONDS } = options;
  const exact = solver && rings.length > 0 ? solved(rings, scores, linked, solver, seconds) : null;
  const own = exact?.proven ? null : searchFlats(rings, scores, linked, LOOKS);
  const better = (a: RingChoice, b: RingChoice): RingChoice =>
    isBetter(valueOf(rings, scores, b.chosen), valueOf(rings, scores, a.chosen)) ? b : a;
  const choice = exact && own ? better(exact, own) : (exact ?? own ?? { chosen: [], proven: true });
  const height = (ring: Ring): number =>
    ring.joints.reduce((sum, joint) => sum + frame.joints[joint]!.z, 0) / ring.joints.length;
  const flats = choice.chosen
    .map((ring) => rings[ring]!)
    .sort(
      (a, b) =>
        b.struts.length - a.struts.length ||
        height(a) - height(b) ||
        Math.min(...a.struts) - Math.min(...b.struts),
    );
  return {
    flats,
    strutsInFlats: flats.reduce((sum, { struts }) => sum + struts.length, 0),
    struts: frame.struts.length,
    proven: choice.proven,
    allRings: complete,
  };
}
