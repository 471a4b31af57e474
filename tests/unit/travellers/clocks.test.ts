import { describe, expect, it } from 'vitest';
import { clockGate, decide, type Clocks, type Step } from '../../../shared/travellers';
import { NOW, stepOf, worldOf } from './fixtures';

const MINUTE = 60;
const CLOCKS: Clocks = {
  touchDry: 30 * MINUTE,
  recoatFrom: 60 * MINUTE,
  recoatUntil: 240 * MINUTE,
  handleFrom: 45 * MINUTE,
  hangFrom: 90 * MINUTE,
};
const coat = (change: Partial<Step> = {}) =>
  stepOf({
    id: 's1',
    position: 1,
    name: 'first coat',
    operation: 'coat',
    clocks: CLOCKS,
    state: 'passed',
    finishedAt: NOW,
    ...change,
  });
const after = (operation: string) => stepOf({ id: 's2', position: 2, operation, state: 'ready' });
const at = (operation: string, minutes: number, before: Step = coat()) =>
  clockGate([before, after(operation)], after(operation), NOW + minutes * MINUTE * 1000);
const refusal = (clock: string, minutes: number) => ({
  refusal: {
    code: 'STEP_CLOCK_RUNNING',
    details: { clock, until: NOW + minutes * MINUTE * 1000, coat: 'first coat' },
  },
  warnings: [],
});
const FREE = { refusal: null, warnings: [] };

describe('clockGate', () => {
  it.each([
    ['coat', 59.99, refusal('recoatFrom', 60)],
    ['coat', 60, FREE],
    ['coat', 240, FREE],
    ['hang', 89.99, refusal('hangFrom', 90)],
    ['hang', 90, FREE],
    ['clean', 44.99, refusal('handleFrom', 45)],
    ['clean', 45, FREE],
  ])(
    'clockGate > %s %d minutes after a coat > its own clock decides, to the second',
    (operation, minutes, answer) => {
      expect(at(operation, minutes)).toEqual(answer);
    },
  );

  it('clockGate > a second coat after its recoat window > warned, not refused; the claim carries the warning', () => {
    const warning = {
      code: 'RECOAT_WINDOW_PAST',
      details: { until: NOW + 240 * MINUTE * 1000, coat: 'first coat' },
    };
    expect(at('coat', 240.01)).toEqual({ refusal: null, warnings: [warning] });
    const step = after('coat');
    const world = worldOf(step, { traveller: [coat(), step], now: NOW + 241 * MINUTE * 1000 });
    const decision = decide(world, { type: 'claim' });
    expect(decision.ok && decision.value.warnings).toEqual([warning]);
  });

  it('clockGate > a coat whose sheet names no hang clock > hanging waits for the handle clock', () => {
    const { hangFrom: _none, ...clocks } = CLOCKS;
    expect(at('hang', 44, coat({ clocks }))).toEqual(refusal('handleFrom', 45));
    expect(at('hang', 45, coat({ clocks }))).toEqual(FREE);
  });

  it('clockGate > hang clock shorter than the handle clock > hanging is carrying too and waits for both', () => {
    expect(at('hang', 30, coat({ clocks: { ...CLOCKS, hangFrom: 20 * MINUTE } }))).toEqual(
      refusal('handleFrom', 45),
    );
  });

  it('clockGate > only the touch-dry clock > nothing else is asked', () => {
    for (const operation of ['coat', 'hang', 'clean'])
      expect(at(operation, 0, coat({ clocks: { touchDry: 60 } }))).toEqual(FREE);
  });

  it('clockGate > two coats > the later one counts', () => {
    const second = coat({ id: 's2', position: 2, name: 'second coat', finishedAt: NOW + 3600_000 });
    const hang = stepOf({ id: 's3', position: 3, operation: 'hang' });
    const answer = clockGate([coat(), second, hang], hang, NOW + 100 * MINUTE * 1000);
    expect(answer.refusal?.details).toEqual({
      clock: 'hangFrom',
      until: NOW + 150 * MINUTE * 1000,
      coat: 'second coat',
    });
  });

  it('clockGate > no coat before the step, or one not finished > free', () => {
    expect(at('hang', 0, coat({ clocks: null }))).toEqual(FREE);
    expect(at('hang', 0, coat({ finishedAt: null }))).toEqual(FREE);
    const first = stepOf({ id: 's0', position: 0, operation: 'clean' });
    expect(clockGate([first, coat()], first, NOW)).toEqual(FREE);
  });

  it('claim > a clock still runs > STEP_CLOCK_RUNNING, before anything about the person is asked', () => {
    const step = after('hang');
    const decision = decide(worldOf(step, { traveller: [coat(), step] }), { type: 'claim' });
    expect(decision.ok ? null : decision.refusal.code).toBe('STEP_CLOCK_RUNNING');
  });
});
