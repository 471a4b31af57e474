import { openHighs } from '../../../server/jobs/highs-solver';
import type { Strut } from '../../../shared/frames';
import type { LinearSolver, ProgramColumn, ProgramRow } from '../../../shared/kernel/linear-program';
import { seededRandom } from '../../../shared/kernel/random';
import { BALANCE, bitsOf, netOf, partition } from '../../../shared/split';
import { randomFrame } from '../../support/structures';

/** Outcome of the comparison with the exact minimum. */
export interface Comparison {
  cases: number;
  /** Cases in which no balanced and connected split exists. */
  impossible: number;
  equal: number;
  oneMore: number;
  worse: number;
  /** Cases the program did not solve in its time: they count for nobody. */
  unsolved: number;
}

const SOLVE_SECONDS = 20;

/**
 * Compare with the exact minimum on seeded random frames of up to 40 struts in 2 or 3 pieces.
 * @param cases how many
 */
export async function compareWithExact(cases: number): Promise<Comparison> {
  const solver = await openHighs();
  const outcome: Comparison = { cases, impossible: 0, equal: 0, oneMore: 0, worse: 0, unsolved: 0 };
  for (let seed = 1; seed <= cases; seed += 1) {
    const random = seededRandom(seed * 101);
    const struts = 16 + Math.floor(random() * 25);
    const joints = Math.max(8, Math.round(struts * (0.45 + 0.3 * random())));
    const frame = randomFrame(joints, struts, seed);
    const pieces = 2 + (seed % 2);
    const exact = exactMinimum(solver, frame.joints.length, frame.struts, pieces);
    if (exact === 'unsolved') {
      outcome.unsolved += 1;
      continue;
    }
    const ours = partition({
      joints: frame.joints,
      struts: frame.struts,
      weights: frame.struts.map(() => 1),
      pieces,
      seed,
    });
    if (exact === 'impossible') {
      outcome.impossible += 1;
      if (ours.balanced && ours.disconnected === 0)
        throw new Error(`Seed ${seed}: the program says it cannot be done.`);
      continue;
    }
    const more = ours.balanced && ours.disconnected === 0 ? ours.fieldJoints - exact : Infinity;
    if (more < 0)
      throw new Error(`Seed ${seed}: ${ours.fieldJoints} field joints, below the minimum ${exact}.`);
    if (more === 0) outcome.equal += 1;
    else if (more === 1) outcome.oneMore += 1;
    else outcome.worse += 1;
  }
  return outcome;
}

/**
 * Least field joints of a balanced split into connected pieces, by a mixed-integer program: x = strut in piece, y = piece at joint;
 * the sum of y less the joints is minimal. Pieces that fall apart are cut off as they turn up and the program is solved again: a
 * set of struts that is no whole piece needs a neighbour of it in the same piece.
 */
export function exactMinimum(
  solver: LinearSolver,
  joints: number,
  struts: readonly Strut[],
  pieces: number,
): number | 'impossible' | 'unsolved' {
  const mean = struts.length / pieces;
  const least = Math.ceil(mean * (1 - BALANCE) - 1e-9);
  const most = Math.floor(mean * (1 + BALANCE) + 1e-9);
  const net = netOf(
    Array.from({ length: joints }, () => ({ x: 0, y: 0, z: 0 })),
    struts,
    struts.map(() => 1),
  );
  const used = new Set(struts.flat()).size;
  const cuts: { inside: number[]; around: number[]; piece: number }[] = [];
  for (;;) {
    const answer = solver.solve(program(joints, struts, pieces, least, most, cuts), {
      seconds: SOLVE_SECONDS,
    });
    if (answer.status === 'infeasible') return 'impossible';
    if (answer.status !== 'optimal') return 'unsolved';
    const pieceOf = Int32Array.from(struts, (_, strut) =>
      Array.from({ length: pieces }, (__, piece) => answer.values[strut * pieces + piece] ?? 0).findIndex(
        (value) => value > 0.5,
      ),
    );
    const bits = bitsOf(net, pieceOf);
    if (bits.length === pieces) return Math.round(answer.objective) - used;
    for (const bit of bits) {
      // A bit that is large enough is a piece by itself in some other split: that one must not be cut off.
      if (bit.struts.length >= least) continue;
      const inside = new Set(bit.struts);
      const around = new Set<number>();
      for (const strut of bit.struts) {
        for (const joint of struts[strut] as Strut) {
          for (let k = net.start[joint] ?? 0; k < (net.start[joint + 1] ?? 0); k += 1) {
            const other = net.at[k] as number;
            if (!inside.has(other)) around.add(other);
          }
        }
      }
      for (let piece = 0; piece < pieces; piece += 1)
        cuts.push({ inside: bit.struts, around: [...around], piece });
    }
  }
}

function program(
  joints: number,
  struts: readonly Strut[],
  pieces: number,
  least: number,
  most: number,
  cuts: readonly { inside: number[]; around: number[]; piece: number }[],
) {
  const rows: ProgramRow[] = [];
  const columns: (Omit<ProgramColumn, 'entries'> & { entries: [number, number][] })[] = [];
  const x = (strut: number, piece: number) => columns[strut * pieces + piece] as (typeof columns)[number];
  const y = (joint: number, piece: number) =>
    columns[struts.length * pieces + joint * pieces + piece] as (typeof columns)[number];
  const binary = (cost: number) => ({
    cost,
    lower: 0,
    upper: 1,
    integer: true,
    entries: [] as [number, number][],
  });
  for (let k = 0; k < struts.length * pieces; k += 1) columns.push(binary(0));
  for (let k = 0; k < joints * pieces; k += 1) columns.push(binary(1));
  const row = (lower: number, upper: number) => rows.push({ lower, upper }) - 1;
  struts.forEach((_, strut) => {
    const at = row(1, 1);
    for (let piece = 0; piece < pieces; piece += 1) x(strut, piece).entries.push([at, 1]);
  });
  for (let piece = 0; piece < pieces; piece += 1) {
    const at = row(least, most);
    struts.forEach((_, strut) => x(strut, piece).entries.push([at, 1]));
  }
  struts.forEach((ends, strut) => {
    for (let piece = 0; piece < pieces; piece += 1) {
      for (const joint of ends) {
        const at = row(0, Infinity);
        y(joint, piece).entries.push([at, 1]);
        x(strut, piece).entries.push([at, -1]);
      }
    }
  });
  // The first strut is in the first piece: without it every answer stands there once for each order of the pieces.
  const first = columns[0];
  if (first) first.lower = 1;
  for (const { inside, around, piece } of cuts) {
    // All of the set in a piece and nothing around it: then the piece is the set, which is too small.
    const at = row(-Infinity, inside.length - 1);
    for (const strut of inside) x(strut, piece).entries.push([at, 1]);
    for (const strut of around) x(strut, piece).entries.push([at, -1]);
  }
  return { sense: 'minimise' as const, rows, columns };
}
