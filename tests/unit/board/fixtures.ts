import {
  LIVE_KINDS,
  type BriefingRecord,
  type CheckoutRecord,
  type InstallationRecord,
  type LiveCollections,
  type LiveKind,
  type PersonRecord,
  type SignOffRecord,
  type StationRecord,
  type StepRecord,
  type StopRecord,
  type SubAssemblyRecord,
  type ToolRecord,
} from '../../../shared/contracts/live';
import { fromSnapshot, type LiveState } from '../../../src/lib/live-state';

/** Sat 14 June 2025, 14:07 in Auckland. */
export const NOW = Date.UTC(2025, 5, 14, 2, 7);

/** A live state of some records; the other collections are empty. */
export function liveOf(records: { [K in LiveKind]?: LiveCollections[K][] }): LiveState {
  const empty = Object.fromEntries(LIVE_KINDS.map((kind) => [kind, []])) as unknown as {
    [K in LiveKind]: LiveCollections[K][];
  };
  return fromSnapshot({
    revision: 1,
    audience: 'leads',
    now: NOW,
    clockRate: 1,
    records: { ...empty, ...records },
  });
}

export const installationRecord = (change: Partial<InstallationRecord>): InstallationRecord => ({
  id: 'i1',
  revision: 1,
  name: 'Pump Hall Canopy',
  venue: 'Pump Hall',
  timeZone: 'Pacific/Auckland',
  unit: 'mm',
  hallLimit: 80,
  status: 'published',
  settings: { maxInHand: 2, ageChanges: [] },
  ...change,
});

export const stepRecord = (change: Partial<StepRecord>): StepRecord => ({
  id: 'step',
  revision: 1,
  subAssemblyId: 'v1',
  position: 1,
  operation: 'lay out',
  name: 'lay out',
  stationId: 'bench',
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
  removed: false,
  ...change,
});

export const personRecord = (change: Partial<PersonRecord>): PersonRecord => ({
  id: 'kofi',
  revision: 1,
  name: 'Kofi A',
  number: 12,
  duties: ['volunteer'],
  confirmed: true,
  onSite: true,
  removed: false,
  details: {
    ageBand: '18+',
    email: null,
    adultName: null,
    joinedAt: NOW - 7_200_000,
    confirmedAt: NOW - 7_000_000,
    leftAt: null,
    hasAccount: false,
  },
  ...change,
});

export const briefingRecord = (change: Partial<BriefingRecord>): BriefingRecord => ({
  id: 'b1',
  revision: 1,
  key: 'hot-glue',
  title: 'Hot glue',
  hazards: ['hot-glue'],
  validityDays: 365,
  versions: [{ version: 1, kind: 'first', effectiveFrom: NOW - 86_400_000, whatChanged: null }],
  ...change,
});

export const signOffRecord = (change: Partial<SignOffRecord>): SignOffRecord => ({
  id: 'so1',
  revision: 1,
  personId: 'kofi',
  briefingKey: 'hot-glue',
  version: 1,
  attempts: [{ at: NOW - 3_600_000, wrongIds: [] }],
  talkBy: null,
  talkAt: null,
  passedAt: NOW - 3_600_000,
  signedAt: NOW - 3_500_000,
  countersignedBy: 'lena',
  countersignedAt: NOW - 3_400_000,
  countersignedAs: 'safety lead',
  expiresAt: NOW + 365 * 86_400_000,
  revokedAt: null,
  revokedBy: null,
  revokeReason: null,
  ...change,
});

export const stopRecord = (change: Partial<StopRecord>): StopRecord => ({
  id: 'stop1',
  revision: 1,
  scope: 'everything',
  stationId: null,
  reason: 'Smoke at glue 2',
  raisedBy: 'kofi',
  raisedAt: NOW,
  liftedBy: null,
  liftedAt: null,
  liftNote: null,
  seenBy: [],
  ...change,
});

export const stationRecord = (change: Partial<StationRecord>): StationRecord => ({
  id: 'bench',
  revision: 1,
  name: 'bench',
  kind: 'bench',
  places: 4,
  position: 1,
  removed: false,
  ...change,
});

export const pieceRecord = (change: Partial<SubAssemblyRecord>): SubAssemblyRecord => ({
  id: 'v1',
  revision: 1,
  frameId: 'f1',
  code: 'V-01',
  name: 'North bay 1',
  position: 1,
  kind: 'piece',
  needs: [],
  travellerRevision: 1,
  removed: false,
  ...change,
});

export const toolRecord = (change: Partial<ToolRecord>): ToolRecord => ({
  id: 't1',
  revision: 1,
  number: 'G-01',
  name: 'hot-glue gun',
  kind: 'hot-glue gun',
  hazard: 'hot-glue',
  traits: { temperature: 'high', watts: 100 },
  condition: 'good',
  tag: null,
  removed: false,
  ...change,
});

export const checkoutRecord = (change: Partial<CheckoutRecord>): CheckoutRecord => ({
  id: 'c1',
  revision: 1,
  toolId: 't1',
  personId: 'kofi',
  stationId: null,
  outAt: NOW - 1_800_000,
  backBy: NOW + 1_800_000,
  backAt: null,
  conditionBack: null,
  ...change,
});
