import { z } from 'zod';
import { shapeSchema, type Frame, type Shape } from '../frames';

const name = z.string().trim().min(1, 'Please fill this in.').max(60);

export const createFrameSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('shape'), name, shape: shapeSchema }),
  z.strictObject({
    kind: z.literal('obj'),
    name,
    fileName: z.string().trim().max(120),
    text: z.string().max(2_200_000),
  }),
]);
export type CreateFrame = z.infer<typeof createFrameSchema>;

/** A frame with its geometry and figures; mm throughout. */
export interface FrameView {
  id: string;
  name: string;
  revision: number;
  source: { kind: 'shape'; shape: Shape } | { kind: 'obj'; fileName: string };
  geometry: Frame;
  subAssemblies: number;
}
