import type Database from 'better-sqlite3';
import type { EntityManager } from 'typeorm';
import type { FrameView } from '../../../shared/contracts/frames';
import { prepared } from '../../realtime/live-source';
import { Frame } from './frame.entity';

interface RawFrame {
  id: string;
  name: string;
  source: string;
  geometry: string;
  revision: number;
  sub_assemblies: number;
}

/** All frames of an installation by name, each with how many pieces are made from it. */
export function framesOf(db: Database.Database, installationId: string): FrameView[] {
  const rows = prepared<RawFrame>(
    db,
    `SELECT id, name, source, geometry, revision,
       (SELECT count(*) FROM sub_assembly WHERE frame_id = frame.id AND removed_at IS NULL) AS sub_assemblies
     FROM frame WHERE installation_id = ? AND removed_at IS NULL ORDER BY name COLLATE NOCASE, id`,
  ).all(installationId);
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    revision: row.revision,
    source: JSON.parse(row.source) as FrameView['source'],
    geometry: JSON.parse(row.geometry) as FrameView['geometry'],
    subAssemblies: row.sub_assemblies,
  }));
}

/** One frame of an installation that has not been removed. */
export const loadFrame = (
  manager: EntityManager,
  installationId: string,
  id: string,
): Promise<Frame | null> =>
  manager
    .createQueryBuilder(Frame, 'frame')
    .where('id = :id AND installation_id = :installationId AND removed_at IS NULL', { id, installationId })
    .getOne();

/** How many pieces are made from a frame, and on how many of them work has begun. */
export async function usesOfFrame(
  manager: EntityManager,
  frameId: string,
): Promise<{ pieces: number; begun: number }> {
  const rows = await manager.query<{ pieces: number; begun: number }[]>(
    `SELECT count(*) AS pieces, coalesce(sum(EXISTS (
       SELECT 1 FROM step JOIN claim ON claim.step_id = step.id WHERE step.sub_assembly_id = sub_assembly.id
     )), 0) AS begun FROM sub_assembly WHERE frame_id = ? AND removed_at IS NULL`,
    [frameId],
  );
  return rows[0] ?? { pieces: 0, begun: 0 };
}

/**
 * Give every piece of a frame a new revision.
 * @param redrawn its geometry changed: a printed traveller is out of date, so the traveller's own revision goes up too
 * @returns ids of the pieces
 */
export async function touchPieces(
  manager: EntityManager,
  frameId: string,
  revision: number,
  redrawn: boolean,
): Promise<string[]> {
  const rows = await manager.query<{ id: string }[]>(
    `UPDATE sub_assembly SET revision = ?, traveller_revision = traveller_revision + ?
     WHERE frame_id = ? AND removed_at IS NULL RETURNING id`,
    [revision, redrawn ? 1 : 0, frameId],
  );
  return rows.map((row) => row.id);
}
