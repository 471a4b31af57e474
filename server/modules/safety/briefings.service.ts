import type { VersionOutcome } from '../../../shared/contracts/safety';
import { newId } from '../../../shared/kernel/ids';
import {
  HOT_GLUE_BRIEFING,
  hotGlueVersion,
  newVersionProblems,
  type BriefingBody,
} from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { dropProposals, proposeCorrection } from './corrections.service';
import { contentHash, recordPublished, refuseProblems } from './publish-version';
import { appendToRegister } from './register.service';
import { loadBriefing, openInstallation, safetyLeads, type BriefingFacts } from './safety.repository';
import { Briefing, BriefingVersion } from './safety.entity';

/** A form that was filled while the clock went on may ask for a time this far back, and gets now. */
const LATE_FORM_MS = 5 * 60_000;

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
    await proposeCorrection(scope, installationId, briefing, draft, leadId);
    return { version: draft.version, status: 'proposed', workInHand: [] };
  }
  const by = { leadId, secondId: null, safetyLeads: (await safetyLeads(manager, installationId)).all, now };
  refuseProblems(newVersionProblems(briefing.versions, draft, by), briefing);
  await dropProposals(scope, briefing);
  const hash = contentHash(draft);
  await manager.insert(BriefingVersion, {
    ...draft,
    id: newId(),
    briefingId: briefing.id,
    contentHash: hash,
    publishedBy: leadId,
    secondBy: null,
    status: 'published',
    publishedAt: now,
  });
  const workInHand = await recordPublished(
    scope,
    installationId,
    briefing,
    { ...draft, contentHash: hash },
    by,
  );
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
