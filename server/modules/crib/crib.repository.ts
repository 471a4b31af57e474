import type { EntityManager } from 'typeorm';
import type { Duty } from '../../../shared/accounts';
import type { ToolTraits } from '../../../shared/contracts/live';
import type { AgeBand, Hazard } from '../../../shared/safety';

/** A tool as the rules see it. */
export interface LoadedTool {
  id: string;
  number: string;
  name: string;
  kind: string;
  hazard: Hazard | null;
  traits: ToolTraits;
  condition: string;
  tag: { reason: string; by: string; at: number } | null;
  revision: number;
}

interface RawTool extends Omit<LoadedTool, 'traits' | 'tag'> {
  traits: string;
  tag: string | null;
}

/** One tool of an installation that has not been removed. */
export async function loadTool(
  manager: EntityManager,
  installationId: string,
  id: string,
): Promise<LoadedTool | null> {
  const rows = await manager.query<RawTool[]>(
    'SELECT * FROM tool WHERE id = ? AND installation_id = ? AND removed_at IS NULL',
    [id, installationId],
  );
  const [row] = rows;
  if (!row) return null;
  return {
    ...row,
    traits: JSON.parse(row.traits) as ToolTraits,
    tag: row.tag === null ? null : (JSON.parse(row.tag) as LoadedTool['tag']),
  };
}

/** Whether another tool has this number, removed ones included: a number painted on a tool is not given out again. */
export async function isNumberTaken(
  manager: EntityManager,
  installationId: string,
  number: string,
  except: string,
): Promise<boolean> {
  const rows = await manager.query<unknown[]>(
    'SELECT 1 FROM tool WHERE installation_id = ? AND number = ? AND id <> ?',
    [installationId, number, except],
  );
  return rows.length > 0;
}

/** The open checkout of a tool. */
export async function openCheckout(
  manager: EntityManager,
  toolId: string,
): Promise<{ id: string; personId: string; name: string; outAt: number; backBy: number } | null> {
  const rows = await manager.query<
    { id: string; person_id: string; name: string; out_at: number; back_by: number }[]
  >(
    `SELECT checkout.id, person_id, trim(first_name || ' ' || initial) AS name, out_at, back_by
     FROM checkout JOIN person ON person.id = checkout.person_id WHERE tool_id = ? AND back_at IS NULL`,
    [toolId],
  );
  const [row] = rows;
  return row
    ? { id: row.id, personId: row.person_id, name: row.name, outAt: row.out_at, backBy: row.back_by }
    : null;
}

/**
 * Write a tool back on condition that it is out.
 * @returns the checkout that ended, or null when there was none
 */
export async function closeCheckout(
  manager: EntityManager,
  toolId: string,
  back: { at: number; by: string; condition: string | null; revision: number },
): Promise<{ id: string; personId: string; backBy: number } | null> {
  const rows = await manager.query<{ id: string; person_id: string; back_by: number }[]>(
    `UPDATE checkout SET back_at = ?, taken_back_by = ?, condition_back = ?, revision = ?
     WHERE tool_id = ? AND back_at IS NULL RETURNING id, person_id, back_by`,
    [back.at, back.by, back.condition, back.revision, toolId],
  );
  const [row] = rows;
  return row ? { id: row.id, personId: row.person_id, backBy: row.back_by } : null;
}

/** Who asks for a tool. */
export async function loadBorrower(
  manager: EntityManager,
  installationId: string,
  personId: string,
): Promise<{ confirmed: boolean; onSite: boolean; ageBand: AgeBand; name: string } | null> {
  const rows = await manager.query<{ confirmed: number; on_site: number; age_band: AgeBand; name: string }[]>(
    `SELECT confirmed_at IS NOT NULL AS confirmed, left_at IS NULL AS on_site, age_band, trim(first_name || ' ' || initial) AS name
     FROM person WHERE id = ? AND installation_id = ? AND removed_at IS NULL`,
    [personId, installationId],
  );
  const [row] = rows;
  return row
    ? { confirmed: row.confirmed === 1, onSite: row.on_site === 1, ageBand: row.age_band, name: row.name }
    : null;
}

/** Name and duties of somebody, for words and for the second person of a tag. */
export async function loadHolder(
  manager: EntityManager,
  personId: string,
): Promise<{ name: string; duties: Duty[] } | null> {
  const rows = await manager.query<{ name: string; duties: string }[]>(
    `SELECT trim(first_name || ' ' || initial) AS name, duties FROM person WHERE id = ?`,
    [personId],
  );
  const [row] = rows;
  return row ? { name: row.name, duties: JSON.parse(row.duties) as Duty[] } : null;
}

/** Whether a station stands in the plan. */
export async function hasStation(
  manager: EntityManager,
  installationId: string,
  stationId: string,
): Promise<boolean> {
  const rows = await manager.query<unknown[]>(
    'SELECT 1 FROM station WHERE id = ? AND installation_id = ? AND removed_at IS NULL',
    [stationId, installationId],
  );
  return rows.length > 0;
}
