import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  assemblyOrder,
  buildShape,
  flatDrawing,
  formatObj,
  frameFigures,
  parseObj,
  shapeSchema,
  strutLengths,
  validateFrame,
  wireframeThumbnail,
} from '../../../shared/frames';
import type { Frame, Shape } from '../../../shared/frames';

const lengthMm = fc.double({ min: 10, max: 5000, noNaN: true });
const based = {
  sides: fc.integer({ min: 3, max: 16 }),
  baseBy: fc.constantFrom('edge' as const, 'radius' as const),
  baseMm: fc.double({ min: 40, max: 3000, noNaN: true }),
};

const platonic = fc.record({
  kind: fc.constantFrom(
    'tetrahedron' as const,
    'cube' as const,
    'octahedron' as const,
    'dodecahedron' as const,
    'icosahedron' as const,
  ),
  edgeMm: lengthMm,
});
const closed: fc.Arbitrary<Shape> = fc.oneof(
  platonic,
  fc.record({ kind: fc.constant('prism' as const), ...based, heightMm: lengthMm }),
  fc.record({ kind: fc.constant('antiprism' as const), ...based, uniform: fc.boolean(), heightMm: lengthMm }),
  fc.record({ kind: fc.constant('pyramid' as const), ...based, heightMm: lengthMm }),
  fc.record({ kind: fc.constant('bipyramid' as const), ...based, upperMm: lengthMm, lowerMm: lengthMm }),
);
const vaultBay: fc.Arbitrary<Shape> = fc
  .record({
    lengthMm: fc.double({ min: 200, max: 9000, noNaN: true }),
    widthMm: fc.double({ min: 200, max: 9000, noNaN: true }),
    share: fc.double({ min: 0, max: 1, noNaN: true }),
    along: fc.integer({ min: 1, max: 6 }),
    across: fc.integer({ min: 1, max: 4 }),
    diagonals: fc.constantFrom(
      'none' as const,
      'one-way' as const,
      'alternating' as const,
      'staggered' as const,
    ),
  })
  .map(({ lengthMm: length, widthMm, share, along, across, diagonals }) => ({
    kind: 'vault-bay' as const,
    lengthMm: length,
    widthMm,
    riseMm: (share * widthMm) / 2,
    divisionsAlong: along,
    divisionsAcross: 2 * across,
    diagonals,
  }));
const shape = fc.oneof(closed, vaultBay);

/** Any valid frame: a random tree over scattered joints, some further struts, a triangle as a face where there is one. */
const anyFrame: fc.Arbitrary<Frame> = fc
  .array(fc.tuple(fc.nat(1e6), fc.double({ min: -4, max: 4, noNaN: true }), fc.nat(1e6)), {
    minLength: 2,
    maxLength: 30,
  })
  .map((seeds) => {
    const joints = seeds.map(([, offset], at) => ({
      x: at * 10 + offset,
      y: (at % 7) * 13 - offset,
      z: (at % 3) * offset + 0,
    }));
    const struts: [number, number][] = seeds.slice(1).map(([parent], at) => [parent % (at + 1), at + 1]);
    const known = new Set(struts.map(([a, b]) => `${a} ${b}`));
    const faces: number[][] = [];
    seeds.forEach(([, , other], at) => {
      const to = other % joints.length;
      const [a, b] = [Math.min(at, to), Math.max(at, to)];
      if (a === b || known.has(`${a} ${b}`)) return;
      known.add(`${a} ${b}`);
      struts.push([b, a]);
    });
    const [p, q] = struts[0]!;
    const third = joints.findIndex((_, at) =>
      [p, q].every((end) => known.has(`${Math.min(at, end)} ${Math.max(at, end)}`)),
    );
    if (third >= 0) faces.push([p, q, third]);
    return { joints, struts, faces };
  })
  .filter((frame) => validateFrame(frame).length === 0);

/** Minus zero is written as 0. */
const plainZeros = (frame: Frame): Frame => ({
  ...frame,
  joints: frame.joints.map(({ x, y, z }) => ({ x: x + 0, y: y + 0, z: z + 0 })),
});

describe('parseObj', () => {
  it('any valid frame > written and read back > exactly the same joints, struts and faces', () => {
    fc.assert(
      fc.property(anyFrame, (frame) => {
        const result = parseObj(formatObj(frame));
        expect(result.ok && result.value.frame).toEqual(plainZeros(frame));
      }),
    );
  });

  it('any shape > written and read back > exactly the same frame', () => {
    fc.assert(
      fc.property(shape, (measures) => {
        const frame = buildShape(measures);
        const result = parseObj(formatObj(frame));
        expect(result.ok && result.value.frame).toEqual(plainZeros(frame));
      }),
      { numRuns: 60 },
    );
  });

  const word = fc.oneof(
    fc.constantFrom(
      'v',
      'l',
      'f',
      'vn',
      '#',
      '\\',
      '\n',
      '\n',
      '\r\n',
      '\\\n',
      '1',
      '2',
      '3',
      '-1',
      '0',
      '1/2',
      '//',
      '1//3',
      'NaN',
      '1e999',
      '-0',
      '1e-9',
      '9'.repeat(30),
    ),
    fc.string({ maxLength: 4 }),
    fc.double().map(String),
  );

  it('random rubbish > read > never throws; problems name a line of the file, a frame is valid', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string({ unit: 'binary', maxLength: 300 }),
          fc.array(word, { maxLength: 80 }).map((words) => words.join(' ')),
        ),
        (text) => {
          const result = parseObj(text);
          if (result.ok) {
            expect(validateFrame(result.value.frame)).toEqual([]);
            return;
          }
          const lines = text.split(/\r\n|\n|\r/).length;
          expect(result.refusal.length).toBeGreaterThan(0);
          expect(result.refusal.length).toBeLessThanOrEqual(50);
          for (const { line } of result.refusal) {
            expect(line).toBeGreaterThanOrEqual(1);
            expect(line).toBeLessThanOrEqual(lines);
          }
        },
      ),
      { numRuns: 1000 },
    );
  });

  it('any frame with its file cut off anywhere > read > never throws, and never more joints or struts than before', () => {
    fc.assert(
      fc.property(anyFrame, fc.double({ min: 0, max: 1, noNaN: true }), (frame, share) => {
        const text = formatObj(frame);
        const result = parseObj(text.slice(0, Math.floor(text.length * share)));
        if (!result.ok) return;
        expect(result.value.frame.joints.length).toBeLessThanOrEqual(frame.joints.length);
        expect(result.value.frame.struts.length).toBeLessThanOrEqual(frame.struts.length);
      }),
    );
  });
});

