import { describe, expect, it } from 'vitest';
import { buildShape, shapeSchema } from '../../../shared/frames';
import type { Frame, Joint, Strut } from '../../../shared/frames';
import {
  analyseStiffness,
  countStiffness,
  PIN_JOINT_WORDS,
  shownMovement,
  stiffnessText,
} from '../../../shared/frames/stiffness';
import type { Stiffness } from '../../../shared/frames/stiffness';

const shape = (input: unknown): Frame => buildShape(shapeSchema.parse(input));
const frame = (places: readonly (readonly [number, number, number])[], struts: Strut[]): Frame => ({
  joints: places.map(([x, y, z]) => ({ x, y, z })),
  struts,
  faces: [],
});
function stiffnessOf(of: Frame): Stiffness {
  const found = analyseStiffness(of);
  if (!found.ok) throw new Error(found.refusal.message);
  return found.value;
}
const refusalOf = (of: Frame) => {
  const found = countStiffness(of);
  if (found.ok) throw new Error('expected a refusal');
  return found.refusal;
};

const SQUARE = frame(
  [
    [0, 0, 0],
    [300, 0, 0],
    [300, 300, 0],
    [0, 300, 0],
  ],
  [
    [0, 1],
    [1, 2],
    [2, 3],
    [0, 3],
  ],
);
const TETRAHEDRON = shape({ kind: 'tetrahedron', edgeMm: 300 });
const beside = (a: Frame, b: Frame, shift: Joint): Frame => ({
  joints: [
    ...a.joints,
    ...b.joints.map(({ x, y, z }) => ({ x: x + shift.x, y: y + shift.y, z: z + shift.z })),
  ],
  struts: [...a.struts, ...b.struts.map(([p, q]): Strut => [p + a.joints.length, q + a.joints.length])],
  faces: [],
});

