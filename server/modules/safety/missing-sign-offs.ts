import type { EntityManager } from 'typeorm';
import {
  HAZARDS,
  hazardGate,
  missingByHazard,
  type BriefingWithVersions,
  type Hazard,
  type StopScope,
  type VersionFacts,
} from '../../../shared/safety';
import type { WorkInHand } from '../../../shared/contracts/safety';
import { SIGN_OFF_COLUMNS, toSignOff, type RawSignOff } from './safety.repository';

interface RawVersion {
  key: string;
  title: string;
  hazards: string;
  version: number;
  kind: VersionFacts['kind'];
  effective_from: number;
}

/** Every briefing of an installation with its published versions, oldest first. */
async function loadBriefings(
  manager: EntityManager,
  installationId: string,
): Promise<BriefingWithVersions[]> {
  const rows = await manager.query<RawVersion[]>(
    `SELECT briefing.key, briefing.title, briefing.hazards, v.version, v.kind, v.effective_from
     FROM briefing JOIN briefing_version AS v ON v.briefing_id = briefing.id
     WHERE briefing.installation_id = ? AND v.status = 'published' ORDER BY briefing.key, v.version`,
    [installationId],
  );
  const briefings = new Map<string, BriefingWithVersions & { versions: VersionFacts[] }>();
  for (const { key, title, hazards, version, kind, effective_from: effectiveFrom } of rows) {
    const briefing = briefings.get(key) ?? {
      key,
      title,
      hazards: JSON.parse(hazards) as Hazard[],
      versions: [],
    };
    briefing.versions.push({ version, kind, effectiveFrom });
    briefings.set(key, briefing);
  }
  return [...briefings.values()];
}

type RawOwn = { [K in keyof RawSignOff]: RawSignOff[K] | null } & { confirmed_at: number | null };

async function missingWith(
  manager: EntityManager,
  installationId: string,
  personId: string,
  now: number,
  briefings: readonly BriefingWithVersions[],
): Promise<Partial<Record<Hazard, string>>> {
  const rows = await manager.query<RawOwn[]>(
    `SELECT person.confirmed_at, own.* FROM person
     LEFT JOIN (SELECT rowid AS begun, ${SIGN_OFF_COLUMNS} FROM sign_off WHERE person_id = ? AND installation_id = ?) AS own
       ON own.person_id = person.id
     WHERE person.id = ? AND person.installation_id = ? ORDER BY own.begun`,
    [personId, installationId, personId, installationId],
  );
  const signOffs = rows.filter((row) => row.id !== null).map((row) => toSignOff(row as RawSignOff));
  const person = { id: personId, ageConfirmed: (rows[0]?.confirmed_at ?? null) !== null };
  return missingByHazard(hazardGate(HAZARDS, signOffs, briefings, now, person));
}

/**
 * For which hazards a person has no valid sign-off, and the first thing that is missing; two queries.
 * @param manager of the use case that asks, so that it reads what that use case wrote
 * @param now ms UTC at which it has to hold
 * @returns the reason by hazard; hazards with a valid sign-off are absent, so an unknown person lacks all
 */
export async function missingSignOffs(
  manager: EntityManager,
  installationId: string,
  personId: string,
  now: number,
): Promise<Partial<Record<Hazard, string>>> {
  const briefings = await loadBriefings(manager, installationId);
  return missingWith(manager, installationId, personId, now, briefings);
}

/** A raised stop, as the rules and the words of a refusal need it. */
interface ActiveStop extends StopScope {
  stopId: string;
  raisedBy: string;
  raisedAt: number;
}

/** Stops that are raised and not lifted, oldest first; one query. */
export async function activeStops(manager: EntityManager, installationId: string): Promise<ActiveStop[]> {
  const rows = await manager.query<
    {
      id: string;
      scope: StopScope['scope'];
      station_id: string | null;
      raised_by: string;
      raised_at: number;
    }[]
  >(
    `SELECT id, scope, station_id, raised_by, raised_at FROM stop
     WHERE installation_id = ? AND lifted_at IS NULL ORDER BY raised_at, id`,
    [installationId],
  );
  return rows.map((row) => ({
    scope: row.scope,
    stationId: row.station_id,
    stopId: row.id,
    raisedBy: row.raised_by,
    raisedAt: row.raised_at,
  }));
}

/**
 * Places in hand whose holder has no valid sign-off for a hazard of the step at some moment. Nothing is stopped: a lead
 * is told.
 * @param hazards only steps with one of these are looked at
 * @param at ms UTC
 * @param personId only this person's places
 */
export async function workInHandWithout(
  manager: EntityManager,
  installationId: string,
  hazards: readonly Hazard[],
  at: number,
  personId?: string,
): Promise<WorkInHand[]> {
  const rows = await manager.query<{ step_id: string; person_id: string; hazards: string }[]>(
    `SELECT claim.step_id, claim.person_id, step.hazards FROM claim JOIN step ON step.id = claim.step_id
     WHERE claim.installation_id = ? AND claim.ended_at IS NULL AND step.removed_at IS NULL
       AND (? IS NULL OR claim.person_id = ?) ORDER BY claim.claimed_at, claim.id`,
    [installationId, personId ?? null, personId ?? null],
  );
  const briefings = await loadBriefings(manager, installationId);
  const missingOf = new Map<string, Partial<Record<Hazard, string>>>();
  const list: WorkInHand[] = [];
  for (const row of rows) {
    const asked = (JSON.parse(row.hazards) as Hazard[]).filter((hazard) => hazards.includes(hazard));
    if (asked.length === 0) continue;
    const missing =
      missingOf.get(row.person_id) ??
      (await missingWith(manager, installationId, row.person_id, at, briefings));
    missingOf.set(row.person_id, missing);
    const lost = asked.filter((hazard) => missing[hazard] !== undefined);
    if (lost.length > 0) list.push({ stepId: row.step_id, personId: row.person_id, hazards: lost });
  }
  return list;
}
