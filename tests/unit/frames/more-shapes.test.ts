import { describe, expect, it } from 'vitest';
import {
  buildShape,
  fieldApplies,
  frameFigures,
  SHAPE_FORMS,
  shapeSchema,
  strutLengths,
  validateFrame,
  type Frame,
  type Shape,
} from '../../../shared/frames';

const build = (shape: object): Frame => buildShape(shapeSchema.parse(shape));
const counts = (frame: Frame) => [frame.joints.length, frame.struts.length, frame.faces.length];
const problems = (input: object): [string, string][] => {
  const parsed = shapeSchema.safeParse(input);
  return parsed.success ? [] : parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message]);
};
const paths = (input: object) => problems(input).map(([path]) => path);

/** How far the corners of a face lie from the plane of its first three, mm. */
function bend({ joints }: Frame, face: number[]): number {
  const [a, b, c, ...rest] = face.map((joint) => joints[joint]!);
  const [u, v] = [b!, c!].map((p) => [p.x - a!.x, p.y - a!.y, p.z - a!.z]) as [number[], number[]];
  const normal = [
    u[1]! * v[2]! - u[2]! * v[1]!,
    u[2]! * v[0]! - u[0]! * v[2]!,
    u[0]! * v[1]! - u[1]! * v[0]!,
  ];
  const size = Math.hypot(...normal);
  return Math.max(
    0,
    ...rest.map(
      (p) =>
        Math.abs((p.x - a!.x) * normal[0]! + (p.y - a!.y) * normal[1]! + (p.z - a!.z) * normal[2]!) / size,
    ),
  );
}

/** Whether no joint lies outside the plane of any face: the shape is its own convex hull, wound outwards. */
function convex(frame: Frame): boolean {
  return frame.faces.every((face) => {
    const [a, b, c] = face.map((joint) => frame.joints[joint]!);
    const u = { x: b!.x - a!.x, y: b!.y - a!.y, z: b!.z - a!.z };
    const v = { x: c!.x - a!.x, y: c!.y - a!.y, z: c!.z - a!.z };
    const n = { x: u.y * v.z - u.z * v.y, y: u.z * v.x - u.x * v.z, z: u.x * v.y - u.y * v.x };
    const size = Math.hypot(n.x, n.y, n.z);
    return frame.joints.every(
      (p) => (n.x * (p.x - a!.x) + n.y * (p.y - a!.y) + n.z * (p.z - a!.z)) / size < 1e-6,
    );
  });
}

const gem = {
  kind: 'gem',
  tableSides: 8,
  tableWidthMm: 240,
  tableTwist: 0,
  crownMm: 100,
  girdleSides: 8,
  girdleWidthMm: 400,
  girdleTwist: 0,
  depthMm: 300,
  foot: 'point',
};
const secondTable = { foot: 'table', footSides: 8, footWidthMm: 100, footTwist: 0 };

