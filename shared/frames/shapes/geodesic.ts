import { z } from 'zod';
import type { Frame, Joint } from '../frame';
import { firstAtPlace } from '../near-points';
import { frameOfFaces } from '../stacked-rings';
import { scale, size } from '../vector';
import { lengthMm, refuseShortStruts, whole } from './measures';
import type { Refuse } from './measures';

/** The finest division: 1,920 struts on the whole sphere. */
const MOST_FREQUENCY = 8;

/** A sphere of triangles on the icosahedron, a corner upwards, or its upper part. */
export const geodesicSchema = z.object({
  kind: z.literal('geodesic'),
  radiusMm: lengthMm('The radius'),
  /** Into how many each edge of the icosahedron is divided. */
  frequency: whole('The frequency', 1, MOST_FREQUENCY),
  part: z.enum(['sphere', 'dome'], { error: 'Choose the whole sphere or a dome.' }),
  /** Rows of triangles from the top that a dome keeps; the sphere has three times the frequency. */
  rows: whole('The number of rows', 1, 3 * MOST_FREQUENCY).optional(),
  /** Foot joints of a dome moved along the sphere to one height, so that it stands on a level floor. */
  levelFoot: z.boolean({ error: 'Say whether the foot of the dome is to be level.' }).optional(),
});
type Geodesic = z.infer<typeof geodesicSchema>;

/** Refuses a dome of more rows than there are, and struts too short to cut, each at its field. */
export function checkGeodesic(shape: Geodesic, refuse: Refuse): void {
  const most = 3 * shape.frequency - 1;
  if (shape.part === 'dome') {
    if (shape.rows === undefined) {
      refuse(
        'rows',
        `Say how many rows of triangles the dome keeps, 1 to ${most}, or choose the whole sphere.`,
      );
      return;
    }
    if (shape.rows > most) {
      refuse(
        'rows',
        `At frequency ${shape.frequency} the whole sphere has ${most + 1} rows; a dome keeps 1 to ${most}. You gave ${shape.rows}.`,
      );
      return;
    }
  }
  refuseShortStruts(
    buildGeodesic(shape),
    refuse,
    'radiusMm',
    'Make the radius larger or the frequency lower.',
  );
}

/** A corner of the icosahedron and the level it stands on: top 0, rings 1 and 2, bottom 3. */
type Corner = { at: Joint; level: number };

/** The icosahedron of radius 1 with a corner up. */
function corners(): Corner[] {
  // Latitude of the rings: their height is 1/sqrt 5 of the radius.
  const [z, radius] = [1 / Math.sqrt(5), 2 / Math.sqrt(5)];
  const ring = (height: number, offset: number, level: number) =>
    Array.from({ length: 5 }, (_, k) => {
      const angle = ((2 * k - 1 + offset) * Math.PI) / 5 - Math.PI / 2;
      return { at: { x: radius * Math.cos(angle), y: radius * Math.sin(angle), z: height }, level };
    });
  return [
    { at: { x: 0, y: 0, z: 1 }, level: 0 },
    ...ring(z, 0, 1),
    ...ring(-z, 1, 2),
    { at: { x: 0, y: 0, z: -1 }, level: 3 },
  ];
}

/** Its faces, anticlockwise seen from outside. */
function faces(): [number, number, number][] {
  const around = [0, 1, 2, 3, 4];
  const [upper, lower] = [(k: number) => 1 + (k % 5), (k: number) => 6 + (k % 5)];
  return [
    ...around.map((k): [number, number, number] => [0, upper(k), upper(k + 1)]),
    ...around.map((k): [number, number, number] => [upper(k), lower(k), upper(k + 1)]),
    ...around.map((k): [number, number, number] => [lower(k), lower(k + 1), upper(k + 1)]),
    ...around.map((k): [number, number, number] => [11, lower(k + 1), lower(k)]),
  ];
}

type Divided = { at: Joint; row: number };

/** The small triangles of the whole sphere of radius 1, each corner with its row from the top. */
function divided(frequency: number): Divided[][] {
  const known = corners();
  return faces().flatMap((face) => {
    const [a, b, c] = face.map((corner) => known[corner]!) as [Corner, Corner, Corner];
    const point = (i: number, j: number): Divided => {
      const [u, v, w] = [frequency - i - j, i, j];
      const mix = (key: 'x' | 'y' | 'z') => (u * a.at[key] + v * b.at[key] + w * c.at[key]) / frequency;
      const flat = { x: mix('x'), y: mix('y'), z: mix('z') };
      return { at: scale(flat, 1 / size(flat)), row: u * a.level + v * b.level + w * c.level };
    };
    const triangles: Divided[][] = [];
    for (let i = 0; i < frequency; i++)
      for (let j = 0; j < frequency - i; j++) {
        triangles.push([point(i, j), point(i + 1, j), point(i, j + 1)]);
        if (i + j < frequency - 1) triangles.push([point(i + 1, j), point(i + 1, j + 1), point(i, j + 1)]);
      }
    return triangles;
  });
}

/** Around the axis, anticlockwise from just left of the front, where the first side of every ring begins. */
function aroundFrom({ x, y }: Joint): number {
  const turn = (Math.atan2(y, x) + Math.PI / 2 + Math.PI / 5) / (2 * Math.PI);
  return Math.round((turn - Math.floor(turn + 1e-9)) * 1e9);
}

/**
 * A geodesic sphere or dome: every face of the icosahedron divided into equal triangles, their corners pushed out to the sphere.
 * @param shape radius in mm, frequency 1 to 8, as `shapeSchema` lets them through
 * @returns joints in rows from the lowest up, anticlockwise in each row; the lowest joint at z = 0; a dome has no floor
 * Source: class I subdivision, method 1 (Kenner, Geodesic Math and How to Use It, 1976, from memory).
 */
export function buildGeodesic({ radiusMm, frequency, part, rows, levelFoot }: Geodesic): Frame {
  const last = part === 'dome' ? (rows ?? 3 * frequency) : 3 * frequency;
  const triangles = divided(frequency).filter((triangle) => triangle.every(({ row }) => row <= last));
  const all = triangles.flat();
  const first = firstAtPlace(
    all.map(({ at }) => at),
    1e-6,
  );
  const order = [...new Set(first)].sort(
    (a, b) => all[b]!.row - all[a]!.row || aroundFrom(all[a]!.at) - aroundFrom(all[b]!.at),
  );
  const number = new Map(order.map((at, index) => [at, index]));
  const places = order.map((at) => all[at]!);
  const foot = places.filter(({ row }) => row === last);
  const level = foot.reduce((sum, { at }) => sum + at.z, 0) / foot.length;
  const moved = places.map(({ at, row }): Joint => {
    if (part !== 'dome' || levelFoot !== true || row !== last) return at;
    const reach = Math.sqrt((1 - level ** 2) / (at.x ** 2 + at.y ** 2));
    return { x: at.x * reach, y: at.y * reach, z: level };
  });
  const ground = moved.reduce((least, { z }) => Math.min(least, z), Infinity);
  return frameOfFaces(
    moved.map(({ x, y, z }) => ({ x: x * radiusMm, y: y * radiusMm, z: (z - ground) * radiusMm })),
    triangles.map((_, triangle) => [0, 1, 2].map((corner) => number.get(first[3 * triangle + corner]!)!)),
  );
}
