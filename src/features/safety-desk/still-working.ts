import type {
  BriefingRecord,
  SignOffRecord,
  StepRecord,
  SubAssemblyRecord,
} from '../../../shared/contracts/live';
import { voidingChange } from '../../../shared/safety/briefing-versions';
import { hazardGate, missingByHazard } from '../../../shared/safety/hazard-gate';
import { HAZARD_LABELS, type Hazard } from '../../../shared/safety/hazards';
import type { LiveState } from '../../lib/live-state';

/** Somebody of a crew who has no valid sign-off for a hazard of the step in hand. */
export interface Unsigned {
  personId: string;
  name: string;
  hazard: Hazard;
  /** What is missing. */
  reason: string;
  /** The version signed once that a change has ended since; null where there was none. */
  ended: { signed: number; now: number } | null;
}

/** A step in hand that some of its crew are not signed off for. */
export interface StepToLookAfter {
  step: StepRecord;
  piece: SubAssemblyRecord | undefined;
  crew: Unsigned[];
}

/**
 * Steps in hand whose crew is not signed off for one of their hazards: a change, a revocation or the end of a sign-off came
 * meanwhile. Nothing stops them; a lead looks after them.
 * @param now the server's time, ms UTC
 */
export function stepsToLookAfter(live: Pick<LiveState, 'records'>, now: number): StepToLookAfter[] {
  const { steps, subAssemblies, people } = live.records;
  const signOffs = [...live.records.signOffs.values()];
  const briefings = [...live.records.briefings.values()];
  const found: StepToLookAfter[] = [];
  for (const step of steps.values()) {
    if (step.removed || step.hazards.length === 0) continue;
    const crew = step.crew.flatMap(({ personId }): Unsigned[] => {
      const person = people.get(personId);
      const asked = { id: personId, ageConfirmed: person?.confirmed ?? false };
      const missing = missingByHazard(hazardGate(step.hazards, signOffs, briefings, now, asked));
      const hazard = step.hazards.find((one) => missing[one] !== undefined);
      if (!hazard) return [];
      const name = person?.name ?? 'somebody';
      const reason = missing[hazard] ?? '';
      return [{ personId, name, hazard, reason, ended: endedVersion(live, personId, hazard, now) }];
    });
    if (crew.length > 0) found.push({ step, piece: subAssemblies.get(step.subAssemblyId), crew });
  }
  return found.sort((a, b) => (a.piece?.code ?? '').localeCompare(b.piece?.code ?? ''));
}

function endedVersion(
  { records }: Pick<LiveState, 'records'>,
  personId: string,
  hazard: Hazard,
  now: number,
): Unsigned['ended'] {
  const briefings = [...records.briefings.values()].filter(({ hazards }) => hazards.includes(hazard));
  const held = [...records.signOffs.values()].filter(
    (signOff) =>
      signOff.personId === personId && signOff.countersignedAt !== null && signOff.revokedAt === null,
  );
  const pairs = held.flatMap((signOff): [SignOffRecord, BriefingRecord][] => {
    const briefing = briefings.find(({ key }) => key === signOff.briefingKey);
    return briefing ? [[signOff, briefing]] : [];
  });
  for (const [signOff, briefing] of pairs.sort(([a], [b]) => b.version - a.version)) {
    const change = voidingChange(briefing.versions, signOff.version, now);
    if (change) return { signed: signOff.version, now: change.version };
  }
  return null;
}

/** Where somebody stands who works without a sign-off that counts. */
export function stillWords({ hazard, reason, ended }: Unsigned): string {
  const version = ended ? `version ${ended.now}` : 'the briefing';
  switch (reason) {
    case 'VOIDED_BY_CHANGE':
      return `has not read ${version} yet`;
    case 'NOT_PASSED':
      return `has read ${version}, answers again`;
    case 'TALK_NEEDED':
      return `missed a question of ${version} twice: talk with them`;
    case 'NOT_SIGNED':
      return `has read ${version}, not signed`;
    case 'NOT_COUNTERSIGNED':
      return `has signed ${version}, waits for your countersign`;
    case 'REVOKED':
      return `${HAZARD_LABELS[hazard]} sign-off revoked`;
    case 'EXPIRED':
      return `${HAZARD_LABELS[hazard]} sign-off has ended`;
    case 'AGE_NOT_CONFIRMED':
      return 'the muster desk has not confirmed the age band';
    default:
      return `has no ${HAZARD_LABELS[hazard]} sign-off`;
  }
}
