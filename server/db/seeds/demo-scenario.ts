import type { Duty, SiteRole } from '../../../shared/accounts';
import type { AgeBand } from '../../../shared/safety';
import type { ToolInput } from '../../../shared/contracts/crib';
import type { PlacementInput } from '../../../shared/contracts/drawing';
import type { Shape } from '../../../shared/frames';

/**
 * The demo: a canopy of fourteen lattice bays and two dozen lanterns for the Pump Hall, a hall that does not exist, built
 * by people who do not exist either. Everything is the same at every fresh start but ids and secrets.
 */
export const INSTALLATION = {
  name: 'Pump Hall Canopy',
  venue: 'Pump Hall, Lower Quay',
  timeZone: 'Europe/Lisbon',
  unit: 'mm',
  hallLimit: 80,
} as const;

/** Saturday 12 June 2027; Lisbon is one hour ahead of UTC in June. */
export const BUILD_DAY = {
  date: '2027-06-12',
  doors: '09:00',
  start: '09:30',
  clearUp: '17:30',
  end: '18:30',
  breaks: [
    { from: '11:00', to: '11:15', label: 'break' },
    { from: '12:30', to: '13:15', label: 'lunch' },
    { from: '15:00', to: '15:15', label: 'break' },
  ],
};
const HOUR_ZERO_UTC = Date.UTC(2027, 5, 11, 23, 0);
/** A local time of the build day as an instant, ms UTC. */
export const onTheDay = (hour: number, minute: number): number =>
  HOUR_ZERO_UTC + (hour * 60 + minute) * 60_000;
/** Where the demo's clock stands at a fresh start. */
export const DEMO_NOW = onTheDay(14, 7);
/** When the organiser began to plan. */
export const PLANNING_FROM = Date.UTC(2027, 4, 10, 17, 0);

export const STATIONS = [
  { name: 'saw', kind: 'saw', places: 2 },
  { name: 'bench', kind: 'bench', places: 8 },
  { name: 'glue', kind: 'glue', places: 8 },
  { name: 'paint bay', kind: 'paint bay', places: 8 },
  { name: 'hanging zone', kind: 'hanging zone', places: 2 },
] as const;

export const FRAMES: { name: string; shape: Shape }[] = [
  {
    name: 'Lattice bay',
    shape: {
      kind: 'vault-bay',
      lengthMm: 1000,
      widthMm: 2841,
      riseMm: 640,
      divisionsAlong: 2,
      divisionsAcross: 4,
      diagonals: 'staggered',
    },
  },
  { name: 'Four-side lantern', shape: lantern(4, 150) },
  { name: 'Five-side lantern', shape: lantern(5, 160) },
  { name: 'Six-side lantern', shape: lantern(6, 170) },
];

const UPRIGHT = { x: 0, y: 0, z: 0 };

/** Where the frames stand: bay beside bay, each sharing its end arch with the next, and three rows of lanterns beneath. */
export const PLACEMENTS: ({ frame: string } & Omit<PlacementInput, 'frameId' | 'revision'>)[] = [
  {
    frame: 'Lattice bay',
    name: 'Canopy',
    at: { x: 0, y: 0, z: 2600 },
    turn: UPRIGHT,
    pattern: { kind: 'row', count: 14, step: { x: 0, y: 1000, z: 0 } },
  },
  ...['Four-side lantern', 'Five-side lantern', 'Six-side lantern'].map((frame, row) => ({
    frame,
    name: `${frame}s`,
    at: { x: -700 + 700 * row, y: 800, z: 1700 + 150 * row },
    turn: UPRIGHT,
    pattern: { kind: 'row' as const, count: 8, step: { x: 0, y: 1700, z: 0 } },
  })),
];

function lantern(sides: number, radius: number): Shape {
  return { kind: 'bipyramid', sides, baseBy: 'radius', baseMm: radius, upperMm: 240, lowerMm: 320 };
}

export const PIECES = [
  { frame: 'Lattice bay', letter: 'V', name: 'North bay', quantity: 7 },
  { frame: 'Lattice bay', letter: 'V', name: 'South bay', quantity: 7 },
  { frame: 'Four-side lantern', letter: 'L', name: 'Four-side lantern', quantity: 8 },
  { frame: 'Five-side lantern', letter: 'L', name: 'Five-side lantern', quantity: 8 },
  { frame: 'Six-side lantern', letter: 'L', name: 'Six-side lantern', quantity: 8 },
] as const;

/** A password everybody in the demo has; the demo is for one's own machine. */
export const DEMO_PASSWORD = 'seven dowels make a start';

