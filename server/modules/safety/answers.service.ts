import type { AnswerResult } from '../../../shared/contracts/safety';
import type { FieldProblem } from '../../../shared/contracts/errors';
import { newId } from '../../../shared/kernel/ids';
import {
  bestSignOff,
  currentVersion,
  gradeAnswers,
  talkNeeded,
  type Answers,
  type BriefingBody,
  type SignOff,
  type VersionFacts,
} from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { AppError, notFound } from '../../http/app-error';
import { appendToRegister, sha256 } from './register.service';
import {
  loadBody,
  loadBriefing,
  loadSigner,
  openInstallation,
  ownSignOffs,
  type BriefingFacts,
  type StoredSignOff,
} from './safety.repository';
import { SignOffRow } from './safety.entity';

/** What a person works on now: the version, and the record that is begun but not signed. */
interface Sheet {
  briefing: BriefingFacts;
  version: VersionFacts & { contentHash: string };
  open: StoredSignOff | null;
}

/**
 * The sheet that a person may work on.
 * @throws AppError when the text is not the one that counts, a talk is due, or what was signed before still holds
 */
async function openSheet(
  scope: WriteScope,
  installationId: string,
  personId: string,
  key: string,
  wanted: number,
): Promise<Sheet> {
  const { manager, now } = scope;
  await openInstallation(manager, installationId);
  const briefing = await loadBriefing(manager, installationId, key);
  const version = briefing.versions.find((one) => one.version === wanted);
  if (!version) throw notFound();
  const current = currentVersion(briefing.versions, now);
  // A change that is published but not in force yet may be signed ahead.
  if (current && wanted < current.version) throw versionOld(briefing, wanted, current.version);
  const own = await ownSignOffs(manager, installationId, personId, key);
  for (const signOff of own) {
    const questionIds = talkNeeded(signOff);
    if (questionIds.length > 0) throw talkDue(briefing, questionIds, signOff.id);
  }
  // Judged at the time from which this version counts: then an older sign-off may hold no longer.
  const context = {
    versions: briefing.versions,
    now: Math.max(now, version.effectiveFrom),
    ageConfirmed: true,
  };
  const best = bestSignOff(own, context);
  if (best.signOff && (best.validity === 'valid' || best.validity === 'NOT_COUNTERSIGNED')) {
    throw signedAlready(briefing, best.signOff, best.validity === 'valid');
  }
  const open = own.findLast((one) => one.version === wanted && one.signedAt === null) ?? null;
  return { briefing, version, open };
}

const versionOld = ({ title }: BriefingFacts, version: number, current: number) =>
  new AppError(
    'BRIEFING_VERSION_OLD',
    `You have version ${version} of the ${title} briefing before you; version ${current} counts now. Load the page again and read that one.`,
    { details: { version, current } },
  );

const talkDue = ({ title }: BriefingFacts, questionIds: string[], signOffId: string) =>
  new AppError(
    'BRIEFING_TALK_NEEDED',
    `You missed ${questionIds.length === 1 ? 'a question' : `${questionIds.length} questions`} of the ${title} sheet twice. Find a safety lead and talk about it; then you can answer again.`,
    { details: { questionIds, signOffId } },
  );

const signedAlready = (
  { title }: BriefingFacts,
  { id, version }: Pick<SignOff, 'id' | 'version'>,
  valid: boolean,
) =>
  new AppError(
    'BRIEFING_SIGNED',
    valid
      ? `Your ${title} sign-off of version ${version} holds: there is nothing more to sign.`
      : `You have signed version ${version} of the ${title} briefing. Ask a safety lead to countersign it.`,
    { details: { signOffId: id, version, countersigned: valid } },
  );

/** Every question unanswered, and every answer that is none of the sheet's. */
function sheetProblems(body: BriefingBody, answers: Answers): FieldProblem[] {
  return body.questions.flatMap((question): FieldProblem[] => {
    const given = Object.hasOwn(answers, question.id) ? answers[question.id] : undefined;
    const path = `answers.${question.id}`;
    if (given === undefined) return [{ path, code: 'missing', message: 'Please choose an answer.' }];
    if (question.options.some((option) => option.id === given)) return [];
    return [{ path, code: 'invalid_value', message: 'Please choose one of the answers given.' }];
  });
}

