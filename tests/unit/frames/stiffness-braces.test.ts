import { describe, expect, it } from 'vitest';
import { buildShape, shapeSchema } from '../../../shared/frames';
import type { Frame, Strut } from '../../../shared/frames';
import { analyseStiffness, proposeBraces } from '../../../shared/frames/stiffness';
import type { BraceOptions, BraceProposal } from '../../../shared/frames/stiffness';
import { hasRoom, stickDistance } from '../../../shared/frames/stiffness/clearance';

const shape = (input: unknown): Frame => buildShape(shapeSchema.parse(input));
function bracesOf(frame: Frame, options?: BraceOptions): BraceProposal {
  const found = proposeBraces(frame, options);
  if (!found.ok) throw new Error(found.refusal.message);
  return found.value;
}
const CUBE = shape({ kind: 'cube', edgeMm: 200 });

describe('proposeBraces', () => {
  it('a cube > 6 ways > a diagonal in each face, not one through the middle', () => {
    const found = bracesOf(CUBE);
    expect(found).toMatchObject({ mechanisms: 6, left: 0, shortfall: null });
    expect(found.braces).toHaveLength(6);
    for (const { lengthMm } of found.braces) expect(lengthMm).toBeCloseTo(200 * Math.SQRT2, 9);
    expect(found.totalMm).toBeCloseTo(1200 * Math.SQRT2, 9);
    const faces = found.braces.map(({ joints: [a, b] }) =>
      CUBE.faces.findIndex((f) => f.includes(a) && f.includes(b)),
    );
    expect(new Set(faces).size).toBe(6);
  });

  it('a stiff frame > nothing to stop > no braces', () => {
    expect(bracesOf(shape({ kind: 'icosahedron', edgeMm: 150 }))).toEqual({
      mechanisms: 0,
      braces: [],
      totalMm: 0,
      left: 0,
      shortfall: null,
    });
  });

  it('braces no longer than 250 mm in a cube of 200 mm > none reaches across a face > says what length would do', () => {
    const found = bracesOf(CUBE, { longestMm: 250 });
    expect(found).toMatchObject({ braces: [], left: 6, shortfall: { code: 'BRACES_BEYOND_LIMITS' } });
    expect(found.shortfall!.message).toBe(
      '6 ways of moving stay that braces could stop. Braces of up to 250 mm do not reach; with 283 mm they would. Allow longer braces or less room beside them, or tape the piece to a board.',
    );
  });

  it('a flat square > a diagonal stops it within its plane > one way out of the plane stays, with what helps', () => {
    const square: Frame = {
      joints: [0, 1, 2, 3].map((k) => ({
        x: 300 * Number(k === 1 || k === 2),
        y: 300 * Number(k > 1),
        z: 40,
      })),
      struts: [
        [0, 1],
        [1, 2],
        [2, 3],
        [3, 0],
      ],
      faces: [],
    };
    const found = bracesOf(square);
    expect(found.braces).toHaveLength(1);
    expect(found).toMatchObject({ mechanisms: 2, left: 1, shortfall: { code: 'BRACES_ALL_IN_ONE_PLANE' } });
    expect(found.shortfall!.message).toContain('1 way of moving out of its plane stay');
  });

  it('joints in one line > no strut along it helps > said so', () => {
    const line: Frame = {
      joints: [0, 100, 250].map((x) => ({ x, y: 0, z: 0 })),
      struts: [[0, 1]],
      faces: [],
    };
    // The loose third joint is linked along the line; across it the line still bends in two ways.
    const found = bracesOf(line);
    expect(found.braces).toEqual([{ joints: [1, 2], lengthMm: 150 }]);
    expect(found).toMatchObject({ left: 2, shortfall: { code: 'BRACES_ALL_IN_ONE_LINE' } });
  });

  it('a strut in the way of the shortest brace > room wanted > the next shortest, and none through a joint', () => {
    const slanted: Frame = {
      joints: [
        { x: 0, y: 0, z: 0 },
        { x: 400, y: 0, z: 0 },
        { x: 430, y: 300, z: 0 },
        { x: 0, y: 300, z: 0 },
        { x: 200, y: 150, z: 0 },
        { x: 200, y: 150, z: 300 },
      ],
      struts: [
        [0, 1],
        [1, 2],
        [2, 3],
        [0, 3],
        [4, 5],
        [5, 0],
        [5, 1],
        [5, 2],
        [5, 3],
      ],
      faces: [],
    };
    const free = bracesOf(slanted);
    const roomy = bracesOf(slanted, { clearanceMm: 10 });
    expect(free.left).toBe(0);
    expect(roomy.left).toBe(0);
    expect(roomy.totalMm).toBeGreaterThanOrEqual(free.totalMm);
    for (const { joints } of roomy.braces) expect(hasRoom(slanted, joints, 10)).toBe(true);
    expect(hasRoom(slanted, [1, 3], 10)).toBe(false);
  });

  it('a vault of 420 struts > 249 ways > 249 braces of the shortest lengths, and then nothing folds', () => {
    const vault = shape({
      kind: 'barrel-vault',
      lengthMm: 8000,
      widthMm: 4000,
      riseMm: 1500,
      divisionsAlong: 14,
      divisionsAcross: 14,
      pattern: 'square',
    });
    const found = bracesOf(vault, { clearanceMm: 12 });
    expect(found).toMatchObject({ mechanisms: 249, left: 0, shortfall: null });
    expect(found.braces).toHaveLength(249);
    const lengths = found.braces.map(({ lengthMm }) => lengthMm);
    expect(lengths).toEqual([...lengths].sort((a, b) => a - b));
    const known = new Set(vault.struts.map(([a, b]) => `${Math.min(a, b)}-${Math.max(a, b)}`));
    for (const { joints } of found.braces) expect(known.has(joints.join('-'))).toBe(false);
  });

  it('a tree of 1,200 struts > 2,397 ways > declined with what to do', () => {
    const joints = Array.from({ length: 1201 }, (_, k) => ({
      x: 100 * k,
      y: (k * 37) % 500,
      z: (k * 91) % 700,
    }));
    const struts = Array.from({ length: 1200 }, (_, k): Strut => [k, k + 1]);
    const found = proposeBraces({ joints, struts, faces: [] });
    expect(found).toEqual({
      ok: false,
      refusal: {
        code: 'BRACES_TOO_MANY',
        message:
          'The frame moves in 2,397 ways, too many to look for braces at once. Split it and ask for each piece.',
      },
    });
  });

  it('a frame without struts > refused as the stiffness is > same code', () => {
    expect(proposeBraces({ joints: [], struts: [], faces: [] })).toMatchObject({
      ok: false,
      refusal: { code: 'STIFFNESS_NO_STRUTS' },
    });
  });

  it('stiffness handed over > not computed again > same braces', () => {
    const known = analyseStiffness(CUBE);
    expect(known.ok && proposeBraces(CUBE, {}, known.value)).toEqual(proposeBraces(CUBE));
  });
});

