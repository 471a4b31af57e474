import { SAME_WITHIN_MM } from '../frame';
import type { Joint } from '../frame';
import { boxOf, dot, scale, subtract } from '../vector';
import type { Vector } from '../vector';
import { orthonormal, pivotedTriangle, zeros } from './dense';

/** How far joints reach: all at one place, along a line, over a plane, or in space. */
export type Extent = 'point' | 'line' | 'plane' | 'space';

/** Joints as the model takes them, and what they span. */
export type Settled = { joints: Joint[]; extent: Extent; centre: Vector; radius: number };

/** Off a plane or line by less than this share of the frame's size is on it, and by less than the saw can tell in any case. */
const FLAT_SHARE = 1e-4;

const meanOf = (points: readonly Vector[]): Vector => ({
  x: points.reduce((sum, p) => sum + p.x, 0) / points.length,
  y: points.reduce((sum, p) => sum + p.y, 0) / points.length,
  z: points.reduce((sum, p) => sum + p.z, 0) / points.length,
});

/** Main directions of some arms, the longest spread first: Jacobi's rotations of their 3 x 3 matrix of products. */
function mainDirections(arms: readonly Vector[]): [Vector, Vector, Vector] {
  const axes = ['x', 'y', 'z'] as const;
  const m = axes.map((p) => axes.map((q) => arms.reduce((sum, arm) => sum + arm[p] * arm[q], 0)));
  const v = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  for (let sweep = 0; sweep < 24; sweep++)
    for (const [p, q] of [
      [0, 1],
      [0, 2],
      [1, 2],
    ] as const) {
      if (m[p]![q] === 0) continue;
      const theta = (m[q]![q]! - m[p]![p]!) / (2 * m[p]![q]!);
      const t = Math.sign(theta || 1) / (Math.abs(theta) + Math.hypot(theta, 1));
      const c = 1 / Math.hypot(t, 1);
      const s = t * c;
      for (let k = 0; k < 3; k++) {
        const [kp, kq] = [m[k]![p]!, m[k]![q]!];
        [m[k]![p], m[k]![q]] = [c * kp - s * kq, s * kp + c * kq];
      }
      for (let k = 0; k < 3; k++) {
        const [pk, qk] = [m[p]![k]!, m[q]![k]!];
        [m[p]![k], m[q]![k]] = [c * pk - s * qk, s * pk + c * qk];
        const [vp, vq] = [v[k]![p]!, v[k]![q]!];
        [v[k]![p], v[k]![q]] = [c * vp - s * vq, s * vp + c * vq];
      }
    }
  const order = [0, 1, 2].sort((a, b) => m[b]![b]! - m[a]![a]!);
  const direction = (k: number): Vector => ({ x: v[0]![k]!, y: v[1]![k]!, z: v[2]![k]! });
  return [direction(order[0]!), direction(order[1]!), direction(order[2]!)];
}

/**
 * Joints as a pin-jointed model takes them: what lies in a plane or line but for rounding is put there exactly, so that a drawing with
 * few decimals does not count as held by its rounding.
 * @param joints mm, finite, one or more
 * @returns the same joints in the same order, moved by less than 0.1 mm and less than a ten-thousandth of the frame's size
 * Source: own; main directions of the covariance.
 */
export function settle(joints: readonly Joint[]): Settled {
  const centre = meanOf(joints);
  const arms = joints.map((joint) => subtract(joint, centre));
  const { least, most } = boxOf(joints);
  const radius = Math.hypot(most.x - least.x, most.y - least.y, most.z - least.z) / 2;
  const within = Math.min(SAME_WITHIN_MM, 2 * radius * FLAT_SHARE);
  if (!(radius > 0)) return { joints: [...joints], extent: 'point', centre, radius: 0 };
  const unitArms = arms.map((arm) => scale(arm, 1 / radius));
  const directions = mainDirections(unitArms);
  const off = (direction: Vector): number => Math.max(...arms.map((arm) => Math.abs(dot(arm, direction))));
  const without = (from: readonly Vector[]): Joint[] =>
    joints.map((joint, at) => {
      const shift = from.map((direction) => scale(direction, dot(arms[at]!, direction)));
      return shift.reduce(subtract, joint);
    });
  if (off(directions[2]) > within) return { joints: [...joints], extent: 'space', centre, radius };
  if (off(directions[1]) > within)
    return { joints: without([directions[2]]), extent: 'plane', centre, radius };
  return { joints: without([directions[1], directions[2]]), extent: 'line', centre, radius };
}

/**
 * The movements of a frame as a whole: three shifts and the turns that move a joint.
 * @param settled joints and their centre
 * @returns orthonormal movements, three numbers per joint: 6 in space and plane, 5 along a line, 3 at one place
 */
export function rigidMotions({ joints, centre, radius, extent }: Settled): Float64Array[] {
  const shifts = [0, 1, 2].map((axis) =>
    Float64Array.from({ length: 3 * joints.length }, (_, at) => (at % 3 === axis ? 1 : 0)),
  );
  if (extent === 'point') return orthonormal(shifts);
  const turns = [0, 1, 2].map((axis) =>
    Float64Array.from({ length: 3 * joints.length }, (_, at) => {
      const { x, y, z } = subtract(joints[Math.floor(at / 3)]!, centre);
      const turned = [
        [0, -z, y],
        [z, 0, -x],
        [-y, x, 0],
      ][axis]!;
      return turned[at % 3]! / radius;
    }),
  );
  if (extent !== 'line') return orthonormal([...shifts, ...turns]);
  // Turning about its own line moves nothing: the two turns that move it most stand for all.
  const dense = zeros(3 * joints.length, 3);
  turns.forEach((turn, col) => dense.data.set(turn, col * dense.rows));
  const { order } = pivotedTriangle(dense, 3, 1e-9);
  return orthonormal([...shifts, turns[order[0]!]!, turns[order[1]!]!]);
}
