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

/** Where a frame's geometry came from: a shape with its measures, a file, or a split that made a piece of the drawing. */
export type FrameSource =
  | { kind: 'shape'; shape: Shape }
  | { kind: 'obj'; fileName: string }
  | { kind: 'piece'; splitId: string; group: number };

/** A frame with its geometry and figures; mm throughout. */
export interface FrameView {
  id: string;
  name: string;
  revision: number;
  source: FrameSource;
  geometry: Frame;
  subAssemblies: number;
}
