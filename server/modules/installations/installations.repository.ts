import type Database from 'better-sqlite3';
import type { EntityManager } from 'typeorm';
import type { DisplayTokenView, InstallationListItem } from '../../../shared/contracts/installations';
import type { InstallationRecord } from '../../../shared/contracts/live';
import type { Hazard } from '../../../shared/safety';
import { prepared } from '../../realtime/live-source';

export interface InstallationRow {
  id: string;
  name: string;
  venue: string;
  time_zone: string;
  unit: InstallationRecord['unit'];
  hall_limit: number;
  status: InstallationRecord['status'];
  join_code: string;
  join_code_at: number;
  settings: string;
  own_revision: number;
}

export const toInstallationRecord = (row: InstallationRow): InstallationRecord => ({
  id: row.id,
  revision: row.own_revision,
  name: row.name,
  venue: row.venue,
  timeZone: row.time_zone,
  unit: row.unit,
  hallLimit: row.hall_limit,
  status: row.status,
  settings: JSON.parse(row.settings) as InstallationRecord['settings'],
});

export const installationById = (db: Database.Database, id: string): InstallationRow | undefined =>
  prepared<InstallationRow>(db, 'SELECT * FROM installation WHERE id = ?').get(id);

export const installationByCode = (db: Database.Database, code: string): InstallationRow | undefined =>
  prepared<InstallationRow>(db, 'SELECT * FROM installation WHERE join_code = ?').get(code);

/** The installation inside a unit of work. */
export async function loadInstallation(manager: EntityManager, id: string): Promise<InstallationRow | null> {
  const rows = await manager.query<InstallationRow[]>('SELECT * FROM installation WHERE id = ?', [id]);
  return rows[0] ?? null;
}

export async function isCodeTaken(manager: EntityManager, code: string): Promise<boolean> {
  const rows = await manager.query<unknown[]>('SELECT 1 FROM installation WHERE join_code = ?', [code]);
  return rows.length > 0;
}

interface ListRow {
  id: string;
  name: string;
  venue: string;
  status: InstallationListItem['status'];
  first_date: string | null;
  sub_assemblies: number;
  people: number;
  duties: string | null;
}

/** Installations an account takes part in, newest first; an administrator sees all. */
export const listInstallations = (
  db: Database.Database,
  accountId: string,
  all: boolean,
): InstallationListItem[] =>
  prepared<ListRow>(
    db,
    `SELECT installation.id, installation.name, installation.venue, installation.status, own.duties,
       (SELECT min(date) FROM build_day WHERE installation_id = installation.id AND removed_at IS NULL) AS first_date,
       (SELECT count(*) FROM sub_assembly WHERE installation_id = installation.id AND removed_at IS NULL) AS sub_assemblies,
       (SELECT count(*) FROM person WHERE installation_id = installation.id AND removed_at IS NULL) AS people
     FROM installation ${all ? 'LEFT JOIN' : 'JOIN'} person AS own
       ON own.installation_id = installation.id AND own.account_id = ? AND own.removed_at IS NULL
     ORDER BY installation.created_at DESC, installation.id`,
  )
    .all(accountId)
    .map((row) => ({
      id: row.id,
      name: row.name,
      venue: row.venue,
      status: row.status,
      firstDate: row.first_date,
      subAssemblies: row.sub_assemblies,
      people: row.people,
      duties: row.duties === null ? [] : (JSON.parse(row.duties) as string[]),
    }));

/** What publishing asks for, counted. */
export interface PublishCounts {
  buildDays: number;
  stations: number;
  subAssemblies: number;
  safetyLeads: number;
  /** Hazards of steps that no published briefing covers. */
  unbriefed: Hazard[];
}

