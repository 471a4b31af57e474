import type { AgeBand, Hazard } from './hazards';

/** How well a default is founded: read in the cited text, partly, or set by this product without a published limit. */
export type SourceStatus = 'read' | 'read, weak' | 'read, by analogy' | 'own';

/** Where a default comes from, shown beside it. */
export interface AgeSource {
  text: string;
  edition: string;
  status: SourceStatus;
}

export const AGE_RULE_KEYS = [
  'powered-saw',
  'hand-cutting',
  'hot-glue',
  'high-temperature-gun',
  'ladder',
  'ladder-height',
  'solvent-spray',
  'overhead',
] as const;
export type AgeRuleKey = (typeof AGE_RULE_KEYS)[number];

/** One line of the table. */
export interface AgeRule {
  key: AgeRuleKey;
  hazard: Hazard;
  /** `from-band`: the youngest band that may. `height`: how high, in mm, somebody under 18 may stand. */
  limit: { kind: 'from-band'; band: AgeBand } | { kind: 'height'; mm: number };
  /** What the line is about, to stand before "is for 18 and over". */
  subject: string;
  source: AgeSource;
}
export type AgeRules = readonly AgeRule[];

const NO_EDITION = 'no edition given';
const NO_LIMIT: AgeSource = {
  text: 'No published limit known to us; the line is here so that an organiser can set one.',
  edition: 'Strutbee 1',
  status: 'own',
};

/** The defaults. Thresholds differ by country and venue: an organiser may tighten each, never loosen it. */
export const DEFAULT_AGE_RULES: AgeRules = [
  {
    key: 'powered-saw',
    hazard: 'cutting',
    limit: { kind: 'from-band', band: '18+' },
    subject: 'a powered saw',
    source: {
      text:
        'US child-labour orders (employment): under 18 none of HO 5 power-driven woodworking machines, ' +
        'HO 14 circular and reciprocating saws; DOL via osha.gov. Housing-build policies: 16-17 no power tools.',
      edition: NO_EDITION,
      status: 'read',
    },
  },
  {
    key: 'hand-cutting',
    hazard: 'cutting',
    limit: { kind: 'from-band', band: 'under-9' },
    subject: 'cutting by hand',
    source: NO_LIMIT,
  },
  {
    key: 'hot-glue',
    hazard: 'hot-glue',
    limit: { kind: 'from-band', band: '9-12' },
    subject: 'a hot-glue gun',
    source: {
      text:
        'Age rule of thumb of a craft-safety page: under 8 not; 8 and over with direct constant supervision, ' +
        'low temperature; teens after sign-off. The band under 9 cannot tell an 8-year-old from a younger child.',
      edition: NO_EDITION,
      status: 'read, weak',
    },
  },
  {
    key: 'high-temperature-gun',
    hazard: 'hot-glue',
    limit: { kind: 'from-band', band: '16-17' },
    subject: 'a high-temperature glue gun',
    source: {
      text:
        'School card "Glue Gun": nozzle and glue up to 195 C. NSTA: "regardless of the temperature setting, glue ' +
        'guns can burn skin". The age itself is set by this product: young people get the cooler gun, which still burns.',
      edition: 'Glue Gun, Jan 2018',
      status: 'read, by analogy',
    },
  },
  {
    key: 'ladder',
    hazard: 'ladder',
    limit: { kind: 'from-band', band: 'under-9' },
    subject: 'a ladder',
    source: NO_LIMIT,
  },
  {
    key: 'ladder-height',
    hazard: 'ladder',
    limit: { kind: 'height', mm: 1800 },
    subject: 'a ladder above 1.8 m',
    source: {
      text: 'Housing-build affiliates: minors not above 6 ft (1.8 m).',
      edition: NO_EDITION,
      status: 'read',
    },
  },
  {
    key: 'solvent-spray',
    hazard: 'solvent-spray',
    limit: { kind: 'from-band', band: '18+' },
    subject: 'solvent spray',
    source: {
      text: 'No solvent spraying for minors; one affiliate policy: minors may not handle hazardous substances (Watauga policy).',
      edition: NO_EDITION,
      status: 'read',
    },
  },
  {
    key: 'overhead',
    hazard: 'overhead',
    limit: { kind: 'from-band', band: '18+' },
    subject: 'overhead work',
    source: {
      text:
        'Housing-build policies: 16-17 no work above 6 ft, no roof. Overhead work zone: 10 ft (3 m) in all ' +
        'directions is kept clear of others (advancedstaging).',
      edition: NO_EDITION,
      status: 'read, by analogy',
    },
  },
];
