import { describe, expect, it } from 'vitest';
import {
  buildShape,
  frameFigures,
  glueEnds,
  shapeSchema,
  strutLengths,
  validateFrame,
} from '../../../shared/frames';

/**
 * Counts and dihedral angles: H. S. M. Coxeter, Regular Polytopes (Dover 1973), table I(i); the closed forms also in Cundy & Rollett,
 * Mathematical Models (1961). Quoted from memory; the decimals follow from the closed forms.
 */
const TABLE = [
  { kind: 'tetrahedron', v: 4, e: 6, f: 4, sides: 3, angle: Math.acos(1 / 3), decimals: 70.5288 },
  { kind: 'cube', v: 8, e: 12, f: 6, sides: 4, angle: Math.PI / 2, decimals: 90 },
  { kind: 'octahedron', v: 6, e: 12, f: 8, sides: 3, angle: Math.acos(-1 / 3), decimals: 109.4712 },
  {
    kind: 'dodecahedron',
    v: 20,
    e: 30,
    f: 12,
    sides: 5,
    angle: Math.acos(-1 / Math.sqrt(5)),
    decimals: 116.5651,
  },
  {
    kind: 'icosahedron',
    v: 12,
    e: 30,
    f: 20,
    sides: 3,
    angle: Math.acos(-Math.sqrt(5) / 3),
    decimals: 138.1897,
  },
] as const;

describe('buildShape', () => {
  for (const { kind, v, e, f, sides, angle, decimals } of TABLE) {
    const frame = buildShape(shapeSchema.parse({ kind, edgeMm: 250 }));
    const figures = frameFigures(frame);

    it(`${kind} of Coxeter's table I > built by its edge > ${v} joints, ${e} struts, ${f} faces of ${sides}, Euler's 2`, () => {
      expect([figures.joints, figures.struts, figures.faces]).toEqual([v, e, f]);
      expect(frame.faces.every((face) => face.length === sides)).toBe(true);
      expect(figures.joints - figures.struts + figures.faces).toBe(2);
      expect(glueEnds(frame)).toBe(2 * e);
      expect(validateFrame(frame)).toEqual([]);
    });

    it(`${kind} > edge of 250 mm > every strut 250 mm to a billionth, one length class`, () => {
      for (const length of strutLengths(frame)) expect(Math.abs(length / 250 - 1)).toBeLessThan(1e-12);
      expect(figures.lengthClasses).toHaveLength(1);
      expect(figures.totalStrutMm).toBeCloseTo(250 * e, 8);
    });

    it(`${kind} > dihedral angle of Coxeter's table I > ${decimals} degrees at all ${e} struts`, () => {
      expect(figures.dihedrals).toHaveLength(1);
      expect(figures.dihedrals[0]!.count).toBe(e);
      expect(figures.dihedrals[0]!.degrees).toBeCloseTo((angle * 180) / Math.PI, 9);
      expect(figures.dihedrals[0]!.degrees).toBeCloseTo(decimals, 4);
    });
  }

  it('uniform antiprism with 3 sides > is the octahedron > dihedral arccos(-1/3) everywhere (Coxeter, table I, from memory)', () => {
    const frame = buildShape({ kind: 'antiprism', sides: 3, baseBy: 'edge', baseMm: 200, uniform: true });
    const { dihedrals, lengthClasses } = frameFigures(frame);
    expect(dihedrals).toHaveLength(1);
    expect(dihedrals[0]!.degrees).toBeCloseTo((Math.acos(-1 / 3) * 180) / Math.PI, 9);
    expect(lengthClasses.map(({ count }) => count)).toEqual([12]);
  });
});