describe('buildShape of a cut gem', () => {
  it('gem > rings of equal sides, not turned > four-cornered fields above, triangles below, 17 joints', () => {
    const frame = build(gem);
    expect(counts(frame)).toEqual([17, 32, 17]);
    expect(frame.faces.map((face) => face.length).sort()).toEqual([
      ...Array(8).fill(3),
      ...Array(8).fill(4),
      8,
    ]);
    expect(Math.max(...frame.faces.map((face) => bend(frame, face)))).toBeLessThan(1e-9);
    expect(frameFigures(frame).boxMm.z).toBeCloseTo(400, 9);
  });

  it('gem > the table turned by half a side > triangles all round, one length', () => {
    const frame = build({ ...gem, tableTwist: 22.5 });
    expect(frame.faces.filter((face) => face.length === 3)).toHaveLength(24);
    const lengths = frameFigures(frame, 0.001).lengthClasses.map(({ count }) => count);
    expect(lengths.sort((a, b) => a - b)).toEqual([8, 8, 8, 16]);
  });

  it('gem > a table of 8 over a girdle of 16 > every joint of the table holds the same, whatever the widths', () => {
    for (const tableWidthMm of [60, 240, 600]) {
      const frame = build({ ...gem, girdleSides: 16, tableWidthMm });
      expect(counts(frame)).toEqual([25, 56, 33]);
      const held = frame.joints.map(
        (_, joint) => frame.struts.filter((strut) => strut.includes(joint)).length,
      );
      expect(new Set(held.slice(17))).toEqual(new Set([4]));
      expect(validateFrame(frame)).toEqual([]);
    }
  });

  it('gem > a second table of other sides, every ring turned > closed, wound outward, the widths kept', () => {
    const frame = build({
      ...gem,
      ...secondTable,
      tableSides: 5,
      girdleSides: 7,
      footSides: 3,
      tableTwist: 13,
      girdleTwist: -180,
      footTwist: 171,
    });
    expect(counts(frame)).toEqual([15, 37, 24]);
    expect(validateFrame(frame)).toEqual([]);
    expect(convex(frame)).toBe(true);
    expect(frame.joints.slice(0, 3).every(({ x, y }) => Math.abs(Math.hypot(x, y) - 50) < 1e-9)).toBe(true);
  });

  it('gem > a turn of 45 degrees > the ring stands 45 degrees further, anticlockwise from above', () => {
    const [still, turned] = [0, 45].map((tableTwist) => build({ ...gem, tableTwist }).joints[9]!);
    const angle = ({ x, y }: { x: number; y: number }) => (Math.atan2(y, x) * 180) / Math.PI;
    expect(angle(turned!) - angle(still!)).toBeCloseTo(45, 9);
  });

  it('gem > a second table without its measures, or several bad fields > every one named at once', () => {
    expect(paths({ ...gem, foot: 'table' })).toEqual(['footSides', 'footWidthMm', 'footTwist']);
    expect(paths({ ...gem, tableSides: 2, girdleTwist: 181, crownMm: 5, foot: 'ball' })).toEqual([
      'tableSides',
      'crownMm',
      'girdleTwist',
      'foot',
    ]);
    expect(problems({ ...gem, girdleTwist: 181 })[0]![1]).toContain('-180 to 180 degrees; you gave 181');
  });

  it('gem > rings whose sides are too short to cut > each named with its width and the length', () => {
    const found = problems({ ...gem, ...secondTable, footSides: 60, footWidthMm: 50, tableSides: 90 });
    expect(found.map(([path]) => path)).toEqual(['footWidthMm']);
    expect(found[0]![1]).toContain('2.6 mm');
  });
});

describe('buildShape of a cupola', () => {
  it('cupola > any number of sides with a height > closed, planar, convex, its edges as given', () => {
    for (const sides of [3, 6, 7, 20]) {
      const frame = build({ kind: 'cupola', sides, edgeMm: 100, uniform: false, heightMm: 60 });
      expect(counts(frame)).toEqual([3 * sides, 5 * sides, 2 * sides + 2]);
      expect(Math.max(...frame.faces.map((face) => bend(frame, face)))).toBeLessThan(1e-9);
      expect(convex(frame)).toBe(true);
      const lengths = strutLengths(frame).filter((length) => Math.abs(length - 100) < 1e-9);
      expect(lengths).toHaveLength(3 * sides);
    }
  });

  it('cupola > uniform with six sides, and without a height > refused at its field with the reason', () => {
    const flat = problems({ kind: 'cupola', sides: 6, edgeMm: 100, uniform: true });
    expect(flat).toEqual([['uniform', expect.stringContaining('3, 4 or 5 sides; with 6')]]);
    expect(paths({ kind: 'cupola', sides: 6, edgeMm: 100, uniform: false })).toEqual(['heightMm']);
    expect(() => buildShape({ kind: 'cupola', sides: 6, edgeMm: 100, uniform: false })).toThrow(RangeError);
  });
});

