import type Database from 'better-sqlite3';
import type { EntityManager } from 'typeorm';
import type { Duty, SiteRole } from '../../../shared/accounts';
import type { AccountView, LinkView } from '../../../shared/contracts/accounts';
import type { Membership } from '../../../shared/contracts/live';
import { prepared } from '../../realtime/live-source';

export interface AccountRow {
  id: string;
  email: string;
  name: string;
  password_hash: string | null;
  site_role: SiteRole;
  disabled_at: number | null;
}

export interface LinkRow {
  id: string;
  kind: LinkView['kind'];
  account_id: string | null;
}

const COLUMNS = 'id, email, name, password_hash, site_role, disabled_at';

export const accountByEmail = (db: Database.Database, email: string): AccountRow | undefined =>
  prepared<AccountRow>(db, `SELECT ${COLUMNS} FROM account WHERE email = ?`).get(email);

export const accountById = (db: Database.Database, id: string): AccountRow | undefined =>
  prepared<AccountRow>(db, `SELECT ${COLUMNS} FROM account WHERE id = ?`).get(id);

export const toAccountView = (row: AccountRow): AccountView => ({
  id: row.id,
  email: row.email,
  name: row.name,
  siteRole: row.site_role,
  pending: row.password_hash === null,
  disabled: row.disabled_at !== null,
});

export const allAccounts = (db: Database.Database): AccountView[] =>
  prepared<AccountRow>(db, `SELECT ${COLUMNS} FROM account ORDER BY name, id`).all().map(toAccountView);

/** The account inside a unit of work, with what was written there before. */
export async function loadAccount(
  manager: EntityManager,
  by: { id: string } | { email: string },
): Promise<AccountRow | null> {
  const [column, value] = 'id' in by ? ['id', by.id] : ['email', by.email];
  const rows = await manager.query<AccountRow[]>(`SELECT ${COLUMNS} FROM account WHERE ${column} = ?`, [
    value,
  ]);
  return rows[0] ?? null;
}

const USABLE_ADMINS = `site_role = 'admin' AND disabled_at IS NULL AND password_hash IS NOT NULL`;

/** Administrators who can sign in. */
export async function countAdmins(manager: EntityManager): Promise<number> {
  const rows = await manager.query<{ n: number }[]>(
    `SELECT count(*) AS n FROM account WHERE ${USABLE_ADMINS}`,
  );
  return rows[0]?.n ?? 0;
}

export const hasAdmin = (db: Database.Database): boolean =>
  prepared<{ n: number }>(db, `SELECT count(*) AS n FROM account WHERE ${USABLE_ADMINS}`).get()?.n !== 0;

/** A link that still works at an instant. */
export const usableLink = (db: Database.Database, secretHash: string, now: number): LinkRow | undefined =>
  prepared<LinkRow>(
    db,
    `SELECT link.id, link.kind, link.account_id FROM one_time_link AS link
     LEFT JOIN account ON account.id = link.account_id
     WHERE link.secret_hash = ? AND link.used_at IS NULL AND link.expires_at > ? AND account.disabled_at IS NULL`,
  ).get(secretHash, now);

interface MembershipRow {
  installation_id: string;
  name: string;
  status: Membership['status'];
  person_id: string | null;
  duties: string | null;
  confirmed: number;
}

const MEMBERSHIP = `SELECT installation.id AS installation_id, installation.name, installation.status,
    person.id AS person_id, person.duties,
    person.id IS NOT NULL AND person.confirmed_at IS NOT NULL AND person.left_at IS NULL AS confirmed`;
const NEWEST_FIRST = 'ORDER BY installation.created_at DESC, installation.id';

const toMembership = (row: MembershipRow): Membership => ({
  installationId: row.installation_id,
  name: row.name,
  status: row.status,
  personId: row.person_id,
  duties: row.duties === null ? [] : (JSON.parse(row.duties) as Duty[]),
  confirmed: row.confirmed === 1,
});

/** Installations an account takes part in; an administrator sees all of them. */
export const membershipsOfAccount = (db: Database.Database, accountId: string, all: boolean): Membership[] =>
  prepared<MembershipRow>(
    db,
    `${MEMBERSHIP} FROM installation ${all ? 'LEFT JOIN' : 'JOIN'} person
       ON person.installation_id = installation.id AND person.account_id = ? AND person.removed_at IS NULL
     ${NEWEST_FIRST}`,
  )
    .all(accountId)
    .map(toMembership);

export const membershipsOfPerson = (db: Database.Database, personId: string): Membership[] =>
  prepared<MembershipRow>(
    db,
    `${MEMBERSHIP} FROM person JOIN installation ON installation.id = person.installation_id
     WHERE person.id = ? AND person.removed_at IS NULL`,
  )
    .all(personId)
    .map(toMembership);

/** Names and venues of all installations: words nobody's password should be made of. */
export const installationTitles = (db: Database.Database): string[] =>
  prepared<{ name: string; venue: string }>(db, 'SELECT name, venue FROM installation')
    .all()
    .flatMap(({ name, venue }) => [name, venue]);
