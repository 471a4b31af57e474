import type { Frame, Joint } from './frame';
import type { Vector } from './vector';

/** How copies of a frame are set out; counts are whole numbers of 1 or more, steps and radius in mm. */
export type Pattern =
  | { kind: 'single' }
  | { kind: 'row'; count: number; step: Vector }
  | { kind: 'ring'; count: number; radius: number; turned: boolean }
  | { kind: 'grid'; counts: { x: number; y: number; z: number }; step: Vector };

/** Where a frame and its copies stand: `at` in mm, `turn` in degrees about x, then y, then z. */
export type Place = { at: Vector; turn: Vector; pattern: Pattern };

/** Where one copy stands. */
export type CopyPlace = { at: Vector; turn: Vector };

const RADIANS = Math.PI / 180;

/** How many frames a pattern sets out. */
export function copiesOf(pattern: Pattern): number {
  switch (pattern.kind) {
    case 'single':
      return 1;
    case 'row':
    case 'ring':
      return pattern.count;
    case 'grid':
      return pattern.counts.x * pattern.counts.y * pattern.counts.z;
  }
}

/**
 * Where each copy of a pattern stands.
 * @param place position of the first copy (of a ring: its centre), turn and pattern
 * @returns one per copy: along a row; round a ring anticlockwise from the x axis; through a grid by x, then y, then z
 */
export function copyPlaces({ at, turn, pattern }: Place): CopyPlace[] {
  const from = (x: number, y: number, z: number, step: Vector): CopyPlace => ({
    at: { x: at.x + x * step.x, y: at.y + y * step.y, z: at.z + z * step.z },
    turn,
  });
  switch (pattern.kind) {
    case 'single':
      return [{ at, turn }];
    case 'row':
      return Array.from({ length: pattern.count }, (_, k) => from(k, k, k, pattern.step));
    case 'ring':
      return Array.from({ length: pattern.count }, (_, k) => {
        const degrees = (360 * k) / pattern.count;
        return {
          at: {
            x: at.x + pattern.radius * Math.cos(degrees * RADIANS),
            y: at.y + pattern.radius * Math.sin(degrees * RADIANS),
            z: at.z,
          },
          turn: pattern.turned ? { ...turn, z: turn.z + degrees } : turn,
        };
      });
    case 'grid': {
      const { counts, step } = pattern;
      return Array.from({ length: copiesOf(pattern) }, (_, k) =>
        from(k % counts.x, Math.floor(k / counts.x) % counts.y, Math.floor(k / (counts.x * counts.y)), step),
      );
    }
  }
}

/**
 * A frame where it stands.
 * @param frame any frame, mm
 * @param place position in mm and turn in degrees, about x, then y, then z through the frame's own zero
 * @returns a new frame with the same numbers
 */
export function placeFrame(frame: Frame, { at, turn }: CopyPlace): Frame {
  const move = turning(turn);
  return {
    joints: frame.joints.map((joint) => {
      const turned = move(joint);
      return { x: turned.x + at.x, y: turned.y + at.y, z: turned.z + at.z };
    }),
    struts: frame.struts,
    faces: frame.faces,
  };
}

/** Cosine and sine; quarter turns exact, so that what is turned by 90 degrees still meets. */
function circle(degrees: number): [number, number] {
  const whole = ((degrees % 360) + 360) % 360;
  if (whole % 90 === 0) {
    const quarter = whole / 90;
    return [[1, 0, -1, 0][quarter] ?? 1, [0, 1, 0, -1][quarter] ?? 0];
  }
  return [Math.cos(whole * RADIANS), Math.sin(whole * RADIANS)];
}

function turning(turn: Vector): (joint: Joint) => Joint {
  const [cx, sx] = circle(turn.x);
  const [cy, sy] = circle(turn.y);
  const [cz, sz] = circle(turn.z);
  return ({ x, y, z }) => {
    const [y1, z1] = [cx * y - sx * z, sx * y + cx * z];
    const [x2, z2] = [cy * x + sy * z1, cy * z1 - sy * x];
    return { x: cz * x2 - sz * y1, y: sz * x2 + cz * y1, z: z2 };
  };
}
