import type { Duty } from '../../../shared/accounts';
import type { AddMember, Confirm, LeavingView } from '../../../shared/contracts/people';
import { newId } from '../../../shared/kernel/ids';
import { forgetNameInAnswers } from '../../db/forget-name';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { loadAccount } from '../accounts';
import { assertOpen, SAFETY_LEADS_NEEDED, type WhenMade } from '../installations';
import { erasePersonFromRegister } from '../safety';
import { releasePlaces } from '../travellers';
import { shownName } from './people.live';
import {
  countOnSite,
  countSafetyLeads,
  dutiesOf,
  isOnSite,
  loadPersonOfAccount,
  loadPersonRow,
  loadStatus,
  nextNumber,
  toolsOutWith,
  type PersonRow,
} from './people.repository';
import { Person } from './person.entity';

async function findPerson(scope: WriteScope, installationId: string, personId: string): Promise<PersonRow> {
  const row = await loadPersonRow(scope.manager, installationId, personId);
  if (!row || row.removed_at !== null) throw notFound();
  return row;
}

async function save(scope: WriteScope, personId: string, fields: Partial<Person>): Promise<void> {
  await scope.manager.update(Person, { id: personId }, { ...fields, revision: await scope.revision() });
  scope.changed('people', personId);
}

/** Who makes an installation is its first organiser and needs no desk to be confirmed. */
export const addFirstOrganiser: WhenMade = async (scope, { installationId, creator }) => {
  const { firstName, initial } = splitName(creator.name);
  const id = newId();
  await scope.manager.insert(Person, {
    id,
    installationId,
    accountId: creator.accountId,
    number: await nextNumber(scope.manager, installationId),
    firstName,
    initial,
    email: null,
    ageBand: '18+',
    adultName: null,
    duties: ['organiser'],
    joinedAt: scope.now,
    confirmedAt: scope.now,
    confirmedBy: scope.maker.actor,
    leftAt: null,
    removedAt: null,
    erasedAt: null,
    revision: await scope.revision(),
  });
  scope.changed('people', id);
  await scope.log({
    action: 'person.added',
    subject: { personId: id, duties: ['organiser'] },
    forPersonId: id,
  });
};

/** An account's name as the room says it. */
function splitName(name: string): { firstName: string; initial: string } {
  const words = name.trim().split(/\s+/);
  const last = words.length > 1 ? (words.at(-1) ?? '') : '';
  const letter = /\p{L}/u.exec(last)?.[0]?.toUpperCase() ?? '';
  return { firstName: (words[0] ?? name).slice(0, 40), initial: letter };
}

/**
 * Give an account a place and duties in the installation. The desk still confirms that the person is there.
 * @throws AppError VALIDATION at `email` when there is no such account or it has a place already
 */
export async function addMember(
  scope: WriteScope,
  installationId: string,
  input: AddMember,
): Promise<{ personId: string }> {
  await assertOpen(scope, installationId);
  const account = await loadAccount(scope.manager, { email: input.email });
  if (!account || account.disabled_at !== null) {
    throw fieldError(
      'email',
      'unknown',
      'Nobody has a sign-in with this address. Invite them first, on the screen Accounts.',
    );
  }
  const known = await loadPersonOfAccount(scope.manager, installationId, account.id);
  if (known && known.removed_at === null)
    throw fieldError('email', 'taken', `${shownName(known)} takes part already, as number ${known.number}.`);
  const duties: Duty[] = [...new Set(input.duties)];
  const fields = {
    firstName: input.firstName,
    initial: input.initial,
    duties: duties.length > 0 ? duties : (['volunteer'] satisfies Duty[]),
    ageBand: '18+' as const,
    confirmedAt: null,
    confirmedBy: null,
    leftAt: null,
  };
  const personId = known?.id ?? newId();
  if (known) await save(scope, known.id, { ...fields, removedAt: null });
  else {
    await scope.manager.insert(Person, {
      id: personId,
      installationId,
      accountId: account.id,
      number: await nextNumber(scope.manager, installationId),
      email: null,
      adultName: null,
      joinedAt: scope.now,
      removedAt: null,
      erasedAt: null,
      ...fields,
      revision: await scope.revision(),
    });
    scope.changed('people', personId);
  }
  await scope.log({
    action: 'person.added',
    subject: { personId, duties: fields.duties },
    forPersonId: personId,
  });
  return { personId };
}

