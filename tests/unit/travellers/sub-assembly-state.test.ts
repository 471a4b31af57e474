import { describe, expect, it } from 'vitest';
import {
  shareDone,
  shownState,
  STEP_STATES,
  subAssemblyState,
  type ShownState,
  type StepStateName,
} from '../../../shared/travellers';
import { NOW } from './fixtures';

const held = { reason: 'wrong kit', by: 'cy', at: NOW };
const step = (shown: ShownState, under: StepStateName = 'ready') =>
  shown === 'held' ? { state: under, held } : { state: shown, held: null };

/** As the product says it: the first of these that any step has, passed only when all have. */
const ORDER: ShownState[] = ['held', 'rework', 'in hand', 'drying', 'to check', 'ready', 'waiting', 'passed'];

describe('subAssemblyState', () => {
  const pairs = ORDER.flatMap((first, at) => ORDER.slice(at).map((second) => [first, second] as const));

  it.each(pairs)(
    'subAssemblyState > one step %s, one %s > the first, whichever comes first on the sheet',
    (first, second) => {
      expect(subAssemblyState([step(first), step(second)])).toBe(first);
      expect(subAssemblyState([step(second), step(first)])).toBe(first);
    },
  );

  it('subAssemblyState > every state at once, then one after the other taken away > the order of the product', () => {
    expect(ORDER.map((_, at) => subAssemblyState(ORDER.slice(at).map((state) => step(state))))).toEqual(
      ORDER,
    );
    expect([...STEP_STATES].sort()).toEqual([...ORDER].sort());
  });

  it('subAssemblyState > all passed but one held under its mark, no step at all > held; waiting', () => {
    expect(subAssemblyState([step('passed'), step('held', 'passed')])).toBe('held');
    expect(subAssemblyState([])).toBe('waiting');
  });

  it('shownState > a hold over any state > held; without one > the state', () => {
    for (const state of ORDER) expect(shownState(step(state, 'drying'))).toBe(state);
  });
});

describe('shareDone', () => {
  const timed = (state: StepStateName, plannedSeconds: number) => ({ state, plannedSeconds });

  it('shareDone > some passed > by planned minutes, not by steps; finished work counts when it has passed', () => {
    expect(shareDone([timed('passed', 600), timed('ready', 1800)])).toBe(0.25);
    expect(shareDone([timed('to check', 600), timed('drying', 600)])).toBe(0);
    expect(shareDone([timed('passed', 600), timed('passed', 60)])).toBe(1);
  });

  it('shareDone > no steps, or none that take time > 0', () => {
    expect(shareDone([])).toBe(0);
    expect(shareDone([timed('passed', 0)])).toBe(0);
  });
});
