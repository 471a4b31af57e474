import { ok, refuse, type Result } from '../kernel/result';
import type { AgeRule, AgeRuleKey, AgeRules, AgeSource } from './age-table';
import { AGE_BAND_FROM, AGE_BANDS, isMinor, oldEnough } from './hazards';
import type { AgeBand, Hazard, Message } from './hazards';
import { traitsOfKind, type SafetyTraits } from './tool-kinds';

/** What somebody wants to do: a hazard, a tool of that hazard, the kinds of tool a step lists. */
export interface AgeQuestion {
  hazard?: Hazard | null | undefined;
  /** Traits of the one tool that is asked for; absent when a step is asked for. */
  tool?: SafetyTraits | undefined;
  toolKinds?: readonly string[] | undefined;
}

/** A condition under which something is allowed. */
export interface AgeLimit {
  key:
    | 'low-temperature-gun-only'
    | 'still-burns'
    | 'constant-supervision'
    | 'no-powered-saw'
    | 'ladder-height'
    | 'adult-at-bench';
  params: Record<string, string | number>;
}

/** Things people do on a build day, from the least dangerous. */
export const AGE_ACTIVITIES = [
  'lay-out',
  'clean',
  'low-temperature-gun',
  'hand-cutting',
  'low-ladder',
  'high-temperature-gun',
  'powered-saw',
  'high-ladder',
  'solvent-spray',
  'overhead',
] as const;
export type AgeActivity = (typeof AGE_ACTIVITIES)[number];

export interface AgeRefusal {
  verdict: 'refused';
  rule: AgeRuleKey;
  /** What the refusing line of the table is about. */
  subject: string;
  /** Youngest band that may; under a height limit those over it must be 18. */
  from: AgeBand;
  /** The height limit in mm where that is the reason. */
  heightMm: number | null;
  /** True when the tool's record does not say its temperature or height and so the stricter case counts. */
  unknown: boolean;
  source: AgeSource;
  /** What this person may do instead, nearest first; never empty. */
  alternatives: AgeActivity[];
  message: Message;
}
export type AgeVerdict =
  { verdict: 'allowed'; limits: [] } | { verdict: 'limited'; limits: AgeLimit[] } | AgeRefusal;

/** A changed line: the rule's key and its new limit, a band or whole millimetres. */
export interface AgeRuleChange {
  key: string;
  value: string;
}
export interface AgeRuleProblem extends AgeRuleChange {
  code: 'UNKNOWN_RULE' | 'CHANGED_TWICE' | 'NOT_A_LIMIT' | 'LOOSER_THAN_DEFAULT';
  /** The default that must not be loosened, as it would be typed. */
  default: string | null;
}

/** A limit as it is typed and stored: `16-17`, or millimetres such as `1500`. */
export const limitValue = (rule: AgeRule): string =>
  rule.limit.kind === 'from-band' ? rule.limit.band : String(rule.limit.mm);

/**
 * The table with an organiser's changes, each of which may only be as strict as its default or stricter.
 * @param defaults the table of defaults
 * @param changes rule keys with new limits (a band, or whole mm from 0); rules not named keep the default
 * @returns the new table in the same order, or every problem in order of the changes, and then nothing is changed
 * @source rule 3 of the product, own
 */
export function tightenAgeRules(
  defaults: AgeRules,
  changes: readonly AgeRuleChange[],
): Result<AgeRules, AgeRuleProblem[]> {
  const problems: AgeRuleProblem[] = [];
  const changed = new Map<string, AgeRule>();
  for (const { key, value } of changes) {
    const rule = defaults.find((candidate) => candidate.key === key);
    const problem = (code: AgeRuleProblem['code']) =>
      problems.push({ key, value, code, default: rule ? limitValue(rule) : null });
    if (!rule) problem('UNKNOWN_RULE');
    else if (changed.has(key)) problem('CHANGED_TWICE');
    else {
      const limit = readLimit(rule, value);
      if (!limit) problem('NOT_A_LIMIT');
      else if (looser(limit, rule.limit)) problem('LOOSER_THAN_DEFAULT');
      // Remembered even when refused, so that a second line for the same rule is named too.
      changed.set(key, limit ? { ...rule, limit } : rule);
    }
  }
  if (problems.length > 0) return refuse(problems);
  return ok(defaults.map((rule) => changed.get(rule.key) ?? rule));
}

function readLimit(rule: AgeRule, value: string): AgeRule['limit'] | null {
  if (rule.limit.kind === 'from-band') {
    const band = AGE_BANDS.find((candidate) => candidate === value.trim());
    return band ? { kind: 'from-band', band } : null;
  }
  return /^\s*\d{1,6}\s*$/.test(value) ? { kind: 'height', mm: Number(value) } : null;
}

function looser(next: AgeRule['limit'], now: AgeRule['limit']): boolean {
  if (next.kind === 'from-band' && now.kind === 'from-band') return !oldEnough(next.band, now.band);
  return next.kind === 'height' && now.kind === 'height' && next.mm > now.mm;
}

