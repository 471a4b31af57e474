import type { VersionOutcome } from '../../../shared/contracts/safety';
import { newId } from '../../../shared/kernel/ids';
import {
  HOT_GLUE_BRIEFING,
  canonicalBriefingText,
  hotGlueVersion,
  newVersionProblems,
  type BriefingBody,
  type BriefingVersion as VersionText,
  type NewVersionProblem,
} from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { workInHandWithout } from './missing-sign-offs';
import { appendToRegister, sha256 } from './register.service';
import {
  loadBriefing,
  loadSigner,
  nameOf,
  openInstallation,
  safetyLeads,
  type BriefingFacts,
} from './safety.repository';
import { Briefing, BriefingVersion } from './safety.entity';

/** A form that was filled while the clock went on may ask for a time this far back, and gets now. */
const LATE_FORM_MS = 5 * 60_000;

const contentHash = (text: Pick<VersionText, 'whatChanged' | 'body'>) => sha256(canonicalBriefingText(text));

/**
 * Give a new installation the briefings that come with the product, each as its first version, in force at once. For the
 * use case that makes the installation: it writes no day-log entry of its own, and its rows carry the installation's
 * revision as it stands.
 */
export async function installShippedBriefings(scope: WriteScope, installationId: string): Promise<void> {
  const { manager, now } = scope;
  const [installation] = await manager.query<{ revision: number }[]>(
    'SELECT revision FROM installation WHERE id = ?',
    [installationId],
  );
  if (!installation) throw notFound();
  const id = newId();
  await manager.insert(Briefing, {
    ...HOT_GLUE_BRIEFING,
    id,
    installationId,
    revision: installation.revision,
  });
  scope.changed('briefings', id);
  const first = hotGlueVersion(now);
  const hash = contentHash(first);
  await manager.insert(BriefingVersion, {
    ...first,
    id: newId(),
    briefingId: id,
    contentHash: hash,
    publishedBy: null,
    secondBy: null,
    status: 'published',
    publishedAt: now,
  });
  await appendToRegister(scope, installationId, {
    kind: 'version-published',
    ids: { briefingKey: HOT_GLUE_BRIEFING.key, version: 1, effectiveFrom: now, contentHash: hash },
    personId: null,
    personal: {},
  });
}

interface Proposal {
  kind: 'change' | 'correction';
  body: BriefingBody;
  whatChanged: string;
  effectiveFrom: number | null;
  basedOn: number;
}

const stale = ({ title }: BriefingFacts, basedOn: number, newest: number) =>
  new AppError(
    'STALE_PAGE',
    `Version ${newest} of the ${title} briefing was published while you wrote on version ${basedOn}. Load the page again and put your words into the new text.`,
    { details: { basedOn, newest } },
  );

/**
 * Publish a change, which ends earlier sign-offs from its time on, or propose a correction, which waits for a second
 * safety lead.
 * @param leadId the safety lead who writes it
 * @throws AppError VALIDATION, STALE_PAGE when it was written on an older version, BRIEFING_PROPOSAL_WAITS
 */
export async function proposeVersion(
  scope: WriteScope,
  installationId: string,
  leadId: string,
  key: string,
  proposal: Proposal,
): Promise<VersionOutcome> {
  const { manager, now } = scope;
  await openInstallation(manager, installationId);
  const briefing = await loadBriefing(manager, installationId, key);
  const last = briefing.versions.at(-1);
  if (!last) throw notFound();
  if (proposal.basedOn !== last.version) throw stale(briefing, proposal.basedOn, last.version);
  if (proposal.whatChanged === '') {
    throw fieldError('whatChanged', 'missing', 'Say in a few lines what changed; people read this first.');
  }
  const draft = {
    version: last.version + 1,
    kind: proposal.kind,
    effectiveFrom: timeOf(proposal, last.effectiveFrom, now),
    whatChanged: proposal.whatChanged,
    body: proposal.body,
  };
  if (draft.kind === 'correction') {
    await propose(scope, installationId, briefing, draft, leadId);
    return { version: draft.version, status: 'proposed', workInHand: [] };
  }
  const by = { leadId, secondId: null, safetyLeads: (await safetyLeads(manager, installationId)).all, now };
  refuseProblems(newVersionProblems(briefing.versions, draft, by), briefing);
  await dropProposals(scope, briefing);
  await manager.insert(BriefingVersion, {
    ...draft,
    id: newId(),
    briefingId: briefing.id,
    contentHash: contentHash(draft),
    publishedBy: leadId,
    secondBy: null,
    status: 'published',
    publishedAt: now,
  });
  const workInHand = await published(scope, installationId, briefing, draft, { leadId, secondId: null });
  return { version: draft.version, status: 'published', workInHand };
}

function timeOf(
  { kind, effectiveFrom }: Pick<Proposal, 'kind' | 'effectiveFrom'>,
  lastFrom: number,
  now: number,
): number {
  // A correction stands at once; one of a text that is not in force yet stands with that text.
  if (kind === 'correction') return Math.max(now, lastFrom);
  if (effectiveFrom === null) {
    throw fieldError('effectiveFrom', 'missing', 'Say from when the change counts.');
  }
  if (effectiveFrom < now - LATE_FORM_MS) {
    throw fieldError(
      'effectiveFrom',
      'too_small',
      'This time is past. A change counts from now on or later, so that nobody worked without a sign-off unknowingly.',
    );
  }
  if (effectiveFrom < lastFrom) {
    throw fieldError(
      'effectiveFrom',
      'too_small',
      'A change that is published already counts from a later time. Choose that time or a later one.',
    );
  }
  return Math.max(effectiveFrom, now);
}

async function propose(
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
  await published(scope, installationId, briefing, { ...next, contentHash: proposal.contentHash }, by);
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

/** A correction of a text that is no longer the newest would put the older words back. */
async function dropProposals(scope: WriteScope, briefing: BriefingFacts): Promise<void> {
  for (const proposal of await openProposals(scope, briefing.id)) await drop(scope, briefing, proposal);
}

function refuseProblems(problems: readonly NewVersionProblem[], briefing: BriefingFacts): void {
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
async function published(
  scope: WriteScope,
  installationId: string,
  briefing: BriefingFacts,
  version: Pick<VersionText, 'version' | 'kind' | 'effectiveFrom'> &
    ({ contentHash: string } | Pick<VersionText, 'whatChanged' | 'body'>),
  by: { leadId: string; secondId: string | null },
): Promise<VersionOutcome['workInHand']> {
  const { manager } = scope;
  const revision = await scope.revision();
  await manager.update(Briefing, { id: briefing.id }, { revision });
  scope.changed('briefings', briefing.id);
  const publisherId = by.secondId ?? by.leadId;
  const publisher = await loadSigner(manager, installationId, publisherId);
  const ids = { briefingKey: briefing.key, version: version.version, effectiveFrom: version.effectiveFrom };
  const hash = 'contentHash' in version ? version.contentHash : contentHash(version);
  const second: Record<string, string> = by.secondId === null ? {} : { proposedBy: by.leadId };
  await appendToRegister(scope, installationId, {
    kind: 'version-published',
    ids: { ...ids, contentHash: hash, by: publisherId, ...second },
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
