import { z } from 'zod';
import { HAZARDS } from '../safety';

export const TOOL_NUMBER = /^[ACEFGHJKLMNQRSTUVWXYZ]{1,2}-\d{2,3}$/;

export const toolTraitsSchema = z.strictObject({
  temperature: z.enum(['high', 'low']).optional(),
  poweredSaw: z.boolean().optional(),
  ladderHeightMm: z.number().int().min(1).max(20_000).optional(),
  watts: z.number().int().min(0).max(20_000).optional(),
  hot: z.boolean().optional(),
});
export const toolSchema = z.strictObject({
  number: z
    .string()
    .trim()
    .toUpperCase()
    .regex(
      TOOL_NUMBER,
      'A number such as G-07: one or two letters (not O, I, B, D, P), a dash, two or three figures.',
    ),
  name: z.string().trim().min(1, 'Please fill this in.').max(60),
  kind: z.string().trim().min(1, 'Please fill this in.').max(40),
  hazard: z.enum(HAZARDS).nullable(),
  traits: toolTraitsSchema,
  condition: z.string().trim().max(200),
});
/** Out to a person by number or id; `stationId` puts it at a station in that person's charge. */
export const lendSchema = z.strictObject({
  personId: z.string().min(1, 'Who takes it?').max(40),
  stationId: z.string().max(40).nullable(),
  /** Minutes until it is due back. */
  minutes: z
    .number()
    .int()
    .min(5, 'At least 5 minutes.')
    .max(24 * 60),
});
export const takeBackSchema = z.strictObject({
  condition: z.string().trim().max(200),
  /** Tag it out of use at once, with this reason. */
  tagReason: z.string().trim().min(3, 'Say what is wrong with it.').max(200).nullable(),
});
export const tagSchema = z.strictObject({
  reason: z.string().trim().min(3, 'Say what is wrong with it.').max(200),
});
/** Cleared by its author, or by a second authorised person with a reason, after inspection. */
export const clearTagSchema = z.strictObject({
  inspected: z.literal(true, { error: 'Inspect the tool first, then say so here.' }),
  reason: z.string().trim().max(200),
});
export type ToolInput = z.infer<typeof toolSchema>;
export type Lend = z.infer<typeof lendSchema>;
export type TakeBack = z.infer<typeof takeBackSchema>;
