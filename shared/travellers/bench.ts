import { mayClaim } from './decide';
import type { Refusal, World } from './gates';
import type { Step } from './step';

/** A step and why it cannot be taken, or that it can. */
export interface BenchEntry {
  step: Step;
  /** Planned seconds of all work that still waits behind it on its traveller. */
  chainSeconds: number;
  /** Steps that wait behind it. */
  stepsBehind: number;
  places: number;
}

export interface Bench {
  inHand: Step[];
  /** Hand-overs offered to this person. */
  offered: Step[];
  canTake: BenchEntry[];
  notYet: (BenchEntry & { refusal: Refusal })[];
}

/**
 * What waits behind a step on its traveller.
 * @param traveller the steps of the traveller in order
 * @param step one of them
 */
export function chainBehind(traveller: readonly Step[], step: Step): { seconds: number; steps: number } {
  let seconds = 0;
  let steps = 0;
  for (const other of traveller) {
    if (other.position > step.position && other.state !== 'passed') {
      seconds += other.plannedSeconds;
      steps += 1;
    }
  }
  return { seconds, steps };
}

/**
 * Sort a person's steps into what they have, what they can take and what they cannot yet.
 * Steps to take come longest chain of work behind first (the step's own minutes included), as in the longest-tail
 * rule of list scheduling (Hu 1961; for chains the critical-path priority), then by code through `order`.
 *
 * @param worldOf the world of one step for this person
 * @param travellers the steps of each traveller, in order of position, travellers in order of code
 * @returns lists in the order they are shown
 */
export function bench(
  personId: string,
  travellers: readonly (readonly Step[])[],
  worldOf: (step: Step) => World,
): Bench {
  const result: Bench = { inHand: [], offered: [], canTake: [], notYet: [] };
  for (const traveller of travellers) {
    for (const step of traveller) {
      if (step.crew.some((member) => member.personId === personId)) {
        result.inHand.push(step);
        continue;
      }
      if (step.handOver?.to === personId) result.offered.push(step);
      // Waiting and passed steps are nobody's question; full ones only matter on the board.
      const open =
        step.state === 'ready' ||
        step.state === 'rework' ||
        (step.state === 'in hand' && step.crew.length < step.crewMax);
      if (!open) continue;
      const behind = chainBehind(traveller, step);
      const entry = {
        step,
        chainSeconds: behind.seconds,
        stepsBehind: behind.steps,
        places: step.crewMax - step.crew.length,
      };
      const refusal = mayClaim(worldOf(step));
      if (refusal) result.notYet.push({ ...entry, refusal });
      else result.canTake.push(entry);
    }
  }
  const longest = (a: BenchEntry, b: BenchEntry) =>
    b.chainSeconds + b.step.plannedSeconds - (a.chainSeconds + a.step.plannedSeconds);
  result.canTake.sort(longest);
  result.notYet.sort(longest);
  return result;
}
