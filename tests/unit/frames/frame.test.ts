import { describe, expect, it } from 'vitest';
import {
  buildShape,
  cutCount,
  dihedralAngles,
  frameFigures,
  glueEnds,
  jointCount,
  strutLengths,
  validateFrame,
} from '../../../shared/frames';
import type { Frame } from '../../../shared/frames';

const square: Frame = {
  joints: [
    { x: 0, y: 0, z: 0 },
    { x: 100, y: 0, z: 0 },
    { x: 100, y: 100, z: 0 },
    { x: 0, y: 100, z: 0 },
  ],
  struts: [
    [0, 1],
    [1, 2],
    [2, 3],
    [3, 0],
  ],
  faces: [[0, 1, 2, 3]],
};

describe('frameFigures', () => {
  it('square of 100 mm > measured > counts, lengths and box', () => {
    expect(frameFigures(square)).toEqual({
      joints: 4,
      struts: 4,
      faces: 1,
      lengthClasses: [{ name: 'A', lengthMm: 100, count: 4, struts: [0, 1, 2, 3] }],
      totalStrutMm: 400,
      meanStrutMm: 100,
      longestStrutMm: 100,
      shortestStrutMm: 100,
      glueEnds: 8,
      boxMm: { x: 100, y: 100, z: 0 },
      dihedrals: [],
    });
    expect([cutCount(square), jointCount(square), glueEnds(square)]).toEqual([4, 4, 8]);
  });

  it('lengths 100.00, 100.10, 100.15 and 99.90 mm > classed > 0.1 mm from the longest together, no creeping chain', () => {
    const ends = [100, 100.1, 100.15, 99.9];
    const frame: Frame = {
      joints: [
        { x: 0, y: 0, z: 0 },
        ...ends.map((length, at) => (at % 2 ? { x: length, y: 0, z: 0 } : { x: 0, y: length, z: 0 })),
      ],
      struts: ends.map((_, at): [number, number] => [0, at + 1]),
      faces: [],
    };
    expect(frameFigures(frame).lengthClasses.map(({ struts }) => struts)).toEqual([
      [1, 2],
      [0, 3],
    ]);
  });

  it('frame without struts > measured > zeros, nothing infinite', () => {
    const figures = frameFigures({ joints: [], struts: [], faces: [] });
    expect([
      figures.meanStrutMm,
      figures.longestStrutMm,
      figures.shortestStrutMm,
      figures.totalStrutMm,
    ]).toEqual([0, 0, 0, 0]);
    expect(figures.boxMm).toEqual({ x: 0, y: 0, z: 0 });
  });

  it('strut to a missing joint > lengths > NaN and no throw', () => {
    expect(strutLengths({ joints: [], struts: [[0, 1]], faces: [] })).toEqual([Number.NaN]);
  });
});

describe('dihedralAngles', () => {
  const cube = buildShape({ kind: 'cube', edgeMm: 100 });

  it('cube with some faces wound backwards > measured > still 90 degrees everywhere', () => {
    const turned = { ...cube, faces: cube.faces.map((face, at) => (at % 2 ? [...face].reverse() : face)) };
    for (const { degrees } of dihedralAngles(turned)) expect(degrees).toBeCloseTo(90, 9);
  });

  it('bipyramid dented from below > measured > base struts reflex or sharp, sum right', () => {
    // The lower tip is pushed up through the base: inside the shape the angle at each base strut is the difference of two slopes.
    const dented = buildShape({
      kind: 'bipyramid',
      sides: 4,
      baseBy: 'edge',
      baseMm: 200,
      upperMm: 300,
      lowerMm: 100,
    });
    dented.joints[0] = { x: 0, y: 0, z: 200 };
    const slope = (height: number) => (Math.atan2(height, 100) * 180) / Math.PI;
    const degrees = dihedralAngles(dented).map((found) => found.degrees);
    const atBase = degrees.filter((angle) => Math.abs(angle - (slope(300) - slope(100))) < 1e-6);
    expect(atBase).toHaveLength(4);
    expect(degrees.filter((angle) => angle > 180)).toHaveLength(4);
  });

  it('open vault bay > measured > at most 180 degrees although it bends', () => {
    const vault = buildShape({
      kind: 'vault-bay',
      lengthMm: 900,
      widthMm: 900,
      riseMm: 300,
      divisionsAlong: 1,
      divisionsAcross: 2,
      diagonals: 'none',
    });
    const half = 2 * Math.atan2(600, 900);
    expect(dihedralAngles(vault).map(({ degrees }) => degrees)).toEqual([
      expect.closeTo(180 - (half * 180) / Math.PI, 9),
    ]);
  });

  it('open vault bay wound downwards > measured > the same angle, as nothing closes it', () => {
    const shape = {
      kind: 'vault-bay',
      lengthMm: 900,
      widthMm: 900,
      riseMm: 300,
      divisionsAlong: 1,
      divisionsAcross: 2,
      diagonals: 'none',
    } as const;
    const up = buildShape(shape);
    const down = { ...up, faces: up.faces.map((face) => [...face].reverse()) };
    expect(dihedralAngles(down)[0]!.degrees).toBeCloseTo(dihedralAngles(up)[0]!.degrees, 9);
  });

  it('edge of three faces > measured > left out, no pair of them is the shape', () => {
    const fan: Frame = {
      joints: [...square.joints, { x: 50, y: 50, z: 100 }],
      struts: [
        [0, 1],
        [1, 2],
        [2, 0],
        [1, 3],
        [3, 0],
        [1, 4],
        [4, 0],
      ],
      faces: [
        [0, 1, 2],
        [0, 1, 3],
        [0, 1, 4],
      ],
    };
    expect(dihedralAngles(fan)).toEqual([]);
  });
});

