import { beforeAll, describe, expect, it } from 'vitest';
import { openHighs } from '../../../server/jobs/highs-solver';
import { buildShape } from '../../../shared/frames';
import type { Frame, Strut } from '../../../shared/frames';
import type { LinearSolver } from '../../../shared/kernel/linear-program';
import { solveFlats } from '../../../shared/split/pieces/flats-program';
import { searchFlats } from '../../../shared/split/pieces/flats-search';
import { areLinked, chooseFlats, planarRings } from '../../../shared/split/pieces';

let solver: LinearSolver;
beforeAll(async () => {
  solver = await openHighs();
});

const at = (x: number, y: number, z = 0) => ({ x, y, z });
const ringOf = (joints: number[]): Strut[] =>
  joints.map((joint, k): Strut => [joint, joints[(k + 1) % joints.length]!]);

/** A level square, and an upright one that goes through its middle. */
function twoLinks(gap: number): Frame {
  return {
    joints: [
      at(0, 0),
      at(200, 0),
      at(200, 200),
      at(0, 200),
      at(100 + gap, 100, -100),
      at(300 + gap, 100, -100),
      at(300 + gap, 100, 100),
      at(100 + gap, 100, 100),
    ],
    struts: [...ringOf([0, 1, 2, 3]), ...ringOf([4, 5, 6, 7])],
    faces: [],
  };
}

describe('planarRings', () => {
  it('octahedron without faces > searched > eight triangles and the three squares round its middle', () => {
    const { rings, complete } = planarRings({
      ...buildShape({ kind: 'octahedron', edgeMm: 200 }),
      faces: [],
    });
    expect(complete).toBe(true);
    expect(rings.map((ring) => ring.joints.length).sort()).toEqual([3, 3, 3, 3, 3, 3, 3, 3, 4, 4, 4]);
  });

  it('each ring > looked at > its struts join its joints in order, no joint twice', () => {
    const frame = buildShape({ kind: 'icosahedron', edgeMm: 200 });
    const { rings } = planarRings(frame);
    expect(rings).toHaveLength(20 + 12);
    for (const { joints, struts } of rings) {
      expect(new Set(joints).size).toBe(joints.length);
      struts.forEach((strut, k) => {
        const ends = [joints[k], joints[(k + 1) % joints.length]];
        expect([...frame.struts[strut]!].sort()).toEqual(ends.sort());
      });
    }
  });

  it('a joint 2 mm off the plane of its ring > searched at 0.5 mm and at 3 mm > no ring, then the ring', () => {
    const frame: Frame = {
      joints: [at(0, 0), at(200, 0), at(200, 200, 4), at(0, 200)],
      struts: ringOf([0, 1, 2, 3]),
      faces: [[0, 1, 2, 3]],
    };
    expect(planarRings(frame).rings).toEqual([]);
    expect(planarRings(frame, 3).rings).toHaveLength(1);
  });

  it('a ring whose struts cross > searched > not taken: it cannot lie on the bench', () => {
    const frame: Frame = {
      joints: [at(0, 0), at(200, 200), at(200, 0), at(0, 300)],
      struts: ringOf([0, 1, 2, 3]),
      faces: [],
    };
    expect(planarRings(frame).rings).toEqual([]);
  });

  it('struts in one line > searched > no ring', () => {
    const line: Frame = { joints: [at(0, 0), at(100, 0), at(200, 0)], struts: ringOf([0, 1, 2]), faces: [] };
    expect(planarRings(line).rings).toEqual([]);
  });

  it('a face with an edge that is no strut > searched > passed over', () => {
    const frame: Frame = {
      joints: [at(0, 0), at(100, 0), at(0, 100)],
      struts: [
        [0, 1],
        [1, 2],
      ],
      faces: [[0, 1, 2]],
    };
    expect(planarRings(frame).rings).toEqual([]);
  });

  it('a large flat net > searched > stops at the limit and says so', () => {
    const net = buildShape({
      kind: 'vault-bay',
      lengthMm: 2000,
      widthMm: 2000,
      riseMm: 0,
      divisionsAlong: 8,
      divisionsAcross: 8,
      diagonals: 'one-way',
    });
    const found = planarRings(net);
    expect(found.complete).toBe(false);
    expect(found.rings.length).toBeGreaterThanOrEqual(net.faces.length);
  });
});

describe('areLinked', () => {
  it('two squares, one through the middle of the other > compared > linked; moved aside they are not', () => {
    const ring = (joints: number[], first: number) => ({ joints, struts: joints.map((_, k) => first + k) });
    const [level, upright] = [ring([0, 1, 2, 3], 0), ring([4, 5, 6, 7], 4)];
    expect(areLinked(level, upright, twoLinks(0).joints)).toBe(true);
    expect(areLinked(upright, level, twoLinks(0).joints)).toBe(true);
    expect(areLinked(level, upright, twoLinks(150).joints)).toBe(false);
  });
});

