import type Database from 'better-sqlite3';
import type { DayLogView } from '../../../shared/contracts/progress';
import { prepared } from '../../realtime/live-source';

interface RawEntry {
  seq: number;
  revision: number;
  happened_at: number;
  recorded_at: number;
  actor: string;
  for_person_id: string | null;
  action: string;
  subject: string;
  flags: string;
}

/**
 * Entries of the day log, newest first.
 * @param filter `before` a sequence number, one action, or one id that stands among the subject's values
 */
export function readDayLog(
  db: Database.Database,
  installationId: string,
  filter: {
    before?: number | undefined;
    limit: number;
    action?: string | undefined;
    subject?: string | undefined;
  },
): DayLogView[] {
  const rows = prepared<RawEntry>(
    db,
    `SELECT * FROM day_log
     WHERE installation_id = :installationId AND (:before IS NULL OR seq < :before) AND (:action IS NULL OR action = :action)
       AND (:subject IS NULL OR EXISTS (SELECT 1 FROM json_each(day_log.subject) WHERE json_each.value = :subject))
     ORDER BY seq DESC LIMIT :limit`,
  ).all({
    installationId,
    before: filter.before ?? null,
    action: filter.action ?? null,
    subject: filter.subject ?? null,
    limit: filter.limit,
  });
  return rows.map((row) => ({
    seq: row.seq,
    revision: row.revision,
    happenedAt: row.happened_at,
    recordedAt: row.recorded_at,
    actor: row.actor,
    forPersonId: row.for_person_id,
    action: row.action,
    subject: JSON.parse(row.subject) as Record<string, unknown>,
    flags: JSON.parse(row.flags) as string[],
  }));
}
