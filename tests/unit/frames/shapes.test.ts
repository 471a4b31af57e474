import { describe, expect, it } from 'vitest';
import { buildShape, frameFigures, shapeSchema, strutLengths, validateFrame } from '../../../shared/frames';
import type { Frame, Shape } from '../../../shared/frames';

/** Each edge must be walked once in each direction, and the volume be positive: faces wound anticlockwise from outside. */
function woundOutward({ joints, faces }: Frame): boolean {
  const walked = new Set<string>();
  let volume = 0;
  for (const face of faces) {
    face.forEach((joint, at) => walked.add(`${joint}>${face[(at + 1) % face.length]}`));
    const [a, ...rest] = face.map((joint) => joints[joint]!);
    for (let at = 0; at + 1 < rest.length; at++) {
      const [b, c] = [rest[at]!, rest[at + 1]!];
      volume +=
        a!.x * (b.y * c.z - b.z * c.y) + a!.y * (b.z * c.x - b.x * c.z) + a!.z * (b.x * c.y - b.y * c.x);
    }
  }
  const edges = faces.reduce((sum, face) => sum + face.length, 0);
  return walked.size === edges && volume > 0;
}

const counts = (frame: Frame) => [frame.joints.length, frame.struts.length, frame.faces.length];
const base = { baseBy: 'radius', baseMm: 200 } as const;

describe('buildShape', () => {
  for (const n of [3, 4, 5, 6, 12]) {
    const cases: [Shape, number[]][] = [
      [{ kind: 'prism', sides: n, ...base, heightMm: 300 }, [2 * n, 3 * n, n + 2]],
      [{ kind: 'antiprism', sides: n, ...base, uniform: false, heightMm: 300 }, [2 * n, 4 * n, 2 * n + 2]],
      [{ kind: 'pyramid', sides: n, ...base, heightMm: 300 }, [n + 1, 2 * n, n + 1]],
      [{ kind: 'bipyramid', sides: n, ...base, upperMm: 400, lowerMm: 100 }, [n + 2, 3 * n, 2 * n]],
    ];
    for (const [shape, expected] of cases)
      it(`${shape.kind} > ${n} sides > ${expected.join(' joints, ')} faces, closed, wound outward, valid`, () => {
        const frame = buildShape(shapeSchema.parse(shape));
        expect(counts(frame)).toEqual(expected);
        expect(frame.joints.length - frame.struts.length + frame.faces.length).toBe(2);
        expect(woundOutward(frame)).toBe(true);
        expect(validateFrame(frame)).toEqual([]);
      });
  }

  for (const kind of ['tetrahedron', 'cube', 'octahedron', 'dodecahedron', 'icosahedron'] as const)
    it(`${kind} > any edge > faces wound outward and it stands on z = 0`, () => {
      const frame = buildShape({ kind, edgeMm: 100 });
      expect(woundOutward(frame)).toBe(true);
      expect(Math.min(...frame.joints.map(({ z }) => z))).toBe(0);
    });

  it('cube > edge of 300 mm > lies along the axes, box 300 x 300 x 300', () => {
    const { x, y, z } = frameFigures(buildShape({ kind: 'cube', edgeMm: 300 })).boxMm;
    for (const measure of [x, y, z]) expect(measure).toBeCloseTo(300, 9);
  });

  it('any base > five sides > its first side faces the front', () => {
    const { joints } = buildShape({ kind: 'prism', sides: 5, ...base, heightMm: 300 });
    const front = Math.min(...joints.map(({ y }) => y));
    expect([joints[0]!.y, joints[1]!.y]).toEqual([expect.closeTo(front, 9), expect.closeTo(front, 9)]);
    expect(joints[0]!.x).toBeLessThan(joints[1]!.x);
  });

  it('prism > base by its edge of 150 mm, height 400 mm > two length classes, 150 and 400', () => {
    const frame = buildShape({ kind: 'prism', sides: 6, baseBy: 'edge', baseMm: 150, heightMm: 400 });
    const classes = frameFigures(frame).lengthClasses.map(({ lengthMm, count }) => [
      Math.round(lengthMm * 1e6) / 1e6,
      count,
    ]);
    expect(classes).toEqual([
      [400, 6],
      [150, 12],
    ]);
  });

  it('antiprism > uniform by edge > all struts equal to the edge and the height follows', () => {
    const frame = buildShape({
      kind: 'antiprism',
      sides: 5,
      baseBy: 'edge',
      baseMm: 200,
      uniform: true,
      heightMm: 999,
    });
    for (const length of strutLengths(frame)) expect(length).toBeCloseTo(200, 9);
  });

  it('antiprism > neither uniform nor a height > throws RangeError', () => {
    expect(() => buildShape({ kind: 'antiprism', sides: 5, ...base, uniform: false })).toThrow(RangeError);
  });

  it('bipyramid > upper 400 and lower 100 mm > box 500 mm high and struts as Pythagoras has them', () => {
    const frame = buildShape({ kind: 'bipyramid', sides: 5, ...base, upperMm: 400, lowerMm: 100 });
    const { boxMm, longestStrutMm } = frameFigures(frame);
    expect(boxMm.z).toBeCloseTo(500, 9);
    expect(longestStrutMm).toBeCloseTo(Math.hypot(200, 400), 9);
  });
});