describe('buildShape of a geodesic dome', () => {
  const dome = { kind: 'geodesic', radiusMm: 2000, frequency: 3, part: 'dome', rows: 5 };

  it('geodesic dome > foot set level > every foot joint at z = 0 and still on the sphere', () => {
    const frame = build({ ...dome, levelFoot: true });
    const foot = frame.joints.slice(0, 15);
    expect(foot.every(({ z }) => Math.abs(z) < 1e-9)).toBe(true);
    const top = frame.joints.at(-1)!;
    expect([top.x, top.y]).toEqual([expect.closeTo(0, 9), expect.closeTo(0, 9)]);
    for (const { x, y, z } of frame.joints) expect(Math.hypot(x, y, z - (top.z - 2000))).toBeCloseTo(2000, 8);
  });

  it('geodesic dome > foot as it falls > 15 foot joints at two heights, an open floor', () => {
    const frame = build({ ...dome, levelFoot: false });
    const heights = new Set(frame.joints.slice(0, 15).map(({ z }) => z.toFixed(6)));
    expect(heights.size).toBe(2);
    expect(frame.joints.length - frame.struts.length + frame.faces.length).toBe(1);
  });

  it('geodesic dome > no rows, or as many as the sphere has > refused with how many there are', () => {
    expect(problems({ ...dome, rows: undefined })[0]).toEqual(['rows', expect.stringContaining('1 to 8')]);
    expect(problems({ ...dome, rows: 9 })[0]![1]).toContain('has 9 rows');
    expect(paths({ ...dome, frequency: 9 })).toEqual(['frequency']);
  });

  it('geodesic sphere > radius 30 mm at frequency 8 > refused, its struts cannot be cut', () => {
    expect(paths({ kind: 'geodesic', radiusMm: 30, frequency: 8, part: 'sphere' })).toEqual(['radiusMm']);
  });
});

const vault = {
  kind: 'barrel-vault',
  lengthMm: 3000,
  widthMm: 2000,
  riseMm: 800,
  divisionsAlong: 4,
  divisionsAcross: 6,
};
const flat = { kind: 'flat-lattice', lengthMm: 3000, widthMm: 2000, divisionsAlong: 4, divisionsAcross: 6 };

describe('buildShape of a lattice', () => {
  it.each([
    ['square', [35, 58, 24]],
    ['braced', [35, 82, 48]],
    ['diagonal', [59, 116, 58]],
    ['triangular', [32, 79, 48]],
  ])("barrel vault > %s pattern > valid, Euler's 1 of a disc, on its arc", (pattern, expected) => {
    const frame = build({ ...vault, pattern });
    expect(counts(frame)).toEqual(expected);
    expect(frame.joints.length - frame.struts.length + frame.faces.length).toBe(1);
    expect(validateFrame(frame)).toEqual([]);
    const radius = (1000 ** 2 + 800 ** 2) / 1600;
    for (const { x, z } of frame.joints) expect(Math.hypot(x, z + radius - 800)).toBeCloseTo(radius, 8);
    expect(frameFigures(frame).boxMm).toEqual({
      x: expect.closeTo(2000, 9),
      y: expect.closeTo(3000, 9),
      z: expect.closeTo(800, 9),
    });
  });

  it('barrel vault > a rise above half the width > a horseshoe that bulges past its feet', () => {
    const frame = build({ ...vault, riseMm: 1400, pattern: 'square' });
    const { boxMm } = frameFigures(frame);
    expect(boxMm.x).toBeGreaterThan(2000);
    expect(boxMm.z).toBeCloseTo(1400, 9);
    expect(frame.joints.filter(({ z }) => z === 0)).toHaveLength(10);
    expect(paths({ ...vault, riseMm: 2001, pattern: 'square' })).toEqual(['riseMm']);
  });

  it('barrel vault > the diagonal pattern > four struts at every joint but the corners, one length apart from the border', () => {
    const frame = build({ ...vault, pattern: 'diagonal' });
    const held = frame.joints.map((_, joint) => frame.struts.filter((strut) => strut.includes(joint)).length);
    expect(held.filter((count) => count === 4)).toHaveLength(59 - 4);
    expect(held.filter((count) => count === 3)).toHaveLength(4);
    expect(frameFigures(frame, 0.001).lengthClasses.map(({ count }) => count)).toEqual([8, 12, 96]);
  });

  it.each([
    ['square', [35, 58, 24]],
    ['diagonal', [59, 116, 58]],
    ['triangular', [32, 79, 48]],
  ])(
    'flat lattice > %s pattern > in the plane z = 0, all fields anticlockwise from above',
    (pattern, expected) => {
      const frame = build({ ...flat, pattern });
      expect(counts(frame)).toEqual(expected);
      expect(frame.joints.every(({ z }) => z === 0)).toBe(true);
      const area = frame.faces.map((face) =>
        face.reduce((sum, joint, at) => {
          const [a, b] = [frame.joints[joint]!, frame.joints[face[(at + 1) % face.length]!]!];
          return sum + (a.x * b.y - b.x * a.y) / 2;
        }, 0),
      );
      expect(Math.min(...area)).toBeGreaterThan(0);
      expect(area.reduce((sum, one) => sum + one, 0)).toBeCloseTo(6e6, 3);
    },
  );

  it('triangular pattern > odd divisions across > refused with the next even number', () => {
    expect(problems({ ...flat, divisionsAcross: 5, pattern: 'triangular' })).toEqual([
      ['divisionsAcross', expect.stringContaining('Take 6.')],
    ]);
  });

  const double = { ...flat, kind: 'double-layer', depthMm: 200 };

  it('double layer > 25 by 25 > 5,000 struts, layers 200 mm apart, every lower joint under the middle of a field', () => {
    const frame = build({ ...double, divisionsAlong: 25, divisionsAcross: 25 });
    expect(counts(frame)).toEqual([1301, 5000, 0]);
    expect(validateFrame(frame)).toEqual([]);
    expect(frame.joints.filter(({ z }) => z === 0)).toHaveLength(625);
    expect(frame.joints.filter(({ z }) => z === 200)).toHaveLength(676);
    expect(frameFigures(frame).lengthClasses.map(({ count }) => count)).toEqual([2500, 1250, 1250]);
  });

  it('double layer > 26 by 25 > refused with the number of struts', () => {
    const found = problems({ ...double, divisionsAlong: 26, divisionsAcross: 25 });
    expect(found).toEqual([['divisionsAlong', expect.stringContaining('5,200 struts; at most 5,000')]]);
  });

  it('lattice > fields too small to cut > refused', () => {
    expect(paths({ ...double, lengthMm: 100, divisionsAlong: 30 })).toEqual(['divisionsAlong']);
    expect(paths({ ...flat, pattern: 'square', widthMm: 100, divisionsAcross: 30 })).toEqual([
      'divisionsAlong',
    ]);
  });
});

