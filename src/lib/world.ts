import type { InstallationRecord, PersonRecord, StepRecord } from '../../shared/contracts/live';
import { tightenAgeRules } from '../../shared/safety/age-rules';
import { DEFAULT_AGE_RULES, type AgeRules } from '../../shared/safety/age-table';
import { hazardGate, missingByHazard } from '../../shared/safety/hazard-gate';
import { HAZARDS } from '../../shared/safety/hazards';
import type { StopScope } from '../../shared/safety/stop';
import type { PersonFacts, World } from '../../shared/travellers/gates';
import { subAssemblyState, type Step } from '../../shared/travellers/step';
import type { LiveMaps, LiveState } from './live-state';

type Records = Pick<LiveState, 'records'>;

/** Something derived from one object, derived again only for another one. */
function derived<K extends object, V>(derive: (from: K) => V): (from: K) => V {
  const known = new WeakMap<K, V>();
  return (from) => {
    const found = known.get(from);
    if (found !== undefined) return found;
    const made = derive(from);
    known.set(from, made);
    return made;
  };
}

interface StepLists {
  ofPiece: ReadonlyMap<string, readonly StepRecord[]>;
  dryingAt: ReadonlyMap<string, readonly StepRecord[]>;
  inHand: ReadonlyMap<string, number>;
}

function put<K, V>(lists: Map<K, V[]>, key: K, value: V): void {
  const list = lists.get(key);
  if (list) list.push(value);
  else lists.set(key, [value]);
}

/** A collection keeps its identity until something in it changes, so a board of hundreds of rows sorts it once. */
const listsOf = derived((steps: LiveMaps['steps']): StepLists => {
  const ofPiece = new Map<string, StepRecord[]>();
  const dryingAt = new Map<string, StepRecord[]>();
  const inHand = new Map<string, number>();
  for (const step of steps.values()) {
    if (step.removed) continue;
    put(ofPiece, step.subAssemblyId, step);
    if (step.state === 'drying') put(dryingAt, step.stationId, step);
    for (const { personId } of step.crew) inHand.set(personId, (inHand.get(personId) ?? 0) + 1);
  }
  for (const list of ofPiece.values()) list.sort((a, b) => a.position - b.position);
  return { ofPiece, dryingAt, inHand };
});

const raisedStops = derived((stops: LiveMaps['stops']): readonly StopScope[] =>
  [...stops.values()].filter((stop) => stop.liftedAt === null),
);

const ageRulesOf = derived((installation: InstallationRecord): AgeRules => {
  const tightened = tightenAgeRules(DEFAULT_AGE_RULES, installation.settings.ageChanges);
  // A table this page cannot read is refused by the server anyway; until then the defaults stand.
  return tightened.ok ? tightened.value : DEFAULT_AGE_RULES;
});

/** The steps of a traveller in order of position; what was taken out of the plan is left out. */
export const travellerSteps = (steps: LiveMaps['steps'], subAssemblyId: string): readonly StepRecord[] =>
  listsOf(steps).ofPiece.get(subAssemblyId) ?? NO_STEPS;

const NO_STEPS: readonly StepRecord[] = [];

/** What a person lacks may end by the mere passing of time: a minute is close enough for a screen. */
const MISSING_MS = 60_000;
interface KnownMissing {
  signOffs: LiveMaps['signOffs'];
  briefings: LiveMaps['briefings'];
  minute: number;
  missing: PersonFacts['missing'];
}
const missingOf = new WeakMap<PersonRecord, KnownMissing>();

function missingFor({ records }: Records, person: PersonRecord, now: number): PersonFacts['missing'] {
  const { signOffs, briefings } = records;
  const minute = Math.floor(now / MISSING_MS);
  const known = missingOf.get(person);
  if (known?.signOffs === signOffs && known.briefings === briefings && known.minute === minute)
    return known.missing;
  const missing = missingByHazard(
    hazardGate(HAZARDS, [...signOffs.values()], [...briefings.values()], now, {
      id: person.id,
      ageConfirmed: person.confirmed,
    }),
  );
  missingOf.set(person, { signOffs, briefings, minute, missing });
  return missing;
}

/** Codes of the pieces that a field joint still waits for. */
function missingPieces({ records }: Records, subAssemblyId: string): string[] {
  const needs = records.subAssemblies.get(subAssemblyId)?.needs ?? [];
  return needs
    .filter((id) => subAssemblyState(travellerSteps(records.steps, id)) !== 'passed')
    .map((id) => records.subAssemblies.get(id)?.code ?? id);
}

/** Somebody the live state does not know may do nothing. */
const NOBODY = { confirmed: false, ageBand: 'under-9', duties: [], missing: {} } as const;

/**
 * A person as the rules see them.
 * @param live the live state of the installation
 * @param now the server's time, ms UTC
 */
export function personFacts(live: Records, personId: string, now: number): PersonFacts {
  const person = live.records.people.get(personId);
  const inHand = listsOf(live.records.steps).inHand.get(personId) ?? 0;
  if (!person || person.removed) return { id: personId, ...NOBODY, inHand };
  return {
    id: personId,
    confirmed: person.confirmed && person.onSite,
    // Others' bands are the desk's matter. Where the live state does not say, the server's answer is the one that counts.
    ageBand: person.details?.ageBand ?? '18+',
    duties: person.duties,
    inHand,
    missing: missingFor(live, person, now),
  };
}

/** What holds for everybody in the hall: the stops that are raised, and the age table as the organiser tightened it. */
export function houseRules({ records }: Records): { stops: readonly StopScope[]; ageRules: AgeRules } {
  const [installation] = records.installation.values();
  return {
    stops: raisedStops(records.stops),
    ageRules: installation ? ageRulesOf(installation) : DEFAULT_AGE_RULES,
  };
}

/**
 * Everything the step rules look at, for one person and one step, from the live state: the same world the server builds,
 * as far as this audience may see it.
 * @param live the live state of the installation
 * @param personId who asks
 * @param step one step of the live state
 * @param now the server's time, ms UTC
 * @returns the world for `decide`, `mayClaim` and `bench`
 */
export function worldOf(live: Records, personId: string, step: Step, now: number): World {
  const { records } = live;
  const lists = listsOf(records.steps);
  const [installation] = records.installation.values();
  const { stops, ageRules } = houseRules(live);
  return {
    now,
    step,
    traveller: lists.ofPiece.get(step.subAssemblyId) ?? [step],
    missingPieces: missingPieces(live, step.subAssemblyId),
    station: lists.dryingAt.get(step.stationId) ?? [],
    person: personFacts(live, personId, now),
    stops,
    settings: { maxInHand: installation?.settings.maxInHand ?? 0, ageRules },
  };
}
