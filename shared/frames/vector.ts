/** A point or direction in space, millimetres for points. */
export type Vector = { x: number; y: number; z: number };

export const add = (a: Vector, b: Vector): Vector => ({ x: a.x + b.x, y: a.y + b.y, z: a.z + b.z });
export const subtract = (a: Vector, b: Vector): Vector => ({ x: a.x - b.x, y: a.y - b.y, z: a.z - b.z });
/** A vector times a number. */
export const scale = (a: Vector, factor: number): Vector => ({
  x: a.x * factor,
  y: a.y * factor,
  z: a.z * factor,
});
export const dot = (a: Vector, b: Vector): number => a.x * b.x + a.y * b.y + a.z * b.z;
/** Cross product, right-handed. */
export const cross = (a: Vector, b: Vector): Vector => ({
  x: a.y * b.z - a.z * b.y,
  y: a.z * b.x - a.x * b.z,
  z: a.x * b.y - a.y * b.x,
});
export const size = (a: Vector): number => Math.hypot(a.x, a.y, a.z);
export const distance = (a: Vector, b: Vector): number => Math.hypot(a.x - b.x, a.y - b.y, a.z - b.z);

/** The direction of a vector with length 1; the zero vector stays zero. */
export const unit = (a: Vector): Vector => {
  const length = size(a);
  return length === 0 ? { x: 0, y: 0, z: 0 } : scale(a, 1 / length);
};

/** Least and greatest coordinates of some points; all zero when there are none. */
export function boxOf(points: readonly Vector[]): { least: Vector; most: Vector } {
  const first = points[0] ?? { x: 0, y: 0, z: 0 };
  const least = { ...first };
  const most = { ...first };
  for (const p of points) {
    least.x = Math.min(least.x, p.x);
    least.y = Math.min(least.y, p.y);
    least.z = Math.min(least.z, p.z);
    most.x = Math.max(most.x, p.x);
    most.y = Math.max(most.y, p.y);
    most.z = Math.max(most.z, p.z);
  }
  return { least, most };
}
