import type { Frame } from './frame';
import type { Segment } from './label-placing';
import { project } from './projection';
import type { Camera } from './projection';
import { boxOf } from './vector';
import type { Vector } from './vector';

/** A dimension line of a drawing; `mm` is the frame's real measure, the rest is px on the page. */
export type Dimension = {
  kind: 'width' | 'depth' | 'height';
  mm: number;
  line: Segment;
  /** From the frame to the ends of the line. */
  extensions: [Segment, Segment];
  /** Middle of the line, where the figure stands, and its turn in degrees from level, -90 to 90. */
  label: { x: number; y: number; angle: number };
};

type Point = { x: number; y: number };
export type ToPage = (point: { x: number; y: number }) => Point;

/** Measures below this are not drawn: the frame is flat in that direction. */
const LEAST_MM = 0.1;
const GAP_PX = 6;

function dimension(kind: Dimension['kind'], mm: number, a: Point, b: Point, off: Point): Dimension {
  const at = (p: Point, factor: number): Point => ({ x: p.x + off.x * factor, y: p.y + off.y * factor });
  const reach = Math.hypot(off.x, off.y);
  const [from, to] = [at(a, 1), at(b, 1)];
  const extension = (p: Point): Segment => {
    const start = at(p, Math.min(0.5, GAP_PX / reach));
    const end = at(p, 1 + GAP_PX / reach);
    return { x1: start.x, y1: start.y, x2: end.x, y2: end.y };
  };
  // Every dimension runs to the right or up, so that its figure is read from below or from the right.
  const angle = (Math.atan2(to.y - from.y, to.x - from.x) * 180) / Math.PI;
  return {
    kind,
    mm,
    line: { x1: from.x, y1: from.y, x2: to.x, y2: to.y },
    extensions: [extension(a), extension(b)],
    label: { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2, angle },
  };
}

/** Width below and height to the left, for views square onto the frame: the page shows true lengths. */
function squareDimensions(frame: Frame, camera: Camera, toPage: ToPage, off: number): Dimension[] {
  const points = frame.joints.map((joint) => ({ ...project(joint, camera), z: 0 }));
  const { least, most } = boxOf(points);
  const [low, right, high] = [
    toPage(least),
    toPage({ x: most.x, y: least.y }),
    toPage({ x: least.x, y: most.y }),
  ];
  const found: Dimension[] = [];
  const [width, height] = [most.x - least.x, most.y - least.y];
  if (width >= LEAST_MM) found.push(dimension('width', width, low, right, { x: 0, y: off }));
  if (height >= LEAST_MM) found.push(dimension('height', height, low, high, { x: -off, y: 0 }));
  return found;
}

/** Along the edges of the box round the frame that face the reader, as oblique drawings are dimensioned. */
function obliqueDimensions(frame: Frame, camera: Camera, toPage: ToPage, off: number): Dimension[] {
  const { least, most } = boxOf(frame.joints);
  const corner = (x: number, y: number, z: number): Point =>
    toPage(project({ x: x ? most.x : least.x, y: y ? most.y : least.y, z: z ? most.z : least.z }, camera));
  const centre = toPage(project(middle(least, most), camera));
  const along = (kind: Dimension['kind'], mm: number, a: Point, b: Point): Dimension[] => {
    const length = Math.hypot(b.x - a.x, b.y - a.y);
    if (mm < LEAST_MM || length < 1) return [];
    const across = { x: -(b.y - a.y) / length, y: (b.x - a.x) / length };
    const away = { x: (a.x + b.x) / 2 - centre.x, y: (a.y + b.y) / 2 - centre.y };
    const side = across.x * away.x + across.y * away.y >= 0 ? off : -off;
    return [dimension(kind, mm, a, b, { x: across.x * side, y: across.y * side })];
  };
  const frontY = camera.towards.y > 0 ? 1 : 0;
  const nearX = camera.towards.x > 0 ? 1 : 0;
  // The upright edge farthest to the left on the page.
  const uprights = [0, 1].flatMap((x) => [0, 1].map((y) => ({ a: corner(x, y, 0), b: corner(x, y, 1) })));
  const left = uprights.reduce((best, next) => (next.a.x < best.a.x ? next : best));
  return [
    ...along('width', most.x - least.x, corner(0, frontY, 0), corner(1, frontY, 0)),
    ...along('depth', most.y - least.y, corner(nearX, 0, 0), corner(nearX, 1, 0)),
    ...along('height', most.z - least.z, left.a, left.b),
  ];
}

const middle = (a: Vector, b: Vector): Vector => ({
  x: (a.x + b.x) / 2,
  y: (a.y + b.y) / 2,
  z: (a.z + b.z) / 2,
});

/** Whether a view is oblique: its page shows lengths shortened, and its dimensions follow the box. */
export const isOblique = ({ view }: Camera): boolean => view === 'isometric' || view === 'turned';

/** The corners of the box round a frame, which an oblique drawing must have room for. */
export function boxCorners(frame: Frame): Vector[] {
  const { least, most } = boxOf(frame.joints);
  return [least.x, most.x].flatMap((x) =>
    [least.y, most.y].flatMap((y) => [least.z, most.z].map((z) => ({ x, y, z }))),
  );
}

/** Dimension lines for the overall measures of a frame in a view, `off` px away from it. */
export const overallDimensions = (frame: Frame, camera: Camera, toPage: ToPage, off: number): Dimension[] =>
  isOblique(camera)
    ? obliqueDimensions(frame, camera, toPage, off)
    : squareDimensions(frame, camera, toPage, off);
