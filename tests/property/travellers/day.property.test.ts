import { isDeepStrictEqual } from 'node:util';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ageVerdict, DEFAULT_AGE_RULES, stopCovers } from '../../../shared/safety';
import { shownState, subAssemblyState, type PersonFacts, type Step } from '../../../shared/travellers';
import { inHandOf, LIMIT, moves, NAMES, PEOPLE, play, playDay, travellerOf, type Turn } from './hall';

const COMMANDS =
  'accept claim clock-ended end-drying finish give-back hold offer pass record release rework start still-wet withdraw'.split(
    ' ',
  );
const ids = (step: Step) => step.crew.map(({ personId }) => personId);
/** A rule of the product, asked hundreds of thousands of times: `expect` is too slow for that. */
function must(holds: boolean, rule: string, ...shown: unknown[]): void {
  if (!holds) throw new Error(`${rule}: ${JSON.stringify(shown)}`);
}
const everyTurn = (look: (turn: Turn) => void) =>
  fc.assert(
    fc.property(moves, (list) => {
      playDay(list, look);
    }),
    { numRuns: 60 },
  );
/** Every step before and after an accepted turn. */
const everyStep = (look: (before: Step, after: Step, turn: Turn) => void) =>
  everyTurn((turn) => {
    turn.after?.steps.forEach((after, at) => {
      look(turn.before.steps[at] as Step, after, turn);
    });
  });

