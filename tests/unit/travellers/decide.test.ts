import { describe, expect, it } from 'vitest';
import { decide, type Command, type Step, type World } from '../../../shared/travellers';
import { inHand, NOW, personOf, stepOf, worldOf } from './fixtures';

/** What a command led to: the changed steps by id, or why not. */
interface Asked {
  steps?: Map<string, Step>;
  event?: string;
  flags?: string[];
  refused?: string;
  details?: Record<string, unknown>;
}

function asked(world: World, command: Command): Asked {
  const decision = decide(world, command);
  if (!decision.ok) return { refused: decision.refusal.code, details: decision.refusal.details };
  const { steps, event, flags } = decision.value;
  return { steps: new Map(steps.map((step) => [step.id, step])), event, flags };
}
const claim: Command = { type: 'claim' };
const finish: Command = { type: 'finish' };

describe('places', () => {
  it('claim > one place left, then none > taken, then STEP_CREW_FULL with who has it', () => {
    const one = inHand(['bo']);
    const taken = asked(worldOf(one), claim).steps?.get('s2');
    expect(taken?.crew.map((member) => member.personId)).toEqual(['bo', 'ann']);
    expect(asked(worldOf(inHand(['bo', 'cy'])), claim)).toMatchObject({
      refused: 'STEP_CREW_FULL',
      details: { crew: ['bo', 'cy'], places: 2 },
    });
  });

  it('claim > two steps in hand already > IN_HAND_LIMIT with the limit; with one more allowed > taken', () => {
    const person = personOf({ inHand: 2 });
    expect(asked(worldOf(stepOf(), { person }), claim)).toMatchObject({
      refused: 'IN_HAND_LIMIT',
      details: { limit: 2 },
    });
    const world = worldOf(stepOf(), { person });
    expect(asked({ ...world, settings: { ...world.settings, maxInHand: 3 } }, claim).event).toBe(
      'step.claimed',
    );
  });

  it('claim > asked off the network three minutes ago > OFFLINE_CLAIM_EXPIRED; one minute ago > taken', () => {
    const old = { ...claim, happenedAt: NOW - 180_000 };
    expect(asked(worldOf(stepOf()), old).refused).toBe('OFFLINE_CLAIM_EXPIRED');
    expect(asked(worldOf(stepOf()), { ...claim, happenedAt: NOW - 60_000 }).event).toBe('step.claimed');
  });

  it('give-back > one of two, then the last > work goes on, then it lies open and its start is forgotten; both stay doers', () => {
    const first = asked(worldOf(inHand(['ann', 'bo'])), { type: 'give-back' }).steps?.get('s2');
    expect(first).toMatchObject({ state: 'in hand', doers: ['ann', 'bo'] });
    expect(first?.startedAt).not.toBeNull();
    const last = asked(worldOf(inHand(['ann'], { doers: ['bo', 'ann'] })), { type: 'give-back' }).steps?.get(
      's2',
    );
    expect(last).toMatchObject({ state: 'ready', crew: [], startedAt: null, doers: ['bo', 'ann'] });
  });

  it('give-back > the last of a step that was sent back > rework again, with its reason', () => {
    const rework = { reason: 'loose', by: 'cy', at: NOW };
    expect(asked(worldOf(inHand(['ann'], { rework })), { type: 'give-back' }).steps?.get('s2')).toMatchObject(
      {
        state: 'rework',
        rework,
      },
    );
  });

  it('start > fewer than the least crew > STEP_CREW_TOO_SMALL with the numbers', () => {
    const step = inHand(['ann'], { crewMin: 2, startedAt: null });
    expect(asked(worldOf(step), { type: 'start' })).toMatchObject({
      refused: 'STEP_CREW_TOO_SMALL',
      details: { crew: 1, needed: 2 },
    });
  });
});

describe('hand-over', () => {
  const offered = inHand(['bo'], { handOver: { from: 'bo', to: 'ann', at: NOW - 1000 } });

  it('accept > offered to her > the place changes hands, both are doers', () => {
    const step = asked(worldOf(offered), { type: 'accept' }).steps?.get('s2');
    expect(step?.crew.map((member) => member.personId)).toEqual(['ann']);
    expect(step).toMatchObject({ doers: ['bo', 'ann'], handOver: null });
  });

  it.each([
    ['not confirmed', personOf({ confirmed: false }), 'PERSON_NOT_CONFIRMED'],
    ['without the sign-off', personOf({ missing: { 'hot-glue': 'not read' } }), 'SIGN_OFF_MISSING'],
    ['with two in hand', personOf({ inHand: 2 }), 'IN_HAND_LIMIT'],
  ])('accept > by a person %s > the same gate as a claim, the place stays', (_who, person, code) => {
    const step = { ...offered, hazards: ['hot-glue' as const] };
    expect(asked(worldOf(step, { person }), { type: 'accept' }).refused).toBe(code);
  });

  it('offer > to oneself or to somebody of the crew > HAND_OVER_TO_SELF', () => {
    for (const to of ['ann', 'bo'])
      expect(asked(worldOf(inHand(['ann', 'bo'])), { type: 'offer', to }).refused).toBe('HAND_OVER_TO_SELF');
  });

  it('withdraw > by whom it was offered, or by who offered it > gone either way, said which', () => {
    expect(asked(worldOf(offered), { type: 'withdraw' }).event).toBe('step.offer-declined');
    const person = personOf({ id: 'bo' });
    expect(asked(worldOf(offered, { person }), { type: 'withdraw' }).event).toBe('step.offer-withdrawn');
  });
});

