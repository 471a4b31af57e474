import type { Frame, Joint } from '../../../shared/frames/frame';
import { cone, frameOfFaces, funnel, ringJoints } from '../../../shared/frames/stacked-rings';
import { buildVaultBay } from '../../../shared/frames/vault-bay';

const BAYS = 7;
const BAY_MM = 1000;
const WIDTH_MM = 2841;
const RISE_MM = 900;

/** One strut of the drawing: its ends on the page and how near it is, 0 far to 1 near. */
export interface DrawnLine {
  x1: number;
  y1: number;
  x2: number;
  y2: number;
  near: number;
  /** Along the foot or an end of a bay, where two bays lie side by side. */
  rib: boolean;
}

function lantern(at: Joint, radius: number): Frame {
  const joints = [{ x: 0, y: 0, z: -320 }, ...ringJoints(6, radius, 0, 0), { x: 0, y: 0, z: 240 }];
  const { struts, faces } = frameOfFaces(joints, [...funnel(1, 6, 0), ...cone(1, 6, 7)]);
  return {
    joints: joints.map(({ x, y, z }) => ({ x: x + at.x, y: y + at.y, z: z + at.z })),
    struts,
    faces,
  };
}

/** Two rows of lanterns hung under the vault at uneven heights, the same on every visit. */
const LANTERNS: readonly Joint[] = Array.from({ length: 14 }, (_, i) => ({
  x: i % 2 === 0 ? -430 : 420,
  y: 620 + i * 440,
  z: 260 + ((i * 37) % 5) * 52,
}));

interface Seen {
  x: number;
  y: number;
  depth: number;
}

/** From a little above and beside the near end, as somebody sees it who comes in. */
const EYE: Joint = { x: 3000, y: -3600, z: 2500 };
const AIM: Joint = { x: 0, y: 2900, z: 250 };

function camera() {
  const look = unit({ x: AIM.x - EYE.x, y: AIM.y - EYE.y, z: AIM.z - EYE.z });
  const right = unit({ x: look.y, y: -look.x, z: 0 });
  const up = {
    x: right.y * look.z - right.z * look.y,
    y: right.z * look.x - right.x * look.z,
    z: right.x * look.y - right.y * look.x,
  };
  return { look, right, up };
}

function unit({ x, y, z }: Joint): Joint {
  const size = Math.hypot(x, y, z);
  return { x: x / size, y: y / size, z: z / size };
}

const dot = (a: Joint, b: Joint): number => a.x * b.x + a.y * b.y + a.z * b.z;

/** The canopy of the sign-in page as lines of a pencil drawing, px, far ones first. */
export function canopyLines(width: number): { lines: DrawnLine[]; height: number } {
  const { look, right, up } = camera();
  const see = (joint: Joint): Seen => {
    const at = { x: joint.x - EYE.x, y: joint.y - EYE.y, z: joint.z - EYE.z };
    const depth = dot(at, look);
    return { x: dot(at, right) / depth, y: -dot(at, up) / depth, depth };
  };
  const bay = buildVaultBay({
    kind: 'vault-bay',
    lengthMm: BAY_MM,
    widthMm: WIDTH_MM,
    riseMm: RISE_MM,
    divisionsAlong: 2,
    divisionsAcross: 12,
    diagonals: 'staggered',
  });
  const raw: (Omit<DrawnLine, 'near'> & { depth: number })[] = [];
  const draw = (frame: Frame, dy: number, ribs: boolean) => {
    const seen = frame.joints.map((joint) => see({ ...joint, y: joint.y + dy }));
    for (const [a, b] of frame.struts) {
      const [from, to] = [seen[a], seen[b]];
      const [ja, jb] = [frame.joints[a], frame.joints[b]];
      if (!from || !to || !ja || !jb) continue;
      const atEnd = (y: number) => y < 1 || y > BAY_MM - 1;
      const rib = ribs && ((atEnd(ja.y) && Math.abs(ja.y - jb.y) < 1) || (ja.z < 1 && jb.z < 1));
      raw.push({ x1: from.x, y1: from.y, x2: to.x, y2: to.y, depth: (from.depth + to.depth) / 2, rib });
    }
  };
  for (let i = 0; i < BAYS; i++) draw(bay, i * BAY_MM * 1.03, true);
  LANTERNS.forEach((at) => draw(lantern(at, 150), 0, false));
  const xs = raw.flatMap(({ x1, x2 }) => [x1, x2]);
  const ys = raw.flatMap(({ y1, y2 }) => [y1, y2]);
  const [left, top] = [Math.min(...xs), Math.min(...ys)];
  const scale = (width - 4) / (Math.max(...xs) - left);
  const depths = raw.map(({ depth }) => depth);
  const [nearest, farthest] = [Math.min(...depths), Math.max(...depths)];
  const px = (value: number, from: number) => 2 + (value - from) * scale;
  const lines = raw
    .sort((a, b) => b.depth - a.depth)
    .map(({ x1, y1, x2, y2, depth, rib }) => ({
      x1: px(x1, left),
      y1: px(y1, top),
      x2: px(x2, left),
      y2: px(y2, top),
      near: 1 - (depth - nearest) / (farthest - nearest),
      rib,
    }));
  return { lines, height: px(Math.max(...ys), top) + 2 };
}
