import {
  expiryOf,
  mayCountersign,
  talkNeeded,
  type CountersignRefusal,
  type PersonalFields,
  type RegisterKind,
} from '../../../shared/safety';
import type { WorkInHand } from '../../../shared/contracts/safety';
import type { WriteScope } from '../../db/write';
import { AppError } from '../../http/app-error';
import { workInHandWithout } from './missing-sign-offs';
import { appendToRegister } from './register.service';
import {
  loadBriefing,
  loadSigner,
  loadSignOff,
  nameOf,
  openInstallation,
  safetyLeads,
  type BriefingFacts,
  type Signer,
  type StoredSignOff,
} from './safety.repository';
import { SignOffRow } from './safety.entity';

interface Known {
  signOff: StoredSignOff;
  briefing: BriefingFacts;
  signer: Signer;
}

async function load(scope: WriteScope, installationId: string, signOffId: string): Promise<Known> {
  const { manager } = scope;
  await openInstallation(manager, installationId);
  const signOff = await loadSignOff(manager, installationId, signOffId);
  return {
    signOff,
    briefing: await loadBriefing(manager, installationId, signOff.briefingKey),
    signer: await loadSigner(manager, installationId, signOff.personId),
  };
}

/** Write a changed sign-off with its register row and its entry in the day log. */
async function record(
  scope: WriteScope,
  installationId: string,
  { signOff, briefing, signer }: Known,
  change: Partial<SignOffRow>,
  entry: {
    kind: RegisterKind;
    ids: Record<string, string | number>;
    personal?: PersonalFields;
    action: string;
    subject?: object;
  },
): Promise<void> {
  const revision = await scope.revision();
  const { affected } = await scope.manager.update(
    SignOffRow,
    { id: signOff.id, revision: signOff.revision },
    { ...change, revision },
  );
  if (affected !== 1) throw new Error(`Sign-off ${signOff.id} changed inside one unit of work.`);
  scope.changed('signOffs', signOff.id);
  const ids = { signOffId: signOff.id, personId: signer.id };
  await appendToRegister(scope, installationId, {
    kind: entry.kind,
    ids: { ...ids, briefingKey: briefing.key, version: signOff.version, ...entry.ids },
    personId: signer.id,
    personal: {
      name: signer.name,
      ageBand: signer.ageBand,
      briefing: briefing.title,
      ...entry.personal,
    },
  });
  await scope.log({
    action: entry.action,
    subject: { ...ids, briefingId: briefing.id, version: signOff.version, ...entry.subject },
    forPersonId: signer.id,
  });
}

/**
 * Note that a safety lead talked with somebody who missed a question twice; then that person may answer again.
 * @throws AppError COUNTERSIGN_SELF for one's own sheet, STALE_PAGE when no talk is due
 */
export async function noteTalk(
  scope: WriteScope,
  installationId: string,
  leadId: string,
  signOffId: string,
): Promise<{ signOffId: string }> {
  const known = await load(scope, installationId, signOffId);
  const questionIds = talkNeeded(known.signOff);
  if (leadId === known.signer.id) {
    throw new AppError(
      'COUNTERSIGN_SELF',
      'This is your own question sheet. Another safety lead has to talk with you about it.',
    );
  }
  if (questionIds.length === 0) {
    throw new AppError(
      'STALE_PAGE',
      `No talk with ${known.signer.name} is due any more. There is nothing to do.`,
    );
  }
  await record(
    scope,
    installationId,
    known,
    { talkBy: leadId, talkAt: scope.now },
    {
      kind: 'talked',
      ids: { by: leadId },
      action: 'briefing.talked',
      subject: { questionIds },
    },
  );
  return { signOffId };
}

const COUNTERSIGN_WORDS: Record<
  CountersignRefusal,
  (known: Known, others: { countersigner: string }) => string
