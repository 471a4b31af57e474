import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bitsOf, netOf, partition } from '../../../shared/split';
import { randomFrame } from '../../support/structures';

describe('partition', () => {
  it('partition > any connected frame and number of pieces > every strut in one piece, every piece in one bit, never worse than a sound simple way, the same again', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 6, max: 60 }),
        fc.double({ min: 1.2, max: 2.4, noNaN: true }),
        fc.integer({ min: 1, max: 6 }),
        fc.integer({ min: 1, max: 1_000_000 }),
        (joints, degree, pieces, seed) => {
          const frame = randomFrame(joints, Math.round(joints * degree), seed);
          const weights = frame.struts.map((_, strut) => 1 + (strut % 3) / 2);
          const input = {
            joints: frame.joints,
            struts: frame.struts,
            weights,
            pieces: Math.min(pieces, frame.struts.length),
            seed,
          };
          const found = partition(input);
          const net = netOf(frame.joints, frame.struts, weights);
          expect(found.pieceOf.every((piece) => piece >= 0 && piece < input.pieces)).toBe(true);
          expect(new Set(found.pieceOf).size).toBe(input.pieces);
          expect(bitsOf(net, found.pieceOf)).toHaveLength(input.pieces);
          expect(found.disconnected).toBe(0);
          expect([...partition(input).pieceOf]).toEqual([...found.pieceOf]);
        },
      ),
      { numRuns: 12 },
    );
  }, 60_000);
});
