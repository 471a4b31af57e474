import { describe, expect, it } from 'vitest';
import {
  briefingVersionSchema,
  canonicalBriefingText,
  currentVersion,
  expiryOf,
  gradeAnswers,
  hotGlueVersion,
  missedTwice,
  newVersionProblems,
  questionSheet,
  type VersionFacts,
} from '../../../shared/safety';
import { DAY, FIRST, MINUTE, sha256, T0 } from './fixtures';

const version = hotGlueVersion(T0);
const allRight = Object.fromEntries(version.body.questions.map((question) => [question.id, question.right]));

describe('gradeAnswers', () => {
  it('gradeAnswers > every answer right > passed, each with its why', () => {
    const grade = gradeAnswers(version, allRight);
    expect(grade).toMatchObject({ passed: true, wrongIds: [] });
    expect(grade.results.every((result) => result.right && result.why.length > 0)).toBe(true);
  });

  it('gradeAnswers > one wrong, one missing > not passed, both named in order of the sheet', () => {
    const rest = Object.fromEntries(Object.entries(allRight).filter(([id]) => id !== 'glue-on-finger'));
    const grade = gradeAnswers(version, { ...rest, 'pass-gun': 'hand' });
    expect(grade.passed).toBe(false);
    expect(grade.wrongIds).toEqual(['glue-on-finger', 'pass-gun']);
    expect(grade.results[0]).toMatchObject({ given: null, right: false });
  });

  it('gradeAnswers > a sheet without questions > never passed', () => {
    expect(gradeAnswers({ body: { questions: [] } }, {}).passed).toBe(false);
  });

  it('gradeAnswers > a question named like an inherited property > its answer is not found on the prototype', () => {
    const question = { id: 'constructor', text: 'Q', options: [], right: 'a', why: 'w' };
    expect(gradeAnswers({ body: { questions: [question] } }, {}).results[0]?.given).toBeNull();
  });
});

describe('missedTwice', () => {
  it('missedTwice > missed in two attempts > named once; doubled inside one attempt > counts once', () => {
    expect(
      missedTwice([{ wrongIds: ['b', 'b', 'a'] }, { wrongIds: ['a'] }, { wrongIds: ['a', 'c'] }]),
    ).toEqual(['a']);
    expect(missedTwice([])).toEqual([]);
  });
});

describe('questionSheet', () => {
  it('questionSheet > shipped briefing > neither right answer nor reason leaves the server', () => {
    const text = JSON.stringify(questionSheet(version.body));
    expect(text).not.toContain('"right"');
    expect(text).not.toContain(version.body.questions[0]?.why ?? 'missing');
    expect(questionSheet(version.body)).toHaveLength(version.body.questions.length);
  });
});

describe('briefingVersionSchema', () => {
  const problems = (candidate: unknown) =>
    (briefingVersionSchema.safeParse(candidate).error?.issues ?? []).map((issue) => issue.path.join('.'));
  const [question] = version.body.questions;
  const [rule] = version.body.rules;
  if (!question || !rule) throw new Error('the shipped briefing is empty');
  const withBody = (body: Partial<typeof version.body>) => ({
    ...version,
    body: { ...version.body, ...body },
  });

  it('briefingVersionSchema > right answer that is no answer, answers and questions doubled > each is named', () => {
    expect(problems(withBody({ questions: [{ ...question, right: 'none' }] }))).toEqual([
      'body.questions.0.right',
    ]);
    expect(problems(withBody({ questions: [question, question] }))).toEqual(['body.questions.1.id']);
    const [option] = question.options;
    expect(
      problems(
        withBody({ questions: [{ ...question, options: [...question.options, option] } as typeof question] }),
      ),
    ).toEqual(['body.questions.0.options']);
  });

  it('briefingVersionSchema > a source that is not in the list, no questions, no first aid > each is named', () => {
    expect(problems(withBody({ rules: [{ ...rule, sources: ['hearsay'] }] }))).toEqual([
      'body.rules.0.sources',
    ]);
    expect(problems(withBody({ questions: [], firstAid: [] }))).toEqual(['body.firstAid', 'body.questions']);
  });

  it('briefingVersionSchema > a change that does not say what changed, a second first > refused', () => {
    expect(problems({ ...version, version: 2, kind: 'change' })).toEqual(['whatChanged']);
    expect(problems({ ...version, version: 2 })).toEqual(['kind']);
    expect(problems({ ...version, version: 2, kind: 'change', whatChanged: 'Cable clips are new.' })).toEqual(
      [],
    );
  });
});

