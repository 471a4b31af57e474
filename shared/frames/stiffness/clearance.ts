import type { Frame } from '../frame';
import { add, dot, scale, size, subtract } from '../vector';
import type { Vector } from '../vector';

const clamp = (value: number): number => Math.min(1, Math.max(0, value));

/**
 * The least distance between two straight sticks.
 * @param a ends of the one, mm
 * @param b ends of the other, mm
 * @returns mm, 0 where they cross; sticks without length count as points
 * Source: C. Ericson, Real-Time Collision Detection (2005), 5.1.9.
 */
export function stickDistance(a: readonly [Vector, Vector], b: readonly [Vector, Vector]): number {
  const [d, e, r] = [subtract(a[1], a[0]), subtract(b[1], b[0]), subtract(a[0], b[0])];
  const [dd, ee, de, dr, er] = [dot(d, d), dot(e, e), dot(d, e), dot(d, r), dot(e, r)];
  const det = dd * ee - de * de;
  let s = det > 1e-12 * dd * ee ? clamp((de * er - dr * ee) / det) : 0;
  let t = ee > 0 ? (de * s + er) / ee : 0;
  // The nearest place on the other stick's line lies beyond its end: then its end counts, and the place on this one follows.
  if (t < 0 || t > 1 || ee === 0) {
    t = clamp(t);
    s = dd > 0 ? clamp((de * t - dr) / dd) : 0;
  }
  return size(subtract(add(a[0], scale(d, s)), add(b[0], scale(e, t))));
}

/**
 * Whether a stick has room between two joints of a frame.
 * @param frame mm
 * @param ends two of its joints
 * @param clearanceMm least distance between centre lines, mm
 * @returns false when another joint or a strut that does not end at its ends is nearer
 * Source: own.
 */
export function hasRoom(
  { joints, struts }: Frame,
  ends: readonly [number, number],
  clearanceMm: number,
): boolean {
  const [a, b] = ends;
  const stick = [joints[a]!, joints[b]!] as const;
  const low = { x: 0, y: 0, z: 0 };
  const high = { x: 0, y: 0, z: 0 };
  for (const axis of ['x', 'y', 'z'] as const) {
    low[axis] = Math.min(stick[0][axis], stick[1][axis]) - clearanceMm;
    high[axis] = Math.max(stick[0][axis], stick[1][axis]) + clearanceMm;
  }
  const beside = (p: Vector, q: Vector): boolean =>
    (['x', 'y', 'z'] as const).some(
      (axis) => Math.max(p[axis], q[axis]) < low[axis] || Math.min(p[axis], q[axis]) > high[axis],
    );
  const near = (p: Vector, q: Vector): boolean => !beside(p, q) && stickDistance(stick, [p, q]) < clearanceMm;
  const shares = (joint: number): boolean => joint === a || joint === b;
  return (
    !joints.some((joint, at) => !shares(at) && near(joint, joint)) &&
    !struts.some(([p, q]) => {
      if (!shares(p) && !shares(q)) return near(joints[p]!, joints[q]!);
      // Struts that start at the same joint touch there; one that runs along the stick passes its other end.
      const end = p === a || q === a ? b : a;
      return (
        !shares(p === a || p === b ? q : p) && pointNear(joints[end]!, joints[p]!, joints[q]!, clearanceMm)
      );
    })
  );
}

const pointNear = (point: Vector, p: Vector, q: Vector, within: number): boolean =>
  stickDistance([point, point], [p, q]) < within;
