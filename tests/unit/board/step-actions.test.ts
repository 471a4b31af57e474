import { describe, expect, it } from 'vitest';
import { may, type Duty } from '../../../shared/accounts';
import type { StepRecord } from '../../../shared/contracts/live';
import { offersFor } from '../../../src/features/travellers/step-actions';
import { worldOf } from '../../../src/lib/world';
import { liveOf, NOW, personRecord, stepRecord } from './fixtures';

const crewOf = (...ids: string[]) => ids.map((personId) => ({ personId, claimedAt: NOW }));

function offers(step: StepRecord, duties: Duty[] = ['volunteer']) {
  const live = liveOf({ steps: [step], people: [personRecord({ id: 'kofi', duties })] });
  const rights = { siteRole: null, duties, confirmed: true, display: false };
  return offersFor(
    { ...worldOf(live, 'kofi', step, NOW), settings: { maxInHand: 2, ageRules: [] } },
    (action) => may(rights, action),
  ).map(({ deed, refusal }) => (refusal ? `${deed}: ${refusal.code}` : deed));
}

describe('offersFor', () => {
  it('offersFor > volunteer at a ready step > may take it and nothing of a lead’s', () => {
    expect(offers(stepRecord({}))).toEqual(['claim']);
  });

  it('offersFor > a full step > the claim is shown with its refusal', () => {
    const full = stepRecord({ state: 'in hand', crewMax: 1, crew: crewOf('wren') });
    expect(offers(full)).toEqual(['claim: STEP_CREW_FULL']);
  });

  it('offersFor > my own step, not begun > start, give back, hand over; with too few hands > start says so', () => {
    const mine = stepRecord({ state: 'in hand', crew: crewOf('kofi') });
    expect(offers(mine)).toEqual(['start', 'give-back', 'offer']);
    expect(offers({ ...mine, crewMin: 2 })[0]).toBe('start: STEP_CREW_TOO_SMALL');
    expect(offers({ ...mine, startedAt: NOW })).toEqual(['finish', 'give-back', 'offer']);
  });

  it('offersFor > checker who worked on it > one refused check with the reason, never a second', () => {
    const done = stepRecord({ state: 'to check', doers: ['kofi'] });
    expect(offers(done, ['volunteer', 'checker'])).toEqual(['pass: CHECKER_DID_WORK', 'hold']);
    expect(offers({ ...done, doers: ['wren'] }, ['volunteer', 'checker'])).toEqual([
      'pass',
      'rework',
      'hold',
    ]);
  });

  it('offersFor > step offered to me > accept or decline; offered by me > take the offer back', () => {
    const step = stepRecord({ state: 'in hand', crew: crewOf('wren') });
    expect(offers({ ...step, handOver: { from: 'wren', to: 'kofi', at: NOW } })).toEqual([
      'accept',
      'withdraw',
      'claim',
    ]);
    const mine = { ...step, crew: crewOf('kofi'), handOver: { from: 'kofi', to: 'wren', at: NOW } };
    expect(offers(mine)).toContain('withdraw');
  });

  it('offersFor > bench lead at a drying, a held and a passed step > what leads do there', () => {
    const clocks = { touchDry: 600 };
    const lead: Duty[] = ['volunteer', 'bench lead'];
    const wet = stepRecord({ state: 'drying', clocks, finishedAt: NOW, dryUntil: NOW + 600_000 });
    expect(offers(wet, lead)).toEqual(['still-wet', 'end-drying', 'hold', 'record']);
    const held = stepRecord({ held: { reason: 'x', by: 'lena', at: NOW } });
    expect(offers(held, lead)).toEqual(['claim: STEP_HELD', 'release', 'record']);
    expect(offers(stepRecord({ state: 'passed' }), lead)).toEqual([]);
  });
});
