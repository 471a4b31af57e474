import { z } from 'zod';
import { HAZARDS } from './hazards';
import { HARMS, SIGNAL_WORD_OF, SIGNAL_WORDS, speaksOfInjury } from './signal-words';

/** Longest validity: an assessment at most five years old (DETE Queensland form V3, 2013), with a yearly review. */
export const MAX_VALIDITY_DAYS = 1826;

const words = (most: number) => z.string().trim().min(1, 'Write something here.').max(most);
const idSchema = z
  .string()
  .regex(/^[a-z0-9][a-z0-9-]{0,59}$/, 'Use small letters, digits and hyphens, at most 60.');

/** A sentence with the ids of the sources it rests on. */
const statementSchema = z.object({ id: idSchema, text: words(600), sources: z.array(idSchema) });
export type Statement = z.infer<typeof statementSchema>;

/**
 * A signal panel. Over an injury stands the word that fits its harm, and the panel names hazard, consequence and
 * avoidance; NOTICE stands over no injury. Source: ANSI Z535.4-2007, 4.14.
 */
export const signalPanelSchema = z
  .object({
    id: idSchema,
    signalWord: z.enum(SIGNAL_WORDS),
    harm: z.enum(HARMS),
    /** Names the hazard. */
    headline: words(200),
    /** What happens when it is not avoided. */
    consequence: z.string().trim().max(600),
    /** How it is avoided, one line each. */
    avoid: z.array(words(300)),
    sources: z.array(idSchema),
  })
  .superRefine((panel, context) => {
    const wanted = SIGNAL_WORD_OF[panel.harm];
    const problem = (path: string, message: string) =>
      context.addIssue({ code: 'custom', path: [path], message });
    if (panel.signalWord !== wanted) {
      const harm = panel.harm === 'no injury' ? 'injures nobody' : panel.harm;
      problem('signalWord', `Over what ${harm} stands the word ${wanted}.`);
    }
    if (panel.harm === 'no injury') {
      if (speaksOfInjury([panel.headline, panel.consequence, ...panel.avoid].join(' '))) {
        problem('signalWord', 'This panel speaks of injury: it needs CAUTION, WARNING or DANGER.');
      }
      return;
    }
    if (panel.consequence === '') problem('consequence', 'Say what happens when the hazard is not avoided.');
    if (panel.avoid.length === 0) problem('avoid', 'Say how the hazard is avoided.');
  });
export type SignalPanel = z.infer<typeof signalPanelSchema>;

export const questionSchema = z
  .object({
    id: idSchema,
    text: words(300),
    options: z
      .array(z.object({ id: idSchema, text: words(200) }))
      .min(2, 'Give at least two answers to choose from.')
      .max(6),
    right: idSchema,
    /** Shown after answering, right or wrong. */
    why: words(400),
  })
  .superRefine((question, context) => {
    const ids = question.options.map((option) => option.id);
    if (new Set(ids).size < ids.length) {
      context.addIssue({ code: 'custom', path: ['options'], message: 'Two answers have the same id.' });
    }
    if (!ids.includes(question.right)) {
      context.addIssue({
        code: 'custom',
        path: ['right'],
        message: 'The right answer is none of the answers.',
      });
    }
  });
export type Question = z.infer<typeof questionSchema>;

export const sourceNoteSchema = z.object({
  id: idSchema,
  text: words(400),
  edition: words(120),
  status: z.enum(['read', 'read, conflict', 'from memory', 'computed', 'own']),
});
export type SourceNote = z.infer<typeof sourceNoteSchema>;

/** The text of one version: what a person reads and answers. */
export const briefingBodySchema = z
  .object({
    panels: z.array(signalPanelSchema).min(1, 'A briefing has at least one signal panel.'),
    rules: z.array(statementSchema).min(1, 'A briefing has at least one rule.'),
    notes: z.array(statementSchema),
    firstAid: z.array(statementSchema).min(1, 'Say what to do when somebody is hurt.'),
    questions: z.array(questionSchema).min(1, 'Ask at least one question.').max(20),
    /** Last line: local rules and competent people come first. */
    closing: words(400),
    sources: z.array(sourceNoteSchema),
  })
  .superRefine((body, context) => {
    const statements = { panels: body.panels, rules: body.rules, notes: body.notes, firstAid: body.firstAid };
    const known = new Set(body.sources.map((source) => source.id));
    for (const [name, list] of Object.entries({
      ...statements,
      questions: body.questions,
      sources: body.sources,
    })) {
      const ids = list.map((entry) => entry.id);
      ids.forEach((id, index) => {
        if (ids.indexOf(id) !== index) {
          context.addIssue({
            code: 'custom',
            path: [name, index, 'id'],
            message: `The id ${id} is used twice.`,
          });
        }
      });
    }
    for (const [name, list] of Object.entries(statements)) {
      list.forEach((entry, index) => {
        for (const id of entry.sources) {
          if (!known.has(id)) {
            context.addIssue({
              code: 'custom',
              path: [name, index, 'sources'],
              message: `No source ${id} in the list.`,
            });
          }
        }
      });
    }
  });
export type BriefingBody = z.infer<typeof briefingBodySchema>;

export const VERSION_KINDS = ['first', 'change', 'correction'] as const;
export type VersionKind = (typeof VERSION_KINDS)[number];

export const briefingVersionSchema = z
  .object({
    version: z.int().min(1),
    kind: z.enum(VERSION_KINDS),
    /** Ms since the epoch. */
    effectiveFrom: z.int(),
    /** The short sheet of a change or correction; null for the first version. */
    whatChanged: words(1000).nullable(),
    body: briefingBodySchema,
  })
  .superRefine((version, context) => {
    if ((version.version === 1) !== (version.kind === 'first')) {
      context.addIssue({ code: 'custom', path: ['kind'], message: 'Version 1, and only it, is the first.' });
    }
    if ((version.kind === 'first') !== (version.whatChanged === null)) {
      context.addIssue({
        code: 'custom',
        path: ['whatChanged'],
        message: 'Say what changed since the version before.',
      });
    }
  });
export type BriefingVersion = z.infer<typeof briefingVersionSchema>;

export const briefingSchema = z.object({
  key: idSchema,
  title: words(80),
  hazards: z.array(z.enum(HAZARDS)).min(1, 'Name at least one hazard.'),
  /** Days from the countersignature until a sign-off ends. */
  validityDays: z.int().min(1).max(MAX_VALIDITY_DAYS),
});
export type Briefing = z.infer<typeof briefingSchema>;
