import { selectRows, type LiveSource } from '../../realtime/live-source';

interface RawPiece {
  id: string;
  frame_id: string;
  code: string;
  name: string;
  position: number;
  kind: 'piece' | 'field joint';
  needs: string;
  traveller_revision: number;
  revision: number;
  removed_at: number | null;
}

/** The pieces; whoever waits at the door sees none. */
export const subAssembliesSource: LiveSource<'subAssemblies'> = {
  kind: 'subAssemblies',
  load: (db, installationId, filter) =>
    selectRows<RawPiece>(db, 'sub_assembly', installationId, filter).map((row) => ({
      id: row.id,
      revision: row.revision,
      frameId: row.frame_id,
      code: row.code,
      name: row.name,
      position: row.position,
      kind: row.kind,
      needs: JSON.parse(row.needs) as string[],
      travellerRevision: row.traveller_revision,
      removed: row.removed_at !== null,
    })),
  view: (record, audience) => (audience === 'door' ? null : record),
};
