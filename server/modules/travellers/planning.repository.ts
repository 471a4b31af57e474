import type Database from 'better-sqlite3';
import type { EntityManager } from 'typeorm';
import type { TemplateView } from '../../../shared/contracts/travellers';
import { prepared } from '../../realtime/live-source';

interface RawTemplate {
  id: string;
  name: string;
  steps: string;
  revision: number;
}

const toView = (row: RawTemplate): TemplateView => ({
  id: row.id,
  name: row.name,
  revision: row.revision,
  steps: JSON.parse(row.steps) as TemplateView['steps'],
});

/** All templates of an installation by name. */
export const templatesOf = (db: Database.Database, installationId: string): TemplateView[] =>
  prepared<RawTemplate>(
    db,
    'SELECT id, name, steps, revision FROM traveller_template WHERE installation_id = ? ORDER BY name COLLATE NOCASE, id',
  )
    .all(installationId)
    .map(toView);

/** One template of an installation. */
export async function loadTemplate(
  manager: EntityManager,
  installationId: string,
  id: string,
): Promise<TemplateView | null> {
  const rows = await manager.query<RawTemplate[]>(
    'SELECT id, name, steps, revision FROM traveller_template WHERE id = ? AND installation_id = ?',
    [id, installationId],
  );
  return rows[0] ? toView(rows[0]) : null;
}

/** How many pieces were made from a template and not removed. */
export async function piecesOf(manager: EntityManager, templateId: string): Promise<number> {
  const rows = await manager.query<{ n: number }[]>(
    'SELECT count(*) AS n FROM sub_assembly WHERE template_id = ? AND removed_at IS NULL',
    [templateId],
  );
  return rows[0]?.n ?? 0;
}

/** Ids of an installation's stations that have not been removed. */
export async function stationIds(manager: EntityManager, installationId: string): Promise<Set<string>> {
  const rows = await manager.query<{ id: string }[]>(
    'SELECT id FROM station WHERE installation_id = ? AND removed_at IS NULL',
    [installationId],
  );
  return new Set(rows.map((row) => row.id));
}

/** Highest number of a letter's codes, removed pieces included: a code once printed is not given out again. */
export async function highestNumber(
  manager: EntityManager,
  installationId: string,
  letter: string,
): Promise<number> {
  const rows = await manager.query<{ code: string }[]>(
    `SELECT code FROM sub_assembly WHERE installation_id = ? AND code LIKE ? || '-%'`,
    [installationId, letter],
  );
  return rows.reduce((highest, { code }) => Math.max(highest, Number(code.slice(letter.length + 1)) || 0), 0);
}

/** Places that were ever held on the steps of a piece. */
export async function claimsOn(manager: EntityManager, subAssemblyId: string): Promise<number> {
  const rows = await manager.query<{ n: number }[]>(
    'SELECT count(*) AS n FROM claim JOIN step ON step.id = claim.step_id WHERE step.sub_assembly_id = ?',
    [subAssemblyId],
  );
  return rows[0]?.n ?? 0;
}

/** One piece of an installation that has not been removed. */
export async function loadPiece(
  manager: EntityManager,
  installationId: string,
  id: string,
): Promise<{ id: string; code: string } | null> {
  const rows = await manager.query<{ id: string; code: string }[]>(
    'SELECT id, code FROM sub_assembly WHERE id = ? AND installation_id = ? AND removed_at IS NULL',
    [id, installationId],
  );
  return rows[0] ?? null;
}

/** Codes of the field joints that need a piece. */
export async function jointsThatNeed(
  manager: EntityManager,
  installationId: string,
  pieceId: string,
): Promise<string[]> {
  const rows = await manager.query<{ code: string }[]>(
    `SELECT code FROM sub_assembly WHERE installation_id = ? AND kind = 'field joint' AND removed_at IS NULL
       AND EXISTS (SELECT 1 FROM json_each(needs) WHERE value = ?) ORDER BY code`,
    [installationId, pieceId],
  );
  return rows.map((row) => row.code);
}
