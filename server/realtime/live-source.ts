import type Database from 'better-sqlite3';
import type { Audience, LiveCollections, LiveKind } from '../../shared/contracts/live';

/** Which rows: all that changed after a revision, or these. */
export type LiveFilter = { since: number } | { ids: readonly string[] };

/** How one live collection is read and who sees what of it. A module gives one for each of its collections. */
export interface LiveSource<K extends LiveKind> {
  kind: K;
  /** Whole records, as a lead sees them; synchronous, inside the caller's read transaction. */
  load(db: Database.Database, installationId: string, filter: LiveFilter): LiveCollections[K][];
  /** The record as an audience may see it, or null when it may not. */
  view(record: LiveCollections[K], audience: Audience): LiveCollections[K] | null;
  /** The person who sees this record whole whatever the audience. */
  owner?(record: LiveCollections[K]): string | null;
}

/** A source whose kind is only known at run time. */
export type AnyLiveSource = { [K in LiveKind]: LiveSource<K> }[LiveKind];

const statements = new WeakMap<Database.Database, Map<string, Database.Statement>>();

/** A prepared statement, made once for each handle. */
export function prepared<T>(db: Database.Database, sql: string): Database.Statement<unknown[], T> {
  let ofHandle = statements.get(db);
  if (!ofHandle) {
    ofHandle = new Map();
    statements.set(db, ofHandle);
  }
  let statement = ofHandle.get(sql);
  if (!statement) {
    statement = db.prepare(sql);
    ofHandle.set(sql, statement);
  }
  return statement as Database.Statement<unknown[], T>;
}

/**
 * Rows of a table of one installation, oldest id order.
 * @param table a table with `id`, `installation_id` and `revision`
 */
export function selectRows<T>(
  db: Database.Database,
  table: string,
  installationId: string,
  filter: LiveFilter,
): T[] {
  if ('since' in filter) {
    const sql = `SELECT * FROM ${table} WHERE installation_id = ? AND revision > ?`;
    return prepared<T>(db, sql).all(installationId, filter.since);
  }
  // The plus keeps the planner from walking the whole installation by its index and comparing ids.
  const sql = `SELECT * FROM ${table} WHERE +installation_id = ? AND id IN (SELECT value FROM json_each(?))`;
  return prepared<T>(db, sql).all(installationId, JSON.stringify(filter.ids));
}
