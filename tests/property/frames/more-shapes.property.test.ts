import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  buildShape,
  formatFrameCsv,
  parseFrameCsv,
  shapeSchema,
  strutLengths,
  validateFrame,
} from '../../../shared/frames';

const mm = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const sides = fc.integer({ min: 3, max: 24 });
const turn = mm(-180, 180);
const gem = fc.record({
  kind: fc.constant('gem'),
  tableSides: sides,
  tableWidthMm: mm(80, 900),
  tableTwist: turn,
  crownMm: mm(20, 900),
  girdleSides: sides,
  girdleWidthMm: mm(80, 900),
  girdleTwist: turn,
  depthMm: mm(20, 900),
  foot: fc.constantFrom('point', 'table'),
  footSides: sides,
  footWidthMm: mm(80, 900),
  footTwist: turn,
});
const cupola = fc.record({
  kind: fc.constant('cupola'),
  sides,
  edgeMm: mm(10, 900),
  uniform: fc.constant(false),
  heightMm: mm(10, 900),
});
const geodesic = fc
  .record({
    frequency: fc.integer({ min: 1, max: 8 }),
    share: mm(0, 1),
    dome: fc.boolean(),
    level: fc.boolean(),
  })
  .map(({ frequency, share, dome, level }) => ({
    kind: 'geodesic',
    radiusMm: 900,
    frequency,
    part: dome ? 'dome' : 'sphere',
    rows: 1 + Math.floor(share * (3 * frequency - 2)),
    levelFoot: level,
  }));
const lattice = fc.record({
  kind: fc.constantFrom('barrel-vault', 'flat-lattice', 'double-layer'),
  lengthMm: mm(300, 5000),
  widthMm: mm(300, 5000),
  riseMm: mm(10, 300),
  depthMm: mm(10, 900),
  divisionsAlong: fc.integer({ min: 1, max: 12 }),
  divisionsAcross: fc.integer({ min: 1, max: 6 }).map((half) => 2 * half),
  pattern: fc.constantFrom('square', 'diagonal', 'triangular'),
});

describe('buildShape', () => {
  it.each([
    ['gem', gem],
    ['cupola', cupola],
    ['geodesic', geodesic],
    ['lattice', lattice],
  ] as const)(
    '%s > any measures that the schema takes > a valid frame on the bench, struts of 5 mm and more, the same through CSV',
    (_, any) => {
      fc.assert(
        fc.property(any as fc.Arbitrary<object>, (input) => {
          const parsed = shapeSchema.safeParse(input);
          if (!parsed.success) {
            expect(parsed.error.issues.every(({ path }) => path.length === 1)).toBe(true);
            return;
          }
          const frame = buildShape(parsed.data);
          expect(validateFrame(frame)).toEqual([]);
          expect(Math.min(...strutLengths(frame))).toBeGreaterThanOrEqual(5 - 1e-9);
          expect(Math.min(...frame.joints.map(({ z }) => z))).toBeCloseTo(0, 6);
          expect(parseFrameCsv(formatFrameCsv(frame))).toMatchObject({ ok: true, value: { notes: [] } });
        }),
        { seed: 11, numRuns: 60 },
      );
    },
  );

  it('gem > any rings > closed: every strut bounds exactly two faces, walked both ways', () => {
    fc.assert(
      fc.property(gem, (input) => {
        const parsed = shapeSchema.safeParse(input);
        if (!parsed.success) return fc.pre(false);
        const { joints, struts, faces } = buildShape(parsed.data);
        const walked = faces.flatMap((face) =>
          face.map((joint, at) => `${joint}>${face[(at + 1) % face.length]}`),
        );
        expect(new Set(walked).size).toBe(walked.length);
        expect(walked).toHaveLength(2 * struts.length);
        expect(joints.length - struts.length + faces.length).toBe(2);
      }),
      { seed: 12, numRuns: 200 },
    );
  });
});
