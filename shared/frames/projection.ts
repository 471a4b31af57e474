import { edgeKey } from './edge-key';
import { SAME_WITHIN_MM } from './frame';
import type { Frame } from './frame';
import { boxOf, cross, distance, dot, scale, size, subtract, unit } from './vector';
import type { Vector } from './vector';

/** How a drawing is to be looked at; `auto` finds a view in which the joints stand apart. */
export type View = 'isometric' | 'front' | 'top' | 'side' | 'auto';

/** How it was looked at: `plane` is square onto a planar frame, `turned` an oblique view found by trial. */
export type ViewTaken = Exclude<View, 'auto'> | 'plane' | 'turned';

/** Directions of the page in space, each of length 1: to the right, up, and out of the page. */
export type Camera = { view: ViewTaken; right: Vector; up: Vector; towards: Vector };

/** A joint on the page, mm to the right and up; greater depth is nearer to the eye. */
export type Projected = { x: number; y: number; depth: number };

const DOWN = 1e-9;

/** Looking from an azimuth (0 is the front, 90 the right) and a height above the horizon, degrees. */
function oblique(view: ViewTaken, azimuth: number, elevation: number): Camera {
  const [a, e] = [(azimuth * Math.PI) / 180, (elevation * Math.PI) / 180];
  const right = { x: Math.cos(a), y: Math.sin(a), z: 0 };
  const towards = { x: Math.sin(a) * Math.cos(e), y: -Math.cos(a) * Math.cos(e), z: Math.sin(e) };
  return { view, right, up: cross(towards, right), towards };
}

const FRONT = oblique('front', 0, 0);
const SIDE = oblique('side', 90, 0);
const TOP: Camera = {
  view: 'top',
  right: { x: 1, y: 0, z: 0 },
  up: { x: 0, y: 1, z: 0 },
  towards: { x: 0, y: 0, z: 1 },
};
/** Equal scale on all three axes: the height is atan(1/√2). */
const ISOMETRIC = oblique('isometric', 45, (Math.atan(Math.SQRT1_2) * 180) / Math.PI);

/** Tried in this order, so that of equally clear views the most usual wins. Odd angles: regular shapes line up at round ones. */
const ELEVATIONS = [22, 27, 17, 33, 12, 39];
const AZIMUTHS = [28, 21, 34, 15, 39, 25, 31, 11, 18, 37, 43, 8];

/** A point (mm) as a camera sees it: right, up and towards the eye, mm. */
export const project = (point: Vector, { right, up, towards }: Camera): Projected => ({
  x: dot(point, right),
  y: dot(point, up),
  depth: dot(point, towards),
});

/** A camera square onto a plane or along a line, when all joints lie in one within 0.1 mm; else null. */
function planeCamera({ joints }: Frame): Camera | null {
  const first = joints[0];
  if (!first) return TOP;
  const farthest = joints.reduce((a, b) => (distance(first, b) > distance(first, a) ? b : a));
  const along = unit(subtract(farthest, first));
  const offLine = (point: Vector) => size(cross(along, subtract(point, first)));
  const third = joints.reduce((a, b) => (offLine(b) > offLine(a) ? b : a));
  const upright = Math.hypot(along.x, along.y) < DOWN;
  let normal =
    offLine(third) >= SAME_WITHIN_MM
      ? unit(cross(along, subtract(third, first)))
      : upright
        ? FRONT.towards
        : unit(cross(along, { x: 0, y: 0, z: 1 }));
  if (joints.some((joint) => Math.abs(dot(normal, subtract(joint, first))) > SAME_WITHIN_MM)) return null;
  // Of the two sides of a plane: from above, else from the front, else from the right.
  const sides = [normal.z, -normal.y, normal.x];
  if ((sides.find((value) => Math.abs(value) > 1e-6) ?? 1) < 0) normal = scale(normal, -1);
  const level = Math.hypot(normal.x, normal.y) < 1e-6;
  const right = level ? TOP.right : unit(cross({ x: 0, y: 0, z: 1 }, normal));
  return { view: 'plane', right, up: unit(cross(normal, right)), towards: normal };
}

