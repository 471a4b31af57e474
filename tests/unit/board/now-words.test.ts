import { describe, expect, it } from 'vitest';
import type { StepRecord } from '../../../shared/contracts/live';
import { formatTime } from '../../../src/lib/formats';
import { boardRows } from '../../../src/features/travellers/board-rows';
import { noteOf, notesBetween } from '../../../src/features/travellers/live-notes';
import { nowWords } from '../../../src/features/travellers/now-words';
import { liveOf, NOW, pieceRecord, stepRecord } from './fixtures';

const NAMES: Record<string, string> = { lena: 'Lena W', kofi: 'Kofi A', wren: 'Wren S' };
const nameOf = (id: string) => NAMES[id] ?? 'somebody';
const context = { nameOf, time: (at: number) => formatTime(at, 'Pacific/Auckland') };
const member = (personId: string) => ({ personId, claimedAt: NOW });

function words(change: Partial<StepRecord>) {
  const { records } = liveOf({ subAssemblies: [pieceRecord({})], steps: [stepRecord(change)] });
  const [row] = boardRows(records.subAssemblies, records.steps);
  if (!row) throw new Error('no row');
  return nowWords(row, context);
}

describe('nowWords', () => {
  it('nowWords > each state > the word of the state with what people need beside it, times in the hall’s zone', () => {
    expect(words({ name: 'clean', crewMin: 2 })).toEqual({
      head: 'clean ready',
      detail: '2 hands wanted',
      crew: '',
    });
    expect(words({ name: 'raise', state: 'in hand', crewMin: 2, crew: [member('kofi')] })).toMatchObject({
      head: 'raise in hand',
      detail: '1 hand wanted',
      crew: 'Kofi A',
    });
    expect(
      words({
        name: 'raise',
        state: 'in hand',
        crewMin: 2,
        startedAt: NOW,
        crew: [member('kofi'), member('wren')],
      }).detail,
    ).toBe('full crew, since 14:07');
    expect(
      words({ name: 'coat', state: 'drying', dryUntil: NOW + 1_680_000, finishedBy: 'wren' }),
    ).toMatchObject({ head: 'coat drying', detail: 'till 14:35', crew: 'Wren S' });
    expect(words({ name: 'tack', held: { reason: 'gun drips', by: 'lena', at: NOW } })).toMatchObject({
      head: 'tack held',
      detail: 'by Lena W, gun drips',
    });
    expect(
      words({
        name: 'glue out',
        state: 'rework',
        rework: { reason: 'joint 6 is open', by: 'lena', at: NOW },
      }),
    ).toMatchObject({ head: 'glue out rework', detail: 'joint 6 is open' });
    expect(
      words({ operation: 'hang', state: 'passed', passedAt: NOW - 900_000, passedBy: 'lena' }),
    ).toMatchObject({ head: 'passed', detail: 'hung 13:52, checked by Lena W' });
    expect(words({ state: 'to check', flags: ['STOP_ACTIVE'] }).detail).toContain('rule was broken');
  });
});

describe('live notes', () => {
  const held = stepRecord({ state: 'in hand', crew: [member('wren')] });

  it('noteOf > somebody joins, gives back, takes, finishes > named with what they did', () => {
    const joined = { ...held, crew: [member('wren'), member('kofi')] };
    expect(noteOf(held, joined, nameOf)?.text).toBe('Kofi A joined just now');
    expect(noteOf(joined, held, nameOf)?.text).toBe('Kofi A gave it back just now');
    expect(noteOf(stepRecord({}), held, nameOf)).toMatchObject({
      text: 'Wren S took it just now',
      state: 'in hand',
    });
    expect(noteOf(held, { ...held, crew: [], state: 'to check', finishedBy: 'wren' }, nameOf)?.text).toBe(
      'Wren S finished just now',
    );
    expect(noteOf(held, { ...held, revision: 2 }, nameOf)).toBeNull();
  });

  it('notesBetween > a step passes and opens the next > one note, the weightier', () => {
    const first = stepRecord({ id: 'a', position: 1, name: 'tack', state: 'to check' });
    const second = stepRecord({ id: 'b', position: 2, name: 'coat', state: 'waiting' });
    const before = liveOf({ steps: [first, second] }).records.steps;
    const after = liveOf({
      steps: [
        { ...first, state: 'passed' },
        { ...second, state: 'ready' },
      ],
    }).records.steps;
    expect([...notesBetween(before, after, nameOf)]).toEqual([
      ['v1', { text: 'tack passed just now', state: 'passed', weight: 7 }],
    ]);
  });

  it('notesBetween > the first snapshot, or a reload that changes everything > no notes', () => {
    const steps = (state: StepRecord['state']) =>
      liveOf({
        steps: Array.from({ length: 40 }, (_, i) =>
          stepRecord({ id: `s${i}`, subAssemblyId: `p${i}`, state, crew: [member('kofi')] }),
        ),
      }).records.steps;
    expect(notesBetween(new Map(), steps('ready'), nameOf).size).toBe(0);
    expect(notesBetween(steps('ready'), steps('in hand'), nameOf).size).toBe(0);
  });
});
