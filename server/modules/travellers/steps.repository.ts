import type { EntityManager } from 'typeorm';
import { newId } from '../../../shared/kernel/ids';
import type { AgeBand } from '../../../shared/safety';
import type { Duty } from '../../../shared/accounts';
import type { Step } from '../../../shared/travellers';
import { toStep, type RawClaim, type RawStep } from './steps.rows';

const CLAIMS =
  'SELECT step_id, person_id, claimed_at, ended_at FROM claim WHERE step_id IN (SELECT value FROM json_each(?)) ORDER BY claimed_at, id';

/** Loaded steps with the revision each row had, for the conditional update. */
export interface LoadedSteps {
  steps: Step[];
  revisions: Map<string, number>;
}

async function withClaims(manager: EntityManager, rows: readonly RawStep[]): Promise<LoadedSteps> {
  const claims =
    rows.length === 0
      ? []
      : await manager.query<RawClaim[]>(CLAIMS, [JSON.stringify(rows.map((row) => row.id))]);
  const ofStep = new Map<string, RawClaim[]>();
  for (const claim of claims) ofStep.set(claim.step_id, [...(ofStep.get(claim.step_id) ?? []), claim]);
  return {
    steps: rows.map((row) => toStep(row, ofStep.get(row.id) ?? [])),
    revisions: new Map(rows.map((row) => [row.id, row.revision])),
  };
}

/** The traveller that holds a step, in order; empty when the step is not of this installation. */
export async function loadTraveller(
  manager: EntityManager,
  installationId: string,
  stepId: string,
): Promise<LoadedSteps> {
  const rows = await manager.query<RawStep[]>(
    `SELECT other.* FROM step JOIN step AS other ON other.sub_assembly_id = step.sub_assembly_id
     WHERE step.id = ? AND step.installation_id = ? AND step.removed_at IS NULL AND other.removed_at IS NULL
     ORDER BY other.position`,
    [stepId, installationId],
  );
  return withClaims(manager, rows);
}

/** What a field joint waits for: the sub-assemblies it needs with their codes, and whether each has passed. */
export async function loadNeeds(
  manager: EntityManager,
  subAssemblyId: string,
): Promise<{ id: string; code: string; passed: boolean }[]> {
  const rows = await manager.query<{ id: string; code: string; passed: number }[]>(
    `SELECT piece.id, piece.code, ${PASSED} AS passed
     FROM sub_assembly, json_each(sub_assembly.needs) AS need JOIN sub_assembly AS piece ON piece.id = need.value
     WHERE sub_assembly.id = ? ORDER BY piece.code`,
    [subAssemblyId],
  );
  return rows.map((row) => ({ ...row, passed: row.passed === 1 }));
}

/** Whether all steps of `piece` have passed, and it has some. */
const PASSED = `(SELECT count(*) > 0 AND sum(step.state <> 'passed') = 0 FROM step
  WHERE step.sub_assembly_id = piece.id AND step.removed_at IS NULL)`;

/** Field joints that need a piece, each with its steps and what it needs. */
export async function loadFieldJointsOf(
  manager: EntityManager,
  installationId: string,
  pieceId: string,
): Promise<{ needs: { id: string; passed: boolean }[]; steps: LoadedSteps }[]> {
  const rows = await manager.query<{ id: string }[]>(
    `SELECT id FROM sub_assembly WHERE installation_id = ? AND kind = 'field joint' AND removed_at IS NULL
       AND EXISTS (SELECT 1 FROM json_each(needs) WHERE value = ?) ORDER BY position, id`,
    [installationId, pieceId],
  );
  const joints: { needs: { id: string; passed: boolean }[]; steps: LoadedSteps }[] = [];
  for (const { id } of rows) {
    const steps = await manager.query<RawStep[]>(
      'SELECT * FROM step WHERE sub_assembly_id = ? AND removed_at IS NULL ORDER BY position',
      [id],
    );
    joints.push({ needs: await loadNeeds(manager, id), steps: await withClaims(manager, steps) });
  }
  return joints;
}

/** Steps that dry at a station. */
export async function loadDryingAt(
  manager: EntityManager,
  installationId: string,
  stationId: string,
): Promise<LoadedSteps> {
  const rows = await manager.query<RawStep[]>(
    `SELECT * FROM step WHERE installation_id = ? AND station_id = ? AND state = 'drying' AND removed_at IS NULL`,
    [installationId, stationId],
  );
  return withClaims(manager, rows);
}