/** A rule that says no, and whether only because a record does not say enough. */
interface Broken {
  rule: AgeRule;
  unknown: boolean;
}

/** Traits of everything that is asked for, a step's kinds of tool included; the strictest counts. */
function mergeTraits({ tool, toolKinds }: AgeQuestion): SafetyTraits {
  const all = [...(tool ? [tool] : []), ...(toolKinds ?? []).map(traitsOfKind)];
  const heights = all.flatMap((traits) => traits.ladderHeightMm ?? []);
  const temperatures = all.flatMap((traits) => traits.temperature ?? []);
  return {
    poweredSaw: all.some((traits) => traits.poweredSaw === true),
    temperature: temperatures.includes('high') ? 'high' : temperatures[0],
    // NaN stays NaN through Math.max and then counts as unknown.
    ladderHeightMm: heights.length > 0 ? Math.max(...heights) : undefined,
  };
}

function firstBroken(table: AgeRules, band: AgeBand, question: AgeQuestion): Broken | null {
  const traits = mergeTraits(question);
  const broken = (key: AgeRuleKey, unknown = false): Broken[] => {
    const rule = table.find((candidate) => candidate.key === key);
    return rule?.limit.kind === 'from-band' && !oldEnough(band, rule.limit.band) ? [{ rule, unknown }] : [];
  };
  const tooHigh = (): Broken[] => {
    const rule = table.find((candidate) => candidate.key === 'ladder-height');
    if (rule?.limit.kind !== 'height' || !isMinor(band)) return [];
    const height = traits.ladderHeightMm;
    if (height !== undefined && height <= rule.limit.mm) return [];
    // A step says no height: then the limit goes with the claim. A ladder whose height is not recorded is refused,
    // and so is every ladder where the limit is nought.
    if (height === undefined && !question.tool && rule.limit.mm > 0) return [];
    return [{ rule, unknown: height === undefined ? rule.limit.mm > 0 : Number.isNaN(height) }];
  };
  const { hazard, tool } = question;
  const found: Broken[] = [];
  if (traits.poweredSaw) found.push(...broken('powered-saw'));
  if (hazard === 'cutting' && !traits.poweredSaw) found.push(...broken('hand-cutting'));
  if (hazard === 'hot-glue' || traits.temperature) {
    found.push(...broken('hot-glue'));
    if (traits.temperature === 'high') found.push(...broken('high-temperature-gun'));
    else if (tool && traits.temperature === undefined) found.push(...broken('high-temperature-gun', true));
  }
  if (hazard === 'ladder' || traits.ladderHeightMm !== undefined)
    found.push(...broken('ladder'), ...tooHigh());
  if (hazard === 'solvent-spray') found.push(...broken('solvent-spray'));
  if (hazard === 'overhead') found.push(...broken('overhead'));
  return found[0] ?? null;
}

function limitsOf(table: AgeRules, band: AgeBand, question: AgeQuestion): AgeLimit[] {
  if (!isMinor(band)) return [];
  const { hazard, tool } = question;
  const traits = mergeTraits(question);
  const limits: AgeLimit[] = [];
  if (hazard === 'hot-glue' || traits.temperature) {
    if (firstBroken(table, band, { tool: { temperature: 'high' } })) {
      limits.push({ key: 'low-temperature-gun-only', params: {} }, { key: 'still-burns', params: {} });
    }
    if (!oldEnough(band, '13-15')) limits.push({ key: 'constant-supervision', params: {} });
  }
  if (hazard === 'cutting' && !tool && firstBroken(table, band, { tool: { poweredSaw: true } })) {
    limits.push({ key: 'no-powered-saw', params: {} });
  }
  if (hazard === 'ladder' || traits.ladderHeightMm !== undefined) {
    limits.push({ key: 'ladder-height', params: { mm: heightLimit(table) ?? 0 } });
  }
  if (limits.length > 0 || hazard || traits.poweredSaw) limits.push({ key: 'adult-at-bench', params: {} });
  return limits;
}

const heightLimit = (table: AgeRules): number | null => {
  const limit = table.find((rule) => rule.key === 'ladder-height')?.limit;
  return limit?.kind === 'height' ? limit.mm : null;
};

/** Nearest first, for each rule. Only what the person may then really do is offered. */
const INSTEAD: Record<AgeRuleKey, readonly AgeActivity[]> = {
  'powered-saw': ['lay-out', 'clean', 'hand-cutting'],
  'hand-cutting': ['lay-out', 'clean'],
  'hot-glue': ['lay-out', 'clean'],
  'high-temperature-gun': ['low-temperature-gun', 'lay-out', 'clean'],
  ladder: ['lay-out', 'clean'],
  'ladder-height': ['low-ladder', 'lay-out', 'clean'],
  'solvent-spray': ['lay-out', 'clean'],
  overhead: ['lay-out', 'clean'],
};

