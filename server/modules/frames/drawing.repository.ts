import type Database from 'better-sqlite3';
import type { EntityManager } from 'typeorm';
import {
  DEFAULT_DRAWING_SETTINGS,
  type DrawingSettings,
  type DrawingView,
  type PlacementView,
} from '../../../shared/contracts/drawing';
import { prepared } from '../../realtime/live-source';

interface RawPlacement {
  id: string;
  frame_id: string;
  name: string;
  place: string;
  revision: number;
}

const toView = (row: RawPlacement): PlacementView => ({
  id: row.id,
  frameId: row.frame_id,
  name: row.name,
  revision: row.revision,
  ...(JSON.parse(row.place) as Pick<PlacementView, 'at' | 'turn' | 'pattern'>),
});

const PLACEMENTS =
  'SELECT id, frame_id, name, place, revision FROM placement WHERE installation_id = ? AND removed_at IS NULL ORDER BY position, id';

/** Whatever was changed last counts, removed placements too: without it the drawing looks another way. */
const REVISION = `SELECT max(
    coalesce((SELECT max(revision) FROM placement WHERE installation_id = ?), 0),
    coalesce((SELECT max(frame.revision) FROM frame JOIN placement ON placement.frame_id = frame.id
              WHERE placement.installation_id = ? AND placement.removed_at IS NULL), 0),
    coalesce((SELECT revision FROM drawing_settings WHERE installation_id = ?), 0)
  ) AS revision`;

/** The drawing of an installation, read in one go. */
export function drawingOf(db: Database.Database, installationId: string): DrawingView {
  return db.transaction((): DrawingView => {
    const placements = prepared<RawPlacement>(db, PLACEMENTS).all(installationId).map(toView);
    const row = prepared<{ settings: string; revision: number }>(
      db,
      'SELECT settings, revision FROM drawing_settings WHERE installation_id = ?',
    ).get(installationId);
    const revision =
      prepared<{ revision: number }>(db, REVISION).get(installationId, installationId, installationId)
        ?.revision ?? 0;
    return {
      settings: row ? (JSON.parse(row.settings) as DrawingSettings) : DEFAULT_DRAWING_SETTINGS,
      settingsRevision: row?.revision ?? 0,
      placements,
      revision,
    };
  })();
}

/** The drawing's revision inside a unit of work. */
export async function loadDrawingRevision(manager: EntityManager, installationId: string): Promise<number> {
  const rows = await manager.query<{ revision: number }[]>(REVISION, [
    installationId,
    installationId,
    installationId,
  ]);
  return rows[0]?.revision ?? 0;
}

/** One placement that has not been removed. */
export async function loadPlacement(
  manager: EntityManager,
  installationId: string,
  id: string,
): Promise<PlacementView | null> {
  const rows = await manager.query<RawPlacement[]>(
    `SELECT id, frame_id, name, place, revision FROM placement
     WHERE id = ? AND installation_id = ? AND removed_at IS NULL`,
    [id, installationId],
  );
  return rows[0] ? toView(rows[0]) : null;
}

/** Placements with the number of struts of their frame, to count a drawing without computing it. */
export async function strutsPlaced(
  manager: EntityManager,
  installationId: string,
): Promise<{ id: string; frameId: string; place: string; struts: number }[]> {
  return manager.query(
    `SELECT placement.id, placement.frame_id AS frameId, placement.place, json_array_length(frame.geometry, '$.struts') AS struts
     FROM placement JOIN frame ON frame.id = placement.frame_id
     WHERE placement.installation_id = ? AND placement.removed_at IS NULL`,
    [installationId],
  );
}

/** How often a frame stands in the drawing. */
export async function placementsOfFrame(manager: EntityManager, frameId: string): Promise<number> {
  const rows = await manager.query<{ n: number }[]>(
    'SELECT count(*) AS n FROM placement WHERE frame_id = ? AND removed_at IS NULL',
    [frameId],
  );
  return rows[0]?.n ?? 0;
}

/** Settings of a drawing and their revision; 0 while they are the defaults. */
export async function loadDrawingSettings(
  manager: EntityManager,
  installationId: string,
): Promise<{ settings: DrawingSettings; revision: number }> {
  const rows = await manager.query<{ settings: string; revision: number }[]>(
    'SELECT settings, revision FROM drawing_settings WHERE installation_id = ?',
    [installationId],
  );
  const row = rows[0];
  return row
    ? { settings: JSON.parse(row.settings) as DrawingSettings, revision: row.revision }
    : { settings: DEFAULT_DRAWING_SETTINGS, revision: 0 };
}
