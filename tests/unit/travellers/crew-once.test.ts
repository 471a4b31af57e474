import { describe, expect, it } from 'vitest';
import { decide, type Command, type Step } from '../../../shared/travellers';
import { inHand, NOW, personOf, worldOf } from './fixtures';

const after = (step: Step, command: Command, who = 'ann'): Step | string => {
  const decision = decide(worldOf(step, { person: personOf({ id: who }) }), command);
  return decision.ok ? (decision.value.steps[0] as Step) : decision.refusal.code;
};
const crewOf = (step: Step | string) =>
  typeof step === 'string' ? step : step.crew.map((member) => member.personId);
const offeredTo = (to: string, crew = ['bo']) =>
  inHand(crew, { handOver: { from: 'bo', to, at: NOW - 1000 } });

describe('one person, one place', () => {
  it('accept > by somebody who took the other place meanwhile > STEP_ALREADY_YOURS, nobody stands there twice', () => {
    expect(after(offeredTo('ann', ['bo', 'ann']), { type: 'accept' })).toBe('STEP_ALREADY_YOURS');
  });

  it('claim > of the free place by whom the other one was offered to > taken, and the offer ends with it', () => {
    const step = after(offeredTo('ann'), { type: 'claim' });
    expect(crewOf(step)).toEqual(['bo', 'ann']);
    expect(step).toMatchObject({ handOver: null });
  });

  it('claim > by a third person while an offer is open > taken, and the offer stands', () => {
    const step = after(offeredTo('cy'), { type: 'claim' });
    expect(crewOf(step)).toEqual(['bo', 'ann']);
    expect(step).toMatchObject({ handOver: { from: 'bo', to: 'cy' } });
  });

  it('accept > of two places one was offered > the other holder keeps theirs', () => {
    expect(crewOf(after(offeredTo('ann', ['cy', 'bo']), { type: 'accept' }))).toEqual(['cy', 'ann']);
  });

  it('give-back > by who offered it > the offer ends; by the other holder > it stands', () => {
    const offered = offeredTo('cy', ['bo', 'ann']);
    expect(after(offered, { type: 'give-back' }, 'bo')).toMatchObject({ handOver: null });
    expect(after(offered, { type: 'give-back' }, 'ann')).toMatchObject({ handOver: { to: 'cy' } });
  });

  it('finish > with an offer open > the offer ends with the work', () => {
    expect(after(offeredTo('ann'), { type: 'finish' }, 'bo')).toMatchObject({ handOver: null, crew: [] });
  });

  it('accept, withdraw > by somebody it was not offered to > HAND_OVER_NOT_OFFERED', () => {
    for (const type of ['accept', 'withdraw'] as const)
      expect(after(offeredTo('cy'), { type })).toBe('HAND_OVER_NOT_OFFERED');
  });
});
