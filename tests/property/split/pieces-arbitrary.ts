import fc from 'fast-check';
import type { Frame, Joint, Strut } from '../../../shared/frames';
import { seededRandom } from '../../../shared/kernel/random';
import type { Random } from '../../../shared/kernel/random';

/** A whole number from 0 below `below`. */
export const draw = (random: Random, below: number): number => Math.floor(random() * below);

/** The numbers from 0 in a random order. */
export function shuffled(random: Random, count: number): number[] {
  const order = Array.from({ length: count }, (_, at) => at);
  for (let at = count - 1; at > 0; at--) {
    const other = draw(random, at + 1);
    [order[at], order[other]] = [order[other]!, order[at]!];
  }
  return order;
}

/** A connected frame: a random tree on the joints and some further struts, joints at least 40 mm apart. */
export function randomFrame(random: Random, joints: number, extra: number, planar = false): Frame {
  const places: Joint[] = [];
  while (places.length < joints) {
    const place = { x: random() * 900, y: random() * 900, z: planar ? 0 : random() * 900 };
    if (places.every((p) => Math.hypot(p.x - place.x, p.y - place.y, p.z - place.z) > 40)) places.push(place);
  }
  const struts: Strut[] = [];
  const known = new Set<string>();
  const add = (a: number, b: number): void => {
    const key = `${Math.min(a, b)}-${Math.max(a, b)}`;
    if (a === b || known.has(key)) return;
    known.add(key);
    struts.push([a, b]);
  };
  for (let joint = 1; joint < joints; joint++) add(draw(random, joint), joint);
  for (let k = 0; k < extra; k++) add(draw(random, joints), draw(random, joints));
  return { joints: places, struts, faces: [] };
}

/** A turn about a random axis by a random angle and a shift, with the mirror image first where asked for. */
export function randomMotion(random: Random, mirrored: boolean): (p: Joint) => Joint {
  const [u, v, w] = [random(), random() * 2 * Math.PI, random() * 2 * Math.PI];
  // Shoemake's uniform random unit quaternion, written out with trigonometry: nothing of the code under test.
  const [a, b, c, d] = [
    Math.sqrt(1 - u) * Math.sin(v),
    Math.sqrt(1 - u) * Math.cos(v),
    Math.sqrt(u) * Math.sin(w),
    Math.sqrt(u) * Math.cos(w),
  ];
  const shift = { x: random() * 5000 - 2500, y: random() * 5000 - 2500, z: random() * 5000 };
  return (p) => {
    const z = mirrored ? -p.z : p.z;
    return {
      x: (1 - 2 * (b * b + c * c)) * p.x + 2 * (a * b - c * d) * p.y + 2 * (a * c + b * d) * z + shift.x,
      y: 2 * (a * b + c * d) * p.x + (1 - 2 * (a * a + c * c)) * p.y + 2 * (b * c - a * d) * z + shift.y,
      z: 2 * (a * c - b * d) * p.x + 2 * (b * c + a * d) * p.y + (1 - 2 * (a * a + b * b)) * z + shift.z,
    };
  };
}

/** The same frame somewhere else with joints and struts numbered otherwise, each joint off its place by at most `wobble` mm. */
export function movedFrame(random: Random, frame: Frame, mirrored: boolean, wobble = 0): Frame {
  const motion = randomMotion(random, mirrored);
  const order = shuffled(random, frame.joints.length);
  const place = new Map(order.map((joint, at) => [joint, at]));
  const off = () => ((random() * 2 - 1) * wobble) / Math.sqrt(3);
  const joints = order.map((joint) => {
    const p = motion(frame.joints[joint]!);
    return { x: p.x + off(), y: p.y + off(), z: p.z + off() };
  });
  const struts = shuffled(random, frame.struts.length).map((strut): Strut => {
    const [a, b] = frame.struts[strut]!;
    const ends: Strut = [place.get(a)!, place.get(b)!];
    return random() < 0.5 ? ends : [ends[1], ends[0]];
  });
  return { joints, struts, faces: frame.faces.map((face) => face.map((joint) => place.get(joint)!)) };
}

/** A seed and a connected frame of 4 to 30 joints. */
export const anyPiece = fc
  .record({
    seed: fc.integer({ min: 0, max: 2 ** 31 }),
    joints: fc.integer({ min: 4, max: 24 }),
    extra: fc.integer({ min: 0, max: 24 }),
  })
  .map(({ seed, joints, extra }) => {
    const random = seededRandom(seed);
    return { random, frame: randomFrame(random, joints, extra) };
  });
