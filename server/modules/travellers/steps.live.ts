import type Database from 'better-sqlite3';
import { prepared, selectRows, type LiveFilter, type LiveSource } from '../../realtime/live-source';
import { toStepRecord, type RawClaim, type RawStep } from './steps.rows';

const CLAIMS_OF_ALL =
  'SELECT step_id, person_id, claimed_at, ended_at FROM claim WHERE installation_id = ? ORDER BY claimed_at, id';
const CLAIMS_OF_SOME =
  'SELECT step_id, person_id, claimed_at, ended_at FROM claim WHERE step_id IN (SELECT value FROM json_each(?)) ORDER BY claimed_at, id';

function claimsOf(
  db: Database.Database,
  installationId: string,
  rows: readonly RawStep[],
  filter: LiveFilter,
): Map<string, RawClaim[]> {
  const all = 'since' in filter && filter.since < 0;
  const claims = all
    ? prepared<RawClaim>(db, CLAIMS_OF_ALL).all(installationId)
    : prepared<RawClaim>(db, CLAIMS_OF_SOME).all(JSON.stringify(rows.map((row) => row.id)));
  const ofStep = new Map<string, RawClaim[]>();
  for (const claim of claims) {
    const known = ofStep.get(claim.step_id);
    if (known) known.push(claim);
    else ofStep.set(claim.step_id, [claim]);
  }
  return ofStep;
}

/** The steps of all travellers; whoever waits at the door sees none. */
export const stepsSource: LiveSource<'steps'> = {
  kind: 'steps',
  load(db, installationId, filter) {
    const rows = selectRows<RawStep>(db, 'step', installationId, filter);
    const claims = claimsOf(db, installationId, rows, filter);
    return rows.map((row) => toStepRecord(row, claims.get(row.id) ?? []));
  },
  view: (record, audience) => (audience === 'door' ? null : record),
};
