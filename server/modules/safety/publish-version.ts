import type { VersionOutcome } from '../../../shared/contracts/safety';
import {
  canonicalBriefingText,
  type BriefingVersion as VersionText,
  type NewVersionProblem,
} from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { AppError } from '../../http/app-error';
import { workInHandWithout } from './missing-sign-offs';
import { appendToRegister, sha256 } from './register.service';
import { loadSigner, type BriefingFacts } from './safety.repository';
import { Briefing } from './safety.entity';

/** The hash under which a text is kept, so that it can be shown later what was signed. */
export const contentHash = (text: Pick<VersionText, 'whatChanged' | 'body'>): string =>
  sha256(canonicalBriefingText(text));

/** Refuse a version that the rules do not let stand. */
export function refuseProblems(problems: readonly NewVersionProblem[], briefing: BriefingFacts): void {
  const [problem] = problems;
  if (problem === undefined) return;
  switch (problem) {
    case 'SECOND_LEAD_SAME':
    case 'SECOND_LEAD_NEEDED':
      throw new AppError(
        'SECOND_LEAD_NEEDED',
        'A correction stands with two safety leads. This one is your own: ask another safety lead to read and second it.',
      );
    case 'NOT_A_SAFETY_LEAD':
      throw new AppError(
        'SECOND_LEAD_NEEDED',
        'Whoever proposed this is no safety lead any more. Withdraw it and propose it yourself.',
      );
    case 'VERSION_NOT_NEXT':
      throw new AppError(
        'STALE_PAGE',
        `Another version of the ${briefing.title} briefing was published meanwhile. Load the page again.`,
      );
    default:
      throw new Error(`A new version is wrong in a way its form cannot be: ${problem}.`);
  }
}

/** What follows when a version is published: the briefing's record, the register, the day log, the list for the lead. */
export async function recordPublished(
  scope: WriteScope,
  installationId: string,
  briefing: BriefingFacts,
  version: Pick<VersionText, 'version' | 'kind' | 'effectiveFrom'> & { contentHash: string },
  by: { leadId: string; secondId: string | null },
): Promise<VersionOutcome['workInHand']> {
  const { manager } = scope;
  const revision = await scope.revision();
  await manager.update(Briefing, { id: briefing.id }, { revision });
  scope.changed('briefings', briefing.id);
  const publisherId = by.secondId ?? by.leadId;
  const publisher = await loadSigner(manager, installationId, publisherId);
  const ids = { briefingKey: briefing.key, version: version.version, effectiveFrom: version.effectiveFrom };
  const second: Record<string, string> = by.secondId === null ? {} : { proposedBy: by.leadId };
  await appendToRegister(scope, installationId, {
    kind: 'version-published',
    ids: { ...ids, contentHash: version.contentHash, by: publisherId, ...second },
    personId: publisherId,
    personal: { name: publisher.name },
  });
  const isChange = version.kind === 'change';
  if (isChange) {
    await appendToRegister(scope, installationId, { kind: 'voided', ids, personId: null, personal: {} });
  }
  const workInHand = isChange
    ? await workInHandWithout(manager, installationId, briefing.hazards, version.effectiveFrom)
    : [];
  await scope.log({
    action: isChange ? 'briefing.changed' : 'briefing.corrected',
    subject: {
      briefingId: briefing.id,
      version: version.version,
      effectiveFrom: version.effectiveFrom,
      ...second,
      ...(isChange ? { stepsInHand: workInHand.map((place) => place.stepId) } : {}),
    },
  });
  return workInHand;
}
