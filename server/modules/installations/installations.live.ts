import type { BuildDayRecord } from '../../../shared/contracts/live';
import { prepared, selectRows, type AnyLiveSource, type LiveSource } from '../../realtime/live-source';
import { toInstallationRecord, type InstallationRow } from './installations.repository';

/** Everybody who is in, even at the door, sees what is built, when and where. */
const seenByAll = <T>(record: T): T => record;

const installation: LiveSource<'installation'> = {
  kind: 'installation',
  load(db, installationId, filter) {
    // The row's own revision: `revision` moves with every change of anything in the installation.
    const since = 'since' in filter ? filter.since : -1;
    if ('ids' in filter && !filter.ids.includes(installationId)) return [];
    return prepared<InstallationRow>(db, 'SELECT * FROM installation WHERE id = ? AND own_revision > ?')
      .all(installationId, since)
      .map(toInstallationRecord);
  },
  view: seenByAll,
};

interface RawBuildDay {
  id: string;
  revision: number;
  date: string;
  doors: string;
  start: string;
  clear_up: string;
  end: string;
  breaks: string;
  removed_at: number | null;
}

const buildDays: LiveSource<'buildDays'> = {
  kind: 'buildDays',
  load: (db, installationId, filter) =>
    selectRows<RawBuildDay>(db, 'build_day', installationId, filter).map((row) => ({
      id: row.id,
      revision: row.revision,
      date: row.date,
      doors: row.doors,
      start: row.start,
      clearUp: row.clear_up,
      end: row.end,
      breaks: JSON.parse(row.breaks) as BuildDayRecord['breaks'],
      removed: row.removed_at !== null,
    })),
  view: seenByAll,
};

interface RawStation {
  id: string;
  revision: number;
  name: string;
  kind: string;
  places: number;
  position: number;
  removed_at: number | null;
}

const stations: LiveSource<'stations'> = {
  kind: 'stations',
  load: (db, installationId, filter) =>
    selectRows<RawStation>(db, 'station', installationId, filter).map((row) => ({
      id: row.id,
      revision: row.revision,
      name: row.name,
      kind: row.kind,
      places: row.places,
      position: row.position,
      removed: row.removed_at !== null,
    })),
  view: seenByAll,
};

export const installationsLive: AnyLiveSource[] = [installation, buildDays, stations];
