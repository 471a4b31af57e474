import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import { openHighs } from '../../../server/jobs/highs-solver';
import { buildShape } from '../../../shared/frames';
import type { Frame, Joint, Strut } from '../../../shared/frames';
import { seededRandom } from '../../../shared/kernel/random';
import type { LinearSolver } from '../../../shared/kernel/linear-program';
import { areLinked, chooseFlats, planarRings } from '../../../shared/split/pieces';
import { movedFrame, randomFrame } from './pieces-arbitrary';

let solver: LinearSolver;
beforeAll(async () => {
  solver = await openHighs();
});

/** Part of a lattice of cubes with some diagonals: many planar rings in many planes. */
function randomLattice(seed: number): Frame {
  const random = seededRandom(seed);
  const joints: Joint[] = [];
  for (let x = 0; x < 3; x++)
    for (let y = 0; y < 3; y++)
      for (let z = 0; z < 2; z++) joints.push({ x: 200 * x, y: 200 * y, z: 200 * z });
  const struts: Strut[] = [];
  joints.forEach((p, a) =>
    joints.forEach((q, b) => {
      const mm = Math.hypot(p.x - q.x, p.y - q.y, p.z - q.z);
      const share = mm < 201 ? 0.75 : mm < 284 ? 0.12 : 0;
      if (a < b && random() < share) struts.push([a, b]);
    }),
  );
  return { joints, struts, faces: [] };
}

const anyFrame = fc.oneof(
  fc.integer().map(randomLattice),
  fc.integer().map((seed) => {
    const random = seededRandom(seed);
    return randomFrame(random, 10, 20);
  }),
  fc
    .integer()
    .map((seed) => movedFrame(seededRandom(seed), buildShape({ kind: 'icosahedron', edgeMm: 150 }), false)),
);

/** The most struts in edge-disjoint rings, by trying every set of rings: independent of the code under test. */
function mostByTrying(rings: readonly (readonly number[])[]): number {
  const from = (index: number, used: ReadonlySet<number>): number => {
    if (index === rings.length) return used.size;
    const without = from(index + 1, used);
    if (rings[index]!.some((strut) => used.has(strut))) return without;
    return Math.max(without, from(index + 1, new Set([...used, ...rings[index]!])));
  };
  return from(0, new Set());
}

describe('chooseFlats', () => {
  it(
    'any frame > chosen with and without the solver > planar rings, no strut twice, no two linked, parity kept',
    { timeout: 60_000 },
    () => {
      fc.assert(
        fc.property(anyFrame, fc.boolean(), (frame, exact) => {
          const found = chooseFlats(frame, exact ? { solver, seconds: 3 } : {});
          const struts = found.flats.flatMap((ring) => ring.struts);
          expect(new Set(struts).size).toBe(struts.length);
          expect(found.strutsInFlats).toBe(struts.length);
          for (const { joints, struts: own } of found.flats) {
            own.forEach((strut, k) =>
              expect([...frame.struts[strut]!].sort()).toEqual(
                [joints[k], joints[(k + 1) % joints.length]].sort(),
              ),
            );
            const [o, ...rest] = joints.map((joint) => frame.joints[joint]!);
            const arms = rest.map((p) => [p.x - o!.x, p.y - o!.y, p.z - o!.z] as const);
            // Volumes spanned with the first two arms: zero for a planar ring.
            const [a, b] = arms;
            for (const c of arms) {
              const volume =
                a![0] * (b![1] * c[2] - b![2] * c[1]) -
                a![1] * (b![0] * c[2] - b![2] * c[0]) +
                a![2] * (b![0] * c[1] - b![1] * c[0]);
              expect(Math.abs(volume)).toBeLessThan(1e6);
            }
          }
          found.flats.forEach((one, k) =>
            found.flats.slice(k + 1).forEach((two) => expect(areLinked(one, two, frame.joints)).toBe(false)),
          );
          const odd = frame.joints.filter(
            (_, joint) => frame.struts.flat().filter((end) => end === joint).length % 2,
          );
          expect(found.strutsInFlats).toBeLessThanOrEqual(frame.struts.length - odd.length / 2);
        }),
        { numRuns: 30 },
      );
    },
  );

  it(
    'frames with few rings > chosen exactly > as many struts as trying every set of rings gives',
    { timeout: 60_000 },
    () => {
      let tried = 0;
      fc.assert(
        fc.property(fc.integer(), (seed) => {
          const frame = randomLattice(seed);
          const { rings } = planarRings(frame);
          const linked = rings.some((a, k) => rings.slice(k + 1).some((b) => areLinked(a, b, frame.joints)));
          if (rings.length > 14 || linked) return;
          tried++;
          const most = mostByTrying(rings.map(({ struts }) => struts));
          expect(chooseFlats(frame, { solver }).strutsInFlats).toBe(most);
          const own = chooseFlats(frame);
          expect(own.strutsInFlats).toBeLessThanOrEqual(most);
          if (own.proven) expect(own.strutsInFlats).toBe(most);
        }),
        { numRuns: 40 },
      );
      expect(tried).toBeGreaterThan(5);
    },
  );
});
