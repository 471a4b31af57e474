import type { ErrorCode } from '../contracts/errors';
import { ok, refuse, type Result } from '../kernel/result';
import { ageVerdict, type AgeLimit } from '../safety/age-rules';
import type { AgeRules } from '../safety/age-table';
import type { AgeBand, Hazard } from '../safety/hazards';
import { stopCoversTool, type StopScope } from '../safety/stop';
import type { SafetyTraits } from '../safety/tool-kinds';

export type LendRefusalCode = Extract<
  ErrorCode,
  | 'TOOL_OUT'
  | 'TOOL_OUT_OF_USE'
  | 'PERSON_NOT_CONFIRMED'
  | 'PERSON_NOT_ON_SITE'
  | 'STOP_ACTIVE'
  | 'AGE_RULE'
  | 'SIGN_OFF_MISSING'
>;

/** Why a tool stays in the crib, with the facts its words need. */
export interface LendRefusal {
  code: LendRefusalCode;
  details: Record<string, unknown>;
}

/** Everything the crib looks at before a tool goes out. */
export interface LendQuestion {
  tool: {
    kind: string;
    hazard: Hazard | null;
    traits: SafetyTraits;
    tag: { reason: string; by: string; at: number } | null;
  };
  /** The checkout that is open, when the tool is out. Times in ms UTC. */
  out: { personId: string; outAt: number; backBy: number } | null;
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
 * @param question the tool, who asks, the stops that are raised, the age table
 * @returns limits to say when handing it over (such as "beside your adult"), or the first reason against it
 * @source rule 4 of the product, without circuits, own
 */
export function decideLend(question: LendQuestion): Result<{ limits: readonly AgeLimit[] }, LendRefusal> {
  const { tool, out, person, stationId, stops, ageRules } = question;
  if (tool.tag) return refuse({ code: 'TOOL_OUT_OF_USE', details: { ...tool.tag } });
  if (out) return refuse({ code: 'TOOL_OUT', details: { ...out } });
  if (!person.confirmed) return refuse({ code: 'PERSON_NOT_CONFIRMED', details: {} });
  if (!person.onSite) return refuse({ code: 'PERSON_NOT_ON_SITE', details: {} });
  const stop = stops.find((raised) =>
    stopCoversTool(raised, { stationId, hazard: tool.hazard, kind: tool.kind, traits: tool.traits }),
  );
  if (stop) return refuse({ code: 'STOP_ACTIVE', details: { ...stop } });
  const age = ageVerdict(ageRules, person.ageBand, {
    hazard: tool.hazard,
    tool: tool.traits,
    toolKinds: [tool.kind],
  });
  if (age.verdict === 'refused') {
    const { rule, source, from, heightMm, alternatives, message, unknown } = age;
    return refuse({
      code: 'AGE_RULE',
      details: { ageBand: person.ageBand, rule, source, from, heightMm, alternatives, message, unknown },
    });
  }
  const missing = tool.hazard === null ? undefined : person.missing[tool.hazard];
  if (missing !== undefined) {
    return refuse({ code: 'SIGN_OFF_MISSING', details: { hazard: tool.hazard, missing } });
  }
  return ok({ limits: age.limits });
}