export interface DemoMember {
  firstName: string;
  initial: string;
  email: string;
  siteRole: SiteRole;
  duties: Exclude<Duty, 'volunteer'>[];
}
/** People with an account. */
export const MEMBERS: DemoMember[] = [
  {
    firstName: 'Ines',
    initial: 'C',
    email: 'ines@pumphall.example',
    siteRole: 'admin',
    duties: ['organiser'],
  },
  {
    firstName: 'Lena',
    initial: 'W',
    email: 'lena@pumphall.example',
    siteRole: 'member',
    duties: ['safety lead', 'first-aider'],
  },
  {
    firstName: 'Noor',
    initial: 'A',
    email: 'noor@pumphall.example',
    siteRole: 'member',
    duties: ['safety lead', 'bench lead'],
  },
  {
    firstName: 'Goran',
    initial: 'M',
    email: 'goran@pumphall.example',
    siteRole: 'member',
    duties: ['bench lead'],
  },
  {
    firstName: 'Cleo',
    initial: 'F',
    email: 'cleo@pumphall.example',
    siteRole: 'member',
    duties: ['crib keeper'],
  },
  {
    firstName: 'Marta',
    initial: 'L',
    email: 'marta@pumphall.example',
    siteRole: 'member',
    duties: ['muster desk', 'first-aider'],
  },
];

export interface DemoVolunteer {
  firstName: string;
  initial: string;
  ageBand: AgeBand;
  adultName?: string;
  /** How far they are: at the door, confirmed, or signed off for hot glue. */
  stage: 'door' | 'confirmed' | 'signed' | 'briefed';
  duties?: Exclude<Duty, 'volunteer'>[];
  /** Works with a gun. */
  glue?: true;
}
/** People who came in by the poster's code, in the order in which they came. */
export const VOLUNTEERS: DemoVolunteer[] = [
  { firstName: 'Wren', initial: 'S', ageBand: '18+', stage: 'briefed', glue: true },
  { firstName: 'Kofi', initial: 'A', ageBand: '18+', stage: 'briefed', glue: true },
  { firstName: 'Bea', initial: 'R', ageBand: '18+', stage: 'briefed' },
  { firstName: 'Olu', initial: 'M', ageBand: '18+', stage: 'briefed' },
  { firstName: 'Tam', initial: 'W', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Ida', initial: 'F', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Juno', initial: 'V', ageBand: '18+', stage: 'briefed', glue: true },
  { firstName: 'Pim', initial: 'H', ageBand: '18+', stage: 'briefed', glue: true },
  { firstName: 'Sol', initial: 'V', ageBand: '18+', stage: 'briefed', glue: true, duties: ['checker'] },
  { firstName: 'Mei', initial: 'T', ageBand: '18+', stage: 'briefed', glue: true },
  { firstName: 'Yuki', initial: 'T', ageBand: '13-15', adultName: 'Mei T', stage: 'briefed' },
  { firstName: 'Rafi', initial: 'G', ageBand: '18+', stage: 'briefed', glue: true },
  { firstName: 'Ezra', initial: 'N', ageBand: '18+', stage: 'briefed', glue: true },
  { firstName: 'Ada', initial: 'K', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Tomas', initial: 'K', ageBand: '16-17', adultName: 'Ada K', stage: 'signed' },
  { firstName: 'Otto', initial: 'F', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Vita', initial: 'Z', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Abe', initial: 'Y', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Ilse', initial: 'G', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Dag', initial: 'E', ageBand: '18+', stage: 'briefed' },
  { firstName: 'Yara', initial: 'Q', ageBand: '18+', stage: 'signed' },
  { firstName: 'Nils', initial: 'H', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Rosa', initial: 'J', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Hana', initial: 'S', ageBand: '18+', stage: 'signed' },
  { firstName: 'Jori', initial: 'L', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Lulu', initial: 'A', ageBand: '9-12', adultName: 'Kofi A', stage: 'confirmed' },
  { firstName: 'Umar', initial: 'E', ageBand: '18+', stage: 'confirmed' },
  { firstName: 'Fenn', initial: 'W', ageBand: '18+', stage: 'door' },
  { firstName: 'Sana', initial: 'R', ageBand: '16-17', adultName: 'Fenn W', stage: 'door' },
];

function tools(letter: string, count: number, tool: Omit<ToolInput, 'number' | 'condition'>): ToolInput[] {
  return Array.from({ length: count }, (_, index) => ({
    ...tool,
    number: `${letter}-${String(index + 1).padStart(2, '0')}`,
    condition: 'good',
  }));
}
/** What stands in the crib. Watts as on an invented nameplate. */
export const TOOLS: ToolInput[] = [
  ...tools('G', 10, {
    name: 'hot-glue gun',
    kind: 'hot-glue gun',
    hazard: 'hot-glue',
    traits: { temperature: 'high', watts: 100, hot: true },
  }),
  ...tools('W', 6, {
    name: 'low-temp glue gun',
    kind: 'low-temp glue gun',
    hazard: 'hot-glue',
    traits: { temperature: 'low', watts: 20, hot: true },
  }),
  ...tools('S', 4, { name: 'mitre box and saw', kind: 'mitre box and saw', hazard: null, traits: {} }),
  ...tools('N', 4, { name: 'dowel nippers', kind: 'nippers', hazard: null, traits: {} }),
  ...tools('K', 3, {
    name: 'step ladder 1.8 m',
    kind: 'step ladder',
    hazard: null,
    traits: { ladderHeightMm: 1800 },
  }),
  ...tools('C', 4, { name: 'cordless driver', kind: 'cordless driver', hazard: null, traits: { watts: 0 } }),
  ...tools('H', 3, { name: 'heat mat', kind: 'heat mat', hazard: null, traits: { watts: 40, hot: true } }),
];
