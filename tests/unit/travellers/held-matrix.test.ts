import { describe, expect, it } from 'vitest';
import { decide, shownState, type Command, type Step } from '../../../shared/travellers';
import { inHand, NOW, stepOf, worldOf } from './fixtures';

const held = { reason: 'wrong kit', by: 'cy', at: NOW - 60_000 };
const rework = { reason: 'loose', by: 'cy', at: NOW - 60_000 };

/** A held step by the state under the hold. */
const UNDER: Record<string, Step> = {
  waiting: stepOf({ held, state: 'waiting' }),
  ready: stepOf({ held }),
  'in hand': inHand(['ann'], { held }),
  'in hand, not started': inHand(['ann'], { held, startedAt: null }),
  'in hand, offered': inHand(['bo'], { held, handOver: { from: 'bo', to: 'ann', at: NOW } }),
  drying: stepOf({
    held,
    state: 'drying',
    clocks: { touchDry: 60 },
    doers: ['bo'],
    finishedAt: NOW - 60_000,
    dryUntil: NOW,
  }),
  'to check': stepOf({ held, state: 'to check', needsCheck: true, doers: ['bo'] }),
  rework: stepOf({ held, state: 'rework', rework }),
};

const ask = (step: Step, command: Command) => {
  const decision = decide(worldOf(step), command);
  return decision.ok
    ? (decision.value.steps.find((one) => one.id === step.id) as Step)
    : decision.refusal.code;
};

// From "held is a mark on top that remembers the state under it" and "hold: a mark on a step that stops it".
describe('a held step', () => {
  it.each([
    ['ready', { type: 'claim' }],
    ['rework', { type: 'claim' }],
    ['waiting', { type: 'claim' }],
    ['in hand, not started', { type: 'start' }],
    ['in hand', { type: 'finish' }],
    ['in hand', { type: 'offer', to: 'bo' }],
    ['in hand, offered', { type: 'accept' }],
    ['to check', { type: 'pass' }],
  ] as [string, Command][])('decide > %s under a hold, %j > STEP_HELD', (state, command) => {
    expect(ask(UNDER[state] as Step, command)).toBe('STEP_HELD');
  });

  it.each(Object.entries(UNDER))(
    'release > %s under the hold > exactly what it was before',
    (_state, step) => {
      const released = ask(step, { type: 'release', note: 'right kit' });
      expect(released).toEqual({ ...step, held: null });
    },
  );

  it.each(Object.entries(UNDER))(
    'hold > of a step that is %s > shown as held, everything under it kept',
    (_state, step) => {
      const free = { ...step, held: null };
      const again = ask(free, { type: 'hold', reason: 'again' }) as Step;
      expect(again).toEqual({ ...free, held: { reason: 'again', by: 'ann', at: NOW } });
      expect(shownState(again)).toBe('held');
    },
  );

  it.each([
    ['in hand', { type: 'give-back' }, 'ready'],
    ['in hand, offered', { type: 'withdraw' }, 'in hand'],
    ['drying', { type: 'clock-ended' }, 'to check'],
    ['drying', { type: 'still-wet', seconds: 60 }, 'drying'],
    ['to check', { type: 'rework', reason: 'loose', targetId: 's2' }, 'rework'],
    ['ready', { type: 'record', crew: ['bo'], happenedAt: NOW }, 'to check'],
  ] as [string, Command, string][])(
    'decide > %s under a hold, %j > what gives way or already happened is let through, and the hold stays on top',
    (state, command, under) => {
      expect(ask(UNDER[state] as Step, command)).toMatchObject({ state: under, held });
    },
  );
});