function questionOf(table: AgeRules, activity: AgeActivity): AgeQuestion {
  const height = heightLimit(table) ?? 0;
  switch (activity) {
    case 'lay-out':
    case 'clean':
      return {};
    case 'low-temperature-gun':
      return { hazard: 'hot-glue', tool: { temperature: 'low' } };
    case 'high-temperature-gun':
      return { hazard: 'hot-glue', tool: { temperature: 'high' } };
    case 'hand-cutting':
      return { hazard: 'cutting', tool: { poweredSaw: false } };
    case 'powered-saw':
      return { hazard: 'cutting', tool: { poweredSaw: true } };
    case 'low-ladder':
      // A limit of nought means no ladder at all, which a height of nought would not show.
      return { hazard: 'ladder', tool: { ladderHeightMm: Math.max(height, 1) } };
    case 'high-ladder':
      return { hazard: 'ladder', tool: { ladderHeightMm: height + 1 } };
    case 'solvent-spray':
    case 'overhead':
      return { hazard: activity };
  }
}

/**
 * Whether somebody of an age band may do something: allowed, allowed within limits, or refused with the rule, its
 * source and what may be done instead.
 * @param table the installation's table, from `tightenAgeRules`
 * @param band the person's band as the muster desk confirmed it
 * @param question a hazard, and for a loan the traits of the tool of that hazard, for a step its kinds of tool. A tool
 *   for hot glue without a temperature counts as high-temperature, a ladder without a height as too high.
 * @returns the verdict; a refusal always has at least one alternative that is allowed
 * @source rule 3 of the product; each line of the table names its own source
 */
export function ageVerdict(table: AgeRules, band: AgeBand, question: AgeQuestion): AgeVerdict {
  const broken = firstBroken(table, band, question);
  if (!broken) {
    const limits = limitsOf(table, band, question);
    return limits.length > 0 ? { verdict: 'limited', limits } : { verdict: 'allowed', limits: [] };
  }
  const { rule, unknown } = broken;
  const from = rule.limit.kind === 'from-band' ? rule.limit.band : '18+';
  const heightMm = rule.limit.kind === 'height' ? rule.limit.mm : null;
  const alternatives = INSTEAD[rule.key].filter(
    (activity) => !firstBroken(table, band, questionOf(table, activity)),
  );
  return {
    verdict: 'refused',
    rule: rule.key,
    subject: rule.subject,
    from,
    heightMm,
    unknown,
    source: rule.source,
    alternatives,
    message: {
      key: `age.refused.${rule.key}${unknown ? '.unknown' : ''}`,
      params: { from, ...(heightMm === null ? {} : { heightMm }) },
    },
  };
}

/** One line of "what I may do". */
export type AgePermission = { activity: AgeActivity } & AgeVerdict;

/**
 * What somebody of an age band may do, permitted things first.
 * @param table the installation's table
 * @param band the person's band
 * @returns every activity once: allowed ones, then those within limits, then refused ones; each group from the least
 *   dangerous on
 * @source rule 3 of the product, own
 */
export function whatIMayDo(table: AgeRules, band: AgeBand): AgePermission[] {
  const all = AGE_ACTIVITIES.map((activity) => ({
    activity,
    ...ageVerdict(table, band, questionOf(table, activity)),
  }));
  return (['allowed', 'limited', 'refused'] as const).flatMap((verdict) =>
    all.filter((one) => one.verdict === verdict),
  );
}

const ALTERNATIVE_WORDS: Partial<Record<AgeActivity, string>> = {
  'lay-out': 'lay-out steps',
  clean: 'clean steps',
  'hand-cutting': 'a hand saw',
  'low-temperature-gun': 'a low-temperature gun (it still burns)',
  'low-ladder': 'a ladder within the limit',
};

/**
 * An age refusal in English, for the server's error message.
 * @param refusal from `ageVerdict`
 * @param toolName the tool as people call it, such as `mitre saw`; without it the rule's own words stand
 * @returns two or three sentences: what is refused, what may be done instead
 */
export function ageRefusalText(refusal: AgeRefusal, toolName?: string): string {
  const subject = toolName ? `the ${toolName}` : refusal.subject;
  const capital = subject.charAt(0).toUpperCase() + subject.slice(1);
  const who = `${AGE_BAND_FROM[refusal.from]} and over`;
  const rule =
    refusal.heightMm === null
      ? `${capital} is for ${who}.`
      : `Under 18 the limit on a ladder is ${refusal.heightMm / 1000} m.`;
  const unknown = refusal.unknown
    ? ' The record of this tool does not say enough, so the strict rule counts.'
    : '';
  const words = refusal.alternatives.flatMap((activity) => ALTERNATIVE_WORDS[activity] ?? []);
  const last = words.at(-1) ?? '';
  const list = words.length > 1 ? `${words.slice(0, -1).join(', ')} or ${last}` : last;
  return `${rule}${unknown} You can take ${list}.`;
}
