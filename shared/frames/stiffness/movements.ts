import { seededRandom } from '../../kernel/random';
import { orthonormal } from './dense';
import { fillMovement, solveSquare } from './elimination';
import type { Elimination } from './elimination';

/** Steps of inverse iteration; it doubles its digits in one or two unless two holds are nearly alike, and then either is the answer. */
const MOST_STEPS = 12;
const CLOSE_ENOUGH = 1e-3;

const length = (vector: Float64Array): number =>
  Math.sqrt(vector.reduce((sum, value) => sum + value * value, 0));

/**
 * Movements that stretch nothing, those as a whole among them.
 * @param elimination of a rigidity matrix
 * @returns an orthonormal basis, the ones of few joints first, three numbers per joint
 */
export function freeMovements(elimination: Elimination): Float64Array[] {
  const { size, free, fronts } = elimination;
  // Columns in the order of the fronts: what is left free in one front moves only one stretch of them.
  const order = Int32Array.from(fronts.flatMap(({ columns, own }) => [...columns.subarray(0, own)]));
  const ends: number[] = [];
  fronts.reduce((sum, { own }) => (ends.push(sum + own), sum + own), 0);
  const starts = fronts.map(({ first }) => (first > 0 ? ends[first - 1]! : 0));
  const reach = (front: number): number => ends[front]! - starts[front]!;
  const near = [...free].sort((a, b) => reach(a.front) - reach(b.front) || a.front - b.front);
  const vectors = near.map(({ column, front }) => {
    const x = new Float64Array(size);
    x[column] = 1;
    fillMovement(elimination, x, front);
    return Float64Array.from(order, (from) => x[from]!);
  });
  const ranges = near.map(({ front }) => [starts[front]!, ends[front]!] as const);
  return orthonormal(vectors, ranges).map((vector) => {
    const x = new Float64Array(size);
    order.forEach((to, at) => (x[to] = vector[at]!));
    return x;
  });
}

/**
 * A random mixture of everything that is free, the whole included.
 * @param elimination of a rigidity matrix
 * @param seed any whole number
 * @returns three numbers per joint; the fastest joint moves 1, or all zero where nothing is free
 */
export function mixture(elimination: Elimination, seed: number): Float64Array {
  const random = seededRandom(seed);
  const x = new Float64Array(elimination.size);
  for (const { column } of elimination.free) x[column] = 2 * random() - 1;
  fillMovement(elimination, x);
  return fastestOne(x);
}

/**
 * The smallest singular value that counts.
 * @param elimination of a rigidity matrix
 * @param free an orthonormal basis of all that is free; null where it is not known
 * @returns with the basis the value, without it a lower bound; Infinity where nothing is held
 * Source: inverse iteration on the sparse triangle; the bound by interlacing, since columns are left out.
 */
export function leastHoldOf(elimination: Elimination, free: readonly Float64Array[] | null): number {
  const { size, rank } = elimination;
  if (rank === 0) return Infinity;
  const random = seededRandom(7);
  const heldPart = (x: Float64Array): number => {
    for (const one of free ?? []) {
      let share = 0;
      for (let i = 0; i < size; i++) share += x[i]! * one[i]!;
      for (let i = 0; i < size; i++) x[i]! -= share * one[i]!;
    }
    if (!free) for (const { column } of elimination.free) x[column] = 0;
    return length(x);
  };
  let x: Float64Array = Float64Array.from({ length: size }, () => 2 * random() - 1);
  let before = heldPart(x);
  let hold = Infinity;
  for (let step = 0; step < MOST_STEPS && before > 0; step++) {
    const start = before;
    x = solveSquare(
      elimination,
      x.map((value) => value / start),
    );
    before = heldPart(x);
    const now = 1 / Math.sqrt(before);
    if (Math.abs(now - hold) < CLOSE_ENOUGH * now) return now;
    hold = now;
  }
  return hold;
}

/**
 * A movement of which the fastest joint moves 1.
 * @param movement three numbers per joint
 * @returns a new one in the same direction; a movement of nothing stays nothing
 */
export function fastestOne(movement: Float64Array): Float64Array {
  let most = 0;
  for (let at = 0; at < movement.length; at += 3)
    most = Math.max(most, Math.hypot(movement[at]!, movement[at + 1]!, movement[at + 2]!));
  return most > 0 ? movement.map((value) => value / most) : movement.slice();
}
