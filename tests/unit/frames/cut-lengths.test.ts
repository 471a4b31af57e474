import { describe, expect, it } from 'vitest';
import {
  anglesAtJoints,
  buildShape,
  className,
  cutLengths,
  frameFigures,
  lengthClasses,
  type Frame,
} from '../../../shared/frames';

const zero = { x: 0, y: 0, z: 0 };
/** Struts of a length from joint 0 in the given directions, degrees in the plane. */
const star = (length: number, ...degrees: number[]): Frame => ({
  joints: [
    zero,
    ...degrees.map((d) => ({
      x: length * Math.cos((d * Math.PI) / 180),
      y: length * Math.sin((d * Math.PI) / 180),
      z: 0,
    })),
  ],
  struts: degrees.map((_, at) => [0, at + 1]),
  faces: [],
});
const codes = (frame: Frame, diameter = 8) => cutLengths(frame, diameter).warnings.map(({ code }) => code);

describe('anglesAtJoints', () => {
  it('anglesAtJoints > a cube > three right angles at each of eight joints', () => {
    const angles = anglesAtJoints(buildShape({ kind: 'cube', edgeMm: 100 }));
    expect(angles).toHaveLength(8);
    for (const { pairs } of angles) {
      expect(pairs).toHaveLength(3);
      for (const { degrees } of pairs) expect(degrees).toBeCloseTo(90, 9);
    }
  });

  it('anglesAtJoints > 0, 20 and 90 degrees > the smallest is the pair at 20, loose ends have none', () => {
    const [hub, end] = anglesAtJoints(star(100, 0, 20, 90));
    expect(hub!.smallest?.struts).toEqual([0, 1]);
    expect(hub!.smallest?.degrees).toBeCloseTo(20, 9);
    expect(hub!.pairs.map(({ struts }) => struts)).toEqual([
      [0, 1],
      [0, 2],
      [1, 2],
    ]);
    expect(end).toEqual({ joint: 1, pairs: [], smallest: null });
  });

  it('anglesAtJoints > struts without a length or with a missing joint > count for nothing', () => {
    const frame: Frame = {
      joints: [zero, { x: 100, y: 0, z: 0 }, zero],
      struts: [
        [0, 1],
        [0, 2],
        [0, 7],
      ],
      faces: [],
    };
    expect(anglesAtJoints(frame)[0]!.pairs).toEqual([]);
  });
});

