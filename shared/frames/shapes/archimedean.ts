import { z } from 'zod';
import type { Frame, Joint } from '../frame';
import { frameOfFaces } from '../stacked-rings';
import { add, cross, distance, dot, scale, subtract, unit } from '../vector';
import type { Vector } from '../vector';
import { ARCHIMEDEAN_SOLIDS, archimedeanPoints } from './archimedean-points';
import type { ArchimedeanSolid } from './archimedean-points';
import { lengthMm } from './measures';

/** One of the thirteen solids of Archimedes, all struts of one length. */
export const archimedeanSchema = z.object({
  kind: z.literal('archimedean'),
  solid: z.enum(Object.keys(ARCHIMEDEAN_SOLIDS) as [ArchimedeanSolid, ...ArchimedeanSolid[]], {
    error: 'Choose one of the thirteen Archimedean solids.',
  }),
  edgeMm: lengthMm('The edge'),
});
type Archimedean = z.infer<typeof archimedeanSchema>;

/** Two lengths of a solid of edge about 1 to 2 that differ by less are the same. */
const SAME = 1e-6;

/** For every joint those one edge away, anticlockwise seen from outside. No two joints of such a solid are nearer than an edge. */
function neighboursOf(points: readonly Vector[], edge: number): number[][] {
  return points.map((point, at) => {
    const outward = unit(point);
    const found = [...points.keys()].filter(
      (other) => other !== at && distance(points[other]!, point) < edge + SAME,
    );
    const ahead = subtract(points[found[0]!]!, point);
    const side = cross(outward, ahead);
    const turn = (other: number): number => {
      const way = subtract(points[other]!, point);
      return Math.atan2(dot(way, side), dot(way, subtract(ahead, scale(outward, dot(ahead, outward)))));
    };
    return found.sort((a, b) => turn(a) - turn(b));
  });
}

/** The faces, anticlockwise seen from outside: along every edge, always turning to the next one on the left. */
function facesOf(neighbours: readonly number[][]): number[][] {
  const walked = new Set<string>();
  const faces: number[][] = [];
  neighbours.forEach((around, start) => {
    for (const first of around) {
      if (walked.has(`${start}>${first}`)) continue;
      const face: number[] = [];
      let [from, to] = [start, first];
      do {
        walked.add(`${from}>${to}`);
        face.push(from);
        const ways = neighbours[to]!;
        const next = ways[(ways.indexOf(from) + ways.length - 1) % ways.length]!;
        [from, to] = [to, next];
      } while (from !== start);
      faces.push(face);
    }
  });
  return faces;
}

const middleOf = (points: readonly Vector[]): Vector =>
  scale(
    points.reduce((sum, point) => add(sum, point)),
    1 / points.length,
  );

/** The points turned so that a face lies level below, with its first side in front. */
function standOn(points: readonly Vector[], face: readonly number[]): Vector[] {
  const floor = middleOf(face.map((at) => points[at]!));
  const front = middleOf([points[face[0]!]!, points[face[1]!]!]);
  const up = scale(unit(floor), -1);
  const back = unit(subtract(floor, front));
  const right = cross(back, up);
  return points.map((point) => {
    const way = subtract(point, floor);
    return { x: dot(way, right), y: dot(way, back), z: dot(way, up) };
  });
}

/** Where a joint stands round the axis: anticlockwise from a little left of the front, by steps far finer than any side. */
function aroundFrom({ x, y }: Vector, sides: number): number {
  const turn = (Math.atan2(y, x) + Math.PI / 2 + Math.PI / sides) / (2 * Math.PI);
  return Math.round((turn - Math.floor(turn + SAME)) * 1e6);
}

/**
 * An Archimedean solid.
 * @param shape the solid, and its edge in mm as `shapeSchema` lets it through
 * @returns it stands on its face of the most sides, one of whose sides is in front; joints from the bottom up, anticlockwise at each
 *   height. Of the two snub solids, which have a left and a right form, always the same one.
 * Source: coordinates as named in `archimedeanPoints`; faces by walking the edges, own.
 */
export function buildArchimedean({ solid, edgeMm }: Archimedean): Frame {
  const points = archimedeanPoints(solid);
  const edge = points
    .slice(1)
    .reduce((least, point) => Math.min(least, distance(points[0]!, point)), Infinity);
  const faces = facesOf(neighboursOf(points, edge));
  const floor = faces.reduce((largest, face) => (face.length > largest.length ? face : largest));
  const standing = standOn(points, floor);
  const height = (at: number): number => Math.round(standing[at]!.z * 1e6);
  const order = [...standing.keys()].sort(
    (a, b) =>
      height(a) - height(b) ||
      aroundFrom(standing[a]!, floor.length) - aroundFrom(standing[b]!, floor.length),
  );
  const number = new Map(order.map((at, index) => [at, index]));
  const joints = order.map((at): Joint => {
    const { x, y, z: up } = scale(standing[at]!, edgeMm / edge);
    // Rounding of the turn must not lift the floor off the bench.
    return { x, y, z: height(at) === 0 ? 0 : up };
  });
  // From the floor up, as the joints are numbered.
  const renumbered = faces
    .map((face) => face.map((at) => number.get(at)!))
    .map((face) => {
      const first = face.indexOf(Math.min(...face));
      return [...face.slice(first), ...face.slice(0, first)];
    });
  renumbered.sort((a, b) => height(order[a[0]!]!) - height(order[b[0]!]!) || Math.max(...a) - Math.max(...b));
  return frameOfFaces(joints, renumbered);
}