describe('validateFrame', () => {
  it('square > looked at > no problem', () => {
    expect(validateFrame(square)).toEqual([]);
  });

  it('everything wrong at once > looked at > every problem with its number from 1', () => {
    const bad: Frame = {
      joints: [
        { x: 0, y: 0, z: 0 },
        { x: Number.NaN, y: 0, z: 0 },
        { x: 100, y: 0, z: 0 },
        { x: 100.05, y: 0, z: 0 },
        { x: 5e6, y: 0, z: 0 },
        { x: 0, y: 50, z: 0 },
      ],
      struts: [
        [0, 2],
        [2, 0],
        [2, 3],
        [0, 0],
        [0, 9],
        [0, 1],
        [0, 4],
        [0, -1],
        [0, 0.5],
      ],
      faces: [
        [0, 2],
        [0, 2, 8],
        [0, 2, 0],
        [0, 2, 5],
      ],
    };
    const found = validateFrame(bad).map(
      ({ code, joint, strut, face }) => `${code} ${joint ?? strut ?? face}`,
    );
    expect(found).toEqual([
      'FRAME_NOT_A_NUMBER 2',
      'FRAME_SAME_PLACE 4',
      'FRAME_TOO_FAR 5',
      'FRAME_DOUBLED_STRUT 2',
      'FRAME_ZERO_LENGTH 3',
      'FRAME_ZERO_LENGTH 4',
      'FRAME_MISSING_JOINT 5',
      'FRAME_MISSING_JOINT 8',
      'FRAME_MISSING_JOINT 9',
      'FRAME_BAD_FACE 1',
      'FRAME_BAD_FACE 2',
      'FRAME_BAD_FACE 3',
      'FRAME_BAD_FACE 4',
      'FRAME_BAD_FACE 4',
      'FRAME_LOOSE_JOINT 6',
    ]);
  });

  it.each(['x', 'y', 'z'] as const)(
    'joints 0.05 mm apart along %s > either order > at the same place',
    (axis) => {
      // 99.97 and 100.02 lie on two sides of a whole tenth.
      for (const [one, two] of [
        [99.97, 100.02],
        [100.02, 99.97],
      ] as const) {
        const origin = { x: 0, y: 0, z: 0 };
        const frame: Frame = {
          joints: [origin, { ...origin, [axis]: one }, { ...origin, [axis]: two }],
          struts: [
            [0, 1],
            [0, 2],
          ],
          faces: [],
        };
        expect(validateFrame(frame).map(({ code, joint }) => [code, joint])).toEqual([
          ['FRAME_SAME_PLACE', 3],
        ]);
      }
    },
  );

  it('doubled strut > looked at > names both struts and both joints', () => {
    const [problem] = validateFrame({ ...square, struts: [...square.struts, [2, 1]] });
    expect(problem).toEqual({
      code: 'FRAME_DOUBLED_STRUT',
      strut: 5,
      message: 'Struts 2 and 5 both join 3 and 2. Leave one out.',
    });
  });

  it.each([
    [20_000, []],
    [20_001, ['FRAME_TOO_LARGE', 'FRAME_TOO_LARGE']],
  ])('chain of %i struts in a ring > looked at > limit codes %j', (count, codes) => {
    const ring: Frame = {
      joints: Array.from({ length: count }, (_, at) => ({ x: at * 10, y: (at % 2) * 10, z: 0 })),
      struts: Array.from({ length: count }, (_, at): [number, number] => [at, (at + 1) % count]),
      faces: [],
    };
    expect(validateFrame(ring).map(({ code }) => code)).toEqual(codes);
  });

  it('no struts > looked at > said so', () => {
    expect(validateFrame({ joints: [], struts: [], faces: [] }).map(({ code }) => code)).toEqual([
      'FRAME_WITHOUT_STRUTS',
    ]);
  });
});
