import { missedTwice, type Attempt } from './briefing';
import { voidingChange, type VersionFacts } from './briefing-versions';

/** A person's record for one version of one briefing. Times are ms since the epoch. */
export interface SignOff {
  id: string;
  personId: string;
  briefingKey: string;
  version: number;
  attempts: readonly Attempt[];
  talkBy: string | null;
  talkAt: number | null;
  passedAt: number | null;
  signedAt: number | null;
  countersignedBy: string | null;
  countersignedAt: number | null;
  countersignedAs: 'safety lead' | 'organiser' | null;
  expiresAt: number | null;
  revokedAt: number | null;
  revokedBy: string | null;
  revokeReason: string | null;
}

/** Why a sign-off does not count, nearest to counting last. */
export const SIGN_OFF_PROBLEMS = [
  'NOT_READ',
  'REVOKED',
  'EXPIRED',
  'VOIDED_BY_CHANGE',
  'TALK_NEEDED',
  'NOT_PASSED',
  'NOT_SIGNED',
  'NOT_COUNTERSIGNED',
  'AGE_NOT_CONFIRMED',
] as const;
export type SignOffProblem = (typeof SIGN_OFF_PROBLEMS)[number];

/** What a sign-off is judged against. */
export interface SignOffContext {
  /** Published versions of its briefing, oldest first. */
  versions: readonly VersionFacts[];
  /** Ms since the epoch. */
  now: number;
  /** The muster desk has confirmed the person's age band. */
  ageConfirmed: boolean;
}

/**
 * Questions that a lead has to talk about with the person before the next try: missed at least twice since the last talk.
 * @param signOff its attempts and the time of the last talk
 * @returns question ids; empty when no talk is due
 * @source rule 2 of the product, own
 */
export function talkNeeded(signOff: Pick<SignOff, 'attempts' | 'talkAt'>): string[] {
  const { attempts, talkAt } = signOff;
  return missedTwice(talkAt === null ? attempts : attempts.filter((attempt) => attempt.at > talkAt));
}

/**
 * Whether a sign-off counts now, and if not, the first thing that is wrong with it. The one function that decides it.
 *
 * A *change* of the briefing voids sign-offs made on earlier versions from its effectiveFrom on; until then they hold. A
 * *correction* voids none. A sign-off made ahead on a change that is published but not yet in force counts already. What
 * ends a sign-off (revoked, expired, voided) is named before what it still lacks.
 *
 * @param signOff the record; null when the person has none for this briefing
 * @param context the versions of its briefing, the time, whether the age band is confirmed
 * @returns `valid` or the problem. Records that contradict themselves never count: a countersignature by the signer
 *   or without a name is none, one without an end has expired, a version that was never published was not read
 * @source rule 2 of the product, own
 */
export function signOffValidity(signOff: SignOff | null, context: SignOffContext): 'valid' | SignOffProblem {
  if (!signOff || !context.versions.some((version) => version.version === signOff.version)) return 'NOT_READ';
  if (signOff.revokedAt !== null) return 'REVOKED';
  const countersigned =
    signOff.countersignedAt !== null &&
    signOff.countersignedAs !== null &&
    signOff.countersignedBy !== null &&
    signOff.countersignedBy !== signOff.personId;
  const expired = signOff.expiresAt === null ? countersigned : context.now >= signOff.expiresAt;
  if (expired) return 'EXPIRED';
  if (voidingChange(context.versions, signOff.version, context.now)) return 'VOIDED_BY_CHANGE';
  if (talkNeeded(signOff).length > 0) return 'TALK_NEEDED';
  if (signOff.passedAt === null) return signOff.attempts.length === 0 ? 'NOT_READ' : 'NOT_PASSED';
  if (signOff.signedAt === null) return 'NOT_SIGNED';
  if (!countersigned) return 'NOT_COUNTERSIGNED';
  return context.ageConfirmed ? 'valid' : 'AGE_NOT_CONFIRMED';
}

/**
 * The one of a person's sign-offs for a briefing that counts, or is nearest to counting. A revocation also ends
 * everything that was signed before it, so that an older record cannot stand in for the revoked one.
 * @param own all sign-offs of one person for one briefing, in any order
 * @param context as for `signOffValidity`
 * @returns the sign-off (null when there is none) and its validity; of equals the newest version
 * @source rule 2 of the product, own
 */
