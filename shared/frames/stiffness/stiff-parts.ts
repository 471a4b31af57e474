import { edgeKey } from '../edge-key';
import type { Joint, Strut } from '../frame';
import { add, cross, dot, scale, size, subtract } from '../vector';
import type { Vector } from '../vector';

/** What joints may move against a part, when the fastest of all moves 1, and still belong to it. */
const STILL = 1e-6;
/** Three joints span a plane when the sine between them is above this. */
const SPANS = 1e-3;

type Triple = readonly [number, number, number];
type Field = (joint: number) => Vector;

const movementOf = (movement: Float64Array, joint: number): Vector => ({
  x: movement[3 * joint]!,
  y: movement[3 * joint + 1]!,
  z: movement[3 * joint + 2]!,
});

/** How a rigid whole moves that three joints belong to; null where they lie in one line. */
function wholeField(joints: readonly Joint[], movement: Float64Array, [a, b, c]: Triple): Field | null {
  const p = subtract(joints[b]!, joints[a]!);
  const q = subtract(joints[c]!, joints[a]!);
  const n = cross(p, q);
  if (size(n) <= SPANS * size(p) * size(q)) return null;
  const base = movementOf(movement, a);
  const u = subtract(movementOf(movement, b), base);
  const v = subtract(movementOf(movement, c), base);
  // The turn w has w x p = u and w x q = v; along n and q that reads w.(p x n) = u.n, w.(q x n) = v.n, w.n = u.q.
  const rows = [cross(p, n), cross(q, n), n] as const;
  const right = [dot(u, n), dot(v, n), dot(u, q)] as const;
  const det = dot(rows[0], cross(rows[1], rows[2]));
  const turn = scale(
    add(
      add(scale(cross(rows[1], rows[2]), right[0]), scale(cross(rows[2], rows[0]), right[1])),
      scale(cross(rows[0], rows[1]), right[2]),
    ),
    1 / det,
  );
  return (joint) => add(base, cross(turn, subtract(joints[joint]!, joints[a]!)));
}

/** Whether two joints keep their distance. */
function apart(joints: readonly Joint[], movement: Float64Array, a: number, b: number): boolean {
  const arm = subtract(joints[a]!, joints[b]!);
  const change = dot(arm, subtract(movementOf(movement, a), movementOf(movement, b)));
  return Math.abs(change) <= STILL * size(arm);
}

/**
 * The parts of a frame that keep their shape.
 * @param joints mm
 * @param struts pairs of joints
 * @param movements two or more random mixtures of all its mechanisms, the fastest joint moving 1; none for a stiff frame
 * @returns for each part three joints or more, not in one line, rising; the largest first. Parts share joints where they are hinged; struts
 *   that belong to no triangle that keeps its shape are in none.
 * Source: own; what keeps its shape under a random mixture keeps it under every mechanism, but for coincidences of probability nought.
 */
export function stiffParts(
  joints: readonly Joint[],
  struts: readonly Strut[],
  movements: readonly Float64Array[],
): number[][] {
  const near: number[][] = joints.map(() => []);
  for (const [a, b] of struts) {
    near[a]!.push(b);
    near[b]!.push(a);
  }
  const parts: number[][] = [];
  const partsOf: Set<number>[] = joints.map(() => new Set());
  const linked = new Set(struts.map(([a, b]) => edgeKey(a, b)));
  const known = ([a, b, c]: Triple): boolean =>
    [...partsOf[a]!].some((part) => partsOf[b]!.has(part) && partsOf[c]!.has(part));
  const grow = (three: Triple): void => {
    const fields = movements.map((movement) => wholeField(joints, movement, three));
    if (fields.includes(null)) return;
    const members = joints.flatMap((_, joint) =>
      near[joint]!.length > 0 &&
      movements.every(
        (movement, k) => size(subtract(movementOf(movement, joint), fields[k]!(joint))) <= STILL,
      )
        ? [joint]
        : [],
    );
    // Three joints with a strut too few keep their distances in a flat frame, to first order, and are no part.
    if (members.length === 3 && !linked.has(edgeKey(three[1], three[2]))) return;
    members.forEach((joint) => partsOf[joint]!.add(parts.length));
    parts.push(members);
  };
  near.forEach((others, b) =>
    others.forEach((a, first) => {
      for (const c of others.slice(first + 1)) {
        if (a === b || c === b || a === c || known([a, b, c])) continue;
        if (movements.every((movement) => apart(joints, movement, a, c))) grow([b, a, c]);
      }
    }),
  );
  return parts.sort((p, q) => q.length - p.length || p[0]! - q[0]!);
}

/**
 * A movement seen from one of its parts, which stays where it is.
 * @param joints mm
 * @param movement three numbers per joint
 * @param part joints of a part that keeps its shape, not all in one line
 * @returns the movement without what moves the part; the same movement when the part spans no plane
 */
export function heldAt(
  joints: readonly Joint[],
  movement: Float64Array,
  part: readonly number[],
): Float64Array {
  const [a, b] = [part[0]!, part[1]!];
  let field: Field | null = null;
  for (const c of part.slice(2)) field ??= wholeField(joints, movement, [a, b, c]);
  if (!field) return movement.slice();
  const still = field;
  return Float64Array.from(movement, (value, at) => {
    const base = still(Math.floor(at / 3));
    return value - [base.x, base.y, base.z][at % 3]!;
  });
}
