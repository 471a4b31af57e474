import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Command, Step } from '../../../shared/travellers';
import { moves, play, playDay, travellerOf, type Ask, type Hall } from './hall';

/** What brings the first step of a piece that has not passed nearer to it, with free hands and a checker at hand. */
function nextAsk(step: Step): Ask {
  const ask = (who: string, command: Command): Ask => ({ stepId: step.id, who, command });
  if (step.held) return ask('hal', { type: 'release', note: 'looked at' });
  if (step.state === 'to check') return ask('hal', { type: 'pass' });
  if (step.state === 'drying') return ask('hal', { type: 'clock-ended' });
  // Whoever is left over from the day goes home.
  const old = step.crew.find(({ personId }) => personId !== 'fay' && personId !== 'gil');
  if (old) return ask(old.personId, { type: 'give-back' });
  if (step.crew.length === 0) return ask('fay', { type: 'claim' });
  if (step.startedAt !== null) return ask('fay', { type: 'finish' });
  return step.crew.length < step.crewMin ? ask('gil', { type: 'claim' }) : ask('fay', { type: 'start' });
}

function finishPiece(from: Hall, first: Step): Hall {
  let hall = from;
  for (let turns = 0; turns < 60; turns += 1) {
    const step = travellerOf(hall, first).find(({ state, held }) => state !== 'passed' || held);
    if (!step) return hall;
    const ask = nextAsk(step);
    // Hours go by: every clock has run out.
    const next = play({ ...hall, now: hall.now + 3_600_000 }, ask);
    if (!next) throw new Error(`refused: ${JSON.stringify([ask, step])}`);
    hall = { ...next, now: hall.now + 3_600_000 };
  }
  throw new Error(`not passed after 60 turns: ${JSON.stringify(travellerOf(hall, first))}`);
}

describe('after any day of random commands', () => {
  it('decide > free hands, a checker and time > every piece can be brought to an end: nothing is ever stuck', () => {
    fc.assert(
      fc.property(moves, (list) => {
        let hall: Hall = { ...playDay(list, () => undefined), stops: [] };
        for (const piece of ['v', 'w']) {
          const first = hall.steps.find(({ subAssemblyId }) => subAssemblyId === piece) as Step;
          hall = finishPiece(hall, first);
        }
        expect(hall.steps.map(({ state }) => state)).toEqual(hall.steps.map(() => 'passed'));
      }),
      { numRuns: 60 },
    );
  });
});
