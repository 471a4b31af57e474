import type { CheckoutRecord, ToolRecord } from '../../../shared/contracts/live';
import { selectRows, type AnyLiveSource, type LiveSource } from '../../realtime/live-source';

interface RawTool {
  id: string;
  number: string;
  name: string;
  kind: string;
  hazard: ToolRecord['hazard'];
  traits: string;
  condition: string;
  tag: string | null;
  revision: number;
  removed_at: number | null;
}

interface RawCheckout {
  id: string;
  tool_id: string;
  person_id: string;
  station_id: string | null;
  out_at: number;
  back_by: number;
  back_at: number | null;
  condition_back: string | null;
  revision: number;
}

/** The tools; the door and the projector see none. */
const tools: LiveSource<'tools'> = {
  kind: 'tools',
  load: (db, installationId, filter) =>
    selectRows<RawTool>(db, 'tool', installationId, filter).map((row) => ({
      id: row.id,
      revision: row.revision,
      number: row.number,
      name: row.name,
      kind: row.kind,
      hazard: row.hazard,
      traits: JSON.parse(row.traits) as ToolRecord['traits'],
      condition: row.condition,
      tag: row.tag === null ? null : (JSON.parse(row.tag) as ToolRecord['tag']),
      removed: row.removed_at !== null,
    })),
  view: (record, audience) => (audience === 'door' || audience === 'projector' ? null : record),
};

/** Who has which tool; the projector counts them, the door sees none. */
const checkouts: LiveSource<'checkouts'> = {
  kind: 'checkouts',
  load: (db, installationId, filter) =>
    selectRows<RawCheckout>(db, 'checkout', installationId, filter).map((row): CheckoutRecord => ({
      id: row.id,
      revision: row.revision,
      toolId: row.tool_id,
      personId: row.person_id,
      stationId: row.station_id,
      outAt: row.out_at,
      backBy: row.back_by,
      backAt: row.back_at,
      conditionBack: row.condition_back,
    })),
  view: (record, audience) => {
    if (audience === 'door') return null;
    return audience === 'projector' ? { ...record, conditionBack: null } : record;
  },
};

export const cribLive: AnyLiveSource[] = [tools, checkouts];
