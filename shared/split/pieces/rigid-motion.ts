import { add, cross, dot, scale, subtract, unit } from '../../frames/vector';
import type { Vector } from '../../frames/vector';

/** A 3 by 3 matrix by rows; its determinant is 1 for a turn, -1 for a turned mirror image. */
export type Rotation = readonly [Vector, Vector, Vector];

/** Where a piece lies: a point p of the first piece lies at `rotation` p + `offset`, mm. */
export type Motion = { rotation: Rotation; offset: Vector };

export const UNTURNED: Rotation = [
  { x: 1, y: 0, z: 0 },
  { x: 0, y: 1, z: 0 },
  { x: 0, y: 0, z: 1 },
];

const times = (rows: Rotation, p: Vector): Vector => ({
  x: dot(rows[0], p),
  y: dot(rows[1], p),
  z: dot(rows[2], p),
});

/** The motion with a given matrix that brings one point onto another. */
export const motionThrough = (rotation: Rotation, from: Vector, to: Vector): Motion => ({
  rotation,
  offset: subtract(to, times(rotation, from)),
});

/**
 * Where a point comes to lie.
 * @param motion a turn (or mirroring) and an offset in mm
 * @param p a point, mm
 */
export const moved = (motion: Motion, p: Vector): Vector => add(times(motion.rotation, p), motion.offset);

/** The mean of some points; the origin when there are none. */
export const centreOf = (points: readonly Vector[]): Vector =>
  points.length === 0
    ? { x: 0, y: 0, z: 0 }
    : scale(
        points.reduce((sum, p) => add(sum, p), { x: 0, y: 0, z: 0 }),
        1 / points.length,
      );

/** Three directions at right angles, right-handed: the first along a, the second on b's side of it. */
function axes(a: Vector, b: Vector): Rotation {
  const e1 = unit(a);
  const e3 = unit(cross(e1, b));
  return [e1, cross(e3, e1), e3];
}

/**
 * The matrix that turns one pair of directions onto another.
 * @param from two directions that are not parallel
 * @param to two directions at the same angle to each other
 * @param mirrored whether the third direction is turned round, so that the result is a mirroring
 */
export function rotationBetween(
  from: readonly [Vector, Vector],
  to: readonly [Vector, Vector],
  mirrored: boolean,
): Rotation {
  const [a1, a2, a3] = axes(...from);
  const [b1, b2, b3] = axes(...to);
  const last = mirrored ? scale(b3, -1) : b3;
  const row = (key: 'x' | 'y' | 'z'): Vector =>
    add(add(scale(a1, b1[key]), scale(a2, b2[key])), scale(a3, last[key]));
  return [row('x'), row('y'), row('z')];
}

/** Any direction at right angles to another. */
export function acrossFrom(a: Vector): Vector {
  const [x, y, z] = [Math.abs(a.x), Math.abs(a.y), Math.abs(a.z)];
  const axis = x <= y && x <= z ? { x: 1, y: 0, z: 0 } : y <= z ? { x: 0, y: 1, z: 0 } : { x: 0, y: 0, z: 1 };
  return unit(cross(a, axis));
}

/** The eigenvector of the greatest eigenvalue of a symmetric 4 by 4 matrix, by Jacobi's rotations. */
function greatestEigenvector(matrix: number[][]): [number, number, number, number] {
  const a = matrix.map((row) => [...row]);
  const v = [0, 1, 2, 3].map((i) => [0, 1, 2, 3].map((j) => (i === j ? 1 : 0)));
  const total = Math.hypot(...a.flat());
  for (let sweep = 0; sweep < 30; sweep++) {
    let off = 0;
    for (let p = 0; p < 3; p++) for (let q = p + 1; q < 4; q++) off = Math.max(off, Math.abs(a[p]![q]!));
    if (off <= 1e-15 * total) break;
    for (let p = 0; p < 3; p++)
      for (let q = p + 1; q < 4; q++) {
        if (a[p]![q] === 0) continue;
        const theta = (a[q]![q]! - a[p]![p]!) / (2 * a[p]![q]!);
        const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.hypot(theta, 1));
        const c = 1 / Math.hypot(t, 1);
        const s = t * c;
        for (const rows of [a, v])
          for (const row of rows) {
            const [x, y] = [row[p]!, row[q]!];
            row[p] = c * x - s * y;
            row[q] = s * x + c * y;
          }
        const [rowP, rowQ] = [a[p]!, a[q]!];
        for (let k = 0; k < 4; k++) {
          const [x, y] = [rowP[k]!, rowQ[k]!];
          rowP[k] = c * x - s * y;
          rowQ[k] = s * x + c * y;
        }
      }
  }
  let best = 0;
  for (let k = 1; k < 4; k++) if (a[k]![k]! > a[best]![best]!) best = k;
  return [v[0]![best]!, v[1]![best]!, v[2]![best]!, v[3]![best]!];
}

/**
 * The rigid motion that brings points closest to others, by least squares.
 * @param from points, mm
 * @param to as many points, each where its partner in `from` shall come to lie, mm
 * @param mirrored whether the motion shall be a mirroring
 * @returns the motion with the least sum of squared distances; points on one line leave the turn about it open, and any is taken
 * Source: B. K. P. Horn, Closed-form solution of absolute orientation using unit quaternions, J. Opt. Soc. Am. A 4 (1987) 629-642.
 */
export function fitMotion(from: readonly Vector[], to: readonly Vector[], mirrored: boolean): Motion {
  const [a, b] = [centreOf(from), centreOf(to)];
  const sign = mirrored ? -1 : 1;
  const sum = { xx: 0, xy: 0, xz: 0, yx: 0, yy: 0, yz: 0, zx: 0, zy: 0, zz: 0 };
  from.forEach((point, at) => {
    // A mirroring is a turn of the points seen through their centre.
    const p = scale(subtract(point, a), sign);
    const q = subtract(to[at]!, b);
    for (const i of ['x', 'y', 'z'] as const)
      for (const j of ['x', 'y', 'z'] as const) sum[`${i}${j}`] += p[i] * q[j];
  });
  const { xx, xy, xz, yx, yy, yz, zx, zy, zz } = sum;
  const [w, x, y, z] = greatestEigenvector([
    [xx + yy + zz, yz - zy, zx - xz, xy - yx],
    [yz - zy, xx - yy - zz, xy + yx, zx + xz],
    [zx - xz, xy + yx, yy - xx - zz, yz + zy],
    [xy - yx, zx + xz, yz + zy, zz - xx - yy],
  ]);
  const rows: Rotation = [
    { x: w * w + x * x - y * y - z * z, y: 2 * (x * y - w * z), z: 2 * (x * z + w * y) },
    { x: 2 * (x * y + w * z), y: w * w - x * x + y * y - z * z, z: 2 * (y * z - w * x) },
    { x: 2 * (x * z - w * y), y: 2 * (y * z + w * x), z: w * w - x * x - y * y + z * z },
  ];
  return motionThrough([scale(rows[0], sign), scale(rows[1], sign), scale(rows[2], sign)], a, b);
}