describe('stickDistance', () => {
  const at = (x: number, y: number, z: number) => ({ x, y, z });

  it.each([
    ['crossing at a distance', [at(-1, 0, 0), at(1, 0, 0)], [at(0, -1, 2), at(0, 1, 2)], 2],
    ['crossing', [at(-1, 0, 0), at(1, 0, 0)], [at(0, -1, 0), at(0, 1, 0)], 0],
    ['side by side', [at(0, 0, 0), at(10, 0, 0)], [at(2, 3, 0), at(5, 3, 0)], 3],
    ['in one line, apart', [at(0, 0, 0), at(1, 0, 0)], [at(4, 0, 0), at(9, 0, 0)], 3],
    ['end to side', [at(0, 5, 0), at(0, 2, 0)], [at(-9, 0, 0), at(9, 0, 0)], 2],
    ['end to end', [at(0, 0, 0), at(1, 0, 0)], [at(4, 4, 0), at(9, 9, 0)], 5],
    ['point to stick', [at(1, 1, 0), at(1, 1, 0)], [at(0, 0, 0), at(4, 0, 0)], 1],
    ['point to point', [at(0, 0, 0), at(0, 0, 0)], [at(3, 4, 0), at(3, 4, 0)], 5],
  ] as const)('two sticks > %s > the least distance, either way round', (_, a, b, distance) => {
    expect(stickDistance(a, b)).toBeCloseTo(distance, 12);
    expect(stickDistance(b, a)).toBeCloseTo(distance, 12);
    expect(stickDistance([a[1], a[0]], b)).toBeCloseTo(distance, 12);
  });
});
