import type { Duty } from '../accounts';
import type { ErrorCode } from '../contracts/errors';
import { ageVerdict } from '../safety/age-rules';
import type { AgeRules } from '../safety/age-table';
import type { AgeBand, Hazard } from '../safety/hazards';
import { stopCovers, type StopScope } from '../safety/stop';
import type { Step } from './step';

export type RefusalCode = Extract<
  ErrorCode,
  | `STEP_${string}`
  | `CHECKER_${string}`
  | `HAND_OVER_${string}`
  | 'PERSON_NOT_CONFIRMED'
  | 'IN_HAND_LIMIT'
  | 'SIGN_OFF_MISSING'
  | 'AGE_RULE'
  | 'STOP_ACTIVE'
  | 'REWORK_TARGET'
  | 'OFFLINE_CLAIM_EXPIRED'
>;

/** Why a rule said no, with the facts its words need; ids, numbers and times, never prose. */
export interface Refusal {
  code: RefusalCode;
  details: Record<string, unknown>;
}

/** The person who asks, as the rules see them. */
export interface PersonFacts {
  id: string;
  /** Confirmed by the desk and on site. */
  confirmed: boolean;
  ageBand: AgeBand;
  duties: readonly Duty[];
  /** Steps this person holds a place on now. */
  inHand: number;
  /** Hazards for which this person has no valid sign-off now, and what is missing of it. */
  missing: Partial<Record<Hazard, string>>;
}

/** Everything a decision looks at. */
export interface World {
  now: number;
  step: Step;
  /** All steps of the traveller, by position, the step itself included. */
  traveller: readonly Step[];
  /** For a field joint: codes of the pieces it still waits for. */
  missingPieces?: readonly string[];
  /** Other steps at the same station; only the drying ones matter. */
  station: readonly Step[];
  person: PersonFacts;
  /** Stops that are raised and not lifted. */
  stops: readonly StopScope[];
  settings: { maxInHand: number; ageRules: AgeRules };
}

/** What an allowed command does: every step it changes, whole, and what goes into the day log. */
export interface Transition {
  steps: Step[];
  event: string;
  /** Rules that what already happened broke; it stands, but unlocks nothing by itself. */
  flags: string[];
  /** Advice that does not refuse, such as a second coat outside its window. */
  warnings: { code: string; details: Record<string, unknown> }[];
}

/** The stop, if any, that covers the step. */
export function stopOver({ step, stops }: Pick<World, 'step' | 'stops'>): Refusal | null {
  const stop = stops.find((raised) =>
    stopCovers(raised, { stationId: step.stationId, hazards: step.hazards, toolKinds: step.toolKinds }),
  );
  return stop ? { code: 'STOP_ACTIVE', details: { ...stop } } : null;
}

/**
 * The gates every way onto a step passes: confirmed, stop, age, sign-off, and for a new place the limit in hand.
 * @param world what the decision looks at
 * @param purpose `claim` takes a new place (claim, accept a hand-over), `start` begins work on a held one
 * @returns the first gate that is shut, or null
 */
export function gatePerson(world: World, purpose: 'claim' | 'start'): Refusal | null {
  const { step, person, settings } = world;
  if (!person.confirmed) return { code: 'PERSON_NOT_CONFIRMED', details: {} };
  const stop = stopOver(world);
  if (stop) return stop;
  const age = ageRefusal(world);
  if (age) return age;
  for (const hazard of step.hazards) {
    const missing = person.missing[hazard];
    if (missing !== undefined) return { code: 'SIGN_OFF_MISSING', details: { hazard, missing } };
  }
  if (purpose === 'claim' && person.inHand >= settings.maxInHand) {
    return { code: 'IN_HAND_LIMIT', details: { limit: settings.maxInHand } };
  }
  return null;
}

/** The age rule, if any, that keeps this person off the step; asked once more where the step lists tools but no hazard. */
function ageRefusal({ step, person, settings }: World): Refusal | null {
  const questions = step.hazards.length > 0 ? step.hazards : [null];
  for (const hazard of questions) {
    const verdict = ageVerdict(settings.ageRules, person.ageBand, { hazard, toolKinds: step.toolKinds });
    if (verdict.verdict !== 'refused') continue;
    const { rule, source, from, heightMm, alternatives, message } = verdict;
    return {
      code: 'AGE_RULE',
      details: { hazard, ageBand: person.ageBand, rule, source, from, heightMm, alternatives, message },
    };
  }
  return null;
}
