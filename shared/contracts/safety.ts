import { z } from 'zod';
import { briefingBodySchema, type BriefingBody, type Hazard } from '../safety';

export const answerSchema = z.strictObject({
  version: z.number().int().min(1),
  /** Question id to option id; every question of the sheet. */
  answers: z.record(z.string().max(60), z.string().max(60)),
});
export const signSchema = z.strictObject({
  version: z.number().int().min(1),
  signature: z.discriminatedUnion('kind', [
    z.strictObject({
      kind: z.literal('typed'),
      value: z.string().trim().min(2, 'Your full name, please.').max(80),
    }),
    /** An SVG path of move and line commands in a 600 x 160 box. */
    z.strictObject({
      kind: z.literal('drawn'),
      value: z
        .string()
        .min(10, 'Please sign with your finger.')
        .max(20_000)
        .regex(/^[ML0-9 .,-]+$/, 'This drawing cannot be read. Clear it and sign again.'),
    }),
  ]),
});
export const revokeSchema = z.strictObject({
  reason: z.string().trim().min(3, 'Say in a few words why.').max(300),
});
/** A change voids sign-offs from a stated time and says what changed; a correction waits for a second safety lead. */
export const proposeVersionSchema = z.strictObject({
  kind: z.enum(['change', 'correction']),
  body: briefingBodySchema,
  whatChanged: z.string().trim().max(600),
  /** ms UTC; only for a change; not before now. */
  effectiveFrom: z.number().int().nullable(),
  /** The newest version the form was filled from. */
  basedOn: z.number().int().min(1),
});

/** Which text was read before it was seconded: the proposal's `at`. A newer proposal under the same number is another text. */
export const secondVersionSchema = z.strictObject({ proposedAt: z.number().int() });
export const briefingQuerySchema = z.object({ version: z.coerce.number().int().min(1).optional() });

export const raiseStopSchema = z.discriminatedUnion('scope', [
  z.strictObject({
    scope: z.literal('hot-tools'),
    reason: z.string().trim().min(2, 'Say in a few words why.').max(200),
  }),
  z.strictObject({
    scope: z.literal('area'),
    stationId: z.string().min(1, 'Which station?').max(40),
    reason: z.string().trim().min(2, 'Say in a few words why.').max(200),
  }),
  z.strictObject({
    scope: z.literal('everything'),
    reason: z.string().trim().min(2, 'Say in a few words why.').max(200),
  }),
]);
export const liftStopSchema = z.strictObject({
  note: z.string().trim().min(3, 'Say what was found and what was done.').max(300),
});

/** One published version of a briefing as people read it. The right answers stay on the server. */
export interface BriefingTextView {
  briefingId: string;
  key: string;
  title: string;
  version: number;
  kind: 'first' | 'change' | 'correction';
  effectiveFrom: number;
  whatChanged: string | null;
  body: Omit<BriefingBody, 'questions'> & {
    questions: { id: string; text: string; options: { id: string; text: string }[] }[];
  };
}
/** The newest published version whole, with the right answers: for the safety lead who writes the next one. */
export interface WholeVersionView {
  version: number;
  effectiveFrom: number;
  body: BriefingBody;
}
/** Reply to an answered sheet: per question whether it was right, and why. */
export interface AnswerResult {
  passed: boolean;
  talkNeeded: boolean;
  results: { questionId: string; right: boolean; why: string }[];
}
/** Reply to a published change or a proposed correction. */
export interface VersionOutcome {
  version: number;
  status: 'published' | 'proposed';
  /** Places in hand whose holder has no valid sign-off once the change is in force; a lead looks after them. */
  workInHand: WorkInHand[];
}
/** A place on a step, and whether a hazard of it is no longer signed off. */
export interface WorkInHand {
  stepId: string;
  personId: string;
  hazards: Hazard[];
}
/** A proposed correction that waits for a second lead. */
export interface ProposedVersionView {
  briefingId: string;
  version: number;
  proposedBy: string;
  at: number;
  whatChanged: string | null;
  body: BriefingBody;
}
export interface RegisterRowView {
  seq: number;
  at: number;
  kind: string;
  ids: Record<string, string | number>;
  hash: string;
  /** Gone when the person was erased. */
  personal: Record<string, string> | null;
}
export interface RegisterView {
  rows: RegisterRowView[];
  count: number;
  headHash: string;
  verified: { ok: true } | { ok: false; seq: number; why: string };
}