/** Pairs of joints that stand closer than a distance on the page. */
function pairsWithin(points: Projected[], within: number): number {
  const cells = new Map<number, Projected[]>();
  let pairs = 0;
  const origin = points[0] ?? { x: 0, y: 0 };
  for (const point of points) {
    const cx = Math.floor((point.x - origin.x) / within);
    const cy = Math.floor((point.y - origin.y) / within);
    for (let dx = -1; dx <= 1; dx++)
      for (let dy = -1; dy <= 1; dy++)
        for (const other of cells.get((cx + dx) * 2 ** 24 + cy + dy) ?? [])
          if (Math.hypot(other.x - point.x, other.y - point.y) < within) pairs += 1;
    const key = cx * 2 ** 24 + cy;
    const list = cells.get(key);
    if (list) list.push(point);
    else cells.set(key, [point]);
  }
  return pairs;
}

/** How far a point is from a line on the page. */
function offLine(point: Projected, from: Projected, to: Projected): number {
  const [dx, dy] = [to.x - from.x, to.y - from.y];
  const span = dx * dx + dy * dy;
  const at =
    span === 0 ? 0 : Math.min(1, Math.max(0, ((point.x - from.x) * dx + (point.y - from.y) * dy) / span));
  return Math.hypot(point.x - from.x - at * dx, point.y - from.y - at * dy);
}

/** Joints that seem to lie on a strut that is not theirs. */
function jointsOnStruts({ struts }: Frame, points: Projected[], within: number): number {
  let count = 0;
  for (const [a, b] of struts)
    points.forEach((point, joint) => {
      if (joint !== a && joint !== b && offLine(point, points[a]!, points[b]!) < within) count += 1;
    });
  return count;
}

/** Struts that seem to lie on one another: the same two places on the page. */
function strutsOnStruts({ struts }: Frame, points: Projected[], within: number): number {
  const places = new Map<string, number>();
  const place = points.map(({ x, y }) => {
    const key = `${Math.round(x / within)},${Math.round(y / within)}`;
    const known = places.get(key) ?? places.size;
    places.set(key, known);
    return known;
  });
  return struts.length - new Set(struts.map(([a, b]) => edgeKey(place[a]!, place[b]!))).size;
}

/** Above this many comparisons per view only the joints are looked at, so that a large frame is drawn within a second. */
const MOST_COMPARISONS = 60_000;

function turnedCamera(frame: Frame): Camera {
  const { least, most } = boxOf(frame.joints);
  const span = distance(least, most);
  const within = span * Math.min(0.03, 0.3 / Math.sqrt(frame.joints.length));
  const thorough = frame.joints.length * frame.struts.length <= MOST_COMPARISONS;
  let best = oblique('turned', AZIMUTHS[0]!, ELEVATIONS[0]!);
  let bestFaults = Number.POSITIVE_INFINITY;
  for (const elevation of ELEVATIONS)
    for (const azimuth of AZIMUTHS) {
      const camera = oblique('turned', azimuth, elevation);
      const points = frame.joints.map((joint) => project(joint, camera));
      // Joints on one another are worst: their numbers cannot be told apart.
      let faults = 1e6 * pairsWithin(points, span * 1e-3) + 1e3 * pairsWithin(points, within);
      if (thorough && faults < bestFaults)
        faults +=
          100 * strutsOnStruts(frame, points, span * 1e-3) + jointsOnStruts(frame, points, within / 2);
      if (faults < bestFaults) [best, bestFaults] = [camera, faults];
      if (faults === 0) return best;
    }
  return best;
}

/**
 * The directions of the page for a view of a frame.
 * @param frame a valid frame
 * @param view `auto` looks square onto a planar frame; else from the first of a fixed list of oblique views in which no joints and struts
 *   lie on one another, or the one with fewest that do. The same frame always gives the same view.
 */
export function chooseCamera(frame: Frame, view: View): Camera {
  if (view === 'front') return FRONT;
  if (view === 'side') return SIDE;
  if (view === 'top') return TOP;
  if (view === 'isometric') return ISOMETRIC;
  return planeCamera(frame) ?? turnedCamera(frame);
}
