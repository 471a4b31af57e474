import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildShape } from '../../../shared/frames';
import type { Frame, Joint } from '../../../shared/frames';
import { identicalPieces, moved, numberedPieces } from '../../../shared/split/pieces';
import { seededRandom } from '../../../shared/kernel/random';
import { anyPiece, draw, movedFrame, randomFrame } from './pieces-arbitrary';

const away = (a: Joint, b: Joint): number => Math.hypot(a.x - b.x, a.y - b.y, a.z - b.z);

/** Looks at a likeness without the code that found it: every joint at its place, every strut between the right joints. */
function expectLike(
  first: Frame,
  piece: Frame,
  found: ReturnType<typeof identicalPieces>,
  index: number,
): void {
  const likeness = found.likenesses[index]!;
  expect([...likeness.joints].sort((a, b) => a - b)).toEqual(first.joints.map((_, at) => at));
  expect([...likeness.struts].sort((a, b) => a - b)).toEqual(first.struts.map((_, at) => at));
  piece.joints.forEach((joint, at) => {
    expect(away(moved(likeness.motion, first.joints[likeness.joints[at]!]!), joint)).toBeLessThan(0.5);
  });
  piece.struts.forEach(([a, b], at) => {
    const ends = first.struts[likeness.struts[at]!]!;
    expect([likeness.joints[a], likeness.joints[b]].sort()).toEqual([...ends].sort());
  });
}

describe('identicalPieces', () => {
  it('a piece and a copy turned, moved and renumbered > compared > one group, same, each joint and strut at its place', () => {
    fc.assert(
      fc.property(anyPiece, ({ random, frame }) => {
        const copy = movedFrame(random, frame, false);
        const found = identicalPieces([{ frame }, { frame: copy }]);
        expect(found.groups).toHaveLength(1);
        expect(found.likenesses[1]!.kind).toBe('same');
        expectLike(frame, copy, found, 1);
      }),
      { numRuns: 200 },
    );
  });

  it('a piece without symmetry and its mirror image > compared > one handed group, left and right', () => {
    fc.assert(
      fc.property(anyPiece, ({ random, frame }) => {
        const [mirror, copy] = [movedFrame(random, frame, true), movedFrame(random, frame, false)];
        const found = identicalPieces([{ frame }, { frame: mirror }, { frame: copy }]);
        expect(found.groups).toEqual([{ first: 0, pieces: [0, 1, 2], mirrored: [1], handed: true }]);
        expect(found.likenesses.map(({ kind }) => kind)).toEqual(['same', 'mirror', 'same']);
        expect(found.likenesses.map(({ hand }) => hand)).toEqual(['left', 'right', 'left']);
        expectLike(frame, mirror, found, 1);
        expectLike(frame, copy, found, 2);
      }),
      { numRuns: 100 },
    );
  });

  it('a flat piece and its mirror image > compared > same: it is turned over', () => {
    fc.assert(
      fc.property(fc.integer(), fc.integer({ min: 3, max: 20 }), (seed, joints) => {
        const random = seededRandom(seed);
        const frame = randomFrame(random, joints, 8, true);
        const mirror = movedFrame(random, frame, true);
        const found = identicalPieces([{ frame }, { frame: mirror }]);
        expect(found.groups).toEqual([{ first: 0, pieces: [0, 1], mirrored: [], handed: false }]);
        expectLike(frame, mirror, found, 1);
      }),
    );
  });

  it('a symmetric solid and copies of both hands > compared > all same', () => {
    const solids = [
      buildShape({ kind: 'tetrahedron', edgeMm: 200 }),
      buildShape({ kind: 'cube', edgeMm: 200 }),
      buildShape({ kind: 'octahedron', edgeMm: 200 }),
      buildShape({ kind: 'dodecahedron', edgeMm: 200 }),
      buildShape({ kind: 'icosahedron', edgeMm: 200 }),
      buildShape({ kind: 'prism', sides: 7, baseBy: 'edge', baseMm: 90, heightMm: 200 }),
    ];
    fc.assert(
      fc.property(fc.integer(), fc.boolean(), (seed, mirrored) => {
        const random = seededRandom(seed);
        const frame = solids[draw(random, solids.length)]!;
        const copy = movedFrame(random, frame, mirrored);
        const found = identicalPieces([{ frame }, { frame: copy }]);
        expect(found.likenesses[1]).toMatchObject({ group: 0, kind: 'same', hand: null });
        expectLike(frame, copy, found, 1);
      }),
    );
  });

  it('joints off their places by up to 0.3 mm > compared at 0.5 mm > found; one joint off by 5 mm > apart', () => {
    fc.assert(
      fc.property(anyPiece, ({ random, frame }) => {
        const copy = movedFrame(random, frame, false, 0.3);
        expect(identicalPieces([{ frame }, { frame: copy }]).groups).toHaveLength(1);
        // Along a strut, so that its length differs by 5 mm whatever the rest of the piece may yield.
        const [a, b] = copy.struts[draw(random, copy.struts.length)]!;
        const [from, to] = [copy.joints[a]!, copy.joints[b]!];
        const further = (k: 'x' | 'y' | 'z') => to[k] + (5 * (to[k] - from[k])) / away(from, to);
        const place = { x: further('x'), y: further('y'), z: further('z') };
        const bent = { ...copy, joints: copy.joints.map((p, at) => (at === b ? place : p)) };
        expect(identicalPieces([{ frame }, { frame: bent }]).groups).toHaveLength(2);
      }),
    );
  });

  it('the same joints with one strut elsewhere > compared > two groups', () => {
    fc.assert(
      fc.property(anyPiece, ({ random, frame }) => {
        const copy = movedFrame(random, frame, false);
        const known = new Set(copy.struts.map(([a, b]) => `${Math.min(a, b)}-${Math.max(a, b)}`));
        const free = copy.joints.flatMap((_, a) =>
          copy.joints.flatMap((__, b) =>
            a < b && !known.has(`${a}-${b}`) ? [[a, b] as [number, number]] : [],
          ),
        );
        fc.pre(free.length > 0);
        const other = { ...copy, struts: [...copy.struts.slice(1), free[draw(random, free.length)]!] };
        expect(identicalPieces([{ frame }, { frame: other }]).groups).toHaveLength(2);
      }),
    );
  });
});

