import type Database from 'better-sqlite3';
import type { BriefingRecord, StopRecord } from '../../../shared/contracts/live';
import type { Hazard, VersionKind } from '../../../shared/safety';
import { prepared, selectRows, type LiveSource } from '../../realtime/live-source';
import { toSignOff, type RawSignOff } from './safety.repository';

/** A list of rows by the id they belong to. */
function grouped<R>(rows: readonly R[], keyOf: (row: R) => string): Map<string, R[]> {
  const groups = new Map<string, R[]>();
  for (const row of rows) {
    const known = groups.get(keyOf(row));
    if (known) known.push(row);
    else groups.set(keyOf(row), [row]);
  }
  return groups;
}

function ofIds<R>(db: Database.Database, sql: string, rows: readonly { id: string }[]): R[] {
  return rows.length === 0 ? [] : prepared<R>(db, sql).all(JSON.stringify(rows.map((row) => row.id)));
}

interface RawBriefing {
  id: string;
  revision: number;
  key: string;
  title: string;
  hazards: string;
  validity_days: number;
}
interface RawVersion {
  briefing_id: string;
  version: number;
  kind: VersionKind;
  effective_from: number;
  what_changed: string | null;
}

/** Briefings with their published versions; proposals are for the leads who write them. */
export const briefingsSource: LiveSource<'briefings'> = {
  kind: 'briefings',
  load(db, installationId, filter) {
    const rows = selectRows<RawBriefing>(db, 'briefing', installationId, filter);
    const versions = grouped(
      ofIds<RawVersion>(
        db,
        `SELECT briefing_id, version, kind, effective_from, what_changed FROM briefing_version
         WHERE briefing_id IN (SELECT value FROM json_each(?)) AND status = 'published' ORDER BY version`,
        rows,
      ),
      (row) => row.briefing_id,
    );
    return rows.map((row): BriefingRecord => ({
      id: row.id,
      revision: row.revision,
      key: row.key,
      title: row.title,
      hazards: JSON.parse(row.hazards) as Hazard[],
      validityDays: row.validity_days,
      versions: (versions.get(row.id) ?? []).map((one) => ({
        version: one.version,
        kind: one.kind,
        effectiveFrom: one.effective_from,
        whatChanged: one.what_changed,
      })),
    }));
  },
  view: (record, audience) => (audience === 'projector' ? null : record),
};

/** Sign-offs: leads see all, everybody else their own. */
export const signOffsSource: LiveSource<'signOffs'> = {
  kind: 'signOffs',
  load: (db, installationId, filter) =>
    selectRows<RawSignOff>(db, 'sign_off', installationId, filter).map((row) => {
      const { attempts, ...signOff } = toSignOff(row);
      return { ...signOff, attempts: attempts.map(({ at, wrongIds }) => ({ at, wrongIds: [...wrongIds] })) };
    }),
  view: (record, audience) => (audience === 'leads' ? record : null),
  owner: (record) => record.personId,
};

interface RawStop {
  id: string;
  revision: number;
  scope: StopRecord['scope'];
  station_id: string | null;
  reason: string;
  raised_by: string;
  raised_at: number;
  lifted_by: string | null;
  lifted_at: number | null;
  lift_note: string | null;
}

/** Stops are for every screen there is: whoever stands at the door has to know too. They carry ids, never names. */
export const stopsSource: LiveSource<'stops'> = {
  kind: 'stops',
  load(db, installationId, filter) {
    const rows = selectRows<RawStop>(db, 'stop', installationId, filter);
    const seen = grouped(
      ofIds<{ stop_id: string; person_id: string }>(
        db,
        'SELECT stop_id, person_id FROM stop_seen WHERE stop_id IN (SELECT value FROM json_each(?)) ORDER BY at, rowid',
        rows,
      ),
      (row) => row.stop_id,
    );
    return rows.map((row): StopRecord => ({
      id: row.id,
      revision: row.revision,
      scope: row.scope,
      stationId: row.station_id,
      reason: row.reason,
      raisedBy: row.raised_by,
      raisedAt: row.raised_at,
      liftedBy: row.lifted_by,
      liftedAt: row.lifted_at,
      liftNote: row.lift_note,
      seenBy: (seen.get(row.id) ?? []).map((one) => one.person_id),
    }));
  },
  view: (record) => record,
};
