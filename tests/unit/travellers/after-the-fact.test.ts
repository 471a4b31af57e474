import { describe, expect, it } from 'vitest';
import { decide, type Command, type Step, type World } from '../../../shared/travellers';
import { inHand, NOW, personOf, stepOf, worldOf } from './fixtures';

const MINUTE = 60_000;
const ask = (step: Step, command: Command, change: Partial<World> = {}) => {
  const decision = decide(worldOf(step, change), command);
  if (!decision.ok) return { refused: decision.refusal.code };
  const { steps, flags, event } = decision.value;
  return {
    step: steps.find((one) => one.id === step.id),
    opened: steps.filter((one) => one.id !== step.id),
    flags,
    event,
  };
};
/** Finished five minutes ago, heard of now. */
const late: Command = { type: 'finish', happenedAt: NOW - 5 * MINUTE };
const everything = [{ scope: 'everything' as const, stationId: null }];
const held = { reason: 'drips', by: 'cy', at: NOW - MINUTE };

describe('a finish made off the network', () => {
  it('finish > nothing stood against it > finished at its own time, with no flag, and the next step opens', () => {
    const { step, opened, flags } = ask(inHand(['ann'], { startedAt: NOW - 20 * MINUTE }), late);
    expect(step).toMatchObject({ state: 'passed', finishedAt: NOW - 5 * MINUTE });
    expect(flags).toEqual([]);
    expect(opened?.map(({ state }) => state)).toEqual(['ready']);
  });

  it.each([
    ['under a hold', { held }, {}, 'STEP_HELD'],
    ['before its start was heard of', { startedAt: null }, {}, 'STEP_NOT_STARTED'],
    ['under a stop', { hazards: ['hot-glue' as const] }, { stops: everything }, 'STOP_ACTIVE'],
  ])('finish > %s > stands, flagged, to check, opens nothing', (_how, change, world, flag) => {
    const { step, opened, flags } = ask(inHand(['ann'], change), late, world);
    expect(step).toMatchObject({ state: 'to check', crew: [], flags: [flag] });
    expect(flags).toEqual([flag]);
    expect(opened).toEqual([]);
  });

  it('finish > its start was heard of after it > it did not end before it began', () => {
    const { step } = ask(inHand(['ann'], { startedAt: NOW - MINUTE }), late);
    expect(step).toMatchObject({ startedAt: NOW - 5 * MINUTE, finishedAt: NOW - 5 * MINUTE });
  });

  it('finish > a phone whose clock is ahead > not later than now', () => {
    const { step } = ask(inHand(['ann']), { type: 'finish', happenedAt: NOW + MINUTE });
    expect(step?.finishedAt).toBe(NOW);
  });

  it.each([
    ['ready', stepOf({ state: 'ready' }), ['STEP_NOT_YOURS']],
    ['rework', stepOf({ state: 'rework', rework: held }), ['STEP_NOT_YOURS']],
    ['waiting', stepOf({ state: 'waiting' }), ['STEP_NOT_YOURS', 'STEP_NOT_READY']],
  ])(
    'finish > her place was given up meanwhile, the step is %s > stands, flagged, to check',
    (_state, step, flags) => {
      const past = { ...step, doers: ['ann'] };
      const answer = ask(past, late);
      expect(answer).toMatchObject({ event: 'step.finished', flags, opened: [] });
      expect(answer.step).toMatchObject({
        state: 'to check',
        finishedBy: 'ann',
        finishedAt: NOW - 5 * MINUTE,
        doers: ['ann'],
        flags,
      });
    },
  );

  it('finish > her place was handed over and bo works on it > he keeps it; what he finishes is looked at for the flag', () => {
    const his = inHand(['bo'], { doers: ['ann', 'bo'] });
    const { step } = ask(his, late);
    expect(step).toMatchObject({ state: 'in hand', flags: ['STEP_NOT_YOURS'] });
    expect(step?.crew).toEqual(his.crew);
    const after = ask(step as Step, { type: 'finish' }, { person: personOf({ id: 'bo' }) });
    expect(after.step?.state).toBe('to check');
    expect(after.opened).toEqual([]);
  });

  it('finish > the rest of the crew finished it already > logged, and what stands as it is stands', () => {
    for (const state of ['to check', 'drying', 'passed'] as const) {
      const step = stepOf({ state, doers: ['ann', 'bo'], finishedBy: 'bo', finishedAt: NOW - MINUTE });
      const answer = ask(step, late);
      expect(answer).toMatchObject({ event: 'step.finished', flags: ['STEP_NOT_YOURS'], opened: [] });
      if (answer.step) expect(answer.step).toEqual({ ...step, flags: ['STEP_NOT_YOURS'] });
      else expect(state).toBe('passed');
    }
  });

  it('finish > by somebody who never held a place, or by a past holder on the network > STEP_NOT_YOURS', () => {
    expect(ask(stepOf({ doers: ['bo'] }), late).refused).toBe('STEP_NOT_YOURS');
    expect(ask(stepOf({ doers: ['ann'] }), { type: 'finish' }).refused).toBe('STEP_NOT_YOURS');
  });
});