describe('canonicalBriefingText', () => {
  const hash = (changed: typeof version) => sha256(canonicalBriefingText(changed));

  it('canonicalBriefingText > same words, other date, number and order of keys > same text', () => {
    const shuffled = { ...version, body: Object.fromEntries(Object.entries(version.body).reverse()) };
    const read = briefingVersionSchema.parse({ ...shuffled, effectiveFrom: T0 + DAY });
    expect(hash(read)).toBe(hash(version));
  });

  it('canonicalBriefingText > one letter of one rule changed > another text', () => {
    const [first, ...rest] = version.body.rules;
    if (!first) throw new Error('the briefing has no rules');
    const rules = [{ ...first, text: `${first.text}.` }, ...rest];
    expect(hash({ ...version, body: { ...version.body, rules } })).not.toBe(hash(version));
  });

  it('canonicalBriefingText > composed and decomposed letters > same text', () => {
    const closing = (text: string) => ({ ...version, body: { ...version.body, closing: text } });
    expect(hash(closing('caf\u00e9'))).toBe(hash(closing('cafe\u0301')));
  });
});

describe('currentVersion', () => {
  it('currentVersion > a change from tomorrow > today the old one, tomorrow the new one', () => {
    const change: VersionFacts = { version: 2, kind: 'change', effectiveFrom: T0 + DAY };
    expect(currentVersion([FIRST, change], T0 + DAY - 1)).toBe(FIRST);
    expect(currentVersion([FIRST, change], T0 + DAY)).toBe(change);
    expect(currentVersion([FIRST, change], T0 - 1)).toBeNull();
  });
});

describe('expiryOf', () => {
  it('expiryOf > 365 days > 365 times 86,400 s later', () => {
    expect(expiryOf(T0, 365) - T0).toBe(31_536_000_000);
  });
});

describe('newVersionProblems', () => {
  const by = { leadId: 'lena', secondId: null, safetyLeads: ['lena', 'noor'], now: T0 + MINUTE };
  const next = (kind: VersionFacts['kind'], changes: Partial<VersionFacts> = {}): VersionFacts => ({
    version: 2,
    kind,
    effectiveFrom: T0 + MINUTE,
    ...changes,
  });

  it('newVersionProblems > correction by one lead, by the same twice, with somebody who is no lead > refused', () => {
    expect(newVersionProblems([FIRST], next('correction'), by)).toEqual(['SECOND_LEAD_NEEDED']);
    expect(newVersionProblems([FIRST], next('correction'), { ...by, secondId: 'lena' })).toEqual([
      'SECOND_LEAD_SAME',
    ]);
    expect(newVersionProblems([FIRST], next('correction'), { ...by, secondId: 'ada' })).toEqual([
      'SECOND_LEAD_NEEDED',
    ]);
  });

  it('newVersionProblems > correction by two leads, change by one > may be published', () => {
    expect(newVersionProblems([FIRST], next('correction'), { ...by, secondId: 'noor' })).toEqual([]);
    expect(newVersionProblems([FIRST], next('change'), by)).toEqual([]);
    expect(newVersionProblems([], next('first', { version: 1 }), by)).toEqual([]);
  });

  it('newVersionProblems > everything wrong > every problem', () => {
    const bad = next('first', { version: 4, effectiveFrom: T0 - 1 });
    expect(newVersionProblems([FIRST], bad, { ...by, leadId: 'ada' })).toEqual([
      'NOT_A_SAFETY_LEAD',
      'VERSION_NOT_NEXT',
      'KIND_WRONG',
      'TIME_PAST',
      'TIME_ORDER',
    ]);
  });
});
