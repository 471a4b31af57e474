import { describe, expect, it } from 'vitest';
import { buildShape, shapeSchema } from '../../../shared/frames';
import type { Frame, Joint, Strut } from '../../../shared/frames';
import { analyseStiffness, countStiffness } from '../../../shared/frames/stiffness';

const counts = (frame: Frame) => {
  const found = analyseStiffness(frame);
  if (!found.ok) throw new Error(found.refusal.message);
  return found.value;
};
const shape = (input: unknown): Frame => buildShape(shapeSchema.parse(input));
const frame = (places: readonly (readonly number[])[], struts: Strut[]): Frame => ({
  joints: places.map(([x, y, z]): Joint => ({ x: x!, y: y!, z: z ?? 0 })),
  struts,
  faces: [],
});
const complete = (count: number): Strut[] =>
  Array.from({ length: count }, (_, a) =>
    Array.from({ length: count - a - 1 }, (_, k): Strut => [a, a + 1 + k]),
  ).flat();

/** Places without symmetry: a frame is generic there unless it is special everywhere. */
const SCATTERED = [
  [113, 27, -341],
  [-207, 311, 89],
  [347, -151, 233],
  [-59, -283, -127],
  [251, 199, 71],
  [-317, 43, 277],
  [79, 337, -223],
  [-163, -107, 353],
  [293, 61, -97],
  [-31, 241, 179],
] as const;