describe('numberedPieces', () => {
  it('copies of one shape in one drawing > cut and numbered > joint k is joint k of the first, strut k strut k', () => {
    fc.assert(
      fc.property(anyPiece, fc.integer({ min: 2, max: 5 }), ({ random, frame }, copies) => {
        const all = [
          frame,
          ...Array.from({ length: copies }, () => movedFrame(random, frame, random() < 0.5)),
        ];
        const drawing: Frame = { joints: [], struts: [], faces: [] };
        const pieceOf: number[] = [];
        all.forEach((part, piece) => {
          const from = drawing.joints.length;
          // Far from each other, so that no two copies touch.
          drawing.joints.push(...part.joints.map((p) => ({ ...p, x: p.x + 20_000 * piece })));
          drawing.struts.push(...part.struts.map(([a, b]): [number, number] => [a + from, b + from]));
          pieceOf.push(...part.struts.map(() => piece));
        });
        const { pieces, likenesses, groups } = numberedPieces(drawing, pieceOf);
        expect(groups).toHaveLength(1);
        const first = pieces[0]!;
        pieces.forEach((piece, index) => {
          const { motion } = likenesses[index]!;
          piece.joints.forEach((joint, at) => {
            expect(drawing.joints[joint]).toEqual(piece.frame.joints[at]);
            expect(away(moved(motion, first.frame.joints[at]!), piece.frame.joints[at]!)).toBeLessThan(0.5);
          });
          piece.struts.forEach((strut, at) => {
            expect(pieceOf[strut]).toBe(index);
            expect([...piece.frame.struts[at]!].sort()).toEqual([...first.frame.struts[at]!].sort());
          });
        });
      }),
      { numRuns: 50 },
    );
  });
});
