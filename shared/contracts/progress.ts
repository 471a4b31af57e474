import { z } from 'zod';

export const changesQuerySchema = z.object({
  since: z.coerce.number().int().min(0),
});
export const dayLogQuerySchema = z.object({
  before: z.coerce.number().int().min(1).optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
  action: z.string().max(60).optional(),
  subject: z.string().max(40).optional(),
});

/** One accepted change. Ids, no names; the screen joins them with the people it may see. */
export interface DayLogView {
  seq: number;
  revision: number;
  happenedAt: number;
  recordedAt: number;
  actor: string;
  forPersonId: string | null;
  action: string;
  subject: Record<string, unknown>;
  flags: string[];
}
