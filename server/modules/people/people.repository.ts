import type Database from 'better-sqlite3';
import type { EntityManager } from 'typeorm';
import type { Duty } from '../../../shared/accounts';
import type { LeavingView } from '../../../shared/contracts/people';
import type { AgeBand } from '../../../shared/safety';
import { prepared } from '../../realtime/live-source';

export interface PersonRow {
  id: string;
  installation_id: string;
  account_id: string | null;
  number: number;
  first_name: string;
  initial: string;
  email: string | null;
  age_band: AgeBand;
  adult_name: string | null;
  duties: string;
  joined_at: number;
  confirmed_at: number | null;
  left_at: number | null;
  removed_at: number | null;
  erased_at: number | null;
  revision: number;
}

export const dutiesOf = (row: Pick<PersonRow, 'duties'>): Duty[] => JSON.parse(row.duties) as Duty[];
export const isOnSite = (row: PersonRow): boolean =>
  row.confirmed_at !== null && row.left_at === null && row.removed_at === null;

/** A person of an installation inside a unit of work, removed ones included. */
export async function loadPersonRow(
  manager: EntityManager,
  installationId: string,
  personId: string,
): Promise<PersonRow | null> {
  const rows = await manager.query<PersonRow[]>('SELECT * FROM person WHERE installation_id = ? AND id = ?', [
    installationId,
    personId,
  ]);
  return rows[0] ?? null;
}

export async function loadPersonOfAccount(
  manager: EntityManager,
  installationId: string,
  accountId: string,
): Promise<PersonRow | null> {
  const rows = await manager.query<PersonRow[]>(
    'SELECT * FROM person WHERE installation_id = ? AND account_id = ?',
    [installationId, accountId],
  );
  return rows[0] ?? null;
}

/** The next number to be said and typed at the crib; numbers are never used twice. */
export async function nextNumber(manager: EntityManager, installationId: string): Promise<number> {
  const rows = await manager.query<{ last: number | null }[]>(
    'SELECT max(number) AS last FROM person WHERE installation_id = ?',
    [installationId],
  );
  return (rows[0]?.last ?? 0) + 1;
}

const ON_SITE = 'confirmed_at IS NOT NULL AND left_at IS NULL AND removed_at IS NULL';

export async function countOnSite(manager: EntityManager, installationId: string): Promise<number> {
  const rows = await manager.query<{ n: number }[]>(
    `SELECT count(*) AS n FROM person WHERE installation_id = ? AND ${ON_SITE}`,
    [installationId],
  );
  return rows[0]?.n ?? 0;
}

export const onSiteNow = (db: Database.Database, installationId: string): number =>
  prepared<{ n: number }>(
    db,
    `SELECT count(*) AS n FROM person WHERE installation_id = ? AND ${ON_SITE}`,
  ).get(installationId)?.n ?? 0;

export async function countSafetyLeads(manager: EntityManager, installationId: string): Promise<number> {
  const rows = await manager.query<{ n: number }[]>(
    `SELECT count(*) AS n FROM person WHERE installation_id = ? AND removed_at IS NULL
     AND EXISTS (SELECT 1 FROM json_each(person.duties) WHERE value = 'safety lead')`,
    [installationId],
  );
  return rows[0]?.n ?? 0;
}

/** Tools that are out with a person. */
export function toolsOutWith(manager: EntityManager, personId: string): Promise<LeavingView['toolsOut']> {
  return manager.query(
    `SELECT tool.id, tool.number, tool.name FROM checkout JOIN tool ON tool.id = checkout.tool_id
     WHERE checkout.person_id = ? AND checkout.back_at IS NULL ORDER BY tool.number`,
    [personId],
  );
}

/** The last build day: its date, its end, and the installation's zone. */
export const lastBuildDay = (
  db: Database.Database,
  installationId: string,
): { date: string; end: string; time_zone: string } | undefined =>
  prepared<{ date: string; end: string; time_zone: string }>(
    db,
    `SELECT build_day.date, build_day.end, installation.time_zone FROM build_day
     JOIN installation ON installation.id = build_day.installation_id
     WHERE build_day.installation_id = ? AND build_day.removed_at IS NULL
     ORDER BY build_day.date DESC, build_day.end DESC LIMIT 1`,
  ).get(installationId);

export async function loadStatus(
  manager: EntityManager,
  installationId: string,
): Promise<string | undefined> {
  const rows = await manager.query<{ status: string }[]>('SELECT status FROM installation WHERE id = ?', [
    installationId,
  ]);
  return rows[0]?.status;
}
