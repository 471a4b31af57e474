import { describe, expect, it } from 'vitest';
import { decide, type Command, type Step } from '../../../shared/travellers';
import { inHand, NOW, stepOf, worldOf } from './fixtures';

/** Every command, as somebody asks it. */
const COMMANDS = {
  claim: { type: 'claim' },
  'give-back': { type: 'give-back' },
  offer: { type: 'offer', to: 'bo' },
  accept: { type: 'accept' },
  withdraw: { type: 'withdraw' },
  start: { type: 'start' },
  finish: { type: 'finish' },
  record: { type: 'record', crew: ['bo'], happenedAt: NOW - 60_000 },
  'end-drying': { type: 'end-drying', reason: 'touched it' },
  'clock-ended': { type: 'clock-ended' },
  'still-wet': { type: 'still-wet', seconds: 1200 },
  pass: { type: 'pass' },
  rework: { type: 'rework', reason: 'a joint is loose', targetId: 's2' },
  hold: { type: 'hold', reason: 'wrong kit' },
  release: { type: 'release', note: 'right kit now' },
} as const satisfies Record<string, Command>;
type CommandName = keyof typeof COMMANDS;

/** The step in each state as a person called ann meets it: hers while it is in hand, somebody else's work after that. */
const STATES: Record<string, Step> = {
  waiting: stepOf({ state: 'waiting' }),
  ready: stepOf({ state: 'ready' }),
  'in hand': inHand(['ann']),
  drying: stepOf({
    state: 'drying',
    clocks: { touchDry: 1800 },
    doers: ['bo'],
    finishedAt: NOW - 1_800_000,
    dryUntil: NOW,
  }),
  'to check': stepOf({ state: 'to check', needsCheck: true, doers: ['bo'], finishedAt: NOW - 60_000 }),
  passed: stepOf({ state: 'passed', doers: ['bo'], passedAt: NOW - 60_000 }),
  rework: stepOf({ state: 'rework', rework: { reason: 'loose', by: 'cy', at: NOW - 60_000 } }),
  held: stepOf({ state: 'ready', held: { reason: 'wrong kit', by: 'cy', at: NOW - 60_000 } }),
};

// Written from "States of a step" and rules 1, 5 and 10 of the product, not from the code: a state is what the step becomes, a
// code in capitals why it does not.
const NOBODYS = {
  'give-back': 'STEP_NOT_YOURS',
  offer: 'STEP_NOT_YOURS',
  start: 'STEP_NOT_YOURS',
  finish: 'STEP_NOT_YOURS',
};
const UNOFFERED = { accept: 'HAND_OVER_NOT_OFFERED', withdraw: 'HAND_OVER_NOT_OFFERED' };
const NOT_DRYING = { 'end-drying': 'STEP_STATE', 'clock-ended': 'STEP_STATE', 'still-wet': 'STEP_STATE' };
const NOT_CHECKED = { pass: 'STEP_STATE', rework: 'STEP_STATE' };

const EXPECTED: Record<string, Record<CommandName, string>> = {
  waiting: {
    ...NOBODYS,
    ...UNOFFERED,
    ...NOT_DRYING,
    ...NOT_CHECKED,
    claim: 'STEP_NOT_READY',
    record: 'to check',
    hold: 'waiting',
    release: 'STEP_NOT_HELD',
  },
  ready: {
    ...NOBODYS,
    ...UNOFFERED,
    ...NOT_DRYING,
    ...NOT_CHECKED,
    claim: 'in hand',
    record: 'to check',
    hold: 'ready',
    release: 'STEP_NOT_HELD',
  },
  'in hand': {
    ...UNOFFERED,
    ...NOT_DRYING,
    ...NOT_CHECKED,
    claim: 'STEP_ALREADY_YOURS',
    'give-back': 'ready',
    offer: 'in hand',
    start: 'STEP_STATE',
    finish: 'passed',
    record: 'to check',
    hold: 'in hand',
    release: 'STEP_NOT_HELD',
  },
  drying: {
    ...NOBODYS,
    ...UNOFFERED,
    ...NOT_CHECKED,
    claim: 'STEP_STATE',
    record: 'to check',
    'end-drying': 'passed',
    'clock-ended': 'passed',
    'still-wet': 'drying',
    hold: 'drying',
    release: 'STEP_NOT_HELD',
  },
  'to check': {
    ...NOBODYS,
    ...UNOFFERED,
    ...NOT_DRYING,
    claim: 'STEP_STATE',
    record: 'to check',
    pass: 'passed',
    rework: 'rework',
    hold: 'to check',
    release: 'STEP_NOT_HELD',
  },
  passed: {
    ...NOBODYS,
    ...UNOFFERED,
    ...NOT_DRYING,
    ...NOT_CHECKED,
    claim: 'STEP_STATE',
    record: 'STEP_STATE',
    hold: 'STEP_STATE',
    release: 'STEP_NOT_HELD',
  },
  rework: {
    ...NOBODYS,
    ...UNOFFERED,
    ...NOT_DRYING,
    ...NOT_CHECKED,
    claim: 'in hand',
    record: 'to check',
    hold: 'rework',
    release: 'STEP_NOT_HELD',
  },
  held: {
    ...NOBODYS,
    ...UNOFFERED,
    ...NOT_DRYING,
    ...NOT_CHECKED,
    claim: 'STEP_HELD',
    record: 'to check',
    hold: 'STEP_HELD',
    release: 'ready',
  },
};

const CASES = Object.entries(EXPECTED).flatMap(([state, row]) =>
  (Object.keys(COMMANDS) as CommandName[]).map((command) => [state, command, row[command]] as const),
);

describe('decide', () => {
  it.each(CASES)('decide > a %s step is asked to %s > %s', (state, name, expected) => {
    const step = STATES[state] as Step;
    const world = worldOf(step);
    const before = structuredClone(world);
    const decision = decide(world, COMMANDS[name]);
    const outcome = decision.ok
      ? decision.value.steps.find((changed) => changed.id === step.id)?.state
      : decision.refusal.code;
    expect(outcome).toBe(expected);
    // A decision is an answer, not a change: what it was asked about stays as it was.
    expect(world).toEqual(before);
  });
});
