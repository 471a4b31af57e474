import { distance } from './vector';
import type { Vector } from './vector';

/**
 * For every point the first kept point closer than a tolerance, or itself.
 * @param points finite points, or null for points to pass over
 * @param within distance, mm, above 0
 * @returns an index per point: its own when it is the first at its place
 */
export function firstAtPlace(points: readonly (Vector | null)[], within: number): number[] {
  // Cells wider than the tolerance: most points then look into one cell, those near a wall into two, four or eight.
  const side = 4 * within;
  const cell = (value: number) => Math.floor(value / side);
  const cells = new Map<string, number[]>();
  return points.map((point, index) => {
    if (!point) return index;
    let found = index;
    for (let x = cell(point.x - within); x <= cell(point.x + within); x++)
      for (let y = cell(point.y - within); y <= cell(point.y + within); y++)
        for (let z = cell(point.z - within); z <= cell(point.z + within); z++)
          for (const other of cells.get(`${x},${y},${z}`) ?? [])
            if (other < found && distance(points[other]!, point) < within) found = other;
    if (found === index) {
      const key = `${cell(point.x)},${cell(point.y)},${cell(point.z)}`;
      const list = cells.get(key);
      if (list) list.push(index);
      else cells.set(key, [index]);
    }
    return found;
  });
}
