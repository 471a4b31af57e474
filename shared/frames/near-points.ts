import { distance } from './vector';
import type { Vector } from './vector';

/**
 * For every point the first kept point closer than a tolerance, or itself.
 * @param points finite points, or null for points to pass over
 * @param within distance, mm, above 0
 * @returns an index per point: its own when it is the first at its place
 */
export function firstAtPlace(points: readonly (Vector | null)[], within: number): number[] {
  const cells = new Map<string, number[]>();
  const cell = (value: number) => Math.floor(value / within);
  return points.map((point, index) => {
    if (!point) return index;
    const [cx, cy, cz] = [cell(point.x), cell(point.y), cell(point.z)];
    let found = index;
    for (let dx = -1; dx <= 1; dx++)
      for (let dy = -1; dy <= 1; dy++)
        for (let dz = -1; dz <= 1; dz++)
          for (const other of cells.get(`${cx + dx},${cy + dy},${cz + dz}`) ?? [])
            if (other < found && distance(points[other]!, point) < within) found = other;
    if (found === index) {
      const key = `${cx},${cy},${cz}`;
      const list = cells.get(key);
      if (list) list.push(index);
      else cells.set(key, [index]);
    }
    return found;
  });
}
