import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Frame, Joint, Strut } from '../../../shared/frames';
import { distance } from '../../../shared/frames/vector';
import {
  analyseStiffness,
  countStiffness,
  proposeBraces,
  stiffnessText,
} from '../../../shared/frames/stiffness';
import { rigidityMatrix } from '../../../shared/frames/stiffness/rigidity-matrix';

/** Joints on a coarse grid, so that planes, lines and squares happen often, or anywhere. */
const joint = (step: number): fc.Arbitrary<Joint> => {
  const coordinate =
    step > 0
      ? fc.integer({ min: 0, max: 3 }).map((k) => k * step)
      : fc.double({ min: 0, max: 900, noNaN: true });
  return fc.record({ x: coordinate, y: coordinate, z: coordinate });
};
const frameOf = (most: number): fc.Arbitrary<Frame> =>
  fc.constantFrom(0, 300).chain((step) =>
    fc
      .record({
        joints: fc.uniqueArray(joint(step), {
          minLength: 3,
          maxLength: most,
          comparator: (a, b) => distance(a, b) < 60,
        }),
        flat: fc.boolean(),
        share: fc.double({ min: 0.2, max: 1, noNaN: true }),
        picks: fc.array(fc.nat(), { minLength: (most * (most - 1)) / 2, maxLength: (most * (most - 1)) / 2 }),
      })
      .map(({ joints, flat, share, picks }) => {
        const pairs = joints.flatMap((_, a) => joints.slice(a + 1).map((__, k): Strut => [a, a + 1 + k]));
        const struts = pairs.filter((_, at) => at === 0 || (picks[at]! % 1000) / 1000 < share);
        const placed = flat ? joints.map(({ x, y }, at) => ({ x, y: y + (at % 7) * 61, z: 0 })) : joints;
        return { joints: placed, struts, faces: [] };
      })
      .filter(({ joints, struts }) => struts.every(([a, b]) => distance(joints[a]!, joints[b]!) > 30)),
  );

/** Rank by full elimination with the largest pivot: slow, plain, and another method than the one under test. */
function plainRank(frame: Frame): number {
  const { ends, along } = rigidityMatrix(frame.joints, frame.struts);
  const rows = frame.struts.map((_, s) => {
    const row = new Array<number>(3 * frame.joints.length).fill(0);
    for (let axis = 0; axis < 3; axis++) {
      row[3 * ends[2 * s]! + axis] = along[3 * s + axis]!;
      row[3 * ends[2 * s + 1]! + axis] = -along[3 * s + axis]!;
    }
    return row;
  });
  let rank = 0;
  while (rank < rows.length) {
    let [best, at, pivot] = [1e-7, -1, -1];
    for (let i = rank; i < rows.length; i++)
      rows[i]!.forEach((value, j) => {
        if (Math.abs(value) > best) [best, at, pivot] = [Math.abs(value), i, j];
      });
    if (at < 0) break;
    [rows[rank], rows[at]] = [rows[at]!, rows[rank]!];
    for (let i = rank + 1; i < rows.length; i++) {
      const share = rows[i]![pivot]! / rows[rank]![pivot]!;
      rows[i] = rows[i]!.map((value, j) => value - share * rows[rank]![j]!);
    }
    rank++;
  }
  return rank;
}

const stiffnessOf = (frame: Frame) => {
  const found = analyseStiffness(frame);
  if (!found.ok) throw new Error(found.refusal.message);
  return found.value;
};

