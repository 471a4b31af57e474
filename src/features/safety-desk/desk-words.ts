import type { BriefingRecord, PersonRecord } from '../../../shared/contracts/live';
import type { AgeLimit, AgePermission } from '../../../shared/safety/age-rules';
import { whatIMayDo } from '../../../shared/safety/age-rules';
import type { AgeRules } from '../../../shared/safety/age-table';
import { voidingChange } from '../../../shared/safety/briefing-versions';
import type { CountersignRefusal } from '../../../shared/safety/countersign';
import type { AgeBand, Hazard } from '../../../shared/safety/hazards';
import { counted, formatDate, formatTime, listed } from '../../lib/formats';
import { questionsRight, type SignOffLine } from './sign-off-lists';

/** What a sign-off opens for somebody of an age. */
export interface Allowed {
  words: string;
  /** The age rules leave nothing of it. */
  nothing: boolean;
}

/** For each hazard its activities, the milder one first, and the words for both, the milder one, none. */
const HAZARD_WORDS: Record<
  Hazard,
  {
    mild: AgePermission['activity'];
    strong: AgePermission['activity'] | null;
    words: [string, string, string];
  }
> = {
  'hot-glue': {
    mild: 'low-temperature-gun',
    strong: 'high-temperature-gun',
    words: ['any gun', 'low-temperature gun only', 'no gun at this age'],
  },
  cutting: {
    mild: 'hand-cutting',
    strong: 'powered-saw',
    words: ['any saw', 'hand saw only', 'no cutting at this age'],
  },
  ladder: {
    mild: 'low-ladder',
    strong: 'high-ladder',
    words: ['any ladder', 'low ladders only', 'no ladder at this age'],
  },
  'solvent-spray': {
    mild: 'solvent-spray',
    strong: null,
    words: ['solvent spray', '', 'no solvent spray at this age'],
  },
  overhead: { mild: 'overhead', strong: null, words: ['overhead work', '', 'no overhead work at this age'] },
};

/**
 * What a sign-off for some hazards then allows, in a few words.
 * @param rules the installation's age table
 * @param adult first name and initial of a minor's adult, where known
 */
export function allowedWords(
  rules: AgeRules,
  band: AgeBand,
  hazards: readonly Hazard[],
  adult: string | null,
): Allowed {
  const may = whatIMayDo(rules, band);
  const limits = new Set<AgeLimit['key']>();
  let nothing = true;
  const parts = hazards.map((hazard) => {
    const { mild, strong, words } = HAZARD_WORDS[hazard];
    const open = may.filter(
      (one) => (one.activity === mild || one.activity === strong) && one.verdict !== 'refused',
    );
    for (const one of open) if (one.verdict === 'limited') for (const { key } of one.limits) limits.add(key);
    if (open.length > 0) nothing = false;
    if (open.length === 0) return words[2];
    return strong === null || open.some(({ activity }) => activity === strong) ? words[0] : words[1];
  });
  const who = adult ?? 'their adult';
  if (limits.has('constant-supervision')) parts.push(`watched by ${who} all the time`);
  else if (limits.has('adult-at-bench')) parts.push(`beside ${who}`);
  return { words: parts.join(', '), nothing };
}

/** Somebody's adult among the people on site, by first name and initial. */
export function adultHere(name: string | null, people: Iterable<PersonRecord>): boolean {
  const plain = (text: string) =>
    text
      .toLowerCase()
      .replace(/[\s.]+/g, ' ')
      .trim();
  if (name === null) return false;
  return [...people].some(
    (person) => person.onSite && person.details?.ageBand === '18+' && plain(person.name) === plain(name),
  );
}

/** What the words of a refusal are made from. */
interface RefusalFacts {
  name: string;
  /** Names of safety leads on site but the signer, and of organisers. */
  leads: readonly string[];
  organisers: readonly string[];
}

/** Why a countersign is refused, and who can give it. */
export function refusalWords(refusal: CountersignRefusal, { name, leads, organisers }: RefusalFacts): string {
  switch (refusal) {
    case 'COUNTERSIGN_SELF':
      if (leads.length > 0)
        return `Nobody countersigns their own. Another safety lead does: ${listed(leads)}.`;
      return organisers.length > 0
        ? `Nobody countersigns their own. No other safety lead is on site, so an organiser may: ${listed(organisers)}.`
        : 'Nobody countersigns their own, and no other safety lead is on site. Call one in.';
    case 'COUNTERSIGN_NOT_LEAD':
      return leads.length > 0
        ? `Needs a safety lead: ${listed(leads)}.`
        : 'Needs a safety lead, and none is on site. Call one in.';
    case 'SIGN_OFF_REVOKED':
      return `Revoked. ${name} goes through the briefing again.`;
    case 'BRIEFING_VERSION_OLD':
      return `Signed an older version. ${name} reads what changed and signs again.`;
    case 'BRIEFING_TALK_NEEDED':
      return 'Missed a question twice. Talk about it first.';
    case 'BRIEFING_NOT_PASSED':
      return 'Has not answered all questions rightly yet.';
    case 'BRIEFING_NOT_SIGNED':
      return 'Has not signed yet.';
    case 'BRIEFING_SIGNED':
      return 'Is countersigned already.';
  }
}

/** Where somebody stands who has not signed a version in force, and what they do next. */
export function notYetWords(
  { signOff, briefing, validity }: SignOffLine,
  questions: number,
  at: Moment,
): string {
  switch (validity) {
    case 'NOT_PASSED': {
      const right = questionsRight(signOff, questions);
      const wrong = right === null ? 0 : questions - right;
      return wrong > 0
        ? `answers again first: ${wrong} of ${counted(questions, 'question')} wrong`
        : 'has not answered yet';
    }
    case 'NOT_SIGNED':
      return 'has passed, has not signed yet';
    case 'VOIDED_BY_CHANGE': {
      const change = voidingChange(briefing.versions, signOff.version, at.now);
      const since = change
        ? `, which version ${change.version} ended at ${at.time(change.effectiveFrom)}`
        : '';
      return `signed version ${signOff.version}${since}; reads what changed and signs again`;
    }
    case 'REVOKED':
      return `revoked${signOff.revokeReason ? `: ${signOff.revokeReason}` : ''}; goes through it again`;
    case 'EXPIRED':
      return `ended${signOff.expiresAt === null ? '' : ` on ${at.date(signOff.expiresAt)}`}; goes through it again`;
    default:
      return '';
  }
}

/** The present, and words for moments in the installation's zone. */
export interface Moment {
  now: number;
  time: (at: number) => string;
  date: (at: number) => string;
}

export const momentIn = (zone: string, now: number): Moment => ({
  now,
  time: (at) => formatTime(at, zone),
  date: (at) => formatDate(at, zone),
});

/** The version that counts now; the first one where none does yet. */
export function versionNow({ versions }: Pick<BriefingRecord, 'versions'>, now: number): number {
  return (versions.findLast(({ effectiveFrom }) => effectiveFrom <= now) ?? versions[0])?.version ?? 1;
}