describe('gates', () => {
  const glue = stepOf({ hazards: ['hot-glue'], toolKinds: ['hot-glue gun'] });

  it('claim > without the sign-off for the hazard > SIGN_OFF_MISSING names hazard and what is missing', () => {
    const person = personOf({ missing: { 'hot-glue': 'not countersigned' } });
    expect(asked(worldOf(glue, { person }), claim)).toMatchObject({
      refused: 'SIGN_OFF_MISSING',
      details: { hazard: 'hot-glue', missing: 'not countersigned' },
    });
  });

  it('finish > the sign-off ended while it was in hand > finished: work in hand is listed for the lead, not stopped', () => {
    const person = personOf({ missing: { 'hot-glue': 'expired' } });
    const step = inHand(['ann'], { hazards: ['hot-glue'] });
    expect(asked(worldOf(step, { person }), finish).event).toBe('step.finished');
  });

  it('claim > a stop for hot tools > no glue step, but a step without hazard goes on', () => {
    const stops = [{ scope: 'hot-tools' as const, stationId: null }];
    expect(asked(worldOf(glue, { stops }), claim).refused).toBe('STOP_ACTIVE');
    expect(asked(worldOf(stepOf(), { stops }), claim).event).toBe('step.claimed');
  });

  it.each(['claim', 'start', 'finish'] as const)(
    '%s > a stop for everything over a glue step > STOP_ACTIVE',
    (type) => {
      const stops = [{ scope: 'everything' as const, stationId: null }];
      const step =
        type === 'claim'
          ? glue
          : inHand(['ann'], { hazards: ['hot-glue'], startedAt: type === 'start' ? null : NOW });
      expect(asked(worldOf(step, { stops }), { type }).refused).toBe('STOP_ACTIVE');
    },
  );

  it('claim > a person of 16 for solvent spray > AGE_RULE with the rule’s source', () => {
    const spray = stepOf({ hazards: ['solvent-spray'] });
    const answer = asked(worldOf(spray, { person: personOf({ ageBand: '16-17' }) }), claim);
    expect(answer.refused).toBe('AGE_RULE');
    expect(String(answer.details?.source).length).toBeGreaterThan(5);
  });

  it('claim > not confirmed by the desk > PERSON_NOT_CONFIRMED before anything else is asked of the person', () => {
    const person = personOf({ confirmed: false, missing: { 'hot-glue': 'not read' }, inHand: 9 });
    expect(asked(worldOf(glue, { person }), claim).refused).toBe('PERSON_NOT_CONFIRMED');
  });
});

