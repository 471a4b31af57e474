import { TZDate } from '@date-fns/tz';
import type { z } from 'zod';
import type { FieldProblem } from '../../../shared/contracts/errors';
import { proposeVersionSchema } from '../../../shared/contracts/safety';
import { newId } from '../../../shared/kernel/ids';
import type { BriefingBody, SourceNote, Statement } from '../../../shared/safety';
import { SIGNAL_WORD_OF, type Harm } from '../../../shared/safety/signal-words';
import { checkInput } from '../../lib/check-input';

/** A panel as it is written: how to avoid the hazard, one line each. */
export interface DraftPanel {
  id: string;
  harm: Harm;
  headline: string;
  consequence: string;
  avoid: string;
  sources: readonly string[];
}
export interface DraftQuestion {
  id: string;
  text: string;
  options: readonly { id: string; text: string }[];
  /** Id of the right answer; empty while none is marked. */
  right: string;
  why: string;
}
/** A briefing's text as it is written. Every entry keeps its id, which is also what the page knows it by. */
export interface DraftBody {
  panels: readonly DraftPanel[];
  rules: readonly Statement[];
  firstAid: readonly Statement[];
  notes: readonly Statement[];
  questions: readonly DraftQuestion[];
  closing: string;
  sources: readonly SourceNote[];
}
/** A version as it is written. */
export interface VersionDraft {
  whatChanged: string;
  /** A change counts at once, or from a time. */
  when: 'at once' | 'from a time';
  /** `YYYY-MM-DDTHH:MM` in the installation's zone. */
  from: string;
  body: DraftBody;
}

/** Which text a new version is written on, and how it is sent. */
export interface VersionBase {
  kind: 'change' | 'correction';
  /** The newest version, and from when it counts. */
  version: number;
  effectiveFrom: number;
  zone: string;
}

export const entryId = (noun: string): string => `${noun}-${newId().toLowerCase().slice(-10)}`;

/** A text to write on. */
export function draftOf(body: BriefingBody): DraftBody {
  return {
    panels: body.panels.map(({ id, harm, headline, consequence, avoid, sources }) => ({
      id,
      harm,
      headline,
      consequence,
      avoid: avoid.join('\n'),
      sources,
    })),
    rules: body.rules,
    firstAid: body.firstAid,
    notes: body.notes,
    questions: body.questions,
    closing: body.closing,
    sources: body.sources,
  };
}

const linesOf = (text: string): string[] =>
  text
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '');

/** The body a draft stands for, as far as it is written. */
export function bodyOf(draft: DraftBody): BriefingBody {
  return {
    panels: draft.panels.map(({ avoid, ...panel }) => ({
      ...panel,
      signalWord: SIGNAL_WORD_OF[panel.harm],
      avoid: linesOf(avoid),
      sources: [...panel.sources],
    })),
    rules: [...draft.rules],
    firstAid: [...draft.firstAid],
    notes: [...draft.notes],
    questions: draft.questions.map((question) => ({ ...question, options: [...question.options] })),
    closing: draft.closing,
    sources: [...draft.sources],
  };
}

/** A local time `YYYY-MM-DDTHH:MM` as an instant, ms UTC; null for anything else. */
export function instantOf(local: string, zone: string): number | null {
  const parts = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2})$/.exec(local)?.slice(1).map(Number);
  if (!parts) return null;
  const [year = 0, month = 1, day = 1, hour = 0, minute = 0] = parts;
  const at = new TZDate(year, month - 1, day, hour, minute, zone).getTime();
  return Number.isNaN(at) ? null : at;
}

/** An instant as a field for local times takes it. */
export const localOf = (at: number, zone: string): string =>
  new Intl.DateTimeFormat('sv-SE', { timeZone: zone, dateStyle: 'short', timeStyle: 'short' })
    .format(at)
    .replace(' ', 'T');

const MINUTE = 60_000;

/**
 * What a draft would send, or every problem of it.
 * @param now the server's time, ms UTC
 */
export function checkVersion(
  draft: VersionDraft,
  base: VersionBase,
  now: number,
): { body: z.infer<typeof proposeVersionSchema> } | { problems: FieldProblem[] } {
  const own: FieldProblem[] = [];
  const problem = (path: string, message: string) => own.push({ path, code: 'missing', message });
  if (draft.whatChanged.trim() === '')
    problem('whatChanged', 'Say in a few lines what changed; people read this first.');
  const given = instantOf(draft.from, base.zone);
  const isChange = base.kind === 'change';
  if (isChange && draft.when === 'from a time' && given === null)
    problem('effectiveFrom', 'Say from when the change counts.');
  draft.body.questions.forEach(({ right, options }, i) => {
    if (!options.some(({ id }) => id === right))
      problem(`body.questions.${i}.right`, 'Mark which answer is right.');
  });
  // Whole minutes, so that the same wish sent again after the network failed is the same wish.
  const atOnce = Math.max(Math.floor(now / MINUTE) * MINUTE, base.effectiveFrom);
  return checkInput(
    proposeVersionSchema,
    {
      kind: base.kind,
      body: bodyOf(draft.body),
      whatChanged: draft.whatChanged,
      effectiveFrom: isChange ? (draft.when === 'at once' ? atOnce : given) : null,
      basedOn: base.version,
    },
    own,
  );
}

/** How an entry differs from the text before. */
export type Mark = 'new' | 'changed';
const MARKED = ['panels', 'rules', 'firstAid', 'notes', 'questions'] as const;

/**
 * Which entries are new or have other words than before.
 * @returns marks by the list's name and the entry's id, such as `rules.stand`; and how many entries are gone
 */
export function marksOf(
  before: BriefingBody,
  after: BriefingBody,
): { marks: ReadonlyMap<string, Mark>; gone: number } {
  const marks = new Map<string, Mark>();
  let gone = 0;
  for (const list of MARKED) {
    const known = new Map(before[list].map((entry) => [entry.id, wordsOf(entry)]));
    for (const entry of after[list]) {
      const old = known.get(entry.id);
      if (old === undefined) marks.set(`${list}.${entry.id}`, 'new');
      else if (old !== wordsOf(entry)) marks.set(`${list}.${entry.id}`, 'changed');
      known.delete(entry.id);
    }
    gone += known.size;
  }
  if (before.closing.trim() !== after.closing.trim()) marks.set('closing', 'changed');
  return { marks, gone };
}

function wordsOf(entry: object): string {
  const shown = ['signalWord', 'headline', 'consequence', 'avoid', 'text', 'options', 'right', 'why'];
  return JSON.stringify(
    shown.map((key) => {
      const value = (entry as Record<string, unknown>)[key];
      return typeof value === 'string' ? value.trim() : value;
    }),
  );
}