describe('cutLengths', () => {
  it('cutLengths > struts at 0, 20 and 90 degrees > each end by its own smallest angle, loose ends whole', () => {
    const { struts } = cutLengths(star(500, 0, 20, 90), 10);
    const cot = (degrees: number) => 5 / Math.tan((degrees * Math.PI) / 360);
    const expected = [cot(20), cot(20), cot(70)];
    struts.forEach(({ centreMm, setBackMm, ends }, strut) => {
      expect(centreMm).toBeCloseTo(500, 9);
      expect(ends[0]).toBeCloseTo(expected[strut]!, 9);
      expect(ends[1]).toBe(0);
      expect(setBackMm).toBeCloseTo(500 - expected[strut]!, 9);
    });
  });

  it('cutLengths > the end of a strut that runs the other way > set back at the end it meets others with', () => {
    const frame = star(500, 0, 90);
    frame.struts[0] = [1, 0];
    expect(cutLengths(frame, 10).struts[0]!.ends).toEqual([0, expect.closeTo(5, 9)]);
  });

  it('cutLengths > 29 and 31 degrees > only the first is named as sharp, with joint and struts', () => {
    expect(codes(star(500, 0, 29))).toEqual(['ANGLE_SHARP']);
    expect(codes(star(500, 0, 31))).toEqual([]);
    const [warning] = cutLengths(star(500, 0, 29, 45), 8).warnings;
    expect(warning).toMatchObject({ joint: 0 });
    expect(warning!.message).toContain('16.0 degrees, the sharpest of 2');
    expect(warning!.message).toContain('struts 2 and 3');
  });

  it('cutLengths > set-backs of more and of less than a tenth > named with strut, millimetres and share, or not at all', () => {
    const triangle = (edgeMm: number): Frame => ({
      joints: [zero, { x: edgeMm, y: 0, z: 0 }, { x: edgeMm / 2, y: edgeMm * Math.sqrt(0.75), z: 0 }],
      struts: [
        [0, 1],
        [1, 2],
        [2, 0],
      ],
      faces: [],
    });
    // Two ends at 60 degrees take 2 * 0.866 * 10 = 17.32 mm.
    expect(codes(triangle(174), 10)).toEqual([]);
    expect(codes(triangle(173), 10)).toEqual(['SET_BACK_LARGE', 'SET_BACK_LARGE', 'SET_BACK_LARGE']);
    expect(cutLengths(triangle(150), 10).warnings[0]!.message).toContain('17.3 mm of 150.0 mm');
    const none = cutLengths(triangle(15), 10);
    expect(none.warnings.map(({ code }) => code)).toEqual(['SET_BACK_ALL', 'SET_BACK_ALL', 'SET_BACK_ALL']);
    expect(none.struts[0]!.setBackMm).toBe(0);
  });

  it('cutLengths > struts that run straight on > butt without a set-back and are listed', () => {
    const { struts, straight, warnings } = cutLengths(star(500, 0, 180), 10);
    expect(struts.map(({ setBackMm }) => setBackMm)).toEqual([
      expect.closeTo(500, 9),
      expect.closeTo(500, 9),
    ]);
    expect(straight).toEqual([{ joint: 0, struts: [0, 1] }]);
    expect(warnings).toEqual([]);
  });

  it('cutLengths > struts on each other, without length, with a missing joint > named, every number finite', () => {
    const frame = star(500, 0, 0.2, 90);
    frame.joints.push({ ...zero });
    frame.struts.push([0, 4], [0, 9]);
    const { struts, warnings } = cutLengths(frame, 8);
    expect(warnings.map(({ code }) => code)).toEqual([
      'STRUTS_OVERLAP',
      'STRUT_WITHOUT_LENGTH',
      'STRUT_WITHOUT_LENGTH',
    ]);
    for (const { centreMm, setBackMm, ends } of struts)
      for (const value of [centreMm, setBackMm, ...ends]) expect(Number.isFinite(value)).toBe(true);
    // The strut beside decides, not the one it lies on.
    expect(struts[0]!.ends[0]).toBeCloseTo(4, 6);
  });
});

describe('lengthClasses', () => {
  it('lengthClasses > 300, 299.5, 298.9 and 100 within 1 mm > A, B, C in falling length, none wider than 1 mm', () => {
    expect(lengthClasses([100, 298.9, 300, 299.5], 1)).toEqual([
      { name: 'A', lengthMm: 299.75, count: 2, struts: [2, 3] },
      { name: 'B', lengthMm: 298.9, count: 1, struts: [1] },
      { name: 'C', lengthMm: 100, count: 1, struts: [0] },
    ]);
  });

  it('lengthClasses > a length that is none > belongs to no class', () => {
    expect(lengthClasses([Number.NaN, 10], 1).map(({ struts }) => struts)).toEqual([[1]]);
  });

  it('className > 0, 25, 26, 27, 701, 702 > A, Z, AA, AB, ZZ, AAA', () => {
    expect([0, 25, 26, 27, 701, 702].map(className)).toEqual(['A', 'Z', 'AA', 'AB', 'ZZ', 'AAA']);
  });

  it('frameFigures > lengths 1 mm apart, tolerance given > one class instead of two', () => {
    const frame: Frame = {
      ...star(500, 0, 90),
      joints: [zero, { x: 500, y: 0, z: 0 }, { x: 0, y: 501, z: 0 }],
    };
    expect(frameFigures(frame).lengthClasses).toHaveLength(2);
    expect(frameFigures(frame, 1).lengthClasses.map(({ name, count }) => [name, count])).toEqual([['A', 2]]);
  });
});
