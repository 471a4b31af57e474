import type { Refusal } from './gates';
import type { Step } from './step';

interface ClockAnswer {
  refusal: Refusal | null;
  warnings: { code: string; details: Record<string, unknown> }[];
}

const FREE: ClockAnswer = { refusal: null, warnings: [] };

/**
 * What the clocks of the last coat before a step say about taking that step now: a second coat inside its recoat
 * window, carrying after the handle clock, hanging after the hang clock.
 * @param traveller the steps of the traveller in order
 * @param step the step somebody wants
 * @param now ms UTC
 * @returns a refusal with the time it ends, or a warning that does not refuse
 */
export function clockGate(traveller: readonly Step[], step: Step, now: number): ClockAnswer {
  const coat = traveller.filter((other) => other.position < step.position && other.clocks !== null).at(-1);
  if (!coat?.clocks || coat.finishedAt === null) return FREE;
  const since = (seconds: number) => (coat.finishedAt ?? 0) + seconds * 1000;
  const wait = (clock: string, seconds: number | undefined): ClockAnswer | null =>
    seconds !== undefined && now < since(seconds)
      ? {
          refusal: { code: 'STEP_CLOCK_RUNNING', details: { clock, until: since(seconds), coat: coat.name } },
          warnings: [],
        }
      : null;
  if (step.operation === 'coat') {
    const early = wait('recoatFrom', coat.clocks.recoatFrom);
    if (early) return early;
    const until = coat.clocks.recoatUntil;
    return until !== undefined && now > since(until)
      ? {
          refusal: null,
          warnings: [{ code: 'RECOAT_WINDOW_PAST', details: { until: since(until), coat: coat.name } }],
        }
      : FREE;
  }
  if (step.operation === 'hang') {
    return wait('hangFrom', coat.clocks.hangFrom) ?? wait('handleFrom', coat.clocks.handleFrom) ?? FREE;
  }
  return wait('handleFrom', coat.clocks.handleFrom) ?? FREE;
}
