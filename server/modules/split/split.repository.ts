import type Database from 'better-sqlite3';
import type { EntityManager } from 'typeorm';
import type { SplitOrigin, SplitPlan, SplitView, SplitWish, StrutKey } from '../../../shared/contracts/split';
import { loadDrawingRevision } from '../frames';
import { prepared } from '../../realtime/live-source';
import type { Split } from './split.entity';

interface RawSplit {
  id: string;
  status: Split['status'];
  drawing_revision: number;
  wish: string;
  plan: string;
  made_at: number;
  revision: number;
}

const toView = (row: RawSplit, drawingRevision: number): SplitView => ({
  id: row.id,
  status: row.status,
  outOfDate: row.drawing_revision !== drawingRevision,
  wish: JSON.parse(row.wish) as SplitWish,
  plan: JSON.parse(row.plan) as SplitPlan,
  madeAt: row.made_at,
  revision: row.revision,
});

const NEWEST = `SELECT id, status, drawing_revision, wish, plan, made_at, revision FROM split
  WHERE installation_id = ? AND status = ? ORDER BY revision DESC LIMIT 1`;

/** The proposal that waits and the split that travellers were made from. */
export function splitsOf(
  db: Database.Database,
  installationId: string,
  drawingRevision: number,
): { proposed: SplitView | null; taken: SplitView | null } {
  const newest = (status: string) => {
    const row = prepared<RawSplit>(db, NEWEST).get(installationId, status);
    return row ? toView(row, drawingRevision) : null;
  };
  return { proposed: newest('proposed'), taken: newest('taken') };
}

/** The proposal of an installation, inside a unit of work. */
export async function loadProposal(
  manager: EntityManager,
  installationId: string,
): Promise<SplitView | null> {
  const drawingRevision = await loadDrawingRevision(manager, installationId);
  const rows = await manager.query<RawSplit[]>(NEWEST, [installationId, 'proposed']);
  return rows[0] ? toView(rows[0], drawingRevision) : null;
}

/** Somebody took a place on it, or it has gone on from where it started. */
const BEGUN = `EXISTS (
  SELECT 1 FROM step WHERE step.sub_assembly_id = sub_assembly.id AND step.removed_at IS NULL
    AND (step.state NOT IN ('waiting', 'ready') OR EXISTS (SELECT 1 FROM claim WHERE claim.step_id = step.id))
)`;

/** A sub-assembly that was made from a split. */
export interface SplitPieceRow {
  id: string;
  code: string;
  kind: 'piece' | 'field joint';
  frameId: string;
  templateId: string | null;
  needs: string[];
  origin: SplitOrigin;
  /** Somebody took a place on it, or it has gone on from where it started. */
  begun: boolean;
}

/** Sub-assemblies of an installation that were made from a split and not removed. */
export async function splitPieces(manager: EntityManager, installationId: string): Promise<SplitPieceRow[]> {
  const rows = await manager.query<
    {
      id: string;
      code: string;
      kind: SplitPieceRow['kind'];
      frame_id: string;
      template_id: string | null;
      needs: string;
      origin: string;
      begun: number;
    }[]
  >(
    `SELECT id, code, kind, frame_id, template_id, needs, origin, ${BEGUN} AS begun
     FROM sub_assembly WHERE installation_id = ? AND origin IS NOT NULL AND removed_at IS NULL ORDER BY code`,
    [installationId],
  );
  return rows.map((row) => ({
    id: row.id,
    code: row.code,
    kind: row.kind,
    frameId: row.frame_id,
    templateId: row.template_id,
    needs: JSON.parse(row.needs) as string[],
    origin: JSON.parse(row.origin) as SplitOrigin,
    begun: row.begun === 1,
  }));
}

/** Pieces on which work has begun, by the struts they are made of: a new split leaves them as they are. */
export function begunPieces(
  db: Database.Database,
  installationId: string,
): { key: string; struts: StrutKey[] }[] {
  return prepared<{ origin: string }>(
    db,
    `SELECT origin FROM sub_assembly WHERE installation_id = ? AND kind = 'piece' AND origin IS NOT NULL AND removed_at IS NULL
       AND ${BEGUN} ORDER BY code`,
  )
    .all(installationId)
    .map((row) => JSON.parse(row.origin) as SplitOrigin)
    .map((origin) => ({ key: origin.keys[0] ?? '', struts: origin.struts }));
}

/** Steps of some sub-assemblies as far as a new split asks for them; a step that somebody holds or held counts as in hand. */
export async function stepsOfPieces(
  manager: EntityManager,
  ids: readonly string[],
): Promise<Map<string, { id: string; name: string; state: string }[]>> {
  const rows = await manager.query<{ id: string; piece: string; name: string; state: string }[]>(
    `SELECT id, sub_assembly_id AS piece, name,
       CASE WHEN state IN ('waiting', 'ready') AND EXISTS (SELECT 1 FROM claim WHERE claim.step_id = step.id)
         THEN 'in hand' ELSE state END AS state
     FROM step WHERE sub_assembly_id IN (SELECT value FROM json_each(?)) AND removed_at IS NULL ORDER BY position`,
    [JSON.stringify(ids)],
  );
  const steps = new Map<string, { id: string; name: string; state: string }[]>();
  for (const { piece, ...step } of rows) steps.set(piece, [...(steps.get(piece) ?? []), step]);
  return steps;
}
