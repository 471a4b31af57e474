import { describe, expect, it } from 'vitest';
import { decide, type Command, type Step } from '../../../shared/travellers';
import { inHand, NOW, stepOf, worldOf } from './fixtures';

const MINUTE = 60_000;
const drying = (change: Partial<Step> = {}) =>
  stepOf({
    operation: 'coat',
    clocks: { touchDry: 1800 },
    state: 'drying',
    doers: ['bo'],
    finishedAt: NOW - 30 * MINUTE,
    dryUntil: NOW,
    ...change,
  });
const next = (change: Partial<Step> = {}) => stepOf({ id: 's3', position: 3, state: 'waiting', ...change });
const ask = (step: Step, command: Command, after = next(), station: Step[] = []) => {
  const decision = decide(worldOf(step, { traveller: [step, after], station }), command);
  if (!decision.ok) return { refused: decision.refusal };
  const states = Object.fromEntries(decision.value.steps.map((one) => [one.id, one.state]));
  return { states, event: decision.value.event, steps: decision.value.steps };
};
const ended: Command = { type: 'clock-ended' };
const wet: Command = { type: 'still-wet', seconds: 1200 };

describe('the drying clock', () => {
  it('clock-ended > touch-dry, no check > passed by nobody, and the next step opens', () => {
    const { states, event, steps } = ask(drying(), ended);
    expect(states).toEqual({ s2: 'passed', s3: 'ready' });
    expect(event).toBe('step.dried');
    expect(steps?.[0]).toMatchObject({ passedAt: NOW, passedBy: null, dryUntil: null });
  });

  it('clock-ended > still wet was said a moment before the job came by > refused with what is left, it dries on', () => {
    expect(ask(drying({ dryUntil: NOW + 1 }), ended).refused).toEqual({
      code: 'STEP_CLOCK_RUNNING',
      details: { clock: 'touchDry', until: NOW + 1, coat: 'tack' },
    });
  });

  it('clock-ended > of a step that needs a check > to check, the next step waits', () => {
    expect(ask(drying({ needsCheck: true }), ended).states).toEqual({ s2: 'to check' });
  });

  it('clock-ended > of a held step > its paint is dry all the same, but it opens nothing', () => {
    const held = { reason: 'runs', by: 'cy', at: NOW };
    const { states, steps } = ask(drying({ held }), ended);
    expect(states).toEqual({ s2: 'to check' });
    expect(steps?.[0]?.held).toEqual(held);
  });

  it('end-drying > by a lead before the clock has run out > ended, logged as early', () => {
    const { states, event } = ask(drying({ dryUntil: NOW + 20 * MINUTE }), {
      type: 'end-drying',
      reason: 'dry',
    });
    expect(states).toEqual({ s2: 'passed', s3: 'ready' });
    expect(event).toBe('step.drying-ended-early');
  });

  it('finish > of a coat under a check > dries first, is checked after', () => {
    const { states, steps } = ask(inHand(['ann'], { clocks: { touchDry: 1800 }, needsCheck: true }), {
      type: 'finish',
    });
    expect(states).toEqual({ s2: 'drying' });
    expect(steps?.[0]?.dryUntil).toBe(NOW + 30 * MINUTE);
  });
});

describe('still wet', () => {
  it.each([
    ['while its clock runs', drying({ dryUntil: NOW + 5 * MINUTE }), 25],
    ['after its clock ran out', drying({ dryUntil: NOW - 5 * MINUTE }), 20],
    ['at its check', drying({ state: 'to check', dryUntil: null }), 20],
    ['when it has passed', drying({ state: 'passed', dryUntil: null, passedAt: NOW }), 20],
  ])('still-wet > found %s > dries 20 minutes more from then on', (_when, step, minutes) => {
    const { steps } = ask(step, wet);
    expect(steps?.[0]).toMatchObject({ state: 'drying', dryUntil: NOW + minutes * MINUTE, passedAt: null });
  });

  it('still-wet > the next step is open > it waits again; sent back for rework > it waits and keeps its reason', () => {
    const passed = drying({ state: 'passed', dryUntil: null });
    expect(ask(passed, wet, next({ state: 'ready' })).states).toEqual({ s2: 'drying', s3: 'waiting' });
    const rework = { reason: 'thin at joint 4', by: 'cy', at: NOW };
    const { steps } = ask(passed, wet, next({ state: 'rework', rework }));
    expect(steps?.[1]).toMatchObject({ state: 'waiting', rework });
  });

  it('still-wet > somebody works on the next step already > STEP_STATE: too late to say', () => {
    const passed = drying({ state: 'passed', dryUntil: null });
    const crew = [{ personId: 'bo', claimedAt: NOW }];
    expect(ask(passed, wet, next({ state: 'in hand', crew })).refused?.code).toBe('STEP_STATE');
  });

  it('still-wet > of a step without paint, or of one not finished > STEP_STATE', () => {
    expect(ask(stepOf({ state: 'passed', finishedAt: NOW }), wet).refused?.code).toBe('STEP_STATE');
    expect(ask(drying({ state: 'ready', finishedAt: null }), wet).refused?.code).toBe('STEP_STATE');
    expect(ask(inHand(['ann'], { clocks: { touchDry: 60 } }), wet).refused?.code).toBe('STEP_STATE');
  });

  it('still-wet > other pieces in the bay > those that dry dry longer, once each; the others stay as they are', () => {
    const other = drying({ id: 'n1', subAssemblyId: 'other', dryUntil: NOW + MINUTE });
    const done = drying({ id: 'n2', subAssemblyId: 'third', state: 'passed', dryUntil: null });
    const itself = drying({ dryUntil: NOW + 5 * MINUTE });
    const { steps } = ask(itself, wet, next(), [itself, other, done]);
    expect(steps?.map((one) => [one.id, one.dryUntil])).toEqual([
      ['s2', NOW + 25 * MINUTE],
      ['n1', NOW + 21 * MINUTE],
    ]);
  });
});
