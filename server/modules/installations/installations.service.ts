import type {
  CreateInstallation,
  EditInstallation,
  JoinCodeView,
} from '../../../shared/contracts/installations';
import type { FieldProblem } from '../../../shared/contracts/errors';
import type { InstallationRecord } from '../../../shared/contracts/live';
import { JOIN_CODE_LENGTH } from '../../../shared/contracts/people';
import { newSayableCode } from '../../../shared/kernel/ids';
import { DEFAULT_AGE_RULES, tightenAgeRules, type AgeRuleProblem } from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { AppError, notFound } from '../../http/app-error';
import { Installation } from './installation.entity';
import {
  fieldsEditedSince,
  isCodeTaken,
  loadInstallation,
  loadPublishCounts,
  toInstallationRecord,
  type InstallationRow,
} from './installations.repository';
import { publishChecks } from './publish-checks';

/** The account that makes an installation. */
interface Creator {
  accountId: string;
  name: string;
}

/** What other areas add to an installation that was just made, in the same unit of work. */
export type WhenMade = (
  scope: WriteScope,
  made: { installationId: string; creator: Creator },
) => Promise<void>;

const DEFAULT_MAX_IN_HAND = 2;

const closed = () =>
  new AppError('INSTALLATION_CLOSED', 'This installation is closed: nothing on it changes any more.');

/**
 * The installation, when it still takes changes.
 * @throws AppError INSTALLATION_CLOSED; notFound for an id that is none
 */
export async function assertOpen(scope: WriteScope, installationId: string): Promise<InstallationRow> {
  const row = await loadInstallation(scope.manager, installationId);
  if (!row) throw notFound();
  if (row.status === 'closed') throw closed();
  return row;
}

async function freshCode(scope: WriteScope): Promise<string> {
  for (;;) {
    const code = newSayableCode(JOIN_CODE_LENGTH);
    if (!(await isCodeTaken(scope.manager, code))) return code;
  }
}

/**
 * Make an installation, a draft until it is published. The scope must belong to this new id.
 * @param whenMade what other areas add: the creator as organiser, the shipped briefings
 */
export async function createInstallation(
  scope: WriteScope,
  installationId: string,
  input: CreateInstallation,
  creator: Creator,
  whenMade: readonly WhenMade[],
): Promise<{ id: string }> {
  await scope.manager.insert(Installation, {
    id: installationId,
    ...input,
    status: 'draft',
    joinCode: await freshCode(scope),
    joinCodeAt: scope.now,
    settings: { maxInHand: DEFAULT_MAX_IN_HAND, ageChanges: [] },
    createdAt: scope.now,
    revision: 0,
    ownRevision: 0,
  });
  await touch(scope, installationId, {});
  await scope.log({ action: 'installation.created', subject: { installationId } });
  for (const hook of whenMade) await hook(scope, { installationId, creator });
  return { id: installationId };
}

/** Write own fields of the installation with the revision that live screens go by. */
async function touch(
  scope: WriteScope,
  installationId: string,
  fields: Partial<
    Pick<Installation, 'name' | 'venue' | 'timeZone' | 'unit' | 'hallLimit' | 'status' | 'settings'>
  >,
): Promise<void> {
  const ownRevision = await scope.revision();
  await scope.manager.update(Installation, { id: installationId }, { ...fields, ownRevision });
  scope.changed('installation', installationId);
}

const AGE_PROBLEM_WORDS: Record<AgeRuleProblem['code'], (problem: AgeRuleProblem) => string> = {
  UNKNOWN_RULE: () => 'There is no such age rule.',
  CHANGED_TWICE: () => 'This rule is changed twice. Keep one of the two.',
  NOT_A_LIMIT: (problem) => `This is no limit for this rule. It looks like ${problem.default ?? '16-17'}.`,
  LOOSER_THAN_DEFAULT: (problem) =>
    `An age rule can be made stricter than ${problem.default ?? 'its default'}, not looser.`,
};

function ageFields(changes: EditInstallation['ageChanges']): FieldProblem[] {
  const tightened = tightenAgeRules(DEFAULT_AGE_RULES, changes);
  if (tightened.ok) return [];
  return tightened.refusal.map((problem) => {
    const index = changes.findIndex((change) => change.key === problem.key && change.value === problem.value);
    return {
      path: `ageChanges.${index}.value`,
      code: problem.code,
      message: AGE_PROBLEM_WORDS[problem.code](problem),
    };
  });
}