/**
 * The desk has seen the person and the age. Whoever left and comes back is confirmed again.
 * @throws AppError ALREADY_CONFIRMED, HALL_FULL with the numbers, ADULT_MISSING for a minor who named no adult
 */
export async function confirmPerson(
  scope: WriteScope,
  installationId: string,
  personId: string,
  input: Confirm,
): Promise<{ personId: string; onSite: number; hallLimit: number }> {
  const installation = await assertOpen(scope, installationId);
  const row = await findPerson(scope, installationId, personId);
  if (isOnSite(row))
    throw new AppError('ALREADY_CONFIRMED', `${shownName(row)} is confirmed already and on site.`);
  const hallLimit = installation.hall_limit;
  const onSite = await countOnSite(scope.manager, installationId);
  if (onSite >= hallLimit) {
    throw new AppError(
      'HALL_FULL',
      `The hall is full: ${onSite} of ${hallLimit} people are in. Sign somebody out who has left, then confirm ${shownName(row)}.`,
      { details: { onSite, hallLimit } },
    );
  }
  const adultName = input.adultName || row.adult_name;
  if (input.ageBand !== '18+' && !adultName) {
    throw new AppError(
      'ADULT_MISSING',
      `${shownName(row)} is under 18 and named no adult. Write down which adult is here with them, then confirm.`,
      { fields: [{ path: 'adultName', code: 'required', message: 'Which adult is here with them?' }] },
    );
  }
  await save(scope, personId, {
    ageBand: input.ageBand,
    adultName: input.ageBand === '18+' ? null : adultName,
    confirmedAt: scope.now,
    confirmedBy: scope.maker.personId ?? scope.maker.actor,
    leftAt: null,
  });
  await scope.log({
    action: 'person.confirmed',
    subject: {
      personId,
      ageBand: input.ageBand,
      ...(input.ageBand === row.age_band ? {} : { said: row.age_band }),
    },
    forPersonId: personId,
  });
  return { personId, onSite: onSite + 1, hallLimit };
}

/**
 * Somebody leaves the site: places on steps are given back, tools still out are named.
 * @param action `person.signed-out` by the desk, `person.left` by themselves
 * @throws AppError PERSON_NOT_ON_SITE
 */
export async function leaveSite(
  scope: WriteScope,
  installationId: string,
  personId: string,
  action: 'person.signed-out' | 'person.left',
): Promise<LeavingView> {
  await assertOpen(scope, installationId);
  const row = await findPerson(scope, installationId, personId);
  if (!isOnSite(row))
    throw new AppError(
      'PERSON_NOT_ON_SITE',
      `${shownName(row)} is not on site by our list; there is nothing to sign out.`,
    );
  const left = await takeLeave(scope, installationId, personId, action);
  await save(scope, personId, { leftAt: scope.now });
  await scope.log({ action, subject: subjectOf(left), forPersonId: personId });
  return left;
}

async function takeLeave(
  scope: WriteScope,
  installationId: string,
  personId: string,
  reason: string,
): Promise<LeavingView> {
  const givenBack = await releasePlaces(scope, installationId, personId, reason);
  return { personId, givenBack, toolsOut: await toolsOutWith(scope.manager, personId) };
}

const subjectOf = ({ personId, givenBack, toolsOut }: LeavingView) => ({
  personId,
  givenBack,
  toolsOut: toolsOut.map((tool) => tool.id),
});

