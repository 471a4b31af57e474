import { z } from 'zod';

const mm = z.number().min(-100_000).max(100_000);
const point = z.strictObject({ x: mm, y: mm, z: mm });
const text = (most: number) => z.string().trim().max(most);

/** What something carries, in newtons: a working load has its safety in it already, a breaking load has not. */
export const ratingSchema = z.strictObject({
  kind: z.enum(['working', 'breaking']),
  newtons: z.number().positive('More than nothing, please.').max(1_000_000),
});
export type Rating = z.infer<typeof ratingSchema>;

/** A point of the venue, its rating and what the venue agreed to. */
export const anchorSchema = z.strictObject({
  name: text(40).min(1, 'Please fill this in.'),
  at: point,
  rating: ratingSchema,
  consent: z
    .strictObject({
      /** The most the venue agreed to at this point, N. */
      newtons: z.number().positive().max(1_000_000),
      by: text(80).min(1, 'Please write down who agreed.'),
      note: text(200),
    })
    .nullable(),
  revision: z.number().int().optional(),
});
export type AnchorInput = z.infer<typeof anchorSchema>;

/** The lines, hooks and knots of an installation. */
export const hangingGearSchema = z.strictObject({
  line: ratingSchema,
  hook: ratingSchema,
  /** What a knot leaves of the line, 0 to 1. */
  knotShare: z.number().min(0.1).max(1),
  designFactor: z.number().min(1).max(20),
  revision: z.number().int().optional(),
});
export type HangingGear = Omit<z.infer<typeof hangingGearSchema>, 'revision'>;

/** How one piece hangs: joints a line goes round, each with the anchor it goes to, and the second line's. */
export const pieceHangingSchema = z.strictObject({
  points: z
    .array(
      z.strictObject({
        /** Joint of the piece, from 0. */
        joint: z.number().int().min(0),
        anchorId: z.string().max(40),
      }),
    )
    .min(2, 'At least two points, so that it does not turn.')
    .max(4, 'At most four points.'),
  second: z.strictObject({ joint: z.number().int().min(0), anchorId: z.string().max(40) }),
  /** What the scales said, kg; null while it was not weighed. */
  weighedKg: z.number().positive().max(500).nullable(),
  revision: z.number().int().optional(),
});
export type PieceHangingInput = z.infer<typeof pieceHangingSchema>;

/** A competent rigger's name under one arrangement. */
export interface RiggerSheet {
  name: string;
  qualification: string;
  at: number;
  /** Person who entered it. */
  by: string;
}
