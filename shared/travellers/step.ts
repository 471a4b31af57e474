import type { Hazard } from '../safety';

/** The eight states of a step; `held` is a mark on top that remembers the state under it. */
export const STEP_STATES = [
  'waiting',
  'ready',
  'in hand',
  'drying',
  'to check',
  'passed',
  'rework',
  'held',
] as const;
export type ShownState = (typeof STEP_STATES)[number];
/** What is stored: every state but `held`. */
export type StepStateName = Exclude<ShownState, 'held'>;

/** What a step is, so that clocks and drawings know it whatever it is called. */
export const OPERATIONS = [
  'cut',
  'lay out',
  'tack',
  'raise',
  'glue out',
  'clean',
  'coat',
  'check',
  'hang',
  'other',
] as const;
export type Operation = (typeof OPERATIONS)[number];

/** Clocks of a coat in seconds from the finish, each from the paint's data sheet. */
export interface Clocks {
  touchDry: number;
  recoatFrom?: number | undefined;
  recoatUntil?: number | undefined;
  handleFrom?: number | undefined;
  hangFrom?: number | undefined;
}

export interface CrewMember {
  personId: string;
  claimedAt: number;
}

/** A step as the rules see it. Times are milliseconds UTC, durations seconds. */
export interface Step {
  id: string;
  subAssemblyId: string;
  position: number;
  operation: string;
  name: string;
  stationId: string;
  hazards: Hazard[];
  toolKinds: string[];
  crewMin: number;
  crewMax: number;
  plannedSeconds: number;
  clocks: Clocks | null;
  needsCheck: boolean;
  state: StepStateName;
  held: { reason: string; by: string; at: number } | null;
  crew: CrewMember[];
  /** Everybody who ever held a place on it, the present crew included. */
  doers: string[];
  startedAt: number | null;
  finishedAt: number | null;
  finishedBy: string | null;
  dryUntil: number | null;
  passedAt: number | null;
  passedBy: string | null;
  rework: { reason: string; by: string; at: number } | null;
  handOver: { from: string; to: string; at: number } | null;
  flags: string[];
}

/** The state people see: the hold covers what is under it. */
export const shownState = (step: Pick<Step, 'state' | 'held'>): ShownState =>
  step.held ? 'held' : step.state;

/** Order in which a sub-assembly takes the state of its steps. */
const DERIVED_ORDER: readonly ShownState[] = [
  'held',
  'rework',
  'in hand',
  'drying',
  'to check',
  'ready',
  'waiting',
];

/**
 * A sub-assembly's state: the first of the order that any of its steps has, passed only when all have.
 * @param steps the steps of one traveller; an empty traveller waits
 */
export function subAssemblyState(steps: readonly Pick<Step, 'state' | 'held'>[]): ShownState {
  const shown = new Set(steps.map(shownState));
  return DERIVED_ORDER.find((state) => shown.has(state)) ?? (steps.length > 0 ? 'passed' : 'waiting');
}

/**
 * Share of the work that has passed, by planned minutes.
 * @param steps any steps; 0 when there are none or they take no time
 * @returns 0 to 1
 */
export function shareDone(steps: readonly Pick<Step, 'state' | 'plannedSeconds'>[]): number {
  let all = 0;
  let passed = 0;
  for (const step of steps) {
    all += step.plannedSeconds;
    if (step.state === 'passed') passed += step.plannedSeconds;
  }
  return all > 0 ? passed / all : 0;
}