export function bestSignOff(
  own: readonly SignOff[],
  context: SignOffContext,
): { signOff: SignOff | null; validity: 'valid' | SignOffProblem } {
  let best: { signOff: SignOff | null; validity: 'valid' | SignOffProblem } = {
    signOff: null,
    validity: 'NOT_READ',
  };
  for (const signOff of [...own].sort((a, b) => a.version - b.version)) {
    const validity = revokedSince(signOff, own) ? 'REVOKED' : signOffValidity(signOff, context);
    if (nearness(validity) >= nearness(best.validity)) best = { signOff, validity };
  }
  return best;
}

const revokedSince = (signOff: SignOff, own: readonly SignOff[]): boolean =>
  own.some(
    (other) => other.revokedAt !== null && signOff.signedAt !== null && signOff.signedAt <= other.revokedAt,
  );

/**
 * How near a validity is to counting, for comparing; the larger the nearer.
 * @param validity from `signOffValidity`
 * @returns 0 to 9
 */
export const nearness = (validity: 'valid' | SignOffProblem): number =>
  validity === 'valid' ? SIGN_OFF_PROBLEMS.length : SIGN_OFF_PROBLEMS.indexOf(validity);

export const SIGN_OFF_STEPS = ['read', 'answer', 'sign', 'countersigned'] as const;
export type SignOffStep = (typeof SIGN_OFF_STEPS)[number];

/** What the marked stick of a sign-off shows. */
export interface SignOffProgress {
  steps: { step: SignOffStep; state: 'passed' | 'in hand' | 'waiting' }[];
  validity: 'valid' | SignOffProblem;
}

/**
 * How far a sign-off is, for the marked stick: read, answer, sign, countersigned.
 * @param signOff the record; null for none
 * @param context as for `signOffValidity`
 * @returns four steps in order, at most one of them in hand, and the validity. After a revocation, the end or a
 *   change all four start again. Reading counts as done from the first answers on.
 * @source rule 2 of the product, own
 */
export function signOffProgress(signOff: SignOff | null, context: SignOffContext): SignOffProgress {
  const validity = signOffValidity(signOff, context);
  const done: Record<typeof validity, number> = {
    NOT_READ: 0,
    REVOKED: 0,
    EXPIRED: 0,
    VOIDED_BY_CHANGE: 0,
    TALK_NEEDED: 1,
    NOT_PASSED: 1,
    NOT_SIGNED: 2,
    NOT_COUNTERSIGNED: 3,
    // The desk's confirmation is no step of the briefing.
    AGE_NOT_CONFIRMED: 4,
    valid: 4,
  };
  const at = done[validity];
  const steps = SIGN_OFF_STEPS.map((step, index) => ({
    step,
    state: index < at ? ('passed' as const) : index === at ? ('in hand' as const) : ('waiting' as const),
  }));
  return { steps, validity };
}

/**
 * Which version a person has to work through now, and whether the short sheet is enough.
 * @param signOffs all of this person's for the briefing
 * @param versions of the briefing, oldest first
 * @param now ms since the epoch
 * @returns the version in force and `what changed` for somebody whose complete, unrevoked, unexpired sign-off a change
 *   has ended (`since` is the version they signed), `whole` for everybody else; null before the first version's time
 * @source rule 2 of the product, own
 */
export function sheetFor<V extends VersionFacts>(
  signOffs: readonly SignOff[],
  versions: readonly V[],
  now: number,
): { version: V; sheet: 'whole' | 'what changed'; since: number | null } | null {
  const version = versions.findLast((candidate) => candidate.effectiveFrom <= now);
  if (!version) return null;
  const known = signOffs
    .filter((signOff) => {
      // Judged as if no change had come: was it complete?
      const unchanged = versions.filter((candidate) => candidate.version <= signOff.version);
      const complete = signOffValidity(signOff, { versions: unchanged, now, ageConfirmed: true }) === 'valid';
      return (
        complete && !revokedSince(signOff, signOffs) && voidingChange(versions, signOff.version, now) !== null
      );
    })
    .map((signOff) => signOff.version);
  const since = known.length > 0 ? Math.max(...known) : null;
  return { version, sheet: since === null ? 'whole' : 'what changed', since };
}
