import type { BriefingVersion } from './briefing-schema';

/** What the rules need to know of a version. */
export type VersionFacts = Pick<BriefingVersion, 'version' | 'kind' | 'effectiveFrom'>;

/**
 * The version that counts now.
 * @param versions of one briefing, oldest first
 * @param now ms since the epoch
 * @returns the newest whose time has come, or null before the first one's
 */
export const currentVersion = <V extends VersionFacts>(versions: readonly V[], now: number): V | null =>
  versions.findLast((version) => version.effectiveFrom <= now) ?? null;

/**
 * The change that ended sign-offs made on a version.
 * @param versions of one briefing, oldest first
 * @param signedVersion number of the version that was signed
 * @param now ms since the epoch
 * @returns the first later *change* whose time has come; null while the sign-off still holds. Corrections never end one.
 * @source rule 2 of the product, own
 */
export const voidingChange = <V extends VersionFacts>(
  versions: readonly V[],
  signedVersion: number,
  now: number,
): V | null =>
  versions.find(
    (version) => version.version > signedVersion && version.kind === 'change' && version.effectiveFrom <= now,
  ) ?? null;

export type NewVersionProblem =
  | 'NOT_A_SAFETY_LEAD'
  | 'SECOND_LEAD_NEEDED'
  | 'SECOND_LEAD_SAME'
  | 'VERSION_NOT_NEXT'
  | 'KIND_WRONG'
  | 'TIME_PAST'
  | 'TIME_ORDER';

/**
 * Whether a version may be published: a first or a change by one safety lead, a correction by two.
 * @param versions published so far, oldest first
 * @param next the proposed version
 * @param by `leadId` who proposes, `secondId` who stands in for it too (null for none), `safetyLeads` all person ids with
 *   that duty, `now` ms since the epoch
 * @returns every problem, in a fixed order; empty when it may be published
 * @source rule 2 of the product, own
 */
export function newVersionProblems(
  versions: readonly VersionFacts[],
  next: VersionFacts,
  by: { leadId: string; secondId: string | null; safetyLeads: readonly string[]; now: number },
): NewVersionProblem[] {
  const problems: NewVersionProblem[] = [];
  const last = versions.at(-1);
  if (!by.safetyLeads.includes(by.leadId)) problems.push('NOT_A_SAFETY_LEAD');
  if (next.kind === 'correction') {
    if (by.secondId === by.leadId) problems.push('SECOND_LEAD_SAME');
    else if (by.secondId === null || !by.safetyLeads.includes(by.secondId))
      problems.push('SECOND_LEAD_NEEDED');
  }
  if (next.version !== (last?.version ?? 0) + 1) problems.push('VERSION_NOT_NEXT');
  if ((next.kind === 'first') !== (last === undefined)) problems.push('KIND_WRONG');
  // A change that began in the past would end sign-offs under which people already worked in good faith.
  if (next.effectiveFrom < by.now) problems.push('TIME_PAST');
  if (last && next.effectiveFrom < last.effectiveFrom) problems.push('TIME_ORDER');
  return problems;
}
