import { describe, expect, it } from 'vitest';
import {
  ARCHIMEDEAN_SOLIDS,
  buildShape,
  frameFigures,
  shapeSchema,
  strutLengths,
  validateFrame,
  type ArchimedeanSolid,
} from '../../../shared/frames';

/**
 * Vertices, edges, faces by number of sides, dihedral angles in degrees: R. Williams, The Geometrical Foundation of Natural Structure
 * (Dover 1979), and Cundy & Rollett, Mathematical Models (1961), table II; quoted from memory.
 */
const TABLE: Record<
  ArchimedeanSolid,
  { v: number; e: number; faces: Record<number, number>; dihedrals: number[] }
> = {
  'truncated-tetrahedron': { v: 12, e: 18, faces: { 3: 4, 6: 4 }, dihedrals: [109.4712, 70.5288] },
  cuboctahedron: { v: 12, e: 24, faces: { 3: 8, 4: 6 }, dihedrals: [125.2644] },
  'truncated-cube': { v: 24, e: 36, faces: { 3: 8, 8: 6 }, dihedrals: [125.2644, 90] },
  'truncated-octahedron': { v: 24, e: 36, faces: { 4: 6, 6: 8 }, dihedrals: [125.2644, 109.4712] },
  rhombicuboctahedron: { v: 24, e: 48, faces: { 3: 8, 4: 18 }, dihedrals: [144.7356, 135] },
  'truncated-cuboctahedron': {
    v: 48,
    e: 72,
    faces: { 4: 12, 6: 8, 8: 6 },
    dihedrals: [144.7356, 135, 125.2644],
  },
  'snub-cube': { v: 24, e: 60, faces: { 3: 32, 4: 6 }, dihedrals: [153.2346, 142.9834] },
  icosidodecahedron: { v: 30, e: 60, faces: { 3: 20, 5: 12 }, dihedrals: [142.6226] },
  'truncated-dodecahedron': { v: 60, e: 90, faces: { 3: 20, 10: 12 }, dihedrals: [142.6226, 116.5651] },
  'truncated-icosahedron': { v: 60, e: 90, faces: { 5: 12, 6: 20 }, dihedrals: [142.6226, 138.1897] },
  rhombicosidodecahedron: {
    v: 60,
    e: 120,
    faces: { 3: 20, 4: 30, 5: 12 },
    dihedrals: [159.0948, 148.2825],
  },
  'truncated-icosidodecahedron': {
    v: 120,
    e: 180,
    faces: { 4: 30, 6: 20, 10: 12 },
    dihedrals: [159.0948, 148.2825, 142.6226],
  },
  'snub-dodecahedron': { v: 60, e: 150, faces: { 3: 80, 5: 12 }, dihedrals: [164.1754, 152.9299] },
};

describe('buildShape', () => {
  for (const [solid, { v, e, faces, dihedrals }] of Object.entries(TABLE)) {
    const frame = buildShape(shapeSchema.parse({ kind: 'archimedean', solid, edgeMm: 250 }));
    const figures = frameFigures(frame);

    it(`${solid} of Cundy & Rollett's table II > built by its edge > ${v} joints, ${e} struts, its faces, Euler's 2`, () => {
      expect([figures.joints, figures.struts]).toEqual([v, e]);
      const bySides: Record<number, number> = {};
      for (const face of frame.faces) bySides[face.length] = (bySides[face.length] ?? 0) + 1;
      expect(bySides).toEqual(faces);
      expect(v - e + frame.faces.length).toBe(2);
      expect(validateFrame(frame)).toEqual([]);
    });

    it(`${solid} > edge of 250 mm > every strut 250 mm to a billionth of a millimetre`, () => {
      for (const length of strutLengths(frame)) expect(Math.abs(length - 250)).toBeLessThan(1e-9);
    });

    it(`${solid} > dihedral angles of Williams > ${dihedrals.join(', ')} degrees`, () => {
      expect(figures.dihedrals.map(({ degrees }) => Number(degrees.toFixed(4)))).toEqual(dihedrals);
    });

    it(`${solid} > its faces > anticlockwise seen from outside`, () => {
      const height = frame.joints.reduce((sum, { z }) => sum + z, 0) / v;
      for (const face of frame.faces) {
        const [a, b, c] = face.map((joint) => frame.joints[joint]!);
        const [p, q] = [b!, c!].map((at) => ({ x: at.x - a!.x, y: at.y - a!.y, z: at.z - a!.z }));
        const outward =
          (p!.y * q!.z - p!.z * q!.y) * a!.x +
          (p!.z * q!.x - p!.x * q!.z) * a!.y +
          (p!.x * q!.y - p!.y * q!.x) * (a!.z - height);
        expect(outward).toBeGreaterThan(0);
      }
    });

    it(`${solid} > where it stands > on a face of the most sides at z = 0, a side of it in front, every joint as far from the middle`, () => {
      const most = Math.max(...frame.faces.map((face) => face.length));
      const floor = frame.joints.filter(({ z }) => z === 0);
      expect(floor).toHaveLength(most);
      expect(Math.min(...frame.joints.map(({ z }) => z))).toBe(0);
      const front = Math.min(...floor.map(({ y }) => y));
      expect(frame.joints.slice(0, 2).map(({ y }) => y)).toEqual([
        expect.closeTo(front, 6),
        expect.closeTo(front, 6),
      ]);
      const mid = frame.joints.reduce((sum, { z }) => sum + z, 0) / v;
      const reach = frame.joints.map(({ x, y, z }) => Math.hypot(x, y, z - mid));
      expect(Math.max(...reach) - Math.min(...reach)).toBeLessThan(1e-6);
    });
  }

  it('ARCHIMEDEAN_SOLIDS > all thirteen > each in the table, with words of its faces', () => {
    expect(Object.keys(ARCHIMEDEAN_SOLIDS).sort()).toEqual(Object.keys(TABLE).sort());
    expect(Object.keys(TABLE)).toHaveLength(13);
  });
});
