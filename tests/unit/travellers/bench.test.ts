import { describe, expect, it } from 'vitest';
import { bench, chainBehind, type Step } from '../../../shared/travellers';
import { inHand, NOW, personOf, stepOf, worldOf } from './fixtures';

/** A traveller of steps with these minutes; the first is open, the others wait. */
const traveller = (piece: string, ...minutes: number[]): Step[] =>
  minutes.map((long, at) =>
    stepOf({
      id: `${piece}${at + 1}`,
      subAssemblyId: piece,
      position: at + 1,
      state: at === 0 ? 'ready' : 'waiting',
      plannedSeconds: long * 60,
    }),
  );
const with0 = (steps: Step[], change: Partial<Step>): Step[] =>
  steps.map((step, at) => (at === 0 ? { ...step, ...change } : step));

function benchOf(travellers: Step[][], missing = {}) {
  const inHandNow = travellers.flat().filter((step) => step.crew.some(({ personId }) => personId === 'ann'));
  const person = personOf({ inHand: inHandNow.length, missing });
  return bench('ann', travellers, (step) =>
    worldOf(step, { traveller: travellers.find((list) => list.includes(step)) ?? [step], person }),
  );
}
const ids = (entries: readonly { step: Step }[]) => entries.map(({ step }) => step.id);

describe('chainBehind', () => {
  it('chainBehind > steps before, the step itself, passed and open ones after > only what is still to do after it', () => {
    const steps = traveller('v', 1, 2, 4, 8, 16).map((step, at) =>
      at === 3 ? { ...step, state: 'passed' as const } : step,
    );
    expect(chainBehind(steps, steps[1] as Step)).toEqual({ seconds: (4 + 16) * 60, steps: 2 });
    expect(chainBehind(steps, steps[4] as Step)).toEqual({ seconds: 0, steps: 0 });
  });
});

describe('bench', () => {
  it('bench > open steps with different work behind them > longest chain first, own minutes counted, then by code', () => {
    const result = benchOf([
      traveller('a', 10, 10),
      traveller('b', 5, 30),
      traveller('c', 40),
      traveller('d', 20),
      traveller('e', 5, 15),
    ]);
    expect(ids(result.canTake)).toEqual(['c1', 'b1', 'a1', 'd1', 'e1']);
    expect(result.canTake[1]).toMatchObject({ chainSeconds: 1800, stepsBehind: 1, places: 2 });
  });

  it('bench > what waits, dries, is checked, has passed, or is full > nobody’s question', () => {
    const states: Partial<Step>[] = [
      { state: 'waiting' },
      { state: 'drying' },
      { state: 'to check' },
      { state: 'passed' },
      { ...inHand(['bo', 'cy']), id: 'x1', position: 1 },
    ];
    const result = benchOf(
      states.map((change, at) => with0(traveller(`x${at}`, 5), { ...change, id: `x${at}` })),
    );
    expect(result).toEqual({ inHand: [], offered: [], canTake: [], notYet: [] });
  });

  it('bench > a place left beside others, and a step sent back > both can be taken', () => {
    const result = benchOf([
      with0(traveller('a', 5), { state: 'in hand', crew: [{ personId: 'bo', claimedAt: NOW }] }),
      with0(traveller('b', 5), { state: 'rework' }),
    ]);
    expect(ids(result.canTake)).toEqual(['a1', 'b1']);
    expect(result.canTake.map(({ places }) => places)).toEqual([1, 2]);
  });

  it('bench > what she has, what she is offered > listed as hers and as offered, never among what to take', () => {
    const result = benchOf([
      with0(traveller('a', 5), { state: 'in hand', crew: [{ personId: 'ann', claimedAt: NOW }] }),
      with0(traveller('b', 5), {
        state: 'in hand',
        crewMax: 1,
        crew: [{ personId: 'bo', claimedAt: NOW }],
        handOver: { from: 'bo', to: 'ann', at: NOW },
      }),
    ]);
    expect(result.inHand.map(({ id }) => id)).toEqual(['a1']);
    expect(result.offered.map(({ id }) => id)).toEqual(['b1']);
    expect(ids([...result.canTake, ...result.notYet])).toEqual([]);
  });

  it('bench > what she may not yet > with the reason, longest chain first', () => {
    const glue: Partial<Step> = { hazards: ['hot-glue'] };
    const held = { reason: 'wrong kit', by: 'cy', at: NOW };
    const result = benchOf([with0(traveller('a', 5), glue), with0(traveller('b', 5, 50), { held })], {
      'hot-glue': 'NOT_COUNTERSIGNED',
    });
    expect(ids(result.canTake)).toEqual([]);
    expect(result.notYet.map(({ step, refusal }) => [step.id, refusal.code])).toEqual([
      ['b1', 'STEP_HELD'],
      ['a1', 'SIGN_OFF_MISSING'],
    ]);
  });

  it('bench > two steps in hand > everything else waits for one of them', () => {
    const mine = ['a', 'b'].map((piece) =>
      with0(traveller(piece, 5), { state: 'in hand', crew: [{ personId: 'ann', claimedAt: NOW }] }),
    );
    const result = benchOf([...mine, traveller('c', 5)]);
    expect(result.notYet.map(({ refusal }) => refusal.code)).toEqual(['IN_HAND_LIMIT']);
  });
});
