import { z } from 'zod';
import { HAZARDS } from '../safety';
import { OPERATIONS } from '../travellers/step';

const seconds = z
  .number()
  .int()
  .min(0)
  .max(14 * 24 * 3600);
const minutes = z.number().min(0).max(600);

/** Clocks of a coat, seconds from the finish, in the order in which they run out. */
export const clocksSchema = z
  .strictObject({
    touchDry: seconds.min(1),
    recoatFrom: seconds.optional(),
    recoatUntil: seconds.optional(),
    handleFrom: seconds.optional(),
    hangFrom: seconds.optional(),
  })
  .refine((clocks) => clocks.recoatUntil === undefined || clocks.recoatUntil > (clocks.recoatFrom ?? 0), {
    error: 'The recoat window ends after it begins.',
    path: ['recoatUntil'],
  });

/** One step of a template; its minutes come from the frame's counts. */
export const templateStepSchema = z
  .strictObject({
    operation: z.enum(OPERATIONS),
    name: z.string().trim().min(1, 'Please fill this in.').max(40),
    stationId: z.string().min(1, 'Please choose a station.').max(40),
    hazards: z.array(z.enum(HAZARDS)).max(HAZARDS.length),
    toolKinds: z.array(z.string().trim().min(1).max(40)).max(6),
    crewMin: z.number().int().min(1).max(12),
    crewMax: z.number().int().min(1).max(12),
    minutes: z.strictObject({ fixed: minutes, perCut: minutes, perJoint: minutes }),
    clocks: clocksSchema.nullable(),
    needsCheck: z.boolean(),
  })
  .refine((step) => step.crewMax >= step.crewMin, {
    error: 'The most crew is at least the least crew.',
    path: ['crewMax'],
  });
export type TemplateStep = z.infer<typeof templateStepSchema>;

export const templateSchema = z.strictObject({
  name: z.string().trim().min(1, 'Please fill this in.').max(60),
  steps: z.array(templateStepSchema).min(1, 'A traveller has at least one step.').max(20),
  /** Revision the form was filled from; absent for a new one. */
  revision: z.number().int().optional(),
});
export interface TemplateView {
  id: string;
  name: string;
  steps: TemplateStep[];
  revision: number;
}

/** Letters of a code are sayable: no O, I, B, D, P. */
export const codeLetterSchema = z
  .string()
  .trim()
  .toUpperCase()
  .regex(
    /^[ACEFGHJKLMNQRSTUVWXYZ]{1,2}$/,
    'One or two letters, without O, I, B, D and P: they are misheard.',
  );
/** Sub-assemblies from a frame: a quantity, numbered on from the highest code of the letter. */
export const createSubAssembliesSchema = z.strictObject({
  frameId: z.string().min(1, 'Please choose a frame.').max(40),
  templateId: z.string().min(1, 'Please choose a template.').max(40),
  letter: codeLetterSchema,
  name: z.string().trim().min(1, 'Please fill this in.').max(60),
  quantity: z.number().int().min(1, 'At least 1, please.').max(99, 'At most 99 at once.'),
});
export const renameSubAssemblySchema = z.strictObject({
  name: z.string().trim().min(1, 'Please fill this in.').max(60),
});

/** How long a change lay in the phone's queue, ms by the phone's running clock (its wall clock may be wrong). */
const queuedMs = z
  .number()
  .int()
  .min(0)
  .max(7 * 24 * 3600_000)
  .optional();
const reason = z.string().trim().min(3, 'Say in a few words why.').max(300);

export const claimSchema = z.strictObject({ queuedMs });
export const noBodySchema = z.strictObject({});
export const offerSchema = z.strictObject({ to: z.string().min(1, 'Please choose a person.').max(40) });
export const finishSchema = z.strictObject({ queuedMs });
export const stillWetSchema = z.strictObject({
  minutes: z
    .number()
    .int()
    .min(1)
    .max(24 * 60),
});
export const endDryingSchema = z.strictObject({ reason });
export const reworkSchema = z.strictObject({ reason, targetId: z.string().min(1).max(40) });
export const holdSchema = z.strictObject({ reason });
export const releaseSchema = z.strictObject({ note: reason });
/** Typed in from paper: who did it, and how long ago (minutes). */
export const recordSchema = z.strictObject({
  crew: z.array(z.string().max(40)).min(1, 'Who did it? Choose at least one person.').max(12),
  minutesAgo: z
    .number()
    .int()
    .min(0)
    .max(24 * 60),
});
