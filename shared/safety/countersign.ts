import type { Duty } from '../accounts';
import type { ErrorCode } from '../contracts/errors';
import { ok, refuse, type Result } from '../kernel/result';
import { voidingChange, type VersionFacts } from './briefing-versions';
import { talkNeeded, type SignOff } from './sign-off';

export type CountersignRefusal = Extract<
  ErrorCode,
  | 'SIGN_OFF_REVOKED'
  | 'BRIEFING_VERSION_OLD'
  | 'BRIEFING_TALK_NEEDED'
  | 'BRIEFING_NOT_PASSED'
  | 'BRIEFING_NOT_SIGNED'
  | 'BRIEFING_SIGNED'
  | 'COUNTERSIGN_SELF'
  | 'COUNTERSIGN_NOT_LEAD'
>;

/** Who wants to countersign what, and who else could. */
export interface CountersignQuestion {
  lead: { personId: string; duties: readonly Duty[] };
  signOff: SignOff;
  /** Person ids of everybody on site now who is a safety lead. */
  safetyLeadsOnSite: readonly string[];
  /** When given, a sign-off that a change has ended is refused. */
  context?: { versions: readonly VersionFacts[]; now: number } | undefined;
}

/**
 * Whether somebody may countersign a sign-off, and in which capacity.
 *
 * It must be passed, with no talk due, signed, neither revoked nor countersigned. Then: never one's own. A safety lead may.
 * An organiser who is no safety lead may only when exactly one safety lead is on site and that lead is the one who
 * signed, because then nobody else is there to do it; with no lead on site, or another one there, the organiser may not.
 *
 * @param question who, what, and the safety leads on site
 * @returns `as`, and `logged` true where the exception was used and the day log has to say so; or the error code of the
 *   first reason against it
 * @source rule 2 of the product, own
 */
export function mayCountersign({
  lead,
  signOff,
  safetyLeadsOnSite,
  context,
}: CountersignQuestion): Result<{ as: 'safety lead' | 'organiser'; logged: boolean }, CountersignRefusal> {
  if (signOff.revokedAt !== null) return refuse('SIGN_OFF_REVOKED');
  if (signOff.countersignedAt !== null) return refuse('BRIEFING_SIGNED');
  if (context && voidingChange(context.versions, signOff.version, context.now))
    return refuse('BRIEFING_VERSION_OLD');
  if (talkNeeded(signOff).length > 0) return refuse('BRIEFING_TALK_NEEDED');
  if (signOff.passedAt === null) return refuse('BRIEFING_NOT_PASSED');
  if (signOff.signedAt === null) return refuse('BRIEFING_NOT_SIGNED');
  if (lead.personId === signOff.personId) return refuse('COUNTERSIGN_SELF');
  if (lead.duties.includes('safety lead')) return ok({ as: 'safety lead', logged: false });
  const leads = new Set(safetyLeadsOnSite);
  const signerIsOnlyLead = leads.size === 1 && leads.has(signOff.personId);
  if (lead.duties.includes('organiser') && signerIsOnlyLead) return ok({ as: 'organiser', logged: true });
  return refuse('COUNTERSIGN_NOT_LEAD');
}