/**
 * Mark a question sheet and keep the attempt.
 * @param input the version that was read, and question ids to option ids
 * @throws AppError VALIDATION for questions left out, BRIEFING_VERSION_OLD, BRIEFING_TALK_NEEDED after two misses of one
 *   question, BRIEFING_PASSED, BRIEFING_SIGNED
 */
export async function answerSheet(
  scope: WriteScope,
  installationId: string,
  personId: string,
  key: string,
  input: { version: number; answers: Answers },
): Promise<AnswerResult> {
  const { manager, now } = scope;
  const { briefing, version, open } = await openSheet(scope, installationId, personId, key, input.version);
  if (open?.passedAt) {
    throw new AppError('BRIEFING_PASSED', 'You have answered this sheet rightly. What is left is to sign.', {
      details: { signOffId: open.id, version: version.version },
    });
  }
  const body = await loadBody(manager, briefing.id, version.version);
  const fields = sheetProblems(body, input.answers);
  if (fields.length > 0) {
    const words =
      fields.length === 1 ? 'One question needs an answer.' : `${fields.length} questions need an answer.`;
    throw new AppError('VALIDATION', words, { fields });
  }
  const grade = gradeAnswers({ body }, input.answers);
  const attempts = [
    ...(open?.attempts ?? []).map(({ at, wrongIds }) => ({ at, wrongIds: [...wrongIds] })),
    { at: now, wrongIds: grade.wrongIds },
  ];
  const passedAt = grade.passed ? now : null;
  const revision = await scope.revision();
  const id = open?.id ?? newId();
  if (open) await manager.update(SignOffRow, { id }, { attempts, passedAt, revision });
  else {
    await manager.insert(SignOffRow, {
      ...BLANK,
      id,
      installationId,
      briefingKey: key,
      version: version.version,
      personId,
      attempts,
      passedAt,
      revision,
    });
  }
  scope.changed('signOffs', id);
  await scope.log({
    action: 'briefing.answered',
    subject: {
      signOffId: id,
      briefingId: briefing.id,
      version: version.version,
      passed: grade.passed,
      wrong: grade.wrongIds.length,
    },
  });
  return {
    passed: grade.passed,
    talkNeeded: talkNeeded({ attempts, talkAt: open?.talkAt ?? null }).length > 0,
    results: grade.results.map(({ questionId, right, why }) => ({ questionId, right, why })),
  };
}

const BLANK = {
  talkBy: null,
  talkAt: null,
  signedAt: null,
  signature: null,
  countersignedBy: null,
  countersignedAt: null,
  countersignedAs: null,
  expiresAt: null,
  revokedAt: null,
  revokedBy: null,
  revokeReason: null,
};

/**
 * Sign a passed briefing with a typed name or a drawing.
 * @throws AppError BRIEFING_NOT_PASSED, BRIEFING_VERSION_OLD, BRIEFING_TALK_NEEDED, BRIEFING_SIGNED
 */
export async function signBriefing(
  scope: WriteScope,
  installationId: string,
  personId: string,
  key: string,
  input: { version: number; signature: { kind: 'typed' | 'drawn'; value: string } },
): Promise<{ signOffId: string }> {
  const { manager, now } = scope;
  const { briefing, version, open } = await openSheet(scope, installationId, personId, key, input.version);
  if (!open || open.passedAt === null) {
    throw new AppError(
      'BRIEFING_NOT_PASSED',
      `Answer all questions of the ${briefing.title} sheet rightly first; then you can sign.`,
      { details: { version: version.version } },
    );
  }
  const signer = await loadSigner(manager, installationId, personId);
  const { signature } = input;
  const revision = await scope.revision();
  await manager.update(SignOffRow, { id: open.id }, { signedAt: now, signature, revision });
  scope.changed('signOffs', open.id);
  await appendToRegister(scope, installationId, {
    kind: 'signed',
    ids: {
      signOffId: open.id,
      personId,
      briefingKey: key,
      version: version.version,
      contentHash: version.contentHash,
    },
    personId,
    personal: {
      name: signer.name,
      ageBand: signer.ageBand,
      briefing: briefing.title,
      signatureHash: sha256(`strutbee/signature/1\n${signature.kind}\n${signature.value}`),
    },
  });
  await scope.log({
    action: 'briefing.signed',
    subject: { signOffId: open.id, briefingId: briefing.id, version: version.version },
  });
  return { signOffId: open.id };
}
