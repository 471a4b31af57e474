import type { Vector } from '../../frames/vector';
import { distance, dot, subtract } from '../../frames/vector';
import { rotationBetween } from './rigid-motion';
import { ringPlane } from './ring-plane';
import type { Ring } from './ring-plane';
import type { Brace } from './moves';
import { stiffnessCount } from './stiffness-count';

/** More sticks than this nobody tapes: then a board, or hands. */
export const MOST_BRACES = 3;
/** Pairs of joints that are tried for a brace. */
const MOST_TRIES = 2_000;

const pairName = ([a, b]: readonly [number, number]): string => `${Math.min(a, b)}-${Math.max(a, b)}`;

/** Where sticks are taken last, because sticks of other flats are there, and never, because a strut will come there. */
type Elsewhere = { last?: readonly Brace[]; never?: readonly Brace[] };

/** Pairs of joints that a stick may be taped across, the nearest first. */
function openPairs(
  points: readonly Vector[],
  struts: readonly (readonly [number, number])[],
  { last = [], never = [] }: Elsewhere,
): Brace[] {
  const closed = new Set([...struts, ...never].map(pairName));
  const put = new Set(last.map(pairName));
  const pairs: { pair: Brace; away: number; late: number }[] = [];
  for (let a = 0; a < points.length; a++)
    for (let b = a + 1; b < points.length; b++) {
      const name = pairName([a, b]);
      if (closed.has(name)) continue;
      pairs.push({ pair: [a, b], away: distance(points[a]!, points[b]!), late: put.has(name) ? 1 : 0 });
    }
  return pairs
    .sort((p, q) => p.late - q.late || p.away - q.away || p.pair[0] - q.pair[0] || p.pair[1] - q.pair[1])
    .map(({ pair }) => pair);
}

/**
 * In how many ways joints can move against each other, as if every joint were a pin, and sticks that stop them.
 * @param points places of the joints, mm; all heights 0 for a flat that stays on its plane
 * @param struts pairs of joints that are held
 * @param stiffRank rank at which nothing moves: 3 n - 6 in space, 2 n - 3 in a plane
 * @param most at most so many sticks are looked for
 * @param elsewhere pairs that are taken last, and pairs that are never taken
 * @returns sticks between joints without a strut: no fewer would stop as many ways (struts form a matroid), the shortest first
 * Source: own; greedy basis of the rigidity matroid.
 */
export function bracesFor(
  points: readonly Vector[],
  struts: readonly (readonly [number, number])[],
  stiffRank: number,
  most: number,
  elsewhere: Elsewhere = {},
): { mechanisms: number; braces: Brace[] } {
  const count = stiffnessCount(points);
  for (const [a, b] of struts) count.add(a, b);
  const mechanisms = Math.max(0, stiffRank - count.rank);
  const braces: Brace[] = [];
  if (mechanisms === 0) return { mechanisms, braces };
  for (const pair of openPairs(points, struts, elsewhere).slice(0, MOST_TRIES)) {
    if (braces.length >= Math.min(most, mechanisms)) break;
    if (count.add(...pair)) braces.push(pair);
  }
  return { mechanisms, braces };
}

/**
 * Sticks that keep a flat in shape while it is lifted.
 * @param ring a planar ring
 * @param chords pairs of its joints that further struts join
 * @param joints places of all joints, mm
 * @param elsewhere pairs of all joints that are taken last, and pairs that are never taken
 * @returns joints as the ring names them; as many sticks as the flat can move in its plane (the number of its sides less three where no
 *   strut lies across), or fewer where struts will come between too many of its joints
 * Source: own.
 */
export function flatBraces(
  ring: Ring,
  chords: readonly (readonly [number, number])[],
  joints: readonly Vector[],
  elsewhere: Elsewhere = {},
): { mechanisms: number; braces: Brace[] } {
  const points = ring.joints.map((joint) => joints[joint]!);
  const { normal, point } = ringPlane(points);
  const first = subtract(points[0]!, point);
  // Turned so that the flat's plane is the level one.
  const rows = rotationBetween(
    [normal, first],
    [
      { x: 0, y: 0, z: 1 },
      { x: 1, y: 0, z: 0 },
    ],
    false,
  );
  const level = points.map((p) => {
    const arm = subtract(p, point);
    return { x: dot(rows[0], arm), y: dot(rows[1], arm), z: 0 };
  });
  const place = new Map(ring.joints.map((joint, at) => [joint, at]));
  const sides = ring.joints.map((_, at): [number, number] => [at, (at + 1) % ring.joints.length]);
  const across = chords.map(([a, b]): [number, number] => [place.get(a)!, place.get(b)!]);
  const own = (pairs: readonly Brace[] = []): Brace[] =>
    pairs.flatMap(([a, b]): Brace[] =>
      place.has(a) && place.has(b) ? [[place.get(a)!, place.get(b)!]] : [],
    );
  const { mechanisms, braces } = bracesFor(
    level,
    [...sides, ...across],
    2 * points.length - 3,
    points.length,
    { last: own(elsewhere.last), never: own(elsewhere.never) },
  );
  return { mechanisms, braces: braces.map(([a, b]) => [ring.joints[a]!, ring.joints[b]!]) };
}