describe('SHAPE_FORMS', () => {
  for (const [kind, { label, fields }] of Object.entries(SHAPE_FORMS)) {
    const values: Record<string, unknown> = Object.fromEntries(
      fields.map((field) => [field.key, field.start]),
    );
    const start: Record<string, unknown> = {
      kind,
      ...Object.fromEntries(
        fields.filter((field) => fieldApplies(field, values)).map((field) => [field.key, field.start]),
      ),
    };

    it(`${kind} > its form as it begins > builds a valid frame, with a label in words`, () => {
      const shape = shapeSchema.parse(start);
      expect(shape).toEqual(start);
      expect(validateFrame(buildShape(shape))).toEqual([]);
      expect(label).toMatch(/^[A-Za-z][^_]+$/);
    });

    it(`${kind} > every choice of its form > is one the schema takes`, () => {
      for (const field of fields)
        if (field.sort === 'choice')
          for (const { value } of field.options) {
            const wrong = paths({ ...start, [field.key]: value });
            expect(wrong).not.toContain(field.key);
          }
    });

    it(`${kind} > what the schema asks for > all of it is in the form`, () => {
      const asked = new Set(fields.map(({ key }) => key));
      expect(paths({ kind }).every((path) => asked.has(path))).toBe(true);
      expect(paths({ kind }).length).toBeGreaterThan(0);
    });
  }

  it('fieldApplies > the second table of a gem > asked for only when the gem has one', () => {
    const fields = SHAPE_FORMS.gem.fields;
    const keys = (foot: string) =>
      fields.filter((field) => fieldApplies(field, { foot })).map(({ key }) => key);
    expect(keys('point')).not.toContain('footSides');
    expect(keys('table')).toEqual(fields.map(({ key }) => key));
  });

  it('every kind of shape > in the forms > none is missing', () => {
    const kinds: Shape['kind'][] = ['gem', 'geodesic', 'cupola', 'archimedean', 'double-layer'];
    for (const kind of kinds) expect(SHAPE_FORMS[kind]).toBeDefined();
    expect(Object.keys(SHAPE_FORMS)).toHaveLength(17);
  });
});
