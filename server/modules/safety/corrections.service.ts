import type { VersionOutcome } from '../../../shared/contracts/safety';
import { newId } from '../../../shared/kernel/ids';
import { newVersionProblems, type BriefingVersion as VersionText } from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { AppError, notFound } from '../../http/app-error';
import { contentHash, recordPublished, refuseProblems } from './publish-version';
import { loadBriefing, nameOf, openInstallation, safetyLeads, type BriefingFacts } from './safety.repository';
import { BriefingVersion } from './safety.entity';

/** Keep a correction until a second safety lead has read it; one at a time. */
export async function proposeCorrection(
  scope: WriteScope,
  installationId: string,
  briefing: BriefingFacts,
  draft: Omit<VersionText, 'kind'> & { kind: 'change' | 'correction' },
  leadId: string,
): Promise<void> {
  const { manager, now } = scope;
  const [waiting] = await openProposals(scope, briefing.id);
  if (waiting) {
    const by =
      waiting.publishedBy === null ? 'Somebody' : await nameOf(manager, installationId, waiting.publishedBy);
    throw new AppError(
      'BRIEFING_PROPOSAL_WAITS',
      `A correction by ${by} waits for a second safety lead. Second it or withdraw it before you propose another.`,
      { details: { version: waiting.version, proposedBy: waiting.publishedBy, at: waiting.publishedAt } },
    );
  }
  await manager.insert(BriefingVersion, {
    ...draft,
    id: newId(),
    briefingId: briefing.id,
    contentHash: contentHash(draft),
    publishedBy: leadId,
    secondBy: null,
    status: 'proposed',
    publishedAt: now,
  });
  await scope.log({
    action: 'briefing.proposed',
    subject: { briefingId: briefing.id, version: draft.version },
  });
}

const openProposals = (scope: WriteScope, briefingId: string) =>
  scope.manager.find(BriefingVersion, {
    where: { briefingId, status: 'proposed' },
    order: { version: 'ASC' },
  });

async function findProposal(
  scope: WriteScope,
  installationId: string,
  key: string,
  version: number,
): Promise<{ briefing: BriefingFacts; proposal: BriefingVersion }> {
  await openInstallation(scope.manager, installationId);
  const briefing = await loadBriefing(scope.manager, installationId, key);
  const proposal = (await openProposals(scope, briefing.id)).find((one) => one.version === version);
  if (!proposal) throw notFound();
  return { briefing, proposal };
}

/**
 * Publish a proposed correction as its second safety lead; sign-offs stand.
 * @param proposedAt when the text that was read had been proposed
 * @throws AppError SECOND_LEAD_NEEDED for one's own, STALE_PAGE for another text
 */
export async function secondCorrection(
  scope: WriteScope,
  installationId: string,
  secondId: string,
  key: string,
  version: number,
  proposedAt: number,
): Promise<VersionOutcome> {
  const { manager, now } = scope;
  const { briefing, proposal } = await findProposal(scope, installationId, key, version);
  if (proposal.publishedAt !== proposedAt) {
    throw new AppError(
      'STALE_PAGE',
      'This correction was proposed anew with other words. Load the page again and read it before you second it.',
    );
  }
  const lastFrom = briefing.versions.at(-1)?.effectiveFrom ?? now;
  const next = { version, kind: proposal.kind, effectiveFrom: Math.max(now, lastFrom) };
  const leadId = proposal.publishedBy ?? '';
  const leads = (await safetyLeads(manager, installationId)).all;
  const by = { leadId, secondId, safetyLeads: leads, now };
  refuseProblems(newVersionProblems(briefing.versions, next, by), briefing);
  await manager.update(
    BriefingVersion,
    { id: proposal.id },
    { status: 'published', secondBy: secondId, effectiveFrom: next.effectiveFrom, publishedAt: now },
  );
  await recordPublished(scope, installationId, briefing, { ...next, contentHash: proposal.contentHash }, by);
  return { version, status: 'published', workInHand: [] };
}

/** Take back a proposed correction; any safety lead may. */
export async function withdrawProposal(
  scope: WriteScope,
  installationId: string,
  key: string,
  version: number,
): Promise<{ version: number }> {
  const { briefing, proposal } = await findProposal(scope, installationId, key, version);
  await drop(scope, briefing, proposal);
  return { version };
}

async function drop(scope: WriteScope, briefing: BriefingFacts, proposal: BriefingVersion): Promise<void> {
  await scope.manager.delete(BriefingVersion, { id: proposal.id });
  await scope.log({
    action: 'briefing.proposal-withdrawn',
    subject: { briefingId: briefing.id, version: proposal.version, proposedBy: proposal.publishedBy },
  });
}

/** Withdraw what waits: a correction of a text that is no longer the newest would put the older words back. */
export async function dropProposals(scope: WriteScope, briefing: BriefingFacts): Promise<void> {
  for (const proposal of await openProposals(scope, briefing.id)) await drop(scope, briefing, proposal);
}
