import type Database from 'better-sqlite3';
import {
  LIVE_KINDS,
  type Audience,
  type CatchUp,
  type Changed,
  type LiveCollections,
  type LiveKind,
  type Snapshot,
} from '../../shared/contracts/live';
import type { Clock } from '../../shared/kernel/clock';
import type { AnyLiveSource, LiveFilter, LiveSource } from './live-source';

type Whole = { [K in LiveKind]?: LiveCollections[K][] };

/** Who looks: the audience, and the person whose own records come along. */
export interface Viewer {
  audience: Audience;
  personId: string | null;
}

/** Above this many records a catch-up costs more than a snapshot. */
const RESET_ABOVE = 1500;

/** Reads live records consistently: everything one answer needs in one synchronous read transaction. */
export class LiveReader {
  private readonly sources: Map<LiveKind, AnyLiveSource>;
  private readonly revision;

  constructor(
    private readonly db: Database.Database,
    sources: readonly AnyLiveSource[],
    private readonly clock: Clock,
  ) {
    this.sources = new Map(sources.map((source) => [source.kind, source]));
    this.revision = db.prepare<[string], { revision: number }>(
      'SELECT revision FROM installation WHERE id = ?',
    );
  }

  /** The installation's revision now, or null when there is no such installation. */
  revisionOf(installationId: string): number | null {
    return this.revision.get(installationId)?.revision ?? null;
  }

  /** The whole state as a viewer may see it. */
  snapshot(installationId: string, viewer: Viewer): Snapshot {
    return this.db.transaction(() => {
      const whole = this.load(installationId, LIVE_KINDS, { since: -1 });
      const seen = this.seenBy(whole, viewer);
      const records = Object.fromEntries(
        LIVE_KINDS.map((kind) => [kind, seen[kind] ?? []]),
      ) as Snapshot['records'];
      return {
        revision: this.revisionOf(installationId) ?? 0,
        audience: viewer.audience,
        now: this.clock.now(),
        clockRate: this.clock.rate,
        records,
      };
    })();
  }

  /** What a viewer missed since a revision; the whole state when that is too much or from another database. */
  catchUp(installationId: string, since: number | null, viewer: Viewer): CatchUp {
    if (since === null) return { reset: true, snapshot: this.snapshot(installationId, viewer) };
    return this.db.transaction((): CatchUp => {
      const to = this.revisionOf(installationId) ?? 0;
      if (since > to) return { reset: true, snapshot: this.snapshot(installationId, viewer) };
      const whole = this.load(installationId, LIVE_KINDS, { since });
      const count = Object.values(whole).reduce((sum, records) => sum + records.length, 0);
      if (count > RESET_ABOVE) return { reset: true, snapshot: this.snapshot(installationId, viewer) };
      return {
        reset: false,
        from: since,
        to,
        changed: this.seenBy(whole, viewer),
        now: this.clock.now(),
        clockRate: this.clock.rate,
      };
    })();
  }

  /** Changed records, whole, for the publisher. */
  changedRecords(installationId: string, ids: ReadonlyMap<LiveKind, ReadonlySet<string>>): Whole {
    return this.db.transaction(() => {
      const whole: Whole = {};
      for (const [kind, wanted] of ids)
        Object.assign(whole, this.load(installationId, [kind], { ids: [...wanted] }));
      return whole;
    })();
  }

  /** What an audience may see of some records; own records of a person are added when the viewer is one. */
  seenBy(whole: Whole, viewer: Viewer): Changed {
    const seen: Changed = {};
    for (const kind of LIVE_KINDS) {
      const records = whole[kind];
      const source = this.sources.get(kind);
      if (!records || !source) continue;
      const visible = viewOf(source, records, viewer);
      if (visible.length > 0) Object.assign(seen, { [kind]: visible });
    }
    return seen;
  }

  /** Records by the person who owns them, for audiences that do not see them anyway. */
  ownRecords(whole: Whole): Map<string, Changed> {
    const byPerson = new Map<string, Changed>();
    for (const kind of LIVE_KINDS) {
      const source = this.sources.get(kind) as LiveSource<LiveKind> | undefined;
      for (const record of whole[kind] ?? []) {
        const owner = source?.owner?.(record);
        if (!owner) continue;
        const own = byPerson.get(owner) ?? {};
        Object.assign(own, { [kind]: [...(own[kind] ?? []), record] });
        byPerson.set(owner, own);
      }
    }
    return byPerson;
  }

  private load(installationId: string, kinds: readonly LiveKind[], filter: LiveFilter): Whole {
    const whole: Whole = {};
    for (const kind of kinds) {
      const source = this.sources.get(kind);
      const records = source?.load(this.db, installationId, filter) ?? [];
      if (records.length > 0) Object.assign(whole, { [kind]: records });
    }
    return whole;
  }
}

function viewOf(source: AnyLiveSource, records: readonly unknown[], viewer: Viewer): unknown[] {
  const any = source as LiveSource<LiveKind>;
  const visible: unknown[] = [];
  for (const record of records as LiveCollections[LiveKind][]) {
    const own = viewer.personId !== null && any.owner?.(record) === viewer.personId;
    const view = own ? record : any.view(record, viewer.audience);
    if (view) visible.push(view);
  }
  return visible;
}