describe('analyseStiffness', () => {
  it('any frame of up to 20 joints > against plain elimination > same rank, and the counts belong together', () => {
    fc.assert(
      fc.property(frameOf(20), (frame) => {
        const found = stiffnessOf(frame);
        fc.pre(!found.soft && found.leastHold > 1e-3);
        expect(found.rank).toBe(plainRank(frame));
        expect(found.certain).toBe(true);
        expect(found.mechanisms).toBe(3 * found.joints - found.rank - found.rigidMotions);
        expect(found.mechanisms).toBeGreaterThanOrEqual(0);
        expect(found.selfStress - found.mechanisms).toBe(found.maxwell);
        expect(found.basis).toHaveLength(found.mechanisms);
        if (found.flat) expect(found.flat.outOfPlane).toBe(found.joints - 3);
        const counted = countStiffness(frame);
        expect(counted.ok && counted.value.rank).toBe(found.rank);
        expect(stiffnessText(found).join(' ')).not.toMatch(/NaN|undefined/);
      }),
      { numRuns: 80 },
    );
  });

  it('any frame > its mechanisms > at right angles, of length 1, stretch nothing, and leave out the whole', () => {
    fc.assert(
      fc.property(frameOf(16), (frame) => {
        const { basis, parts, moving, mechanisms } = stiffnessOf(frame);
        const ends = rigidityMatrix(frame.joints, frame.struts);
        for (const [at, movement] of basis!.entries()) {
          basis!.forEach((other, k) => {
            const product = movement.reduce((sum, value, i) => sum + value * other[i]!, 0);
            expect(product).toBeCloseTo(k === at ? 1 : 0, 7);
          });
          for (let s = 0; s < frame.struts.length; s++) {
            let stretch = 0;
            for (let axis = 0; axis < 3; axis++)
              stretch +=
                ends.along[3 * s + axis]! *
                (movement[3 * ends.ends[2 * s]! + axis]! - movement[3 * ends.ends[2 * s + 1]! + axis]!);
            expect(Math.abs(stretch)).toBeLessThan(1e-6);
          }
          for (const axis of [0, 1, 2]) {
            const [p, q] = [(axis + 1) % 3, (axis + 2) % 3];
            let [shift, turn] = [0, 0];
            frame.joints.forEach(({ x, y, z }, joint) => {
              const place = [x, y, z];
              shift += movement[3 * joint + axis]!;
              turn += (place[p]! * movement[3 * joint + q]! - place[q]! * movement[3 * joint + p]!) / 1000;
            });
            expect(Math.abs(shift) + Math.abs(turn)).toBeLessThan(1e-5);
          }
        }
        if (mechanisms === 0) expect(moving).toEqual([]);
        else for (const joint of parts[0] ?? []) expect(moving).not.toContain(joint);
      }),
      { numRuns: 100 },
    );
  });

  it('any frame > turned, sized and renumbered > same counts', () => {
    fc.assert(
      fc.property(
        frameOf(14),
        fc.double({ min: 0, max: 6, noNaN: true }),
        fc.double({ min: 0.01, max: 50, noNaN: true }),
        (frame, turn, size) => {
          const before = stiffnessOf(frame);
          fc.pre(!before.soft && before.leastHold > 1e-3);
          const [c, s] = [Math.cos(turn), Math.sin(turn)];
          const last = frame.joints.length - 1;
          const turned = frame.joints
            .map(({ x, y, z }) => {
              const [u, v] = [c * x - s * y, s * x + c * y];
              return { x: size * u, y: size * (c * v - s * z), z: size * (s * v + c * z) };
            })
            .reverse();
          const after = stiffnessOf({
            joints: turned,
            struts: frame.struts.map(([a, b]): Strut => [last - b, last - a]).reverse(),
            faces: [],
          });
          for (const key of ['rank', 'mechanisms', 'selfStress', 'rigidMotions', 'extent', 'bits'] as const)
            expect(after[key]).toBe(before[key]);
          expect(
            after.parts.map((part) => part.map((joint) => last - joint).sort((a, b) => a - b)).sort(),
          ).toEqual([...before.parts].sort());
          expect(after.strained!.map((strut) => frame.struts.length - 1 - strut).reverse()).toEqual(
            before.strained,
          );
        },
      ),
      { numRuns: 100 },
    );
  });

  it('a frame and the same with one strut more > rank > grows by one or not at all, and so say the strained struts', () => {
    fc.assert(
      fc.property(frameOf(12), fc.nat(), (frame, pick) => {
        const whole = stiffnessOf(frame);
        fc.pre(frame.struts.length > 1 && whole.leastHold > 1e-3);
        const out = pick % frame.struts.length;
        const without = stiffnessOf({ ...frame, struts: frame.struts.filter((_, at) => at !== out) });
        // A strut takes part in a self-stress exactly when the others hold all that it holds.
        fc.pre(without.leastHold > 1e-3);
        expect(whole.rank - without.rank).toBe(whole.strained!.includes(out) ? 0 : 1);
      }),
      { numRuns: 150 },
    );
  });
});

describe('proposeBraces', () => {
  it('any frame > braced > as many braces as ways stopped, and what stays is out of reach', () => {
    fc.assert(
      fc.property(frameOf(12), (frame) => {
        const found = proposeBraces(frame);
        if (!found.ok) throw new Error(found.refusal.message);
        const { mechanisms, braces, left, shortfall } = found.value;
        fc.pre(stiffnessOf(frame).leastHold > 1e-3);
        expect(left).toBe(mechanisms - braces.length);
        expect(shortfall === null).toBe(left === 0);
        const { extent, joints } = stiffnessOf(frame);
        expect(left).toBe(extent === 'plane' ? joints - 3 : extent === 'line' ? 2 * joints - 4 : 0);
      }),
      { numRuns: 100 },
    );
  });

  it('frames of up to 6 joints > every choice of braces tried > none has fewer, none of as many is shorter', () => {
    fc.assert(
      fc.property(frameOf(6), (frame) => {
        const found = proposeBraces(frame);
        if (!found.ok) throw new Error(found.refusal.message);
        fc.pre(stiffnessOf(frame).leastHold > 1e-2);
        const { braces, left, totalMm } = found.value;
        const has = new Set(frame.struts.map((pair) => pair.join()));
        const open = frame.joints
          .flatMap((_, a) => frame.joints.slice(a + 1).map((__, k): Strut => [a, a + 1 + k]))
          .filter((pair) => !has.has(pair.join()));
        const lengths = open.map(([a, b]) => distance(frame.joints[a]!, frame.joints[b]!));
        const { rigidMotions, joints } = stiffnessOf(frame);
        for (let choice = 0; choice < 2 ** open.length; choice++) {
          let [count, total] = [0, 0];
          for (let at = 0; at < open.length; at++)
            if ((choice >> at) & 1) {
              count++;
              total += lengths[at]!;
            }
          const better = count < braces.length || (count === braces.length && total < totalMm - 1e-6);
          // One brace stops one way at most, so only as many braces, or one fewer, need the slow count.
          if (!better || count < braces.length - 1) continue;
          const taken = open.filter((_, at) => (choice >> at) & 1);
          const rank = plainRank({ ...frame, struts: [...frame.struts, ...taken] });
          expect(3 * joints - rank - rigidMotions).toBeGreaterThan(left);
        }
      }),
      { numRuns: 40 },
    );
  });
});
