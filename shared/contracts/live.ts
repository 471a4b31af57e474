import type { Duty, SiteRole } from '../accounts';
import type { Step } from '../travellers/step';
import type { AgeBand, Hazard } from '../safety';

/** Who sees what: each socket sits in exactly one of these, and in its person's room. */
export const AUDIENCES = ['leads', 'desk', 'people', 'door', 'projector'] as const;
export type Audience = (typeof AUDIENCES)[number];

/** What every live record carries: the installation's revision at which it last changed. */
export interface LiveRecord {
  id: string;
  revision: number;
}

export interface InstallationRecord extends LiveRecord {
  name: string;
  venue: string;
  timeZone: string;
  unit: 'mm' | 'inch';
  hallLimit: number;
  status: 'draft' | 'published' | 'closed';
  settings: { maxInHand: number; ageChanges: AgeChange[] };
}
/** A tightened age rule: the rule's key in the table and the new limit. */
export interface AgeChange {
  key: string;
  value: string;
}
export interface BuildDayRecord extends LiveRecord {
  /** `YYYY-MM-DD` in the installation's zone. */
  date: string;
  /** Local times of day, `HH:MM`. */
  doors: string;
  start: string;
  clearUp: string;
  end: string;
  breaks: { from: string; to: string; label: string }[];
  removed: boolean;
}
export interface StationRecord extends LiveRecord {
  name: string;
  kind: string;
  places: number;
  position: number;
  removed: boolean;
}
export interface SubAssemblyRecord extends LiveRecord {
  frameId: string;
  code: string;
  name: string;
  position: number;
  /** A piece that a crew builds, or the joints where pieces meet. */
  kind: 'piece' | 'field joint';
  /** Sub-assemblies that must have passed before its first step is ready. */
  needs: string[];
  /** Revision letter or number of the traveller, printed on the sheet. */
  travellerRevision: number;
  removed: boolean;
}
/** A step as the rules see it. */
export interface StepRecord extends Step, LiveRecord {
  removed: boolean;
}
export interface PersonRecord extends LiveRecord {
  /** First name and initial, as the room sees it. */
  name: string;
  number: number;
  duties: Duty[];
  confirmed: boolean;
  onSite: boolean;
  removed: boolean;
  /** Only for leads and the desk; null for others. */
  details: {
    ageBand: AgeBand;
    email: string | null;
    adultName: string | null;
    joinedAt: number;
    confirmedAt: number | null;
    leftAt: number | null;
    hasAccount: boolean;
  } | null;
}
export interface BriefingRecord extends LiveRecord {
  key: string;
  title: string;
  hazards: Hazard[];
  validityDays: number;
  /** Oldest first; text comes from the briefing's own route. */
  versions: {
    version: number;
    kind: 'first' | 'change' | 'correction';
    effectiveFrom: number;
    whatChanged: string | null;
  }[];
}
export interface SignOffRecord extends LiveRecord {
  personId: string;
  briefingKey: string;
  version: number;
  attempts: { at: number; wrongIds: string[] }[];
  talkBy: string | null;
  talkAt: number | null;
  passedAt: number | null;
  signedAt: number | null;
  countersignedBy: string | null;
  countersignedAt: number | null;
  countersignedAs: 'safety lead' | 'organiser' | null;
  expiresAt: number | null;
  revokedAt: number | null;
  revokedBy: string | null;
  revokeReason: string | null;
}
export interface ToolRecord extends LiveRecord {
  number: string;
  name: string;
  kind: string;
  hazard: Hazard | null;
  traits: ToolTraits;
  condition: string;
  tag: { reason: string; by: string; at: number } | null;
  removed: boolean;
}
/** What the age rules and the circuits of a later issue need to know of a tool. */
export interface ToolTraits {
  temperature?: 'high' | 'low';
  poweredSaw?: boolean;
  ladderHeightMm?: number;
  watts?: number;
  hot?: boolean;
}
export interface CheckoutRecord extends LiveRecord {
  toolId: string;
  personId: string;
  stationId: string | null;
  outAt: number;
  backBy: number;
  backAt: number | null;
  conditionBack: string | null;
}
export interface StopRecord extends LiveRecord {
  scope: 'hot-tools' | 'area' | 'everything';
  stationId: string | null;
  reason: string;
  raisedBy: string;
  raisedAt: number;
  liftedBy: string | null;
  liftedAt: number | null;
  liftNote: string | null;
  /** How many of the people on site have said that they saw it. */
  seenBy: string[];
}

/** All live collections of an installation. */
export interface LiveCollections {
  installation: InstallationRecord;
  buildDays: BuildDayRecord;
  stations: StationRecord;
  subAssemblies: SubAssemblyRecord;
  steps: StepRecord;
  people: PersonRecord;
  briefings: BriefingRecord;
  signOffs: SignOffRecord;
  tools: ToolRecord;
  checkouts: CheckoutRecord;
  stops: StopRecord;
}
export type LiveKind = keyof LiveCollections;
export const LIVE_KINDS = [
  'installation',
  'buildDays',
  'stations',
  'subAssemblies',
  'steps',
  'people',
  'briefings',
  'signOffs',
  'tools',
  'checkouts',
  'stops',
] as const satisfies readonly LiveKind[];

/** Changed records, whole; a collection without changes is absent. */
export type Changed = { [K in LiveKind]?: LiveCollections[K][] };

/** The one message per window and audience: everything between two revisions, as that audience may see it. */
export interface RangeMessage {
  from: number;
  to: number;
  changed: Changed;
}

/** The whole state as one audience may see it. */
export interface Snapshot {
  revision: number;
  audience: Audience;
  /** The server's clock, ms, and how many of its seconds pass in a real one. */
  now: number;
  clockRate: number;
  records: { [K in LiveKind]: LiveCollections[K][] };
}

/** Reply to `GET /changes?since=`. */
export type CatchUp =
  | ({ reset: false } & RangeMessage & { now: number; clockRate: number })
  | { reset: true; snapshot: Snapshot };

/** Sent every few seconds: the link lives, and what time and revision it is. */
export interface Beat {
  now: number;
  clockRate: number;
  revision: number;
  /** Phones with a live link now, of the people on site. */
  phones: number;
}

/** Socket events from the server; the client only ever emits `watch`. */
export interface ServerEvents {
  range: (message: RangeMessage) => void;
  /** Records only this person sees (own sign-offs); carries no range. */
  own: (changed: Changed) => void;
  reset: (snapshot: Snapshot) => void;
  beat: (beat: Beat) => void;
  /** The session ended (signed out, removed, token closed): ask for the session again. */
  ended: () => void;
}
export interface ClientEvents {
  watch: (
    input: { installationId: string; since: number | null },
    reply: (answer: { ok: true; catchUp: CatchUp } | { ok: false; code: string }) => void,
  ) => void;
}

/** Who is signed in, as the client needs to know it. */
export interface SessionView {
  csrfToken: string;
  now: number;
  clockRate: number;
  demo: boolean;
  principal:
    | null
    | {
        kind: 'account';
        accountId: string;
        name: string;
        email: string;
        siteRole: SiteRole;
        installations: Membership[];
      }
    | { kind: 'person'; personId: string; installations: Membership[] }
    | { kind: 'display'; installationId: string };
}
/** One installation a signed-in person takes part in. */
export interface Membership {
  installationId: string;
  name: string;
  status: 'draft' | 'published' | 'closed';
  personId: string | null;
  duties: Duty[];
  confirmed: boolean;
}