describe('analyseStiffness', () => {
  /**
   * The skeleton of a convex polyhedron whose faces are free has rank E, so 3V - 6 - E mechanisms: A. L. Cauchy 1813, M. Dehn, Mathematische
   * Annalen 77 (1916) 466-473, A. D. Alexandrov, Convex Polyhedra (1950), chapter 10. Quoted from memory; the counts follow.
   */
  for (const [name, input, mechanisms] of [
    ['tetrahedron', { kind: 'tetrahedron', edgeMm: 250 }, 0],
    ['octahedron', { kind: 'octahedron', edgeMm: 250 }, 0],
    ['icosahedron', { kind: 'icosahedron', edgeMm: 250 }, 0],
    ['cube', { kind: 'cube', edgeMm: 250 }, 6],
    ['cuboctahedron', { kind: 'archimedean', solid: 'cuboctahedron', edgeMm: 250 }, 6],
    ['dodecahedron', { kind: 'dodecahedron', edgeMm: 250 }, 24],
    ['square pyramid', { kind: 'pyramid', sides: 4, baseBy: 'edge', baseMm: 250, heightMm: 200 }, 1],
    [
      'pentagonal bipyramid',
      { kind: 'bipyramid', sides: 5, baseBy: 'edge', baseMm: 250, upperMm: 200, lowerMm: 200 },
      0,
    ],
    ['truncated icosahedron', { kind: 'archimedean', solid: 'truncated-icosahedron', edgeMm: 100 }, 84],
    ['geodesic sphere of frequency 3', { kind: 'geodesic', frequency: 3, radiusMm: 1000, part: 'sphere' }, 0],
  ] as const)
    it(`${name} > Cauchy, Dehn, Alexandrov: rank E > ${mechanisms} mechanisms, no self-stress`, () => {
      const solid = shape(input);
      const found = counts(solid);
      expect(found).toMatchObject({
        mechanisms,
        selfStress: 0,
        rank: solid.struts.length,
        rigidMotions: 6,
        certain: true,
      });
      expect(found.basis).toHaveLength(mechanisms);
      // Maxwell 1864: struts less 3V - 6 is self-stresses less mechanisms.
      expect(found.maxwell).toBe(found.selfStress - found.mechanisms);
    });

  it('double banana > H. Crapo & W. Whiteley: 8 joints, 18 struts, Maxwell 0 > rank 17, one mechanism, one self-stress', () => {
    const banana = (tips: readonly [number, number], middle: readonly [number, number, number]): Strut[] => [
      ...middle.flatMap((m): Strut[] => tips.map((tip): Strut => [tip, m])),
      [middle[0], middle[1]],
      [middle[1], middle[2]],
      [middle[0], middle[2]],
    ];
    const double = frame(SCATTERED.slice(0, 8), [...banana([0, 1], [2, 3, 4]), ...banana([0, 1], [5, 6, 7])]);
    expect(double.struts).toHaveLength(18);
    const found = counts(double);
    expect(found).toMatchObject({ maxwell: 0, rank: 17, mechanisms: 1, selfStress: 1 });
    // Each banana keeps its shape; they turn about the line through their tips.
    expect(found.parts).toEqual([
      [0, 1, 2, 3, 4],
      [0, 1, 5, 6, 7],
    ]);
    expect(found.moving).toEqual([5, 6, 7]);
    expect(found.strained).toHaveLength(18);
    const barred = counts({ ...double, struts: [...double.struts, [0, 1]] });
    expect(barred).toMatchObject({ rank: 17, mechanisms: 1, selfStress: 2 });
  });

  it('cube with a diagonal in each of its six faces > Cauchy for its triangulated surface > just stiff: rank 18 of 18', () => {
    const cube = shape({ kind: 'cube', edgeMm: 250 });
    const diagonals = cube.faces.map(([a, , c]): Strut => [a!, c!]);
    const found = counts({ ...cube, struts: [...cube.struts, ...diagonals] });
    expect(found).toMatchObject({ struts: 18, rank: 18, mechanisms: 0, selfStress: 0, maxwell: 0 });
  });

  it('K4 to K6 in space > complete graphs are stiff, self-stress E - 3V + 6 > 0, 1 and 3', () => {
    for (const [count, selfStress] of [
      [4, 0],
      [5, 1],
      [6, 3],
    ] as const)
      expect(counts(frame(SCATTERED.slice(0, count), complete(count)))).toMatchObject({
        mechanisms: 0,
        selfStress,
      });
  });

  it('K4,6 and K5,5 in general places > E. Bolker & B. Roth 1980 > K4,6 just stiff, K5,5 stiff with one self-stress', () => {
    const bipartite = (left: number): Strut[] =>
      SCATTERED.slice(0, left).flatMap((_, a) => SCATTERED.slice(left).map((_, k): Strut => [a, left + k]));
    expect(counts(frame(SCATTERED, bipartite(4)))).toMatchObject({ rank: 24, mechanisms: 0, selfStress: 0 });
    expect(counts(frame(SCATTERED, bipartite(5)))).toMatchObject({ rank: 24, mechanisms: 0, selfStress: 1 });
  });

  it('K3,3 in a plane > Bolker & Roth: stiff unless its joints lie on a conic > on a circle one mechanism and one self-stress', () => {
    const struts = [0, 1, 2].flatMap((a): Strut[] => [3, 4, 5].map((b): Strut => [a, b]));
    const scattered = SCATTERED.slice(0, 6).map(([x, y]) => [x, y]);
    expect(counts(frame(scattered, struts))).toMatchObject({
      rank: 9,
      selfStress: 0,
      flat: { inPlane: 0, outOfPlane: 3 },
    });
    const turns = [10, 50, 115, 170, 235, 300].map((degrees) => (degrees * Math.PI) / 180);
    const round = turns.map((turn) => [300 * Math.cos(turn), 300 * Math.sin(turn)]);
    expect(counts(frame(round, struts))).toMatchObject({
      rank: 8,
      selfStress: 1,
      flat: { inPlane: 1, outOfPlane: 3 },
    });
  });

  it('octahedron as a twisted antiprism > W. Wunderlich 1965 (from memory): upper triangle a quarter turn off the even place > loose there only', () => {
    const antiprism = (degrees: number): Frame => {
      const ring = (turn: number, z: number) =>
        [0, 1, 2].map((k) => {
          const angle = ((turn + 120 * k) * Math.PI) / 180;
          return [200 * Math.cos(angle), 200 * Math.sin(angle), z];
        });
      const sides = [0, 1, 2].flatMap((k): Strut[] => [
        [k, (k + 1) % 3],
        [3 + k, 3 + ((k + 1) % 3)],
        [k, 3 + k],
        [k, 3 + ((k + 2) % 3)],
      ]);
      return frame([...ring(0, 0), ...ring(degrees, 300)], sides);
    };
    expect(counts(antiprism(60))).toMatchObject({ rank: 12, mechanisms: 0 });
    // Struts from k to k and to k + 2: the middle of the two lies at 300 degrees; a turn of 90 degrees from there is the special one.
    expect(counts(antiprism(150))).toMatchObject({ rank: 11, mechanisms: 1, selfStress: 1 });
    expect(counts(antiprism(140))).toMatchObject({ rank: 12, mechanisms: 0, selfStress: 0 });
  });

  it('square-on-square-offset grid, 8 by 8 bays > Maxwell: 512 struts, 429 needed > counted sparsely and in full alike', () => {
    const grid = shape({
      kind: 'double-layer',
      lengthMm: 8000,
      widthMm: 8000,
      depthMm: 700,
      divisionsAlong: 8,
      divisionsAcross: 8,
    });
    const short = countStiffness(grid);
    const full = counts(grid);
    expect(full).toMatchObject({ maxwell: 83, rank: 428, mechanisms: 1, selfStress: 84 });
    expect(short.ok && short.value).toMatchObject({
      rank: 428,
      mechanisms: 1,
      selfStress: 84,
      certain: true,
    });
  });
});
