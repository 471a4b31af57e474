import {
  LIVE_KINDS,
  type Audience,
  type Changed,
  type LiveCollections,
  type LiveKind,
  type RangeMessage,
  type Snapshot,
} from '../../shared/contracts/live';

export type LiveMaps = { readonly [K in LiveKind]: ReadonlyMap<string, LiveCollections[K]> };

/** What this browser knows of an installation. */
export interface LiveState {
  /** Everything up to this revision is in the records. Only the live path moves it. */
  cursor: number;
  audience: Audience;
  records: LiveMaps;
}

/** The state a snapshot gives. */
export function fromSnapshot(snapshot: Snapshot): LiveState {
  const records = Object.fromEntries(
    LIVE_KINDS.map((kind) => [kind, new Map(snapshot.records[kind].map((record) => [record.id, record]))]),
  ) as unknown as LiveMaps;
  return { cursor: snapshot.revision, audience: snapshot.audience, records };
}

/**
 * Lay changed records over the state; the newer revision of each wins, whatever the order in which they come.
 * @returns the same state when nothing was newer; collections without a change keep their identity
 */
export function withRecords(state: LiveState, changed: Changed): LiveState {
  const records: Record<string, ReadonlyMap<string, unknown>> = {};
  for (const kind of LIVE_KINDS) {
    const incoming = changed[kind];
    if (!incoming) continue;
    const known = state.records[kind] as ReadonlyMap<string, LiveCollections[LiveKind]>;
    const newer = incoming.filter((record) => record.revision > (known.get(record.id)?.revision ?? -1));
    if (newer.length === 0) continue;
    const next = new Map(known);
    for (const record of newer) next.set(record.id, record);
    records[kind] = next;
  }
  if (Object.keys(records).length === 0) return state;
  return { ...state, records: { ...state.records, ...records } };
}

/**
 * Apply one range message.
 * @returns the new state, or `gap` when something before it is missing and has to be caught up first
 */
export function withRange(state: LiveState, message: RangeMessage): LiveState | 'gap' {
  if (message.from > state.cursor) return 'gap';
  const next = withRecords(state, message.changed);
  return message.to > next.cursor ? { ...next, cursor: message.to } : next;
}