const bay = {
  kind: 'vault-bay',
  lengthMm: 1000,
  widthMm: 2700,
  riseMm: 400,
  divisionsAlong: 2,
  divisionsAcross: 4,
  diagonals: 'staggered',
} as const;

/** No edge walked twice the same way, and every face anticlockwise seen from above or from the side it bulges to. */
function woundUpwards({ joints, faces }: Frame): boolean {
  const walked = faces.flatMap((face) => face.map((joint, at) => `${joint}>${face[(at + 1) % face.length]}`));
  const area = (face: number[]) =>
    face.reduce((sum, joint, at) => {
      const [a, b] = [joints[joint]!, joints[face[(at + 1) % face.length]!]!];
      return sum + a.x * b.y - b.x * a.y;
    }, 0);
  return new Set(walked).size === walked.length && faces.every((face) => area(face) > 0);
}

describe('buildShape of a vault bay', () => {
  for (const diagonals of ['none', 'one-way', 'alternating', 'staggered'] as const)
    for (const riseMm of [0, 1e-200, 1, 400, 1350])
      it(`${diagonals} diagonals > rise ${riseMm} mm > valid, Euler's 1 of a disc, width, rise and length kept`, () => {
        const frame = buildShape(shapeSchema.parse({ ...bay, diagonals, riseMm }));
        expect(validateFrame(frame)).toEqual([]);
        expect(frame.joints.length - frame.struts.length + frame.faces.length).toBe(1);
        const { boxMm } = frameFigures(frame);
        expect(boxMm.x).toBeCloseTo(2700, 6);
        expect(boxMm.y).toBeCloseTo(1000, 6);
        expect(boxMm.z).toBeCloseTo(riseMm, 6);
        expect(woundUpwards(frame)).toBe(true);
      });

  it('staggered > 2 along and 4 across > 13 joints, rows of 3, 2, 3, 2, 3', () => {
    const frame = buildShape(bay);
    const rows = new Map<number, number>();
    for (const { x } of frame.joints) rows.set(Math.round(x), (rows.get(Math.round(x)) ?? 0) + 1);
    expect([...rows.values()]).toEqual([3, 2, 3, 2, 3]);
    expect(frame.struts).toHaveLength(28);
  });

  it.each([
    ['none', 4],
    ['one-way', 6],
    ['alternating', 8],
  ] as const)('%s diagonals > 2 by 2 fields > %i struts meet in the middle', (diagonals, expected) => {
    const frame = buildShape({ ...bay, divisionsAcross: 2, diagonals });
    expect(frame.struts.filter((strut) => strut.includes(4))).toHaveLength(expected);
  });

  it('arc > rise 400 on a chord of 2,700 mm > every joint as far from the axis as the circle through them', () => {
    const radius = (2700 ** 2 / 4 + 400 ** 2) / 800;
    for (const { x, z } of buildShape(bay).joints)
      expect(Math.hypot(x, z + radius - 400)).toBeCloseTo(radius, 8);
  });

  it('largest allowed > 40 by 40 with diagonals > 4,880 struts as foreseen by the schema', () => {
    const shape = { ...bay, lengthMm: 9000, widthMm: 9000, divisionsAlong: 40, divisionsAcross: 40 };
    expect(buildShape(shapeSchema.parse({ ...shape, diagonals: 'one-way' })).struts).toHaveLength(4880);
    expect(shapeSchema.safeParse({ ...shape, diagonals: 'one-way', divisionsAcross: 41 }).success).toBe(
      false,
    );
    const staggered = { ...shape, diagonals: 'staggered', divisionsAlong: 41 };
    expect(buildShape(shapeSchema.parse(staggered)).struts).toHaveLength(4981);
    expect(shapeSchema.safeParse({ ...staggered, divisionsAlong: 42 }).success).toBe(false);
  });
});

