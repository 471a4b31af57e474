import type Database from 'better-sqlite3';
import type { PieceSheet, SplitOrigin, SplitPlan } from '../../../shared/contracts/split';
import type { Frame } from '../../../shared/frames';
import { pieceMeetings } from '../../../shared/split';
import { notFound } from '../../http/app-error';
import { prepared } from '../../realtime/live-source';

interface RawPiece {
  id: string;
  code: string;
  name: string;
  traveller_revision: number;
  origin: string | null;
  geometry: string | null;
}

/**
 * The sheet of one piece: drawing, flats, moves, and where it meets its neighbours.
 * @throws AppError NOT_FOUND for a piece of another installation; a piece that was made without a split has a drawing and no moves
 */
export function sheetOf(db: Database.Database, installationId: string, subAssemblyId: string): PieceSheet {
  return db.transaction((): PieceSheet => {
    const row = prepared<RawPiece>(
      db,
      `SELECT sub_assembly.id, code, sub_assembly.name, traveller_revision, origin, frame.geometry
       FROM sub_assembly LEFT JOIN frame ON frame.id = sub_assembly.frame_id
       WHERE sub_assembly.id = ? AND sub_assembly.installation_id = ? AND sub_assembly.removed_at IS NULL
         AND sub_assembly.kind = 'piece'`,
    ).get(subAssemblyId, installationId);
    if (!row) throw notFound();
    const sheet = {
      id: row.id,
      code: row.code,
      name: row.name,
      travellerRevision: row.traveller_revision,
      frame:
        row.geometry === null ? { joints: [], struts: [], faces: [] } : (JSON.parse(row.geometry) as Frame),
    };
    const origin = row.origin === null ? null : (JSON.parse(row.origin) as SplitOrigin);
    const group = origin && groupOf(db, origin);
    if (!origin || !group)
      return {
        ...sheet,
        mark: null,
        hand: null,
        massKg: null,
        flats: null,
        moves: [],
        meetings: [],
        alike: [],
      };
    const pieces = splitPieces(db, installationId);
    const own = pieces.findIndex((piece) => piece.id === row.id);
    const meetings = pieceMeetings(
      pieces.map((piece) => piece.origin),
      pieces.map((piece) => piece.code),
    );
    return {
      ...sheet,
      mark: origin.mark,
      hand: origin.hand,
      massKg: origin.massKg,
      flats: group.flats,
      moves: group.moves,
      meetings: meetings[own] ?? [],
      alike: pieces
        .filter((piece) => piece.frameId === pieces[own]?.frameId && piece.id !== row.id)
        .map((piece) => piece.code),
    };
  })();
}

function groupOf(db: Database.Database, origin: SplitOrigin): SplitPlan['groups'][number] | null {
  const row = prepared<{ plan: string }>(db, 'SELECT plan FROM split WHERE id = ?').get(origin.splitId);
  if (!row) return null;
  const plan = JSON.parse(row.plan) as SplitPlan;
  const piece = plan.pieces.find((one) => one.key === origin.keys[0]);
  return (piece && plan.groups[piece.group]) ?? null;
}

function splitPieces(
  db: Database.Database,
  installationId: string,
): { id: string; code: string; frameId: string; origin: SplitOrigin }[] {
  return prepared<{ id: string; code: string; frame_id: string; origin: string }>(
    db,
    `SELECT id, code, frame_id, origin FROM sub_assembly
     WHERE installation_id = ? AND kind = 'piece' AND origin IS NOT NULL AND removed_at IS NULL ORDER BY code`,
  )
    .all(installationId)
    .map((row) => ({
      id: row.id,
      code: row.code,
      frameId: row.frame_id,
      origin: JSON.parse(row.origin) as SplitOrigin,
    }));
}
