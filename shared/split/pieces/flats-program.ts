import type { LinearProgram, LinearSolver, ProgramColumn, ProgramRow } from '../../kernel/linear-program';
import type { RingChoice } from './flats-search';
import type { Ring } from './ring-plane';

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

/**
 * The best choice of rings by a solver: first as many struts as possible, then as few flats, then the best score, each keeping what was
 * reached before it.
 * @param rings candidates
 * @param scores per ring what decides between choices with as many struts in as many flats
 * @param apart pairs of rings of which at most one may be chosen
 * @param solver the solver
 * @param seconds wall clock for the first question; half as much each for the other two
 * @returns indexes of rings, `proven` when the number of struts is; null when the solver found nothing in its time
 * Source: own; set packing, solved lexicographically.
 */
export function solveFlats(
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
