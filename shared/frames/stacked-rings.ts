import { edgeKey, ringEdges } from './edge-key';
import type { Frame, Joint, Strut } from './frame';

/** Radius to the corners of a regular polygon from its edge, both in mm. */
export const radiusOfEdge = (edgeMm: number, sides: number): number =>
  edgeMm / (2 * Math.sin(Math.PI / sides));

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

/** A ring as `ringJoints` makes it, from joint `start` on. */
export type Ring = { start: number; sides: number; halfSteps: number };

/** Directions of two sides closer than this are the same, in turns. */
const SAME_TURN = 1e-9;

/** The sides of a ring by the direction they face, in turns from 0 to 1, beginning with the least. */
function sidesByTurn({ sides, halfSteps }: Ring): { at: number; turn: number }[] {
  return Array.from({ length: sides }, (_, at) => {
    const turn = (2 * at + halfSteps) / (2 * sides);
    const within = turn - Math.floor(turn);
    return { at, turn: within > 1 - SAME_TURN ? 0 : within };
  }).sort((a, b) => a.turn - b.turn);
}

/**
 * The faces that close the gap between two rings of any numbers of sides, as their convex hull has them.
 * @param lower a ring, and `upper` one above it
 * @returns a triangle on each side of either ring, its tip the joint of the other ring that lies farthest that way; a four-cornered field
 *   where sides of both face the same way; anticlockwise seen from outside
 * Source: merging of edge directions, as in the Minkowski sum of two convex polygons.
 */
export function bridge(lower: Ring, upper: Ring): number[][] {
  const [low, high] = [sidesByTurn(lower), sidesByTurn(upper)];
  const joint = (ring: Ring, at: number) => ringIndex(ring.start, ring.sides, at);
  const faces: number[][] = [];
  let [i, j] = [0, 0];
  while (i < low.length || j < high.length) {
    // Past its last side a ring shows the joint at which its first one begins.
    const [below, above] = [low[i] ?? low[0]!, high[j] ?? high[0]!];
    const gap = (i < low.length ? below.turn : 2) - (j < high.length ? above.turn : 2);
    const [l0, l1] = [joint(lower, below.at), joint(lower, below.at + 1)];
    const [u0, u1] = [joint(upper, above.at), joint(upper, above.at + 1)];
    if (Math.abs(gap) < SAME_TURN) faces.push([l0, l1, u1, u0]);
    else faces.push(gap < 0 ? [l0, l1, u0] : [u1, u0, l0]);
    if (gap < SAME_TURN) i += 1;
    if (gap > -SAME_TURN) j += 1;
  }
  return faces;
}