/** Words for the fields of an installation in a sentence. */
const FIELD_WORDS: Record<string, string> = {
  name: 'name',
  venue: 'venue',
  timeZone: 'time zone',
  unit: 'unit',
  hallLimit: 'hall limit',
  maxInHand: 'steps in hand at once',
  ageChanges: 'age rules',
};

/**
 * Edit an installation.
 * @throws AppError STALE_PAGE with the fields that somebody else changed since the form was filled; VALIDATION for age
 *   rules that are looser than their defaults
 */
export async function editInstallation(
  scope: WriteScope,
  installationId: string,
  input: EditInstallation,
): Promise<InstallationRecord> {
  const row = await assertOpen(scope, installationId);
  if (row.own_revision !== input.revision) throw await stale(scope, row, input.revision);
  const fields = ageFields(input.ageChanges);
  if (fields.length > 0) throw new AppError('VALIDATION', 'An age rule needs another look.', { fields });
  const before = toInstallationRecord(row);
  const { revision: _read, maxInHand, ageChanges, ...plain } = input;
  const settings = { ...before.settings, maxInHand, ageChanges };
  const changed = Object.entries({ ...plain, maxInHand, ageChanges })
    .filter(([key, value]) => {
      const was =
        key in before ? before[key as keyof typeof plain] : before.settings[key as keyof typeof settings];
      return JSON.stringify(value) !== JSON.stringify(was);
    })
    .map(([key]) => key);
  await touch(scope, installationId, { ...plain, settings });
  await scope.log({ action: 'installation.edited', subject: { installationId, fields: changed } });
  return { ...before, ...plain, settings, revision: await scope.revision() };
}

async function stale(scope: WriteScope, row: InstallationRow, revision: number): Promise<AppError> {
  const fields = await fieldsEditedSince(scope.manager, row.id, revision);
  const words = fields.map((field) => FIELD_WORDS[field] ?? field).join(', ');
  return new AppError(
    'STALE_PAGE',
    `Somebody changed this installation since you opened the page${words ? `: ${words}` : ''}. Nothing of yours was saved. Load the newer state and make your change again.`,
    { details: { fields, current: toInstallationRecord(row) } },
  );
}

/**
 * Publish: from now on people can join and work.
 * @throws AppError PUBLISH_INCOMPLETE with everything that is missing
 */
export async function publishInstallation(
  scope: WriteScope,
  installationId: string,
): Promise<{ status: 'published' }> {
  const row = await assertOpen(scope, installationId);
  if (row.status === 'published') return { status: 'published' };
  const checks = publishChecks(await loadPublishCounts(scope.manager, installationId));
  const missing = checks.filter((check) => !check.done);
  if (missing.length > 0) {
    throw new AppError(
      'PUBLISH_INCOMPLETE',
      `Not published yet: ${missing.map((check) => check.message).join(' ')}`,
      { details: { missing } },
    );
  }
  await touch(scope, installationId, { status: 'published' });
  await scope.log({ action: 'installation.published', subject: { installationId } });
  return { status: 'published' };
}

/** Close: everything stays readable, nothing changes any more. */
export async function closeInstallation(
  scope: WriteScope,
  installationId: string,
): Promise<{ status: 'closed' }> {
  await assertOpen(scope, installationId);
  await touch(scope, installationId, { status: 'closed' });
  await scope.log({ action: 'installation.closed', subject: { installationId } });
  return { status: 'closed' };
}

/** A new join code; the one on the old posters stops working at once. */
export async function renewJoinCode(
  scope: WriteScope,
  installationId: string,
  publicUrl: string,
): Promise<JoinCodeView> {
  await assertOpen(scope, installationId);
  const joinCode = await freshCode(scope);
  await scope.manager.update(Installation, { id: installationId }, { joinCode, joinCodeAt: scope.now });
  await scope.log({ action: 'installation.code-renewed', subject: { installationId } });
  return { joinCode, joinUrl: joinUrl(publicUrl, joinCode), renewedAt: scope.now };
}

/** The plain link that a poster's QR code is. */
export const joinUrl = (publicUrl: string, code: string): string => `${publicUrl}/join/${code}`;