async function guardSafetyLeads(scope: WriteScope, row: PersonRow): Promise<void> {
  if (!dutiesOf(row).includes('safety lead')) return;
  if ((await loadStatus(scope.manager, row.installation_id)) !== 'published') return;
  const leads = await countSafetyLeads(scope.manager, row.installation_id);
  if (leads > SAFETY_LEADS_NEEDED) return;
  throw new AppError(
    'LAST_SAFETY_LEAD',
    `A published installation keeps ${SAFETY_LEADS_NEEDED} safety leads, and there are ${leads}. Give another person the duty first.`,
    { details: { leads, needed: SAFETY_LEADS_NEEDED } },
  );
}

/**
 * Give a duty or take it away. Everybody without one is a volunteer.
 * @throws AppError LAST_SAFETY_LEAD
 */
export async function changeDuty(
  scope: WriteScope,
  installationId: string,
  personId: string,
  duty: Exclude<Duty, 'volunteer'>,
  on: boolean,
): Promise<{ personId: string; duties: Duty[] }> {
  await assertOpen(scope, installationId);
  const row = await findPerson(scope, installationId, personId);
  const had = dutiesOf(row);
  if (had.includes(duty) === on) return { personId, duties: had };
  if (!on && duty === 'safety lead') await guardSafetyLeads(scope, row);
  const others = had.filter((other) => other !== duty && other !== 'volunteer');
  const now = on ? [...others, duty] : others;
  const duties: Duty[] = now.length > 0 ? now : ['volunteer'];
  await save(scope, personId, { duties });
  await scope.log({
    action: on ? 'person.duty-given' : 'person.duty-taken',
    subject: { personId, duty },
    forPersonId: personId,
  });
  return { personId, duties };
}

/** Take somebody out of the installation. The caller ends their session after the commit. */
export async function removePerson(
  scope: WriteScope,
  installationId: string,
  personId: string,
): Promise<LeavingView> {
  await assertOpen(scope, installationId);
  const row = await findPerson(scope, installationId, personId);
  await guardSafetyLeads(scope, row);
  const left = await takeLeave(scope, installationId, personId, 'person.removed');
  await save(scope, personId, { removedAt: scope.now, leftAt: row.left_at ?? scope.now });
  await scope.log({ action: 'person.removed', subject: subjectOf(left), forPersonId: personId });
  return left;
}

/**
 * Forget who somebody was: name, mail, age and signatures go, what was done stays under their number. Also possible when
 * the installation is closed, because the wish mostly comes after the day.
 * @throws AppError IN_USE while tools are out with them, LAST_SAFETY_LEAD
 */
export async function erasePerson(
  scope: WriteScope,
  installationId: string,
  personId: string,
): Promise<{ personId: string }> {
  const row = await loadPersonRow(scope.manager, installationId, personId);
  if (!row) throw notFound();
  if (row.erased_at !== null) return { personId };
  if (row.removed_at === null) await guardSafetyLeads(scope, row);
  const { toolsOut, givenBack } = await takeLeave(scope, installationId, personId, 'person.erased');
  if (toolsOut.length > 0) {
    throw new AppError(
      'IN_USE',
      `${shownName(row)} still has ${toolsOut.map((tool) => tool.number).join(', ')}. Take that back first, so that nothing is lost track of.`,
      { details: { toolsOut } },
    );
  }
  await erasePersonFromRegister(scope, installationId, personId);
  await forgetNameInAnswers(scope.manager, installationId, shownName(row));
  await save(scope, personId, {
    firstName: 'erased',
    initial: '',
    email: null,
    adultName: null,
    accountId: null,
    ageBand: '18+',
    duties: ['volunteer'],
    leftAt: row.left_at ?? scope.now,
    removedAt: row.removed_at ?? scope.now,
    erasedAt: scope.now,
  });
  await scope.log({ action: 'person.erased', subject: { personId, givenBack }, forPersonId: personId });
  return { personId };
}
