import type { Step, StepStateName } from '../../../shared/travellers';
import type { StepRecord } from '../../../shared/contracts/live';
import type { Hazard } from '../../../shared/safety';

/** A row of the table `step` as SQLite gives it. */
export interface RawStep {
  id: string;
  installation_id: string;
  sub_assembly_id: string;
  position: number;
  operation: string;
  name: string;
  station_id: string;
  hazards: string;
  tool_kinds: string;
  crew_min: number;
  crew_max: number;
  planned_seconds: number;
  clocks: string | null;
  needs_check: number;
  state: StepStateName;
  held: string | null;
  started_at: number | null;
  finished_at: number | null;
  finished_by: string | null;
  dry_until: number | null;
  passed_at: number | null;
  passed_by: string | null;
  rework: string | null;
  hand_over: string | null;
  flags: string;
  revision: number;
  removed_at: number | null;
}

/** A row of the table `claim`, as far as a step needs it. */
export interface RawClaim {
  step_id: string;
  person_id: string;
  claimed_at: number;
  ended_at: number | null;
}

const parsed = (json: string | null): unknown => (json === null ? null : JSON.parse(json));

/**
 * A step as the rules see it.
 * @param row the row
 * @param claims its claims, present and past, oldest first
 */
export function toStep(row: RawStep, claims: readonly RawClaim[]): Step {
  return {
    id: row.id,
    subAssemblyId: row.sub_assembly_id,
    position: row.position,
    operation: row.operation,
    name: row.name,
    stationId: row.station_id,
    hazards: JSON.parse(row.hazards) as Hazard[],
    toolKinds: JSON.parse(row.tool_kinds) as string[],
    crewMin: row.crew_min,
    crewMax: row.crew_max,
    plannedSeconds: row.planned_seconds,
    clocks: parsed(row.clocks) as Step['clocks'],
    needsCheck: row.needs_check === 1,
    state: row.state,
    held: parsed(row.held) as Step['held'],
    crew: claims
      .filter((claim) => claim.ended_at === null)
      .map((claim) => ({ personId: claim.person_id, claimedAt: claim.claimed_at })),
    doers: [...new Set(claims.map((claim) => claim.person_id))],
    startedAt: row.started_at,
    finishedAt: row.finished_at,
    finishedBy: row.finished_by,
    dryUntil: row.dry_until,
    passedAt: row.passed_at,
    passedBy: row.passed_by,
    rework: parsed(row.rework) as Step['rework'],
    handOver: parsed(row.hand_over) as Step['handOver'],
    flags: JSON.parse(row.flags) as string[],
  };
}

/** A step as the screens get it. */
export const toStepRecord = (row: RawStep, claims: readonly RawClaim[]): StepRecord => ({
  ...toStep(row, claims),
  revision: row.revision,
  removed: row.removed_at !== null,
});
