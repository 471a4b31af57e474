import type { Strut } from '../../../shared/frames';
import type { Projected } from './camera';

/** Farther from a strut than this a press means nothing, px: a finger is not a pencil. */
export const NEAR_PX = 14;

/**
 * The strut under a point of the paper: of those within reach the nearest to the eye among the nearest to the point.
 * @param points the joints on the paper
 * @param struts pairs of joints
 * @param x right, px
 * @param y down, px
 * @param may whether a strut may be picked
 * @returns its index, or -1
 */
export function strutAt(
  points: Projected,
  struts: readonly Strut[],
  x: number,
  y: number,
  may: (strut: number) => boolean = () => true,
): number {
  let best = -1;
  let least = NEAR_PX;
  let nearest = -Infinity;
  struts.forEach(([a, b], strut) => {
    const away = distanceTo(points, a, b, x, y);
    if (away > least + 2 || !may(strut)) return;
    const depth = ((points[3 * a + 2] ?? 0) + (points[3 * b + 2] ?? 0)) / 2;
    // Where several lie under the finger, the one in front is meant.
    if (away < least - 2 || depth > nearest) {
      best = strut;
      least = Math.min(least, away);
      nearest = depth;
    }
  });
  return best;
}

function distanceTo(points: Projected, a: number, b: number, x: number, y: number): number {
  const [ax, ay] = [points[3 * a] ?? 0, points[3 * a + 1] ?? 0];
  const [bx, by] = [points[3 * b] ?? 0, points[3 * b + 1] ?? 0];
  const [dx, dy] = [bx - ax, by - ay];
  const length = dx * dx + dy * dy;
  const share = length === 0 ? 0 : Math.max(0, Math.min(1, ((x - ax) * dx + (y - ay) * dy) / length));
  return Math.hypot(x - ax - share * dx, y - ay - share * dy);
}

/**
 * Struts whose middle lies in a rectangle of the paper.
 * @param box two opposite corners, px
 */
export function strutsIn(
  points: Projected,
  struts: readonly Strut[],
  box: { x1: number; y1: number; x2: number; y2: number },
  may: (strut: number) => boolean = () => true,
): number[] {
  const [left, right] = [Math.min(box.x1, box.x2), Math.max(box.x1, box.x2)];
  const [top, foot] = [Math.min(box.y1, box.y2), Math.max(box.y1, box.y2)];
  const found: number[] = [];
  struts.forEach(([a, b], strut) => {
    const x = ((points[3 * a] ?? 0) + (points[3 * b] ?? 0)) / 2;
    const y = ((points[3 * a + 1] ?? 0) + (points[3 * b + 1] ?? 0)) / 2;
    if (x >= left && x <= right && y >= top && y <= foot && may(strut)) found.push(strut);
  });
  return found;
}
