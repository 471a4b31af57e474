import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../shared/kernel/random';
import { applyToTheRest, splitChanges } from '../../../shared/split/pieces';
import { draw } from './pieces-arbitrary';

/** Struts thrown into pieces at random; some struts only before, some only after. */
const anyChange = fc
  .record({
    seed: fc.integer(),
    struts: fc.integer({ min: 1, max: 40 }),
    old: fc.integer({ min: 1, max: 6 }),
    now: fc.integer({ min: 1, max: 6 }),
  })
  .map(({ seed, struts, old, now }) => {
    const random = seededRandom(seed);
    const thrown = (pieces: number) => {
      const list: number[][] = Array.from({ length: pieces }, () => []);
      for (let strut = 0; strut < struts; strut++)
        if (random() < 0.9) list[draw(random, pieces)]!.push(strut);
      return list;
    };
    const before = thrown(old).map((own, k) => ({ id: `id ${k}`, code: `V-${k}`, struts: own }));
    const after = thrown(now).map((own) => ({ struts: own }));
    const progress = new Map(
      before.map(({ id }) => [id, [{ id, name: 'cut', state: random() < 0.4 ? 'passed' : 'ready' }]]),
    );
    return { before, after, progress };
  });

/** The most struts in common that any pairing of old and new pieces has, by trying all. */
function mostInCommon(before: readonly number[][], after: readonly number[][]): number {
  const [first, ...rest] = before;
  if (!first) return 0;
  let most = mostInCommon(rest, after);
  after.forEach((own, at) => {
    const common = own.filter((strut) => first.includes(strut)).length;
    most = Math.max(
      most,
      common +
        mostInCommon(
          rest,
          after.filter((_, k) => k !== at),
        ),
    );
  });
  return most;
}

describe('splitChanges', () => {
  it('any two splits > matched > as many struts in common as the best of all pairings, every piece once', () => {
    fc.assert(
      fc.property(anyChange, ({ before, after, progress }) => {
        const { changes } = splitChanges(before, after, progress);
        let common = 0;
        for (const change of changes)
          if (change.kind === 'changed' || change.kind === 'unchanged') {
            const old = before.find(({ id }) => id === change.id)!.struts;
            common += after[change.piece]!.struts.filter((strut) => old.includes(strut)).length;
          }
        expect(common).toBe(
          mostInCommon(
            before.map(({ struts }) => struts),
            after.map(({ struts }) => struts),
          ),
        );
        const ids = changes.flatMap((change) => ('id' in change ? [change.id] : []));
        expect([...ids].sort()).toEqual(before.map(({ id }) => id).sort());
        const pieces = changes.flatMap((change) => ('piece' in change ? [change.piece] : []));
        expect(pieces).toEqual(after.map((_, piece) => piece));
      }),
      { numRuns: 200 },
    );
  });

  it('any two splits > applied to the rest > begun pieces exactly as before or unchanged, every drawn strut once', () => {
    fc.assert(
      fc.property(anyChange, ({ before, after, progress }) => {
        const changes = splitChanges(before, after, progress);
        const rest = applyToTheRest(before, after, changes);
        const struts = rest.pieces.flatMap((piece) => piece.struts);
        expect(new Set(struts).size).toBe(struts.length);
        const gone = new Set(rest.missing.flatMap((piece) => piece.struts));
        const drawn = after.flatMap((piece) => piece.struts);
        expect(struts.filter((strut) => !gone.has(strut)).sort()).toEqual([...drawn].sort());
        for (const { id, struts: own } of before) {
          if (progress.get(id)![0]!.state !== 'passed' || own.length === 0) continue;
          const now = rest.pieces.find((piece) => piece.id === id)!;
          expect([...now.struts].sort()).toEqual([...own].sort());
        }
        expect(
          rest.pieces.every(
            (piece) => piece.struts.length > 0 || changes.touched.some(({ id }) => id === piece.id),
          ),
        ).toBe(true);
      }),
      { numRuns: 200 },
    );
  });
});