/** Steps whose drying clock has run out, of all open installations. */
export function dueDrying(
  manager: EntityManager,
  now: number,
): Promise<{ id: string; installation_id: string }[]> {
  return manager.query(
    `SELECT step.id, step.installation_id FROM step JOIN installation ON installation.id = step.installation_id
     WHERE step.state = 'drying' AND step.dry_until <= ? AND step.removed_at IS NULL AND installation.status <> 'closed'`,
    [now],
  );
}

export interface RawPerson {
  id: string;
  age_band: AgeBand;
  duties: Duty[];
  confirmed: boolean;
  inHand: number;
}

/** The person who asks, with how many steps they have in hand. */
export async function loadPerson(
  manager: EntityManager,
  installationId: string,
  personId: string,
): Promise<RawPerson | null> {
  const rows = await manager.query<
    { id: string; age_band: AgeBand; duties: string; confirmed: number; in_hand: number }[]
  >(
    `SELECT id, age_band, duties, confirmed_at IS NOT NULL AND left_at IS NULL AS confirmed,
            (SELECT count(*) FROM claim WHERE claim.person_id = person.id AND claim.ended_at IS NULL) AS in_hand
     FROM person WHERE id = ? AND installation_id = ? AND removed_at IS NULL`,
    [personId, installationId],
  );
  const row = rows[0];
  if (!row) return null;
  return {
    id: row.id,
    age_band: row.age_band,
    duties: JSON.parse(row.duties) as Duty[],
    confirmed: row.confirmed === 1,
    inHand: row.in_hand,
  };
}

/**
 * Write a changed step: its row on condition that nobody wrote it since it was read, and its claims.
 * @returns false when the row had changed: the caller was too late
 */
export async function saveStep(
  manager: EntityManager,
  installationId: string,
  before: Step,
  after: Step,
  revisions: { read: number; next: number },
  event: string,
  now: number,
): Promise<boolean> {
  const updated = await manager.query<{ id: string }[]>(
    `UPDATE step SET state = ?, held = ?, started_at = ?, finished_at = ?, finished_by = ?, dry_until = ?,
       passed_at = ?, passed_by = ?, rework = ?, hand_over = ?, flags = ?, revision = ?
     WHERE id = ? AND revision = ? RETURNING id`,
    [
      after.state,
      json(after.held),
      after.startedAt,
      after.finishedAt,
      after.finishedBy,
      after.dryUntil,
      after.passedAt,
      after.passedBy,
      json(after.rework),
      json(after.handOver),
      JSON.stringify(after.flags),
      revisions.next,
      after.id,
      revisions.read,
    ],
  );
  if (updated.length !== 1) return false;
  const still = new Set(after.crew.map((member) => member.personId));
  const had = new Set(before.crew.map((member) => member.personId));
  for (const member of before.crew) {
    if (still.has(member.personId)) continue;
    await manager.query(
      'UPDATE claim SET ended_at = ?, ended_by = ? WHERE step_id = ? AND person_id = ? AND ended_at IS NULL',
      [now, event, after.id, member.personId],
    );
  }
  for (const member of after.crew) {
    if (!had.has(member.personId))
      await insertClaim(manager, installationId, after.id, member.personId, member.claimedAt, null);
  }
  // Doers typed in from paper never held a place here; they did the work all the same.
  for (const personId of after.doers) {
    if (before.doers.includes(personId) || still.has(personId)) continue;
    await insertClaim(manager, installationId, after.id, personId, after.finishedAt ?? now, event);
  }
  return true;
}

function insertClaim(
  manager: EntityManager,
  installationId: string,
  stepId: string,
  personId: string,
  at: number,
  endedBy: string | null,
): Promise<unknown> {
  return manager.query(
    `INSERT INTO claim (id, installation_id, step_id, person_id, claimed_at, ended_at, ended_by) VALUES (?, ?, ?, ?, ?, ?, ?)`,
    [newId(), installationId, stepId, personId, at, endedBy === null ? null : at, endedBy],
  );
}

const json = (value: unknown): string | null => (value === null ? null : JSON.stringify(value));

/** Settings of an installation and whether it still takes changes. */
export async function loadSettings(
  manager: EntityManager,
  installationId: string,
): Promise<{ status: string; settings: string } | null> {
  const rows = await manager.query<{ status: string; settings: string }[]>(
    'SELECT status, settings FROM installation WHERE id = ?',
    [installationId],
  );
  return rows[0] ?? null;
}

/** Steps on which a person holds a place or to whom one is offered. */
export function stepsOfPerson(
  manager: EntityManager,
  installationId: string,
  personId: string,
): Promise<{ step_id: string }[]> {
  return manager.query(
    `SELECT step_id FROM claim WHERE installation_id = ? AND person_id = ? AND ended_at IS NULL ORDER BY claimed_at`,
    [installationId, personId],
  );
}
