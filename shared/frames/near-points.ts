import { distance } from './vector';
import type { Vector } from './vector';

/** A grid of cells that finds the points kept near a place. */
class PointGrid {
  private readonly cells = new Map<string, number[]>();
  private readonly side: number;

  constructor(private readonly within: number) {
    // Cells wider than the tolerance: most points then look into one cell, those near a wall into two, four or eight.
    this.side = 4 * within;
  }

  private cell(value: number): number {
    return Math.floor(value / this.side);
  }

  /** Calls back with every kept point that may be near, and some that are not. */
  each({ x: px, y: py, z: pz }: Vector, visit: (index: number) => void): void {
    const { within } = this;
    for (let x = this.cell(px - within); x <= this.cell(px + within); x++)
      for (let y = this.cell(py - within); y <= this.cell(py + within); y++)
        for (let z = this.cell(pz - within); z <= this.cell(pz + within); z++)
          for (const index of this.cells.get(`${x},${y},${z}`) ?? []) visit(index);
  }

  keep(index: number, { x, y, z }: Vector): void {
    const key = `${this.cell(x)},${this.cell(y)},${this.cell(z)}`;
    const list = this.cells.get(key);
    if (list) list.push(index);
    else this.cells.set(key, [index]);
  }
}

/**
 * For every point the first kept point closer than a tolerance, or itself.
 * @param points finite points, or null for points to pass over
 * @param within distance, mm, above 0
 * @returns an index per point: its own when it is the first at its place
 */
export function firstAtPlace(points: readonly (Vector | null)[], within: number): number[] {
  const grid = new PointGrid(within);
  return points.map((point, index) => {
    if (!point) return index;
    let found = index;
    grid.each(point, (other) => {
      if (other < found && distance(points[other]!, point) < within) found = other;
    });
    if (found === index) grid.keep(index, point);
    return found;
  });
}

/**
 * For every point the first point of its group: points closer than a tolerance are of one group, and so is whatever they lead to.
 * @param points finite points
 * @param within distance, mm, above 0
 * @returns an index per point: its own when it is the first of its group
 * Source: single-linkage clustering by union-find over a grid of cells.
 */
export function linkedWithin(points: readonly Vector[], within: number): number[] {
  const grid = new PointGrid(within);
  const leader: number[] = [];
  const first = (index: number): number => {
    let at = index;
    for (let up = leader[at]!; up !== at; up = leader[at]!) {
      leader[at] = leader[up]!;
      at = up;
    }
    return at;
  };
  points.forEach((point, index) => {
    leader.push(index);
    grid.each(point, (other) => {
      if (distance(points[other]!, point) >= within) return;
      const [a, b] = [first(other), first(index)];
      leader[Math.max(a, b)] = Math.min(a, b);
    });
    grid.keep(index, point);
  });
  return points.map((_, index) => first(index));
}
