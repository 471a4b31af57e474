import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../shared/kernel/random';
import { pieceMarks } from '../../../shared/split/pieces';
import { draw, shuffled } from './pieces-arbitrary';

describe('pieceMarks', () => {
  it('splits whose every part has a piece with at most five neighbours > marked > no neighbours share colour or pattern', () => {
    fc.assert(
      fc.property(fc.integer(), fc.integer({ min: 1, max: 80 }), (seed, count) => {
        const random = seededRandom(seed);
        const name = shuffled(random, count);
        const neighbours: number[][] = Array.from({ length: count }, () => []);
        // Each piece meets at most five before it, and pieces are numbered otherwise than they were made.
        for (let piece = 1; piece < count; piece++)
          for (let k = 0; k < Math.min(piece, 5); k++)
            neighbours[name[piece]!]!.push(name[draw(random, piece)]!);
        const { marks, clashes } = pieceMarks(count, neighbours);
        expect(clashes).toEqual([]);
        neighbours.forEach((list, piece) =>
          list.forEach((other) => {
            expect(marks[piece]!.colour).not.toBe(marks[other]!.colour);
            expect(marks[piece]!.pattern).not.toBe(marks[other]!.pattern);
          }),
        );
        expect(new Set(marks.map(({ letter }) => letter)).size).toBe(count);
      }),
    );
  });
});
