import { tz } from '@date-fns/tz';
import { parse } from 'date-fns';
import type { CodeView, Join } from '../../../shared/contracts/people';
import { normaliseCode } from '../../../shared/kernel/ids';
import type { WriteScope } from '../../db/write';
import type { Deps } from '../../deps';
import { AppError } from '../../http/app-error';
import type { Principal } from '../../http/principal';
import { assertOpen, installationByCode } from '../installations';
import { Person } from './person.entity';
import {
  lastBuildDay,
  loadPersonOfAccount,
  loadPersonRow,
  nextNumber,
  onSiteNow,
  type PersonRow,
} from './people.repository';

const HOUR_MS = 3600_000;
const AFTER_END_MS = 6 * HOUR_MS;
const AT_LEAST_MS = 12 * HOUR_MS;

const unknownCode = () =>
  new AppError(
    'JOIN_CODE_UNKNOWN',
    'No installation has this code now. Look at the poster again: the code may be new. There is no O, I, B, D or P in it.',
  );
const notPublished = () =>
  new AppError(
    'INSTALLATION_NOT_PUBLISHED',
    'Joining is not open yet: the organisers are still planning. Try again when they say so.',
  );
const closed = () =>
  new AppError(
    'INSTALLATION_CLOSED',
    'This build is over: nobody can join it any more. Thank you for coming.',
  );

/**
 * The installation behind a poster's code, when it can be joined.
 * @throws AppError JOIN_CODE_UNKNOWN (also for a code that was renewed), INSTALLATION_NOT_PUBLISHED, INSTALLATION_CLOSED
 */
export function findByCode(deps: Deps, typed: string): CodeView {
  const db = deps.data.readHandle;
  return db.transaction(() => {
    const row = installationByCode(db, normaliseCode(typed));
    if (!row) throw unknownCode();
    if (row.status === 'draft') throw notPublished();
    if (row.status === 'closed') throw closed();
    return { installationId: row.id, name: row.name, venue: row.venue, onSite: onSiteNow(db, row.id) };
  })();
}

type Answers = Omit<Join, 'code'>;

const fieldsOf = (input: Answers) => ({
  firstName: input.firstName,
  initial: input.initial,
  ageBand: input.ageBand,
  email: input.email ? input.email.toLowerCase() : null,
  adultName: input.ageBand === '18+' ? null : (input.adultName ?? null),
});

/**
 * Join an installation. Somebody who joined already from this session or account stays the same person; until the desk
 * has confirmed them, joining again corrects what they typed.
 * @param who the session that asks, if it has one
 * @param id id of a new person
 * @returns the person's id
 */
export async function joinInstallation(
  scope: WriteScope,
  installationId: string,
  input: Answers,
  who: Principal | null,
  id: string,
): Promise<string> {
  const { status } = await assertOpen(scope, installationId);
  if (status === 'draft') throw notPublished();
  const known = await alreadyIn(scope, installationId, who);
  if (known && known.removed_at === null) {
    if (known.confirmed_at === null) await correct(scope, known, input);
    return known.id;
  }
  const revision = await scope.revision();
  const fresh = {
    ...fieldsOf(input),
    joinedAt: scope.now,
    confirmedAt: null,
    confirmedBy: null,
    leftAt: null,
    revision,
  };
  const personId = known?.id ?? id;
  // An account that was removed and comes back with the poster's code is a volunteer again, its number the same.
  if (known)
    await scope.manager.update(
      Person,
      { id: known.id },
      { ...fresh, duties: ['volunteer'], removedAt: null },
    );
  else {
    await scope.manager.insert(Person, {
      id: personId,
      installationId,
      accountId: who?.kind === 'account' ? who.accountId : null,
      number: await nextNumber(scope.manager, installationId),
      duties: ['volunteer'],
      removedAt: null,
      erasedAt: null,
      ...fresh,
    });
  }
  scope.changed('people', personId);
  await scope.log({ action: 'person.joined', subject: { personId }, forPersonId: personId });
  return personId;
}

async function alreadyIn(
  scope: WriteScope,
  installationId: string,
  who: Principal | null,
): Promise<PersonRow | null> {
  if (who?.kind === 'account') return loadPersonOfAccount(scope.manager, installationId, who.accountId);
  if (who?.kind === 'person') return loadPersonRow(scope.manager, installationId, who.personId);
  return null;
}

async function correct(scope: WriteScope, known: PersonRow, input: Answers): Promise<void> {
  const fields = fieldsOf(input);
  const same =
    known.first_name === fields.firstName &&
    known.initial === fields.initial &&
    known.age_band === fields.ageBand &&
    known.email === fields.email &&
    known.adult_name === fields.adultName;
  if (same) return;
  await scope.manager.update(Person, { id: known.id }, { ...fields, revision: await scope.revision() });
  scope.changed('people', known.id);
  await scope.log({ action: 'person.corrected', subject: { personId: known.id }, forPersonId: known.id });
}

/**
 * How long a volunteer's session lives: until six hours after the last build day ends in the hall's own zone, and twelve
 * hours at least.
 * @returns ms of the real clock, for the cookie
 */
export function volunteerLifeMs(deps: Deps, installationId: string): number {
  const day = lastBuildDay(deps.data.readHandle, installationId);
  if (!day) return AT_LEAST_MS;
  const end = parse(`${day.date} ${day.end}`, 'yyyy-MM-dd HH:mm', new Date(0), { in: tz(day.time_zone) });
  const left = (end.getTime() + AFTER_END_MS - deps.clock.now()) / deps.clock.rate;
  return Math.max(AT_LEAST_MS, Math.round(left));
}
