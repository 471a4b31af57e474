import type { BriefingBody, BriefingVersion, Question } from './briefing-schema';
import { canonicalJson } from './canonical';

const DAY_MS = 86_400_000;

/**
 * When a sign-off ends.
 * @param countersignedAt ms since the epoch
 * @param validityDays of the briefing; days of 24 hours
 * @returns ms since the epoch; from that instant on it no longer counts
 */
export const expiryOf = (countersignedAt: number, validityDays: number): number =>
  countersignedAt + validityDays * DAY_MS;

/** Question id to option id. */
export type Answers = Readonly<Record<string, string>>;
export interface GradedAnswer {
  questionId: string;
  given: string | null;
  right: boolean;
  why: string;
}
export interface Grade {
  passed: boolean;
  results: GradedAnswer[];
  wrongIds: string[];
}

/**
 * Mark a question sheet; it is passed only when every question is answered rightly.
 * @param version whose body holds the questions
 * @param answers question id to option id; a missing answer is wrong, an answer to no question is ignored
 * @returns one result per question in the order of the sheet, with why; the ids of the wrong ones
 * @source rule 2 of the product, own
 */
export function gradeAnswers(version: { body: Pick<BriefingBody, 'questions'> }, answers: Answers): Grade {
  const results = version.body.questions.map((question) => {
    // Own keys only: `constructor` is no answer.
    const given = Object.hasOwn(answers, question.id) ? (answers[question.id] ?? null) : null;
    return { questionId: question.id, given, right: given === question.right, why: question.why };
  });
  const wrongIds = results.filter((result) => !result.right).map((result) => result.questionId);
  return { passed: results.length > 0 && wrongIds.length === 0, results, wrongIds };
}

/** One try at the question sheet. */
export interface Attempt {
  /** Ms since the epoch. */
  at: number;
  wrongIds: readonly string[];
  answers?: Answers | undefined;
}

/**
 * Questions missed at least twice: a lead talks to that person before the next try.
 * @param attempts in any order
 * @returns question ids, in the order in which they were first missed
 * @source rule 2 of the product, own
 */
export function missedTwice(attempts: readonly Pick<Attempt, 'wrongIds'>[]): string[] {
  const misses = new Map<string, number>();
  for (const attempt of attempts) {
    for (const id of new Set(attempt.wrongIds)) misses.set(id, (misses.get(id) ?? 0) + 1);
  }
  return [...misses].filter(([, count]) => count >= 2).map(([id]) => id);
}

/** A question as a phone may see it before answering: without the right answer and the reason. */
export type OpenQuestion = Omit<Question, 'right' | 'why'>;

/**
 * The question sheet without its answers.
 * @param body of a version
 * @returns questions in order, options in order
 */
export const questionSheet = (body: Pick<BriefingBody, 'questions'>): OpenQuestion[] =>
  body.questions.map(({ id, text, options }) => ({
    id,
    text,
    options: options.map((option) => ({ id: option.id, text: option.text })),
  }));

/**
 * The text whose hash is kept with a version, so that it can be shown later what was signed. Two versions with the same
 * words have the same text: number, kind and date are not in it.
 * @param version whose words count; composed and decomposed letters are the same
 * @returns a canonical text that begins with its own domain, to be hashed with SHA-256
 * @source canonical JSON after RFC 8785, Unicode NFC; own
 */
export function canonicalBriefingText(version: Pick<BriefingVersion, 'whatChanged' | 'body'>): string {
  const text = canonicalJson({ whatChanged: version.whatChanged, body: version.body });
  return `strutbee/briefing-text/1\n${text.normalize('NFC')}`;
}
