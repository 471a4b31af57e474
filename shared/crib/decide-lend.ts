import { ok, refuse, type Result } from '../kernel/result';
import { ageVerdict, type AgeLimit, type AgeRefusal } from '../safety/age-rules';
import type { AgeRules } from '../safety/age-table';
import type { AgeBand, Hazard } from '../safety/hazards';
import { stopCoversTool, type StopScope } from '../safety/stop';
import type { SafetyTraits } from '../safety/tool-kinds';

/** A tag that says a tool is unsafe; `at` in ms UTC. */
export interface OutOfUseTag {
  reason: string;
  by: string;
  at: number;
}

/** A checkout that is open; times in ms UTC. */
export interface OpenCheckout {
  personId: string;
  outAt: number;
  backBy: number;
}

/** Why a tool stays in the crib, with the facts its words need. */
export type LendRefusal =
  | { code: 'TOOL_OUT_OF_USE'; details: OutOfUseTag }
  | { code: 'TOOL_OUT'; details: OpenCheckout }
  | { code: 'PERSON_NOT_CONFIRMED' | 'PERSON_NOT_ON_SITE'; details: Record<string, never> }
  | { code: 'STOP_ACTIVE'; details: StopScope }
  | { code: 'AGE_RULE'; details: AgeRefusal & { ageBand: AgeBand } }
  | { code: 'SIGN_OFF_MISSING'; details: { hazard: Hazard; missing: string } };

/** Everything the crib looks at before a tool goes out. */
export interface LendQuestion {
  tool: {
    kind: string;
    hazard: Hazard | null;
    traits: SafetyTraits;
    tag: OutOfUseTag | null;
  };
  /** The checkout that is open, when the tool is out. */
  out: OpenCheckout | null;
  person: {
    /** Confirmed by the desk. */
    confirmed: boolean;
    onSite: boolean;
    ageBand: AgeBand;
    /** Hazards without a valid sign-off, and what is missing. */
    missing: Partial<Record<Hazard, string>>;
  };
  /** The station it goes to in that person's charge; null when they carry it. */
  stationId: string | null;
  stops: readonly StopScope[];
  ageRules: AgeRules;
}

/**
 * Whether a tool may leave the crib. Taking one back is always possible and asks nothing.
 * @param question the tool, who asks, the stops that are raised, the age table. A tool with the temperature of a glue
 *   gun needs the hot-glue sign-off even when its record names no hazard.
 * @returns limits to say when handing it over (such as "beside your adult"), or the first reason against it: tag, out,
 *   not confirmed, not on site, stop, age, sign-off
 * @source rule 4 of the product, without circuits, own
 */
export function decideLend(question: LendQuestion): Result<{ limits: readonly AgeLimit[] }, LendRefusal> {
  const { tool, out, person, stationId, stops, ageRules } = question;
  if (tool.tag) return refuse({ code: 'TOOL_OUT_OF_USE', details: tool.tag });
  if (out) {
    const { personId, outAt, backBy } = out;
    return refuse({ code: 'TOOL_OUT', details: { personId, outAt, backBy } });
  }
  if (!person.confirmed) return refuse({ code: 'PERSON_NOT_CONFIRMED', details: {} });
  if (!person.onSite) return refuse({ code: 'PERSON_NOT_ON_SITE', details: {} });
  // A forgotten hazard on the list must not put a gun into an unbriefed hand.
  const hazard = tool.hazard ?? (tool.traits.temperature === undefined ? null : 'hot-glue');
  const stop = stops.find((raised) =>
    stopCoversTool(raised, { stationId, hazard, kind: tool.kind, traits: tool.traits }),
  );
  if (stop) return refuse({ code: 'STOP_ACTIVE', details: stop });
  const age = ageVerdict(ageRules, person.ageBand, { hazard, tool: tool.traits, toolKinds: [tool.kind] });
  if (age.verdict === 'refused') {
    return refuse({ code: 'AGE_RULE', details: { ...age, ageBand: person.ageBand } });
  }
  const missing = hazard === null ? undefined : person.missing[hazard];
  if (hazard !== null && missing !== undefined) {
    return refuse({ code: 'SIGN_OFF_MISSING', details: { hazard, missing } });
  }
  return ok({ limits: age.limits });
}
