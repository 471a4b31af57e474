import type { Frame } from './frame';

/**
 * The separate shapes of a frame: struts that are linked through joints belong to one.
 * @param frame struts that name existing joints
 * @returns for each shape the indexes of its struts in rising order; shapes in the order of their first strut; joints without struts
 *   belong to none
 * Source: union-find, Tarjan 1975.
 */
export function separateShapes({ joints, struts }: Frame): number[][] {
  const parent = joints.map((_, joint) => joint);
  const root = (joint: number): number => {
    let at = joint;
    for (let up = parent[at]!; up !== at; up = parent[at]!) {
      parent[at] = parent[up]!;
      at = up;
    }
    return at;
  };
  for (const [a, b] of struts) parent[root(a)] = root(b);
  const shapes = new Map<number, number[]>();
  struts.forEach(([a], strut) => {
    const shape = shapes.get(root(a));
    if (shape) shape.push(strut);
    else shapes.set(root(a), [strut]);
  });
  return [...shapes.values()];
}