const messages = (input: unknown): [string, string][] => {
  const parsed = shapeSchema.safeParse(input);
  return parsed.success ? [] : parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message]);
};

describe('shapeSchema', () => {
  it('several bad fields > one reading > every one at its field with limits and the number given', () => {
    expect(messages({ kind: 'prism', sides: 2, baseBy: 'edge', baseMm: 3, heightMm: Number.NaN })).toEqual([
      ['sides', 'The number of sides must be from 3 to 120; you gave 2.'],
      ['baseMm', 'The measure of the base must be from 10 to 20000 mm; you gave 3.'],
      ['heightMm', 'The height must be from 10 to 20000 mm; you gave NaN. Type a number.'],
    ]);
  });

  it('unknown kind > read > told which shapes there are', () => {
    expect(messages({ kind: 'torus' })[0]).toEqual([
      'kind',
      expect.stringContaining('Choose a shape: tetrahedron'),
    ]);
  });

  it.each([null, 'cube', 7, [], {}, { kind: 'cube' }, { kind: 'cube', edgeMm: '300' }])(
    'input %j > read > refused without throwing',
    (input) => expect(messages(input).length).toBeGreaterThan(0),
  );

  it('5.5 sides > read > refused as no whole number', () => {
    expect(messages({ kind: 'pyramid', sides: 5.5, ...base, heightMm: 100 })).toEqual([
      ['sides', 'The number of sides must be a whole number; you gave 5.5.'],
    ]);
  });

  it('antiprism > not uniform and without a height > asked for the height at its field', () => {
    expect(messages({ kind: 'antiprism', sides: 5, ...base, uniform: false })).toEqual([
      ['heightMm', 'Give the height, or choose all struts of one length.'],
    ]);
  });

  it('base radius 20 mm > 120 sides > refused, its struts would be 1.0 mm', () => {
    expect(messages({ kind: 'prism', sides: 120, baseBy: 'radius', baseMm: 20, heightMm: 100 })[0]).toEqual([
      'baseMm',
      expect.stringContaining('1.0 mm'),
    ]);
  });

  it('base edge 20 m > 120 sides > refused, it would reach too far from its centre', () => {
    expect(
      messages({ kind: 'prism', sides: 120, baseBy: 'edge', baseMm: 20_000, heightMm: 100 })[0]![0],
    ).toBe('baseMm');
  });

  it('vault bay > rise above half the width and odd staggered rows > both refused at once', () => {
    const found = messages({ ...bay, riseMm: 1351, divisionsAcross: 5 });
    expect(found.map(([path]) => path)).toEqual(['riseMm', 'divisionsAcross']);
    expect(found[0]![1]).toContain('At most 1350 mm');
  });

  it('vault bay > fields below 5 mm > refused at the divisions along', () => {
    expect(messages({ ...bay, lengthMm: 100, divisionsAlong: 40 })[0]![0]).toBe('divisionsAlong');
  });
});