> = {
  SIGN_OFF_REVOKED: ({ signer, briefing }) =>
    `This sign-off of ${signer.name} was revoked. ${signer.name} has to go through the ${briefing.title} briefing again.`,
  BRIEFING_SIGNED: ({ signer, briefing }, { countersigner }) =>
    `${countersigner} has countersigned ${signer.name} for ${briefing.title} already. There is nothing to do.`,
  BRIEFING_VERSION_OLD: ({ signer, signOff, briefing }) =>
    `${signer.name} signed version ${signOff.version} of the ${briefing.title} briefing, which a change has ended. Ask ${signer.name} to read what changed and sign again.`,
  BRIEFING_TALK_NEEDED: ({ signer }) =>
    `${signer.name} missed a question twice. Talk about it first and note the talk.`,
  BRIEFING_NOT_PASSED: ({ signer }) =>
    `${signer.name} has not answered all questions rightly yet. Countersign after that.`,
  BRIEFING_NOT_SIGNED: ({ signer }) =>
    `${signer.name} has passed but not signed yet. Ask for the signature first.`,
  COUNTERSIGN_SELF: () =>
    'Nobody countersigns their own sign-off. Ask another safety lead; where you are the only one on site, an organiser.',
  COUNTERSIGN_NOT_LEAD: ({ signer }) =>
    `${signer.name} needs a safety lead's countersignature. An organiser may give it only when the one safety lead on site is the person who signed.`,
};

/**
 * Countersign one sign-off, in person.
 * @throws AppError with the first reason against it, PERSON_NOT_CONFIRMED while the desk has not confirmed the age band
 */
export async function countersignSignOff(
  scope: WriteScope,
  installationId: string,
  leadId: string,
  signOffId: string,
): Promise<{ signOffId: string; as: 'safety lead' | 'organiser'; expiresAt: number }> {
  const { manager, now } = scope;
  const known = await load(scope, installationId, signOffId);
  const { signOff, briefing, signer } = known;
  const lead = await loadSigner(manager, installationId, leadId);
  const verdict = mayCountersign({
    lead: { personId: leadId, duties: lead.duties },
    signOff,
    safetyLeadsOnSite: (await safetyLeads(manager, installationId)).onSite,
    context: { versions: briefing.versions, now },
  });
  if (!verdict.ok) {
    const by = signOff.countersignedBy;
    const countersigner = by === null ? '' : await nameOf(manager, installationId, by);
    throw new AppError(verdict.refusal, COUNTERSIGN_WORDS[verdict.refusal](known, { countersigner }), {
      details: { signOffId, personId: signer.id, version: signOff.version, countersignedBy: by },
    });
  }
  if (!signer.ageConfirmed) {
    throw new AppError(
      'PERSON_NOT_CONFIRMED',
      `The muster desk has not confirmed ${signer.name} and the age band yet. Send ${signer.name} there first; the signature is kept.`,
      { details: { personId: signer.id } },
    );
  }
  const { as, logged } = verdict.value;
  const expiresAt = expiryOf(now, briefing.validityDays);
  await record(
    scope,
    installationId,
    known,
    { countersignedBy: leadId, countersignedAt: now, countersignedAs: as, expiresAt },
    {
      kind: 'countersigned',
      ids: { by: leadId, as, expiresAt },
      action: 'briefing.countersigned',
      subject: { as, ...(logged ? { exception: 'the only safety lead on site is the signer' } : {}) },
    },
  );
  return { signOffId, as, expiresAt };
}

/**
 * Revoke a sign-off, with a reason; it and everything signed before it count no more.
 * @returns places in hand that the person holds without a sign-off now: listed for the lead, not stopped
 * @throws AppError SIGN_OFF_REVOKED, BRIEFING_NOT_SIGNED
 */
export async function revokeSignOff(
  scope: WriteScope,
  installationId: string,
  leadId: string,
  signOffId: string,
  reason: string,
): Promise<{ signOffId: string; workInHand: WorkInHand[] }> {
  const { manager, now } = scope;
  const known = await load(scope, installationId, signOffId);
  const { signOff, briefing, signer } = known;
  if (signOff.revokedAt !== null) {
    const by =
      signOff.revokedBy === null ? 'Somebody' : await nameOf(manager, installationId, signOff.revokedBy);
    throw new AppError(
      'SIGN_OFF_REVOKED',
      `${by} has revoked this sign-off already. There is nothing to do.`,
      {
        details: { signOffId, revokedBy: signOff.revokedBy, revokedAt: signOff.revokedAt },
      },
    );
  }
  if (signOff.signedAt === null) {
    throw new AppError(
      'BRIEFING_NOT_SIGNED',
      `${signer.name} has not signed yet, so there is nothing to revoke.`,
      { details: { signOffId } },
    );
  }
  await record(
    scope,
    installationId,
    known,
    { revokedAt: now, revokedBy: leadId, revokeReason: reason },
    { kind: 'revoked', ids: { by: leadId }, personal: { reason }, action: 'briefing.revoked' },
  );
  const workInHand = await workInHandWithout(manager, installationId, briefing.hazards, now, signer.id);
  return { signOffId, workInHand };
}
