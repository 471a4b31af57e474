import { edgeKey, ringEdges } from './edge-key';
import type { Frame, Joint, Strut } from './frame';

/**
 * A ring of joints round the z axis, anticlockwise from above. Its first side faces the front (-y), so that a cube lies along the axes;
 * `halfSteps` turns it on by halves of a side.
 */
export function ringJoints(sides: number, radius: number, z: number, halfSteps: number): Joint[] {
  return Array.from({ length: sides }, (_, at) => {
    const angle = ((2 * at - 1 + halfSteps) * Math.PI) / sides - Math.PI / 2;
    return { x: radius * Math.cos(angle), y: radius * Math.sin(angle), z };
  });
}

/** A frame whose struts are the edges of its faces, each once, in the order in which the faces name them. */
export function frameOfFaces(joints: Joint[], faces: number[][]): Frame {
  const seen = new Set<number>();
  const struts: Strut[] = [];
  for (const face of faces)
    for (const [a, b] of ringEdges(face)) {
      const key = edgeKey(a, b);
      if (seen.has(key)) continue;
      seen.add(key);
      struts.push([a, b]);
    }
  return { joints, struts, faces };
}

/** Index of the `at`-th joint of the ring that starts at `start`, going round. */
export const ringIndex = (start: number, sides: number, at: number): number =>
  start + (((at % sides) + sides) % sides);

/** The ring as a face seen from above, or from below. */
export const lid = (start: number, sides: number): number[] =>
  Array.from({ length: sides }, (_, at) => start + at);
export const floor = (start: number, sides: number): number[] => lid(start, sides).reverse();

/** Triangles from a ring up to a tip. */
export const cone = (start: number, sides: number, tip: number): number[][] =>
  lid(start, sides).map((joint, at) => [joint, ringIndex(start, sides, at + 1), tip]);

/** Triangles from a ring down to a tip. */
export const funnel = (start: number, sides: number, tip: number): number[][] =>
  lid(start, sides).map((joint, at) => [ringIndex(start, sides, at + 1), joint, tip]);

/** Upright fields between a ring and an equal one above it, turned by nothing. */
export const wall = (lower: number, upper: number, sides: number): number[][] =>
  lid(lower, sides).map((joint, at) => [
    joint,
    ringIndex(lower, sides, at + 1),
    ringIndex(upper, sides, at + 1),
    ringIndex(upper, sides, at),
  ]);

/** Zigzag of triangles between a ring and one above it that is turned by half a side. */
export const zigzag = (lower: number, upper: number, sides: number): number[][] =>
  lid(lower, sides).flatMap((joint, at) => [
    [joint, ringIndex(lower, sides, at + 1), ringIndex(upper, sides, at)],
    [ringIndex(lower, sides, at + 1), ringIndex(upper, sides, at + 1), ringIndex(upper, sides, at)],
  ]);