const PUBLISH_COUNTS_SQL = `SELECT
  (SELECT count(*) FROM build_day WHERE installation_id = :id AND removed_at IS NULL) AS build_days,
  (SELECT count(*) FROM station WHERE installation_id = :id AND removed_at IS NULL) AS stations,
  (SELECT count(*) FROM sub_assembly WHERE installation_id = :id AND removed_at IS NULL) AS sub_assemblies,
  (SELECT count(*) FROM person WHERE installation_id = :id AND removed_at IS NULL
     AND EXISTS (SELECT 1 FROM json_each(person.duties) WHERE value = 'safety lead')) AS safety_leads,
  (SELECT json_group_array(DISTINCT hazard.value) FROM step, json_each(step.hazards) AS hazard
     WHERE step.installation_id = :id AND step.removed_at IS NULL AND NOT EXISTS (
       SELECT 1 FROM briefing, json_each(briefing.hazards) AS covered
       WHERE briefing.installation_id = :id AND covered.value = hazard.value AND EXISTS (
         SELECT 1 FROM briefing_version WHERE briefing_id = briefing.id AND status = 'published'))) AS unbriefed`;

interface CountsRow {
  build_days: number;
  stations: number;
  sub_assemblies: number;
  safety_leads: number;
  unbriefed: string;
}

const toCounts = (row: CountsRow): PublishCounts => ({
  buildDays: row.build_days,
  stations: row.stations,
  subAssemblies: row.sub_assemblies,
  safetyLeads: row.safety_leads,
  unbriefed: JSON.parse(row.unbriefed) as Hazard[],
});

export function publishCounts(db: Database.Database, id: string): PublishCounts {
  const row = prepared<CountsRow>(db, PUBLISH_COUNTS_SQL).get({ id });
  if (!row) throw new Error('Counting gave no row.');
  return toCounts(row);
}

/** The same inside a unit of work. */
export async function loadPublishCounts(manager: EntityManager, id: string): Promise<PublishCounts> {
  // The driver takes named parameters as one object among the positions.
  const rows = await manager.query<CountsRow[]>(PUBLISH_COUNTS_SQL, [{ id }]);
  const row = rows[0];
  if (!row) throw new Error('Counting gave no row.');
  return toCounts(row);
}

/** Fields of the installation that were edited after a revision, by the day log. */
export async function fieldsEditedSince(
  manager: EntityManager,
  id: string,
  revision: number,
): Promise<string[]> {
  const rows = await manager.query<{ field: string }[]>(
    `SELECT DISTINCT field.value AS field FROM day_log, json_each(day_log.subject, '$.fields') AS field
     WHERE day_log.installation_id = ? AND day_log.revision > ? AND day_log.action = 'installation.edited'`,
    [id, revision],
  );
  return rows.map((row) => row.field);
}

export const displaysOf = (db: Database.Database, installationId: string): DisplayTokenView[] =>
  prepared<{ id: string; label: string; created_at: number; closed_at: number | null }>(
    db,
    'SELECT id, label, created_at, closed_at FROM display_token WHERE installation_id = ? ORDER BY created_at, id',
  )
    .all(installationId)
    .map((row) => ({
      id: row.id,
      label: row.label,
      createdAt: row.created_at,
      closed: row.closed_at !== null,
    }));

export const displayByHash = (db: Database.Database, tokenHash: string): string | undefined =>
  prepared<{ id: string }>(db, 'SELECT id FROM display_token WHERE token_hash = ? AND closed_at IS NULL').get(
    tokenHash,
  )?.id;

/** How much still uses a station: steps that are not removed, and steps of templates. */
export async function usesOfStation(
  manager: EntityManager,
  installationId: string,
  stationId: string,
): Promise<{ steps: number; templates: string[] }> {
  const steps = await manager.query<{ n: number }[]>(
    'SELECT count(*) AS n FROM step WHERE installation_id = ? AND station_id = ? AND removed_at IS NULL',
    [installationId, stationId],
  );
  const templates = await manager.query<{ name: string }[]>(
    `SELECT DISTINCT traveller_template.name FROM traveller_template, json_each(traveller_template.steps) AS one
     WHERE installation_id = ? AND json_extract(one.value, '$.stationId') = ?`,
    [installationId, stationId],
  );
  return { steps: steps[0]?.n ?? 0, templates: templates.map((row) => row.name) };
}