describe('chooseFlats', () => {
  it.each([
    ['with the solver', true],
    ['without it', false],
  ])('two rings that hang in each other > chosen %s > one of them; side by side both', (_, withSolver) => {
    const options = withSolver ? { solver } : {};
    expect(chooseFlats(twoLinks(0), options)).toMatchObject({ strutsInFlats: 4, struts: 8, proven: true });
    expect(chooseFlats(twoLinks(150), options)).toMatchObject({ strutsInFlats: 8, struts: 8, proven: true });
  });

  it('cube standing upright > chosen > floor and lid, the floor first', () => {
    const frame = buildShape({ kind: 'cube', edgeMm: 200 });
    const { flats } = chooseFlats(frame, { solver });
    const heights = flats.map(({ joints }) => joints.map((joint) => Math.round(frame.joints[joint]!.z)));
    expect(heights).toEqual([
      [0, 0, 0, 0],
      [200, 200, 200, 200],
    ]);
  });

  it('octahedron > chosen > three squares, not four triangles with as many struts: a flat less to make', () => {
    const { flats } = chooseFlats(buildShape({ kind: 'octahedron', edgeMm: 200 }), { solver });
    expect(flats.map((ring) => ring.struts.length)).toEqual([4, 4, 4]);
  });

  it('pyramid of six sides > chosen > three triangles with 9 struts rather than the base with 6', () => {
    const pyramid = buildShape({ kind: 'pyramid', sides: 6, baseBy: 'edge', baseMm: 100, heightMm: 300 });
    expect(chooseFlats(pyramid, { solver })).toMatchObject({ strutsInFlats: 9, struts: 12, proven: true });
  });

  it('a frame without rings > chosen > no flats, proven', () => {
    const bare: Frame = { joints: [at(0, 0), at(100, 0)], struts: [[0, 1]], faces: [] };
    expect(chooseFlats(bare, { solver })).toEqual({
      flats: [],
      strutsInFlats: 0,
      struts: 1,
      proven: true,
      allRings: true,
    });
  });

  it('too many rings for the short search > chosen without a solver > says that it is not proven', () => {
    const net = buildShape({
      kind: 'vault-bay',
      lengthMm: 1500,
      widthMm: 1200,
      riseMm: 0,
      divisionsAlong: 5,
      divisionsAcross: 4,
      diagonals: 'one-way',
    });
    const found = chooseFlats(net);
    expect(found).toMatchObject({ proven: false, allRings: false });
    expect(found.strutsInFlats).toBeGreaterThan(50);
  });

  it('a solver that finds nothing in its time > asked > the short search answers', () => {
    const silent: LinearSolver = {
      open: () => {
        throw new Error('not used');
      },
      solve: () => ({ status: 'limit', objective: Number.NaN, bound: Infinity, values: [], duals: [] }),
    };
    const cube = buildShape({ kind: 'cube', edgeMm: 200 });
    expect(chooseFlats(cube, { solver: silent }).strutsInFlats).toBe(8);
  });
});

describe('order of what counts', () => {
  // Three rings of seven struts, and the same 21 struts as one ring of twelve and three of three.
  const sevens = [0, 1, 2].map((k) => Array.from({ length: 7 }, (_, at) => 7 * k + at));
  const threes = [0, 1, 2].map((k) => [7 * k, 7 * k + 1, 7 * k + 2]);
  const twelve = [0, 1, 2].flatMap((k) => [3, 4, 5, 6].map((at) => 7 * k + at));
  const rings = [...threes, twelve, ...sevens].map((struts, ring) => ({
    struts,
    // Joints of its own for each ring: only struts are shared.
    joints: struts.map((_, at) => 100 * ring + at),
  }));
  const squares = rings.map(({ struts }) => struts.length ** 2);

  it('as many struts in three or in four rings > solved > three, although the four have the higher score', () => {
    expect(solveFlats(rings, squares, [], solver, 5)).toEqual({ chosen: [4, 5, 6], proven: true });
    expect(searchFlats(rings, squares, () => false, 1e6)).toEqual({ chosen: [4, 5, 6], proven: true });
  });

  it('as many struts in as many rings > solved > those with the higher score', () => {
    const pair = [
      [0, 1, 2, 3],
      [4, 5, 6, 7],
      [0, 1, 2],
      [3, 4, 5, 6, 7],
    ].map((struts, ring) => ({ struts, joints: struts.map((_, at) => 100 * ring + at) }));
    const scores = pair.map(({ struts }) => struts.length ** 2);
    expect(solveFlats(pair, scores, [], solver, 5)!.chosen).toEqual([2, 3]);
    expect([...searchFlats(pair, scores, () => false, 1e6).chosen].sort()).toEqual([2, 3]);
  });

  it('two rings apart > solved > not both', () => {
    const two = [
      [0, 1, 2],
      [3, 4, 5, 6],
    ].map((struts, ring) => ({ struts, joints: struts.map((_, at) => 100 * ring + at) }));
    expect(solveFlats(two, [0, 0], [[0, 1]], solver, 5)!.chosen).toEqual([1]);
  });
});
