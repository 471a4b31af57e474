import type { Joint } from '../../../shared/frames';

/** How the drawing is looked at: turned about the upright axis, tilted, drawn larger, moved on the paper. */
export interface Camera {
  /** Degrees about the upright axis. */
  turn: number;
  /** Degrees from the level; 90 looks straight down. */
  tilt: number;
  /** 1 fills the paper. */
  zoom: number;
  /** Of the paper's width and height. */
  panX: number;
  panY: number;
}

export const START: Camera = { turn: -35, tilt: 28, zoom: 1, panX: 0, panY: 0 };

/** Usual ways to look at it. */
export const VIEWS = [
  { key: 'space', label: 'Space', camera: START },
  { key: 'front', label: 'Front', camera: { ...START, turn: 0, tilt: 0 } },
  { key: 'side', label: 'Side', camera: { ...START, turn: -90, tilt: 0 } },
  { key: 'top', label: 'Top', camera: { ...START, turn: 0, tilt: 90 } },
] as const;

/** The ball that holds all joints. */
export interface Ball {
  x: number;
  y: number;
  z: number;
  radius: number;
}

/**
 * The ball round the middle of the box of some joints.
 * @param joints mm
 * @returns radius at least 1 mm, so that it can be divided by
 */
export function ballOf(joints: readonly Joint[]): Ball {
  if (joints.length === 0) return { x: 0, y: 0, z: 0, radius: 1 };
  const low = { x: Infinity, y: Infinity, z: Infinity };
  const high = { x: -Infinity, y: -Infinity, z: -Infinity };
  for (const joint of joints) {
    for (const axis of ['x', 'y', 'z'] as const) {
      if (joint[axis] < low[axis]) low[axis] = joint[axis];
      if (joint[axis] > high[axis]) high[axis] = joint[axis];
    }
  }
  const middle = { x: (low.x + high.x) / 2, y: (low.y + high.y) / 2, z: (low.z + high.z) / 2 };
  let radius = 1;
  for (const joint of joints)
    radius = Math.max(radius, Math.hypot(joint.x - middle.x, joint.y - middle.y, joint.z - middle.z));
  return { ...middle, radius };
}

/** Points on the paper, three numbers each: right and down in px, and depth in mm, larger is nearer. */
export type Projected = Float64Array;

/**
 * Draws joints onto the paper, without perspective: lengths at one depth keep their proportions, as on a drawing.
 * @param joints mm, z upwards
 * @param ball of all joints
 * @param camera how it is looked at
 * @param scale pixels of one millimetre before the zoom
 * @param width of the paper, px
 * @param height of the paper, px
 * @param into reused when it is long enough
 */
export function project(
  joints: readonly Joint[],
  ball: Ball,
  camera: Camera,
  scale: number,
  width: number,
  height: number,
  into?: Projected,
): Projected {
  const points = into && into.length >= 3 * joints.length ? into : new Float64Array(3 * joints.length);
  const [ct, st] = [Math.cos(radians(camera.turn)), Math.sin(radians(camera.turn))];
  const [cl, sl] = [Math.cos(radians(camera.tilt)), Math.sin(radians(camera.tilt))];
  const size = scale * camera.zoom;
  const left = width * (0.5 + camera.panX);
  const top = height * (0.5 + camera.panY);
  let at = 0;
  for (const joint of joints) {
    const x = joint.x - ball.x;
    const y = joint.y - ball.y;
    const z = joint.z - ball.z;
    const right = ct * x - st * y;
    const away = st * x + ct * y;
    points[at] = left + size * right;
    points[at + 1] = top - size * (cl * z + sl * away);
    points[at + 2] = sl * z - cl * away;
    at += 3;
  }
  return points;
}

const EDGE_PX = 28;
const LEAST_PX = 20;

/**
 * Pixels of one millimetre at which the drawing fills the paper, looked at in one way.
 * @param camera how it is looked at; its zoom and pan do not count
 */
export function fillScale(
  joints: readonly Joint[],
  ball: Ball,
  camera: Camera,
  width: number,
  height: number,
): number {
  const points = project(joints, ball, { ...camera, panX: 0, panY: 0 }, 1, 0, 0);
  let [across, up] = [1, 1];
  for (let at = 0; at < points.length; at += 3) {
    across = Math.max(across, Math.abs(points[at] ?? 0));
    up = Math.max(up, Math.abs(points[at + 1] ?? 0));
  }
  return Math.min(
    Math.max(LEAST_PX, width - 2 * EDGE_PX) / (2 * across),
    Math.max(LEAST_PX, height - 2 * EDGE_PX) / (2 * up),
  );
}

const radians = (degrees: number): number => (degrees * Math.PI) / 180;

const MOST_TILT = 90;
const LEAST_ZOOM = 0.4;
const MOST_ZOOM = 24;

/** The camera turned, tilted, brought nearer or moved by a step; tilts end when it looks straight up or down. */
export function moved(camera: Camera, step: Partial<Camera> & { times?: number }): Camera {
  const zoom = camera.zoom * (step.times ?? 1);
  return {
    turn: (camera.turn + (step.turn ?? 0)) % 360,
    tilt: Math.max(-MOST_TILT, Math.min(MOST_TILT, camera.tilt + (step.tilt ?? 0))),
    zoom: Math.max(LEAST_ZOOM, Math.min(MOST_ZOOM, zoom)),
    panX: camera.panX + (step.panX ?? 0),
    panY: camera.panY + (step.panY ?? 0),
  };
}