describe('finishing and checking', () => {
  it('finish > no clocks, no check > passed, and the next step opens in the same decision', () => {
    const { steps } = asked(worldOf(inHand(['ann'])), finish);
    expect(steps?.get('s2')).toMatchObject({ state: 'passed', finishedBy: 'ann', crew: [] });
    expect(steps?.get('s3')?.state).toBe('ready');
  });

  it('finish > with clocks > drying until touch-dry, the next step waits; its clock ends it', () => {
    const { steps } = asked(worldOf(inHand(['ann'], { clocks: { touchDry: 1800 } })), finish);
    expect(steps?.get('s2')).toMatchObject({ state: 'drying', dryUntil: NOW + 1_800_000 });
    expect(steps?.has('s3')).toBe(false);
  });

  it('finish > not started > STEP_NOT_STARTED', () => {
    expect(asked(worldOf(inHand(['ann'], { startedAt: null })), finish).refused).toBe('STEP_NOT_STARTED');
  });

  it('finish > made off the network while a stop came > stands, flagged, waits for a lead and opens nothing', () => {
    const stops = [{ scope: 'everything' as const, stationId: null }];
    const step = inHand(['ann'], { hazards: ['hot-glue'] });
    const answer = asked(worldOf(step, { stops }), { ...finish, happenedAt: NOW - 30_000 });
    expect(answer.flags).toEqual(['STOP_ACTIVE']);
    expect(answer.steps?.get('s2')).toMatchObject({ state: 'to check', finishedAt: NOW - 30_000 });
    expect(answer.steps?.has('s3')).toBe(false);
  });

  const done = (doers: string[]): Step =>
    stepOf({ state: 'to check', needsCheck: true, doers, finishedBy: doers[0] ?? null });

  it('pass > by somebody who once held a place and handed it over > CHECKER_DID_WORK', () => {
    expect(asked(worldOf(done(['bo', 'ann'])), { type: 'pass' }).refused).toBe('CHECKER_DID_WORK');
    expect(asked(worldOf(done(['bo'])), { type: 'pass' }).event).toBe('step.passed');
  });

  it('pass > by a volunteer without the duty > CHECKER_NEEDED', () => {
    const person = personOf({ duties: ['volunteer', 'crib keeper'] });
    expect(asked(worldOf(done(['bo']), { person }), { type: 'pass' }).refused).toBe('CHECKER_NEEDED');
  });

  it('rework > to an earlier step > that one is sent back, this one waits again and forgets its work, doers stay', () => {
    const step = done(['bo']);
    const { steps } = asked(worldOf(step), { type: 'rework', reason: 'short', targetId: 's1' });
    expect(steps?.get('s1')).toMatchObject({ state: 'rework', rework: { reason: 'short', by: 'ann' } });
    expect(steps?.get('s2')).toMatchObject({ state: 'waiting', finishedAt: null, doers: ['bo'] });
    expect(asked(worldOf(step), { type: 'rework', reason: 'short', targetId: 's3' }).refused).toBe(
      'REWORK_TARGET',
    );
  });

  it('rework > of a step typed in from paper whose turn has not come > it waits and opens as rework when the earlier one passes', () => {
    const before = inHand(['ann'], { id: 's1', position: 1 });
    const early = stepOf({
      state: 'to check',
      doers: ['bo'],
      flags: ['RECORDED_FROM_PAPER', 'STEP_NOT_READY'],
    });
    const sent = asked(worldOf(early, { traveller: [before, early] }), {
      type: 'rework',
      reason: 'short',
      targetId: 's2',
    });
    const waits = sent.steps?.get('s2') as Step;
    expect(waits).toMatchObject({ state: 'waiting', rework: { reason: 'short' } });
    const { steps } = asked(worldOf(before, { traveller: [before, waits] }), finish);
    expect(steps?.get('s2')).toMatchObject({ state: 'rework', rework: { reason: 'short' } });
  });

  it('record > from paper, of a step that waits > never refused, flagged, to be checked, opens nothing', () => {
    const step = stepOf({ state: 'waiting' });
    const answer = asked(worldOf(step), { type: 'record', crew: ['bo', 'cy'], happenedAt: NOW - 600_000 });
    expect(answer.flags).toEqual(['RECORDED_FROM_PAPER', 'STEP_NOT_READY']);
    expect([...(answer.steps?.keys() ?? [])]).toEqual(['s2']);
    expect(answer.steps?.get('s2')).toMatchObject({ state: 'to check', doers: ['bo', 'cy'] });
  });

  it('clock-ended > of a step that was flagged > to its check, whatever the template says: it opens nothing by itself', () => {
    const step = stepOf({
      state: 'drying',
      clocks: { touchDry: 60 },
      flags: ['RECORDED_FROM_PAPER'],
      doers: ['bo'],
      dryUntil: NOW,
    });
    const { steps } = asked(worldOf(step), { type: 'clock-ended' });
    expect(steps?.get('s2')?.state).toBe('to check');
    expect(steps?.has('s3')).toBe(false);
  });

  it('still-wet > twenty minutes more > this piece and all that dry in the bay, and the next step closes', () => {
    const wet = stepOf({
      state: 'passed',
      clocks: { touchDry: 1800 },
      finishedAt: NOW - 1_900_000,
      passedAt: NOW - 100_000,
    });
    const next = stepOf({ id: 's3', position: 3, state: 'ready' });
    const neighbour = stepOf({ id: 'n1', subAssemblyId: 'other', state: 'drying', dryUntil: NOW + 60_000 });
    const world = worldOf(wet, { traveller: [wet, next], station: [neighbour] });
    const { steps } = asked(world, { type: 'still-wet', seconds: 1200 });
    expect(steps?.get('s2')).toMatchObject({ state: 'drying', dryUntil: NOW + 1_200_000, passedAt: null });
    expect(steps?.get('n1')?.dryUntil).toBe(NOW + 60_000 + 1_200_000);
    expect(steps?.get('s3')?.state).toBe('waiting');
  });
});
