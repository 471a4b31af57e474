import { ok, type Result } from '../kernel/result';
import type { Refusal, Transition, World } from './gates';
import type { Step } from './step';

/** Accepted with the rules it broke: they stand on the step, where a checker sees them, and in the day log. */
const flagged = (steps: Step[], event: string, flags: string[]): Result<Transition, Refusal> =>
  ok({ steps, event, flags, warnings: [] });

const withFlags = (step: Step, flags: readonly string[]): string[] => [...new Set([...step.flags, ...flags])];

/** Done, whatever stood against it: it goes to its check, gives up its places and opens nothing. */
const doneBy = (step: Step, by: string, at: number, flags: string[]): Step => ({
  ...step,
  state: 'to check',
  crew: [],
  handOver: null,
  startedAt: Math.min(step.startedAt ?? at, at),
  finishedAt: at,
  finishedBy: by,
  dryUntil: null,
  rework: null,
  flags,
});

/**
 * A finish made off the network by somebody whose place was given up or handed over before it was heard of.
 * @param world the step; the person held a place on it once and is not who finished it
 * @param happenedAt ms UTC
 * @returns never a refusal. Where nobody holds the step it goes to its check, flagged; where others do they keep it, and the
 *   flag sends what they finish to a check; finished already it stays as it is
 * @source rule 10 of the product, own
 */
export function lateFinish({ step, person, now }: World, happenedAt: number): Result<Transition, Refusal> {
  const broken = ['STEP_NOT_YOURS'];
  if (step.held) broken.push('STEP_HELD');
  if (step.state === 'waiting') broken.push('STEP_NOT_READY');
  const flags = withFlags(step, broken);
  const open = step.state === 'waiting' || step.state === 'ready' || step.state === 'rework';
  // A passed step has been looked at or needed no look: only the day log keeps the late word.
  const steps = open
    ? [doneBy(step, person.id, Math.min(happenedAt, now), flags)]
    : step.state === 'passed'
      ? []
      : [{ ...step, flags }];
  return flagged(steps, 'step.finished', broken);
}

/**
 * Work typed in from paper, with the rules it broke as far as the step itself shows them.
 * @param world the step, not passed
 * @param crew ids of who did it, at least one; they become its doers
 * @param happenedAt ms UTC
 * @returns never a refusal: the step goes to its check
 * @source rule 10 of the product, own
 */
export function recorded(
  { step, person, now }: World,
  crew: readonly string[],
  happenedAt: number,
): Result<Transition, Refusal> {
  const hands = new Set(crew);
  const broken = ['RECORDED_FROM_PAPER'];
  if (step.held) broken.push('STEP_HELD');
  if (step.state === 'waiting') broken.push('STEP_NOT_READY');
  if (hands.size > step.crewMax) broken.push('STEP_CREW_FULL');
  if (hands.size < step.crewMin) broken.push('STEP_CREW_TOO_SMALL');
  const flags = withFlags(step, broken);
  const doers = [...new Set([...step.doers, ...crew])];
  const done = doneBy(step, crew[0] ?? person.id, Math.min(happenedAt, now), flags);
  return flagged([{ ...done, doers }], 'step.recorded', flags);
}
