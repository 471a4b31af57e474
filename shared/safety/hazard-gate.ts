import type { Briefing } from './briefing-schema';
import type { VersionFacts } from './briefing-versions';
import type { Hazard, Message } from './hazards';
import { bestSignOff, nearness, type SignOff, type SignOffProblem } from './sign-off';

/** A briefing with its published versions, oldest first. */
export interface BriefingWithVersions extends Pick<Briefing, 'key' | 'title' | 'hazards'> {
  versions: readonly VersionFacts[];
}

/** A hazard for which the person has no valid sign-off. */
export interface MissingSignOff {
  hazard: Hazard;
  reason: SignOffProblem | 'NO_BRIEFING';
  /** The briefing nearest to counting; null when none covers the hazard. */
  briefingKey: string | null;
  /** What the person can do about it, for the client's catalogue. */
  way: Message;
}

const WAY: Record<MissingSignOff['reason'], string> = {
  NO_BRIEFING: 'safety.way.no-briefing',
  NOT_READ: 'safety.way.read',
  NOT_PASSED: 'safety.way.answer',
  TALK_NEEDED: 'safety.way.talk-to-lead',
  NOT_SIGNED: 'safety.way.sign',
  NOT_COUNTERSIGNED: 'safety.way.ask-countersign',
  EXPIRED: 'safety.way.read-again',
  REVOKED: 'safety.way.ask-why-revoked',
  VOIDED_BY_CHANGE: 'safety.way.read-what-changed',
  AGE_NOT_CONFIRMED: 'safety.way.go-to-desk',
};
/** Every key that `way` may have, so that a catalogue can be tested for all of them. */
export const WAY_KEYS: readonly string[] = Object.values(WAY);

/**
 * Which of some hazards a person has no valid sign-off for, and how to get one.
 * @param hazards of a step or a tool; doubles are ignored
 * @param signOffs any; those of other people are ignored
 * @param briefings of the installation; any one valid sign-off of a briefing that covers the hazard is enough
 * @param now ms since the epoch
 * @param person id, and whether the muster desk has confirmed the age band
 * @returns one entry per missing hazard in the order asked; empty when nothing is missing. The reason is that of the
 *   sign-off nearest to counting; where a newer one is on the way, its next step is named rather than the old one's end
 * @source rule 2 of the product, own
 */
export function hazardGate(
  hazards: readonly Hazard[],
  signOffs: readonly SignOff[],
  briefings: readonly BriefingWithVersions[],
  now: number,
  person: { id: string; ageConfirmed: boolean },
): MissingSignOff[] {
  return [...new Set(hazards)].flatMap((hazard) => {
    let best: { reason: SignOffProblem; briefing: BriefingWithVersions } | null = null;
    for (const briefing of briefings.filter((one) => one.hazards.includes(hazard))) {
      const own = signOffs.filter((one) => one.personId === person.id && one.briefingKey === briefing.key);
      const context = { versions: briefing.versions, now, ageConfirmed: person.ageConfirmed };
      const { validity } = bestSignOff(own, context);
      if (validity === 'valid') return [];
      if (!best || nearness(validity) > nearness(best.reason)) best = { reason: validity, briefing };
    }
    return [missing(hazard, best)];
  });
}

function missing(
  hazard: Hazard,
  best: { reason: SignOffProblem; briefing: BriefingWithVersions } | null,
): MissingSignOff {
  const reason = best?.reason ?? 'NO_BRIEFING';
  const briefing = best?.briefing ?? null;
  return {
    hazard,
    reason,
    briefingKey: briefing?.key ?? null,
    way: { key: WAY[reason], params: { hazard, ...(briefing ? { briefing: briefing.title } : {}) } },
  };
}

/**
 * The gate's answer as the step rules take it.
 * @param list from `hazardGate`
 * @returns reason by hazard; hazards with a valid sign-off are absent
 */
export const missingByHazard = (
  list: readonly MissingSignOff[],
): Partial<Record<Hazard, MissingSignOff['reason']>> =>
  Object.fromEntries(list.map((one) => [one.hazard, one.reason]));
