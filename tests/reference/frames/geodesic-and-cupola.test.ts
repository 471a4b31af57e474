import { describe, expect, it } from 'vitest';
import { buildShape, frameFigures, shapeSchema, validateFrame } from '../../../shared/frames';

/**
 * Chord factors of class I icosahedral spheres, method 1, and how many struts of each a whole sphere has: H. Kenner, Geodesic Math and
 * How to Use It (1976); Domebook 2 (1971); quoted from memory.
 */
const CHORDS: [number, [factor: number, struts: number][]][] = [
  [1, [[1.05146, 30]]],
  [
    2,
    [
      [0.61803, 60],
      [0.54653, 60],
    ],
  ],
  [
    3,
    [
      [0.41241, 120],
      [0.40355, 90],
      [0.34862, 60],
    ],
  ],
  [
    4,
    [
      [0.32492, 60],
      [0.31287, 120],
      [0.29859, 60],
      [0.29524, 60],
      [0.29453, 120],
      [0.25318, 60],
    ],
  ],
];
const geodesic = (frequency: number, more: object = { part: 'sphere' }) =>
  buildShape(shapeSchema.parse({ kind: 'geodesic', radiusMm: 1000, frequency, ...more }));

describe('buildShape of a geodesic sphere', () => {
  it.each(CHORDS)('geodesic sphere > frequency %i > chord factors of Kenner', (frequency, chords) => {
    const { lengthClasses } = frameFigures(geodesic(frequency), 0.001);
    expect(lengthClasses.map(({ lengthMm, count }) => [lengthMm / 1000, count])).toEqual(
      chords.map(([factor, count]) => [expect.closeTo(factor, 5) as number, count]),
    );
  });

  // 10 f^2 + 2 vertices, 30 f^2 edges, 20 f^2 faces: Kenner, from memory; they follow from Euler's formula.
  it.each([1, 2, 3, 4, 5, 6, 7, 8])(
    'geodesic sphere > frequency %i > 10 f² + 2 joints, 30 f² struts, 20 f² faces, all on the sphere',
    (f) => {
      const frame = geodesic(f);
      expect([frame.joints.length, frame.struts.length, frame.faces.length]).toEqual([
        10 * f * f + 2,
        30 * f * f,
        20 * f * f,
      ]);
      expect(validateFrame(frame)).toEqual([]);
      for (const { x, y, z } of frame.joints) expect(Math.hypot(x, y, z - 1000)).toBeCloseTo(1000, 8);
    },
  );

  it('geodesic dome > half of frequency 2 > 26 joints, 30 short and 35 long struts (Domebook 2, from memory), foot level by itself', () => {
    const frame = geodesic(2, { part: 'dome', rows: 3 });
    expect(frame.joints).toHaveLength(26);
    expect(frameFigures(frame).lengthClasses.map(({ count }) => count)).toEqual([35, 30]);
    expect(frame.joints.slice(0, 10).every(({ z }) => Math.abs(z) < 1e-9)).toBe(true);
  });

  it('geodesic dome > 5/8 of frequency 3 > 61 joints, 80, 55 and 30 struts of three lengths (Domebook 2, from memory)', () => {
    const frame = geodesic(3, { part: 'dome', rows: 5 });
    expect(frame.joints).toHaveLength(61);
    expect(frameFigures(frame).lengthClasses.map(({ count }) => count)).toEqual([80, 55, 30]);
  });
});

/**
 * Dihedral angles of the Johnson solids J3, J4 and J5: N. W. Johnson, Convex Polyhedra with Regular Faces (1966), from memory; those
 * between triangle and square are the cuboctahedron's, the rhombicuboctahedron's and the rhombicosidodecahedron's.
 */
describe('buildShape of a cupola', () => {
  it.each([
    [3, [125.2644, 70.5288, 54.7356]],
    [4, [144.7356, 135, 54.7356, 45]],
    [5, [159.0948, 148.2825, 37.3774, 31.7175]],
  ])(
    'cupola > uniform, %i sides > joints, struts and faces of the Johnson solid, its angles',
    (n, angles) => {
      const frame = buildShape(shapeSchema.parse({ kind: 'cupola', sides: n, edgeMm: 200, uniform: true }));
      const { joints, struts, faces, lengthClasses, dihedrals } = frameFigures(frame);
      expect([joints, struts, faces]).toEqual([3 * n, 5 * n, 2 * n + 2]);
      expect(lengthClasses.map(({ count }) => count)).toEqual([5 * n]);
      expect(lengthClasses[0]!.lengthMm).toBeCloseTo(200, 9);
      expect(dihedrals.map(({ degrees }) => Number(degrees.toFixed(4)))).toEqual(angles);
      expect(validateFrame(frame)).toEqual([]);
    },
  );
});