describe('analyseStiffness', () => {
  it('a single strut > 6 coordinates, 1 row, 5 movements as a whole > nothing folds, nothing is spare', () => {
    const found = stiffnessOf(
      frame(
        [
          [0, 0, 0],
          [120, 50, 70],
        ],
        [[0, 1]],
      ),
    );
    expect(found).toMatchObject({
      rank: 1,
      rigidMotions: 5,
      mechanisms: 0,
      selfStress: 0,
      extent: 'line',
      flat: null,
      parts: [],
      moving: [],
    });
  });

  it('three joints in one line, two struts > 5 movements as a whole > the middle moves across in two ways', () => {
    const line = frame(
      [
        [0, 0, 0],
        [100, 100, 50],
        [200, 200, 100],
      ],
      [
        [0, 1],
        [1, 2],
      ],
    );
    expect(stiffnessOf(line)).toMatchObject({ rank: 2, rigidMotions: 5, mechanisms: 2, extent: 'line' });
    expect(stiffnessOf({ ...line, struts: [...line.struts, [0, 2]] })).toMatchObject({
      rank: 2,
      mechanisms: 2,
      selfStress: 1,
      strained: [0, 1, 2],
    });
  });

  it('a square of four struts > flat > folds once within its plane and once out of it', () => {
    const found = stiffnessOf(SQUARE);
    expect(found).toMatchObject({
      rank: 4,
      mechanisms: 2,
      extent: 'plane',
      flat: { inPlane: 1, outOfPlane: 1 },
    });
    expect(found.basis).toHaveLength(2);
    expect(found.moving).toEqual([0, 1, 2, 3]);
  });

  it('a square with a joint lifted by 0.02 mm > rounding of a file, less than the saw can tell > counted as flat', () => {
    const lifted = {
      ...SQUARE,
      joints: SQUARE.joints.map((joint, at) => (at === 2 ? { ...joint, z: 0.02 } : joint)),
    };
    const crossed = { ...lifted, struts: [...lifted.struts, [0, 2], [1, 3]] as Strut[] };
    expect(stiffnessOf(crossed)).toMatchObject({ rank: 5, extent: 'plane', mechanisms: 1, selfStress: 1 });
    const higher = { ...crossed, joints: crossed.joints.map((joint) => ({ ...joint, z: 20 * joint.z })) };
    expect(stiffnessOf(higher)).toMatchObject({
      rank: 6,
      extent: 'space',
      mechanisms: 0,
      soft: false,
      certain: true,
    });
  });

  it('a joint 0.06 mm above the plane of its three struts of 2 m > stiff only by that > said to be held by a hair', () => {
    const tip = frame(
      [
        [0, 0, 0],
        [4000, 0, 0],
        [0, 4000, 0],
        [1300, 1400, 0.06],
        [1000, 1000, -2000],
      ],
      [
        [0, 1],
        [1, 2],
        [0, 2],
        [0, 3],
        [1, 3],
        [2, 3],
        [0, 4],
        [1, 4],
        [2, 4],
      ],
    );
    const found = stiffnessOf(tip);
    expect(found).toMatchObject({ mechanisms: 0, soft: true });
    expect(found.leastHold).toBeGreaterThan(1e-5);
    expect(stiffnessText(found).join(' ')).toContain('held by a hair');
  });

  it('two tetrahedra apart > 12 struts, one whole of 6 movements > 6 ways against each other, two bits, two stiff parts', () => {
    const found = stiffnessOf(beside(TETRAHEDRON, TETRAHEDRON, { x: 900, y: 0, z: 0 }));
    expect(found).toMatchObject({ rank: 12, rigidMotions: 6, mechanisms: 6, bits: 2, moving: [4, 5, 6, 7] });
    expect(found.parts).toEqual([
      [0, 1, 2, 3],
      [4, 5, 6, 7],
    ]);
    expect(stiffnessText(found).join(' ')).toContain('in 2 bits that nothing links');
  });

  it('a joint without a strut > free in three directions > counted and named as a bit', () => {
    const found = stiffnessOf({ ...TETRAHEDRON, joints: [...TETRAHEDRON.joints, { x: 999, y: 0, z: 0 }] });
    expect(found).toMatchObject({ rank: 6, mechanisms: 3, bits: 2, moving: [] });
  });

  it('a flap on a tetrahedron > one triangle on a hinge > only its tip moves, and shown with the rest held', () => {
    const [a, b] = [TETRAHEDRON.joints[0]!, TETRAHEDRON.joints[1]!];
    const tip = { x: (a.x + b.x) / 2 + 400, y: (a.y + b.y) / 2 + 500, z: (a.z + b.z) / 2 + 300 };
    const flap: Frame = {
      joints: [...TETRAHEDRON.joints, tip],
      struts: [...TETRAHEDRON.struts, [0, 4], [1, 4]],
      faces: [],
    };
    const found = stiffnessOf(flap);
    expect(found).toMatchObject({ mechanisms: 1, moving: [4] });
    expect(found.parts).toEqual([
      [0, 1, 2, 3],
      [0, 1, 4],
    ]);
    const shown = shownMovement(flap, found, 0);
    for (const joint of shown.slice(0, 4)) expect(Math.hypot(joint.x, joint.y, joint.z)).toBeLessThan(1e-9);
    expect(Math.hypot(shown[4]!.x, shown[4]!.y, shown[4]!.z)).toBeCloseTo(1, 9);
    // Across both struts of the flap, as on a hinge.
    for (const end of [a, b])
      expect(
        shown[4]!.x * (tip.x - end.x) + shown[4]!.y * (tip.y - end.y) + shown[4]!.z * (tip.z - end.z),
      ).toBeCloseTo(0, 6);
    const floating = shownMovement(flap, found, 0, 'nothing');
    expect(Math.max(...floating.map(({ x, y, z }) => Math.hypot(x, y, z)))).toBeCloseTo(1, 9);
    expect(floating.reduce((sum, { x }) => sum + x, 0)).toBeCloseTo(0, 9);
    expect(() => shownMovement(flap, found, 1)).toThrow(
      'There is no way of moving number 2 among the 1 listed.',
    );
  });

  it('a square with both diagonals and a flap > spare strut in the square only > the square is strained, the flap is not', () => {
    const found = stiffnessOf({
      joints: [...SQUARE.joints, { x: 150, y: -200, z: 0 }],
      struts: [...SQUARE.struts, [0, 2], [1, 3], [0, 4], [1, 4]],
      faces: [],
    });
    expect(found).toMatchObject({
      selfStress: 1,
      strained: [0, 1, 2, 3, 4, 5],
      flat: { inPlane: 0, outOfPlane: 2 },
    });
    expect(stiffnessText(found).join(' ')).toContain('1 strut is spare among 6 struts');
  });

  it('a strut without length and one doubled > hold nothing > spare, and no number that is none', () => {
    const found = stiffnessOf({
      joints: [...TETRAHEDRON.joints, { ...TETRAHEDRON.joints[3]! }],
      struts: [...TETRAHEDRON.struts, [3, 4], TETRAHEDRON.struts[0]!],
      faces: [],
    });
    expect(found).toMatchObject({ rank: 6, selfStress: 2, mechanisms: 3, strained: [0, 6, 7] });
    for (const movement of found.basis!) expect(movement.every(Number.isFinite)).toBe(true);
  });

  it('all joints at one place > nothing has a direction > 3 shifts as a whole, no number that is none', () => {
    const place: readonly [number, number, number] = [5, 5, 5];
    const found = stiffnessOf(frame([place, place], [[0, 1]]));
    expect(found).toMatchObject({ rank: 0, rigidMotions: 3, mechanisms: 3, extent: 'point' });
    expect(stiffnessText(found).join(' ')).not.toMatch(/NaN|undefined|Infinity/);
  });

  it('bad frames > refused > with the joint or strut and what to do', () => {
    expect(refusalOf(frame([[0, 0, 0]], []))).toMatchObject({ code: 'STIFFNESS_NO_STRUTS' });
    expect(refusalOf({ ...SQUARE, struts: [[0, 9]] })).toEqual({
      code: 'STIFFNESS_MISSING_JOINT',
      message: 'Strut 1 ends at joint 10; the frame has joints 1 to 4. Choose one of those, then ask again.',
    });
    const lost = {
      ...SQUARE,
      joints: SQUARE.joints.map((joint, at) => (at === 1 ? { ...joint, y: Number.NaN } : joint)),
    };
    expect(refusalOf(lost)).toMatchObject({ code: 'STIFFNESS_NOT_A_NUMBER' });
    expect(refusalOf(lost).message).toContain('Joint 2 is at (300, NaN, 0), which is no place.');
  });

  it('3,000 struts between joints at random > no cut parts them, minutes of work > declined with the reason, at once', () => {
    const joints = Array.from({ length: 800 }, (_, k) => ({
      x: (k * 7919) % 997,
      y: (k * 104729) % 991,
      z: (k * 1299709) % 983,
    }));
    const struts = Array.from({ length: 3000 }, (_, k): Strut => [
      (k * 37) % 800,
      (k * 53 + 401 + (k % 13) * 57) % 800,
    ]);
    const refusal = refusalOf({ joints, struts: struts.filter(([a, b]) => a !== b), faces: [] });
    expect(refusal.code).toBe('STIFFNESS_TOO_LARGE');
    expect(refusal.message).toMatch(
      /^The stiffness of [\d,]+ struts linked as closely as these was not computed: it would take about \d+ s\./,
    );
  });

  it('a lattice of 600 struts > every movement listed > right angles, no stretch, no movement as a whole', () => {
    const lattice = shape({
      kind: 'flat-lattice',
      lengthMm: 8000,
      widthMm: 8000,
      divisionsAlong: 17,
      divisionsAcross: 17,
      pattern: 'square',
    });
    const found = stiffnessOf(lattice);
    expect(found).toMatchObject({
      struts: 612,
      rank: 612,
      selfStress: 0,
      flat: { inPlane: 33, outOfPlane: 321 },
    });
    const basis = found.basis!;
    expect(basis).toHaveLength(354);
    const product = (a: Float64Array, b: Float64Array) =>
      a.reduce((sum, value, at) => sum + value * b[at]!, 0);
    for (const way of [0, 100, 353]) {
      expect(product(basis[way]!, basis[way]!)).toBeCloseTo(1, 9);
      expect(product(basis[way]!, basis[(way + 17) % 354]!)).toBeCloseTo(0, 9);
      for (const axis of [0, 1, 2])
        expect(basis[way]!.reduce((sum, value, at) => (at % 3 === axis ? sum + value : sum), 0)).toBeCloseTo(
          0,
          9,
        );
      for (const [a, b] of lattice.struts) {
        const [p, q] = [lattice.joints[a]!, lattice.joints[b]!];
        const change =
          (p.x - q.x) * (basis[way]![3 * a]! - basis[way]![3 * b]!) +
          (p.y - q.y) * (basis[way]![3 * a + 1]! - basis[way]![3 * b + 1]!) +
          (p.z - q.z) * (basis[way]![3 * a + 2]! - basis[way]![3 * b + 2]!);
        expect(Math.abs(change)).toBeLessThan(1e-6);
      }
    }
  });

  it('a double-layer grid of 4,800 struts > counted front by front > its one twist found', () => {
    const grid = shape({
      kind: 'double-layer',
      lengthMm: 15000,
      widthMm: 15000,
      depthMm: 700,
      divisionsAlong: 24,
      divisionsAcross: 25,
    });
    const found = countStiffness(grid);
    expect(found.ok && found.value).toMatchObject({
      joints: 1250,
      struts: 4800,
      rank: 3743,
      mechanisms: 1,
      certain: true,
    });
  });
});

describe('stiffnessText', () => {
  it('a cube > six ways, every joint > said with what it means for glue', () => {
    expect(stiffnessText(stiffnessOf(shape({ kind: 'cube', edgeMm: 200 })))).toEqual([
      'It can fold in 6 ways.',
    ]);
    expect(stiffnessText(stiffnessOf(TETRAHEDRON))).toEqual(['It keeps its shape: no way of moving.']);
    expect(stiffnessText(stiffnessOf(SQUARE))).toEqual([
      'It can fold in 2 ways. 1 within its plane and 1 out of it.',
    ]);
    expect(PIN_JOINT_WORDS.join(' ')).toContain('needs temporary braces while the glue is warm');
  });
});