describe('buildShape', () => {
  it('any measures > built > valid, accepted by the schema, Euler 2 when closed, 1 for a bay', () => {
    fc.assert(
      fc.property(shape, (measures) => {
        expect(shapeSchema.safeParse(measures).success).toBe(true);
        const frame = buildShape(measures);
        expect(validateFrame(frame)).toEqual([]);
        expect(frame.joints.length - frame.struts.length + frame.faces.length).toBe(
          measures.kind === 'vault-bay' ? 1 : 2,
        );
      }),
    );
  });

  it('any Platonic solid > any edge > every strut has that length', () => {
    fc.assert(
      fc.property(platonic, (measures) => {
        for (const length of strutLengths(buildShape(measures)))
          expect(Math.abs(length / measures.edgeMm - 1)).toBeLessThan(1e-12);
      }),
    );
  });

  it('any prism and pyramid > any measures > base edges and slanted edges as trigonometry has them', () => {
    fc.assert(
      fc.property(fc.record(based), lengthMm, ({ sides, baseBy, baseMm }, heightMm) => {
        const half = Math.sin(Math.PI / sides);
        const edge = baseBy === 'edge' ? baseMm : 2 * baseMm * half;
        const radius = edge / (2 * half);
        const rising = { prism: heightMm, pyramid: Math.hypot(radius, heightMm) };
        for (const kind of ['prism', 'pyramid'] as const) {
          const frame = buildShape({ kind, sides, baseBy, baseMm, heightMm });
          strutLengths(frame).forEach((length, at) => {
            const [a, b] = frame.struts[at]!;
            const level = frame.joints[a]!.z === frame.joints[b]!.z;
            expect(length / (level ? edge : rising[kind])).toBeCloseTo(1, 10);
          });
        }
      }),
    );
  });
});

describe('frameFigures', () => {
  it('any frame > measured > classes hold every strut once, none spreads over 0.1 mm, the total is theirs', () => {
    fc.assert(
      fc.property(fc.oneof(anyFrame, shape.map(buildShape)), (frame) => {
        const lengths = strutLengths(frame);
        const { lengthClasses, totalStrutMm } = frameFigures(frame);
        expect(lengthClasses.flatMap(({ struts }) => struts).sort((a, b) => a - b)).toEqual(
          lengths.map((_, at) => at),
        );
        for (const { struts } of lengthClasses) {
          const own = struts.map((strut) => lengths[strut]!);
          expect(Math.max(...own) - Math.min(...own)).toBeLessThanOrEqual(0.1 + 1e-8);
        }
        const sum = lengthClasses.reduce((total, { lengthMm: length, count }) => total + length * count, 0);
        expect(sum / totalStrutMm).toBeCloseTo(1, 9);
      }),
    );
  });
});

describe('assemblyOrder', () => {
  it('any frame in one part > ordered > every strut once, each touching one before it, the first at joint 1', () => {
    fc.assert(
      fc.property(fc.oneof(anyFrame, shape.map(buildShape)), (frame) => {
        const order = assemblyOrder(frame);
        expect([...order].sort((a, b) => a - b)).toEqual(frame.struts.map((_, at) => at));
        const built = new Set([0]);
        for (const strut of order) {
          const ends = frame.struts[strut]!;
          expect(ends.some((joint) => built.has(joint))).toBe(true);
          ends.forEach((joint) => built.add(joint));
        }
      }),
    );
  });
});

describe('flatDrawing', () => {
  it('any frame in any view > drawn > finite, whole, joints inside the margin', () => {
    fc.assert(
      fc.property(
        fc.oneof(anyFrame, shape.map(buildShape)),
        fc.constantFrom(
          'auto' as const,
          'isometric' as const,
          'front' as const,
          'top' as const,
          'side' as const,
        ),
        (frame, view) => {
          const { points, lines, dimensions } = flatDrawing(frame, {
            view,
            width: 400,
            height: 300,
            margin: 50,
          });
          expect([points.length, lines.length]).toEqual([frame.joints.length, frame.struts.length]);
          for (const { x, y, label } of points) {
            expect(x).toBeGreaterThanOrEqual(50 - 1e-6);
            expect(x).toBeLessThanOrEqual(350 + 1e-6);
            expect(y).toBeGreaterThanOrEqual(50 - 1e-6);
            expect(y).toBeLessThanOrEqual(250 + 1e-6);
            expect(Number.isFinite(label.x + label.y)).toBe(true);
          }
          for (const { label, mm, line } of dimensions) {
            expect(Number.isFinite(label.x + label.y + mm + line.x1 + line.y2)).toBe(true);
            expect(Math.abs(label.angle)).toBeLessThanOrEqual(90 + 1e-6);
          }
          expect(wireframeThumbnail(frame, 62, 37).match(/L/g)).toHaveLength(frame.struts.length);
        },
      ),
      { numRuns: 60 },
    );
  });
});
