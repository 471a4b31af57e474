import { DEFAULT_AGE_RULES } from '../../../shared/safety';
import type { PersonFacts, Step, World } from '../../../shared/travellers';

export const NOW = Date.UTC(2027, 5, 12, 13, 0);

/** A step that is ready, with nothing special about it. */
export const stepOf = (change: Partial<Step> = {}): Step => ({
  id: 's2',
  subAssemblyId: 'piece',
  position: 2,
  operation: 'tack',
  name: 'tack',
  stationId: 'glue',
  hazards: [],
  toolKinds: [],
  crewMin: 1,
  crewMax: 2,
  plannedSeconds: 600,
  clocks: null,
  needsCheck: false,
  state: 'ready',
  held: null,
  crew: [],
  doers: [],
  startedAt: null,
  finishedAt: null,
  finishedBy: null,
  dryUntil: null,
  passedAt: null,
  passedBy: null,
  rework: null,
  handOver: null,
  flags: [],
  ...change,
});

/** Somebody who may do what a bench lead may. */
export const personOf = (change: Partial<PersonFacts> = {}): PersonFacts => ({
  id: 'ann',
  confirmed: true,
  ageBand: '18+',
  duties: ['volunteer', 'bench lead'],
  inHand: 0,
  missing: {},
  ...change,
});

/** The step between an earlier one that has passed and a later one that waits. */
export function worldOf(step: Step, change: Partial<World> = {}): World {
  const before = stepOf({ id: 's1', position: 1, name: 'lay out', state: 'passed' });
  const after = stepOf({ id: 's3', position: 3, name: 'raise', state: 'waiting' });
  return {
    now: NOW,
    step,
    traveller: [before, step, after],
    station: [],
    person: personOf(),
    stops: [],
    settings: { maxInHand: 2, ageRules: DEFAULT_AGE_RULES },
    ...change,
  };
}

/** Whoever works on the step. */
export const inHand = (by: readonly string[], change: Partial<Step> = {}): Step =>
  stepOf({
    state: 'in hand',
    crew: by.map((personId) => ({ personId, claimedAt: NOW - 600_000 })),
    doers: [...by],
    startedAt: NOW - 500_000,
    ...change,
  });
