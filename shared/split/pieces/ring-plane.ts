import { ringEdges } from '../../frames/edge-key';
import type { Frame } from '../../frames/frame';
import { add, cross, distance, dot, scale, size, subtract, unit } from '../../frames/vector';
import type { Vector } from '../../frames/vector';
import { centreOf } from './rigid-motion';

/** A closed way along struts. `struts[k]` joins `joints[k]` and the joint after it; indexes from 0. */
export type Ring = { joints: number[]; struts: number[] };

/** A plane through `point` with unit `normal`, and how far it is from the points it was laid through, mm. */
export type RingPlane = { point: Vector; normal: Vector; offMm: number; widthMm: number };

/** Height of a point above a plane along its normal, mm. */
export const above = (plane: { point: Vector; normal: Vector }, p: Vector): number =>
  dot(plane.normal, subtract(p, plane.point));

/**
 * The plane of a ring: through the mean of its joints, at right angles to Newell's area vector.
 * @param points the joints in order round the ring, at least 3, mm
 * @returns `offMm` the farthest joint from the plane; `widthMm` twice the area over the longest distance between joints, which is 0
 *   for a ring without area
 * Source: M. E. Newell's normal, after Sutherland, Sproull and Schumacker, Computing Surveys 6 (1974).
 */
export function ringPlane(points: readonly Vector[]): RingPlane {
  const point = centreOf(points);
  let area: Vector = { x: 0, y: 0, z: 0 };
  let longest = 0;
  points.forEach((p, at) => {
    const [a, b] = [subtract(p, point), subtract(points[(at + 1) % points.length]!, point)];
    area = add(area, cross(a, b));
    for (const q of points) longest = Math.max(longest, distance(p, q));
  });
  const normal = unit(area);
  const plane = { point, normal };
  const offMm = points.reduce((worst, p) => Math.max(worst, Math.abs(above(plane, p))), 0);
  return { ...plane, offMm, widthMm: longest === 0 ? 0 : size(area) / longest };
}

type Flat = { u: number; v: number };

/** Points seen straight down on a plane. */
function onPlane(plane: RingPlane, points: readonly Vector[]): Flat[] {
  const rough = Math.abs(plane.normal.x) < 0.7 ? { x: 1, y: 0, z: 0 } : { x: 0, y: 1, z: 0 };
  const e1 = unit(subtract(rough, scale(plane.normal, dot(rough, plane.normal))));
  const e2 = cross(plane.normal, e1);
  return points.map((p) => {
    const arm = subtract(p, plane.point);
    return { u: dot(arm, e1), v: dot(arm, e2) };
  });
}

const side = (a: Flat, b: Flat, c: Flat): number => (b.u - a.u) * (c.v - a.v) - (b.v - a.v) * (c.u - a.u);

/** Whether two struts of a plane meet anywhere; they share no joint. */
function meet(a: Flat, b: Flat, c: Flat, d: Flat): boolean {
  const [s1, s2, s3, s4] = [side(a, b, c), side(a, b, d), side(c, d, a), side(c, d, b)];
  if (s1 * s2 < 0 && s3 * s4 < 0) return true;
  const within = (p: Flat, q: Flat, r: Flat): boolean =>
    Math.min(p.u, q.u) <= r.u &&
    r.u <= Math.max(p.u, q.u) &&
    Math.min(p.v, q.v) <= r.v &&
    r.v <= Math.max(p.v, q.v);
  return (
    (s1 === 0 && within(a, b, c)) ||
    (s2 === 0 && within(a, b, d)) ||
    (s3 === 0 && within(c, d, a)) ||
    (s4 === 0 && within(c, d, b))
  );
}

/**
 * Whether a planar ring can lie on the bench: none of its struts crosses another.
 * @param plane the ring's plane
 * @param points its joints in order, mm
 */
export function isSimple(plane: RingPlane, points: readonly Vector[]): boolean {
  const flat = onPlane(plane, points);
  const count = flat.length;
  for (let i = 0; i < count; i++)
    for (let j = i + 2; j < count; j++) {
      if (i === 0 && j === count - 1) continue;
      if (meet(flat[i]!, flat[i + 1]!, flat[j]!, flat[(j + 1) % count]!)) return false;
    }
  return true;
}

/** Whether a point of a plane lies inside a ring, by the crossings of a ray (even-odd rule). */
function inside(ring: readonly Flat[], p: Flat): boolean {
  let found = false;
  ring.forEach((a, at) => {
    const b = ring[(at + 1) % ring.length]!;
    if (a.v > p.v !== b.v > p.v && p.u < a.u + ((p.v - a.v) / (b.v - a.v)) * (b.u - a.u)) found = !found;
  });
  return found;
}

/** The disc that a planar ring spans. */
type Disc = { plane: RingPlane; corners: Flat[] };

function discOf(ring: Ring, joints: readonly Vector[]): Disc {
  const points = ring.joints.map((joint) => joints[joint]!);
  const plane = ringPlane(points);
  return { plane, corners: onPlane(plane, points) };
}

/** Whether the line from p to q goes through the inside of a disc, from one side to the other. */
function pierces({ plane, corners }: Disc, p: Vector, q: Vector): boolean {
  const [from, to] = [above(plane, p), above(plane, q)];
  if (from > 0 === to > 0) return false;
  const cut = add(p, scale(subtract(q, p), from / (from - to)));
  return inside(corners, onPlane(plane, [cut])[0]!);
}

/**
 * Whether two rings hang in each other like links of a chain, so that not both can be closed before they are put together.
 * @param a a planar ring
 * @param b another one without a strut in common
 * @param joints places of all joints, mm
 * @returns false for rings that share a joint: there one can be slipped past the other
 * Source: the linking number modulo 2, counted as crossings of one ring through the other's disc.
 */
export function areLinked(a: Ring, b: Ring, joints: readonly Vector[]): boolean {
  const shared = new Set(a.joints);
  if (b.joints.some((joint) => shared.has(joint))) return false;
  const disc = discOf(a, joints);
  const crossings = ringEdges(b.joints).filter(([p, q]) => pierces(disc, joints[p]!, joints[q]!));
  return crossings.length % 2 === 1;
}

/**
 * Struts that go through the inside of a ring: the closed ring cannot be brought to its place once they are in.
 * @param ring a planar ring
 * @param frame the frame it belongs to, mm
 * @returns indexes of struts that touch no joint of the ring
 */
export function strutsThrough(ring: Ring, { joints, struts }: Frame): number[] {
  const own = new Set(ring.joints);
  const disc = discOf(ring, joints);
  return struts.flatMap(([a, b], strut) =>
    !own.has(a) && !own.has(b) && pierces(disc, joints[a]!, joints[b]!) ? [strut] : [],
  );
}
