import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../shared/kernel/random';
import { moveStruts, splitFigures } from '../../../shared/split/pieces';
import { draw, randomFrame } from './pieces-arbitrary';

const anySplit = fc
  .record({ seed: fc.integer(), pieces: fc.integer({ min: 1, max: 5 }) })
  .map(({ seed, pieces }) => {
    const random = seededRandom(seed);
    const frame = randomFrame(random, 4 + draw(random, 12), draw(random, 20));
    return { random, split: { frame, pieceOf: frame.struts.map(() => draw(random, pieces)), pieces } };
  });

describe('moveStruts', () => {
  it('any struts to any piece > moved > field joints as counted joint by joint, struts kept, undo as before', () => {
    fc.assert(
      fc.property(anySplit, ({ random, split }) => {
        const struts = split.pieceOf.flatMap((_, strut) => (random() < 0.3 ? [strut] : []));
        const to = random() < 0.2 ? null : draw(random, split.pieces);
        const result = moveStruts(split, struts, to);
        if (!result.ok) {
          expect(struts.every((strut) => split.pieceOf[strut] === to)).toBe(true);
          return;
        }
        const { split: next, after, before, undo, problems, piece } = result.value;
        struts.forEach((strut) => expect(next.pieceOf[strut]).toBe(piece));
        let fieldJoints = 0;
        split.frame.joints.forEach((_, joint) => {
          const meeting = new Set(
            next.pieceOf.filter((__, strut) => split.frame.struts[strut]!.includes(joint)),
          );
          fieldJoints += meeting.size - 1;
        });
        expect(after.fieldJoints).toBe(fieldJoints);
        expect(after.pieces.reduce((sum, { struts: count }) => sum + count, 0)).toBe(split.pieceOf.length);
        expect(splitFigures(undo)).toEqual(before);
        for (const problem of problems)
          if (problem.code === 'PIECE_IN_PARTS')
            expect(after.pieces[problem.piece]!.parts).toBe(problem.parts.length);
      }),
    );
  });
});
