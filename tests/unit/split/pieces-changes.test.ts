import { describe, expect, it } from 'vitest';
import { applyToTheRest, splitChanges } from '../../../shared/split/pieces';
import type { KnownPiece, StepProgress } from '../../../shared/split/pieces';

const before: KnownPiece[] = [
  { id: 'a', code: 'V-01', struts: [0, 1, 2, 3] },
  { id: 'b', code: 'V-02', struts: [4, 5, 6, 7] },
  { id: 'c', code: 'V-03', struts: [8, 9, 10, 11] },
];
const step = (state: string): StepProgress => ({ id: `step ${state}`, name: 'tack', state });
const none = new Map<string, StepProgress[]>();
const begun = (id: string, ...states: string[]) => new Map([[id, states.map(step)]]);

describe('splitChanges', () => {
  it('the same pieces in another order > compared > all unchanged, under their codes', () => {
    const after = [before[2]!, before[0]!, before[1]!].map(({ struts }) => ({
      struts: [...struts].reverse(),
    }));
    expect(splitChanges(before, after, none)).toEqual({
      changes: [
        { kind: 'unchanged', piece: 0, id: 'c', code: 'V-03' },
        { kind: 'unchanged', piece: 1, id: 'a', code: 'V-01' },
        { kind: 'unchanged', piece: 2, id: 'b', code: 'V-02' },
      ],
      touched: [],
    });
  });

  it('a strut given to a neighbour > compared > both changed, with the strut on both sides', () => {
    const after = [{ struts: [0, 1, 2] }, { struts: [3, 4, 5, 6, 7] }, { struts: [8, 9, 10, 11] }];
    expect(splitChanges(before, after, none).changes).toEqual([
      { kind: 'changed', piece: 0, id: 'a', code: 'V-01', added: [], removed: [3] },
      { kind: 'changed', piece: 1, id: 'b', code: 'V-02', added: [3], removed: [] },
      { kind: 'unchanged', piece: 2, id: 'c', code: 'V-03' },
    ]);
  });

  it('two pieces joined and one cut in two > compared > the greater part keeps the code, one is gone, one is new', () => {
    const after = [{ struts: [0, 1, 2, 3, 4, 5, 6, 7, 20] }, { struts: [8, 9, 10] }, { struts: [11] }];
    expect(splitChanges(before, after, none).changes).toEqual([
      { kind: 'changed', piece: 0, id: 'a', code: 'V-01', added: [4, 5, 6, 7, 20], removed: [] },
      { kind: 'changed', piece: 1, id: 'c', code: 'V-03', added: [], removed: [11] },
      { kind: 'new', piece: 2, added: [11] },
      { kind: 'gone', id: 'b', code: 'V-02', removed: [4, 5, 6, 7] },
    ]);
  });

  it('the largest overlap taken first > would give 5 in common > the assignment with 7 is found', () => {
    const known = [
      { id: 'a', code: 'V-01', struts: [1, 2, 3, 4, 5, 6, 7] },
      { id: 'b', code: 'V-02', struts: [8, 9, 10, 11] },
    ];
    // a has 4 in common with the first and 3 with the second, b 4 with the first and none with the second.
    const after = [{ struts: [1, 2, 3, 4, 8, 9, 10, 11] }, { struts: [5, 6, 7] }];
    expect(splitChanges(known, after, none).changes.map((change) => 'code' in change && change.code)).toEqual(
      ['V-02', 'V-01'],
    );
  });

  it('joined pieces of equal size, one of them begun > compared > the begun one keeps its successor', () => {
    const after = [{ struts: [0, 1, 2, 3, 4, 5, 6, 7] }, { struts: [8, 9, 10, 11] }];
    const { changes } = splitChanges(before, after, begun('b', 'in hand'));
    expect(changes[0]).toMatchObject({ kind: 'changed', code: 'V-02' });
    expect(changes[2]).toMatchObject({ kind: 'gone', code: 'V-01' });
  });

  it.each(['in hand', 'drying', 'to check', 'passed', 'rework'])(
    'a step %s on a piece that would change > compared > touched, with the step and the struts',
    (state) => {
      const after = [{ struts: [0, 1, 2] }, { struts: [3, 4, 5, 6, 7] }, { struts: [8, 9, 10, 11] }];
      const { touched } = splitChanges(before, after, begun('a', 'waiting', state));
      expect(touched).toEqual([
        { kind: 'changed', id: 'a', code: 'V-01', added: [], removed: [3], steps: [step(state)] },
      ]);
    },
  );

  it('steps only waiting and ready, or begun on a piece that stays > compared > nothing touched', () => {
    const after = [{ struts: [0, 1, 2] }, { struts: [3, 4, 5, 6, 7] }, { struts: [8, 9, 10, 11] }];
    expect(splitChanges(before, after, begun('a', 'waiting', 'ready')).touched).toEqual([]);
    expect(splitChanges(before, after, begun('c', 'passed')).touched).toEqual([]);
  });

  it('a begun piece that would go > compared > touched as gone', () => {
    const after = [{ struts: [0, 1, 2, 3] }, { struts: [8, 9, 10, 11] }];
    expect(splitChanges(before, after, begun('b', 'passed')).touched).toEqual([
      { kind: 'gone', id: 'b', code: 'V-02', added: [], removed: [4, 5, 6, 7], steps: [step('passed')] },
    ]);
  });
});

describe('applyToTheRest', () => {
  it('a begun piece would lose a strut > applied to the rest > it keeps it, the neighbour goes without, others change', () => {
    const after = [{ struts: [0, 1, 2] }, { struts: [3, 4, 5, 6] }, { struts: [7, 8, 9, 10, 11] }];
    const changes = splitChanges(before, after, begun('a', 'in hand'));
    expect(applyToTheRest(before, after, changes)).toEqual({
      pieces: [
        { id: 'a', code: 'V-01', struts: [0, 1, 2, 3] },
        { id: 'b', code: 'V-02', struts: [4, 5, 6] },
        { id: 'c', code: 'V-03', struts: [7, 8, 9, 10, 11] },
      ],
      kept: [{ id: 'a', code: 'V-01' }],
      missing: [],
    });
  });

  it('a begun piece would get a strut > applied to the rest > the strut is a piece of its own without a code', () => {
    const after = [{ struts: [0, 1, 2, 3, 4] }, { struts: [5, 6, 7] }, { struts: [8, 9, 10, 11] }];
    const changes = splitChanges(before, after, begun('a', 'passed'));
    expect(applyToTheRest(before, after, changes).pieces).toEqual([
      { id: 'a', code: 'V-01', struts: [0, 1, 2, 3] },
      { id: null, code: null, struts: [4] },
      { id: 'b', code: 'V-02', struts: [5, 6, 7] },
      { id: 'c', code: 'V-03', struts: [8, 9, 10, 11] },
    ]);
  });

  it('struts of a begun piece are no longer drawn > applied to the rest > named as missing', () => {
    const after = [{ struts: [0, 1] }, { struts: [4, 5, 6, 7] }, { struts: [8, 9, 10, 11] }];
    const changes = splitChanges(before, after, begun('a', 'drying'));
    expect(applyToTheRest(before, after, changes).missing).toEqual([
      { id: 'a', code: 'V-01', struts: [2, 3] },
    ]);
  });
});