describe('a day of random commands', () => {
  it('decide > places > never over the most crew, nobody twice, nobody over the limit, an offer only out of the crew', () => {
    everyStep((_before, after) => {
      const crew = ids(after);
      must(crew.length <= after.crewMax, 'most crew', after);
      must(new Set(crew).size === crew.length, 'nobody twice', after);
      const { handOver } = after;
      must(!handOver || (crew.includes(handOver.from) && !crew.includes(handOver.to)), 'offer', after);
    });
    everyTurn(({ after }) => {
      if (after)
        for (const who of NAMES) must(inHandOf(after, who) <= LIMIT, 'limit in hand', who, after.steps);
    });
  });

  it('decide > doers > only grow, and hold whoever stands at the bench', () => {
    everyStep((before, after) => {
      must(isDeepStrictEqual(after.doers.slice(0, before.doers.length), before.doers), 'grow', before, after);
      must(new Set(after.doers).size === after.doers.length, 'each once', after);
      must(
        ids(after).every((who) => after.doers.includes(who)),
        'crew are doers',
        after,
      );
    });
  });

  it('decide > a check > passed or sent back only by a checker who never held a place on it', () => {
    everyStep((before, after, { ask }) => {
      if (before.id !== ask.stepId || (ask.command.type !== 'pass' && ask.command.type !== 'rework')) return;
      const { confirmed, duties } = PEOPLE[ask.who] as PersonFacts;
      must(!before.doers.includes(ask.who), 'own work', ask, before);
      must(confirmed && duties.some((duty) => duty === 'checker' || duty === 'bench lead'), 'duty', ask);
      must(ask.command.type === 'rework' || after.passedBy === ask.who, 'named', ask, after);
    });
  });

  it('decide > who gets onto a step, or begins on it > has passed every gate', () => {
    everyStep((before, after, { ask, before: hall }) => {
      const joined = ids(after).filter((who) => !ids(before).includes(who));
      const began = before.startedAt === null && after.startedAt !== null && ask.command.type === 'start';
      if (joined.length === 0 && !began) return;
      must(isDeepStrictEqual(joined, began ? [] : [ask.who]), 'only who asked', ask, joined);
      const person = PEOPLE[ask.who] as PersonFacts;
      must(person.confirmed, 'confirmed', ask);
      must(!hall.stops.some((stop) => stopCovers(stop, before)), 'stop', ask, hall.stops);
      for (const hazard of before.hazards) {
        must(person.missing[hazard] === undefined, 'sign-off', ask, before);
        const question = { hazard, toolKinds: before.toolKinds };
        must(ageVerdict(DEFAULT_AGE_RULES, person.ageBand, question).verdict !== 'refused', 'age', ask);
      }
      must(before.held === null, 'not held', ask, before);
      must(!began || before.crew.length >= before.crewMin, 'least crew', ask, before);
    });
  });

  it('decide > order > nothing is open, worked on or passed before all in front of it has passed', () => {
    everyStep((_before, after, { after: hall }) => {
      // Only what was flagged may be further on than its turn; it waits for its look.
      const flagged = (after.state === 'to check' || after.state === 'drying') && after.flags.length > 0;
      if (!hall || after.state === 'waiting' || flagged) return;
      const earlier = travellerOf(hall, after).filter(({ position }) => position < after.position);
      must(
        earlier.every(({ state }) => state === 'passed'),
        'before its turn',
        after,
        earlier,
      );
    });
  });

  it('decide > an earlier step is opened again > later ones of its piece wait without places, the rest goes on', () => {
    everyTurn(({ before, ask, after }) => {
      if (!after || ask.command.type !== 'rework') return;
      const { targetId } = ask.command;
      const target = before.steps.find(({ id }) => id === targetId) as Step;
      for (const [at, step] of after.steps.entries()) {
        const later = step.subAssemblyId === target.subAssemblyId && step.position > target.position;
        if (later)
          expect(step).toMatchObject({
            state: 'waiting',
            crew: [],
            finishedAt: null,
            passedAt: null,
            flags: [],
          });
        else if (step.id !== targetId) expect(step).toEqual(before.steps[at]);
      }
    });
  });

  it('decide > a hold > is ended by its release only, which gives back exactly what was under it', () => {
    everyStep((before, after, { ask }) => {
      const own = before.id === ask.stepId;
      const released = own && ask.command.type === 'release';
      if (before.held && !released)
        must(isDeepStrictEqual(after.held, before.held), 'stays held', ask, after);
      if (released || (own && ask.command.type === 'hold'))
        must(isDeepStrictEqual({ ...after, held: null }, { ...before, held: null }), 'under it', ask, after);
      must(!after.held || shownState(after) === 'held', 'shown', after);
    });
  });

  it('decide > what already happened > is never refused, is flagged where it broke a rule, and then opens nothing', () => {
    everyTurn(({ before, ask, after }) => {
      const step = before.steps.find(({ id }) => id === ask.stepId) as Step;
      const { command } = ask;
      const late = command.type === 'finish' && command.happenedAt !== undefined;
      if (!late && command.type !== 'record') return;
      const may = late
        ? step.doers.includes(ask.who) && step.finishedBy !== ask.who
        : step.state !== 'passed';
      if (may) expect(after, JSON.stringify([ask, step])).not.toBeNull();
      const now = after?.steps.find(({ id }) => id === ask.stepId);
      if (!after || !now || now.flags.length === 0) return;
      const rest = (steps: readonly Step[]) => steps.filter(({ id }) => id !== step.id);
      expect(rest(after.steps)).toEqual(rest(before.steps));
    });
  });

  it('decide > what a step says of itself > agrees with its state', () => {
    everyStep((_before, after) => {
      const { state } = after;
      must(after.crew.length > 0 === (state === 'in hand'), 'crew', after);
      must((after.dryUntil !== null) === (state === 'drying'), 'drying', after);
      must((after.passedAt !== null) === (state === 'passed'), 'passed', after);
      must(state !== 'passed' || after.flags.length === 0, 'flags', after);
      must(state !== 'rework' || after.rework !== null, 'rework', after);
      must(state !== 'ready' || after.rework === null, 'ready', after);
      const open = state === 'waiting' || state === 'ready' || state === 'rework';
      if (open) must(!after.startedAt && !after.finishedAt && !after.handOver, 'open', after);
      if (state === 'drying' || state === 'to check' || state === 'passed')
        must(
          (after.startedAt ?? Infinity) <= (after.finishedAt ?? -Infinity),
          'began before it ended',
          after,
        );
    });
  });

  it('subAssemblyState > after every turn > passed only when all steps have, held when any is', () => {
    everyTurn(({ after }) => {
      for (const piece of ['v', 'w']) {
        const steps = after?.steps.filter((step) => step.subAssemblyId === piece) ?? [];
        if (steps.length === 0) continue;
        const shown = subAssemblyState(steps);
        const all = steps.every((step) => step.state === 'passed' && !step.held);
        must((shown === 'passed') === all, 'passed', shown);
        must((shown === 'held') === steps.some((step) => step.held), 'held', shown);
      }
    });
  });

  it('decide > the same thing asked twice at once > refused, or nothing changes a second time', () => {
    everyTurn(({ after, ask }) => {
      const again = after && play(after, ask);
      if (!after || !again) return;
      // Saying "still wet" again asks for more time; the idempotency key tells a repeated request from a second word.
      const timeless = (step: Step) =>
        ask.command.type === 'still-wet' ? { ...step, dryUntil: null } : step;
      must(
        isDeepStrictEqual(again.steps.map(timeless), after.steps.map(timeless)),
        'twice',
        ask,
        after.steps,
        again.steps,
      );
    });
  });

  it('hall > the random days > reach every state and every kind of command', () => {
    const states = new Set<string>();
    const accepted = new Set<string>();
    for (const list of fc.sample(moves, { numRuns: 60, seed: 7 })) {
      playDay(list, ({ after, ask }) => {
        if (!after) return;
        accepted.add(ask.command.type);
        for (const step of after.steps) states.add(shownState(step));
      });
    }
    expect(states.size).toBe(8);
    expect([...accepted].sort()).toEqual(COMMANDS);
  });
});