describe('typed in from paper', () => {
  const record = (crew: string[], happenedAt = NOW - 30 * MINUTE): Command => ({
    type: 'record',
    crew,
    happenedAt,
  });

  it('record > of a step that is free > to check, its crew are doers, at its own time, flagged', () => {
    const { step, opened, event } = ask(stepOf({ doers: ['dee'] }), record(['bo', 'cy']));
    expect(event).toBe('step.recorded');
    expect(step).toMatchObject({
      state: 'to check',
      doers: ['dee', 'bo', 'cy'],
      finishedBy: 'bo',
      finishedAt: NOW - 30 * MINUTE,
      flags: ['RECORDED_FROM_PAPER'],
    });
    expect(opened).toEqual([]);
  });

  it.each([
    ['a held step', { held }, ['bo'], 'STEP_HELD'],
    ['a step that waits', { state: 'waiting' as const }, ['bo'], 'STEP_NOT_READY'],
    ['three people on two places', {}, ['bo', 'cy', 'dee'], 'STEP_CREW_FULL'],
    ['one person where two are needed', { crewMin: 2 }, ['bo'], 'STEP_CREW_TOO_SMALL'],
  ])('record > of %s > never refused, and the broken rule is a flag', (_what, change, crew, flag) => {
    expect(ask(stepOf(change), record(crew))).toMatchObject({
      flags: ['RECORDED_FROM_PAPER', flag],
      step: { state: 'to check', flags: ['RECORDED_FROM_PAPER', flag] },
    });
  });

  it('record > of a step in hand > the places are given up, who held them stay doers', () => {
    const { step } = ask(inHand(['ann'], { startedAt: NOW - MINUTE }), record(['bo']));
    expect(step).toMatchObject({ crew: [], doers: ['ann', 'bo'], startedAt: NOW - 30 * MINUTE });
  });

  it('record > the same sheet twice > the same step, no doer and no flag twice', () => {
    const once = ask(stepOf(), record(['bo', 'bo'])).step as Step;
    expect(once.doers).toEqual(['bo']);
    expect(ask(once, record(['bo'])).step).toEqual(once);
  });

  it('record > of a step that has passed > STEP_STATE: there is nothing left to do on it', () => {
    expect(ask(stepOf({ state: 'passed' }), record(['bo'])).refused).toBe('STEP_STATE');
  });

  it('pass > of what was typed in before its turn > STEP_NOT_READY until the earlier step has passed, then its flags are gone', () => {
    const flagged = stepOf({
      state: 'to check',
      doers: ['bo'],
      flags: ['RECORDED_FROM_PAPER', 'STEP_NOT_READY'],
    });
    const before = stepOf({ id: 's1', position: 1, name: 'lay out', state: 'ready' });
    const world = { traveller: [before, flagged] };
    expect(ask(flagged, { type: 'pass' }, world).refused).toBe('STEP_NOT_READY');
    world.traveller = [{ ...before, state: 'passed' }, flagged];
    expect(ask(flagged, { type: 'pass' }, world).step).toMatchObject({ state: 'passed', flags: [] });
  });

  it('pass > of a field joint typed in before its pieces have passed > STEP_NOT_READY', () => {
    const flagged = stepOf({ position: 1, state: 'to check', doers: ['bo'], flags: ['RECORDED_FROM_PAPER'] });
    const world = { traveller: [flagged], missingPieces: ['V-07'] };
    expect(ask(flagged, { type: 'pass' }, world).refused).toBe('STEP_NOT_READY');
  });
});
