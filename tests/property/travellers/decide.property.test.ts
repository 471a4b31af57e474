import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DEFAULT_AGE_RULES } from '../../../shared/safety';
import {
  decide,
  subAssemblyState,
  type Command,
  type PersonFacts,
  type Step,
} from '../../../shared/travellers';
import { NOW, personOf, stepOf } from '../../unit/travellers/fixtures';

const PEOPLE = ['ann', 'bo', 'cy', 'dee'];
const LIMIT = 2;

const commands = fc.oneof(
  fc.constantFrom<Command>(
    { type: 'claim' },
    { type: 'give-back' },
    { type: 'accept' },
    { type: 'withdraw' },
    { type: 'start' },
    { type: 'finish' },
    { type: 'clock-ended' },
    { type: 'pass' },
    { type: 'hold', reason: 'look' },
    { type: 'release', note: 'looked' },
    { type: 'still-wet', seconds: 600 },
  ),
  fc.constantFrom(...PEOPLE).map((to): Command => ({ type: 'offer', to })),
  fc
    .integer({ min: 0, max: 3 })
    .map((target): Command => ({ type: 'rework', reason: 'again', targetId: `s${target}` })),
  fc
    .constantFrom(...PEOPLE)
    .map((who): Command => ({ type: 'record', crew: [who], happenedAt: NOW - 60_000 })),
  fc.constant<Command>({ type: 'finish', happenedAt: NOW - 30_000 }),
);
const move = fc.record({
  command: commands,
  step: fc.integer({ min: 0, max: 3 }),
  who: fc.constantFrom(...PEOPLE),
  later: fc.integer({ min: 0, max: 900 }),
});

const traveller = (): Step[] =>
  [0, 1, 2, 3].map((at) =>
    stepOf({
      id: `s${at}`,
      position: at + 1,
      state: at === 0 ? 'ready' : 'waiting',
      crewMax: 1 + (at % 2),
      needsCheck: at % 2 === 1,
      clocks: at === 2 ? { touchDry: 300 } : null,
    }),
  );

const inHandOf = (steps: readonly Step[], id: string) =>
  steps.filter((step) => step.crew.some((member) => member.personId === id)).length;
const person = (steps: readonly Step[], id: string): PersonFacts =>
  personOf({ id, inHand: inHandOf(steps, id) });

describe('decide', () => {
  it('decide > any sequence of commands by four people > crews, limits, order, doers and checks keep their rules', () => {
    fc.assert(
      fc.property(fc.array(move, { minLength: 10, maxLength: 80 }), (moves) => {
        let steps = traveller();
        let now = NOW;
        for (const { command, step: at, who, later } of moves) {
          now += later * 1000;
          const step = steps[at] as Step;
          const decision = decide(
            {
              now,
              step,
              traveller: steps,
              station: [],
              person: person(steps, who),
              stops: [],
              settings: { maxInHand: LIMIT, ageRules: DEFAULT_AGE_RULES },
            },
            command,
          );
          if (!decision.ok) continue;
          const changed = new Map(decision.value.steps.map((one) => [one.id, one]));
          const next = steps.map((one) => changed.get(one.id) ?? one);
          for (const [index, after] of next.entries()) {
            const before = steps[index] as Step;
            expect(after.crew.length).toBeLessThanOrEqual(after.crewMax);
            expect(new Set(after.crew.map((member) => member.personId)).size).toBe(after.crew.length);
            // Whoever ever held a place stays a doer.
            for (const doer of before.doers) expect(after.doers).toContain(doer);
            for (const member of after.crew) expect(after.doers).toContain(member.personId);
            if (after.crew.length > 0) expect(after.state).toBe('in hand');
            if (after.state === 'in hand') expect(after.crew.length).toBeGreaterThan(0);
            if (before.state !== 'passed' && after.state === 'passed' && command.type === 'pass')
              expect(before.doers).not.toContain(who);
            // A hold remembers the state under it and nothing but its release ends it.
            if (before.held && !after.held && before.id === step.id) expect(command.type).toBe('release');
          }
          for (const id of PEOPLE) expect(inHandOf(next, id)).toBeLessThanOrEqual(LIMIT);
          // Nothing is open before all in front of it has passed; what was typed in from paper waits for its check.
          next.forEach((one, index) => {
            // Typed in from paper and found wet it dries out of turn, and goes to its check after that.
            const open =
              one.state === 'drying'
                ? one.flags.length === 0
                : ['ready', 'in hand', 'passed'].includes(one.state);
            if (open && next.slice(0, index).some((earlier) => earlier.state !== 'passed'))
              throw new Error(`${one.id} is ${one.state} before its turn`);
          });
          const shown = subAssemblyState(next);
          expect(shown === 'passed').toBe(next.every((one) => one.state === 'passed' && !one.held));
          steps = next;
        }
      }),
      { numRuns: 400 },
    );
  });

  it('decide > the same command by the same person at once again > refused, or without a second place or doer', () => {
    fc.assert(
      fc.property(commands, fc.constantFrom(...PEOPLE), (command, who) => {
        const steps = traveller();
        const world = (list: Step[]) => ({
          now: NOW,
          step: list[0] as Step,
          traveller: list,
          station: [],
          person: person(list, who),
          stops: [],
          settings: { maxInHand: LIMIT, ageRules: DEFAULT_AGE_RULES },
        });
        const once = decide(world(steps), command);
        if (!once.ok) return;
        const first = steps.map((step) => once.value.steps.find((one) => one.id === step.id) ?? step);
        const twice = decide(world(first), command);
        if (!twice.ok) return;
        const second = first.map((step) => twice.value.steps.find((one) => one.id === step.id) ?? step);
        expect(second.map((step) => [step.crew, step.doers])).toEqual(
          first.map((step) => [step.crew, step.doers]),
        );
      }),
    );
  });
});
