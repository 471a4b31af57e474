import { z } from 'zod';
import { FRAME_LIMITS, shapeSchema, type Frame, type Shape } from '../frames';

const name = z.string().trim().min(1, 'Please fill this in.').max(60);

/** Revision the form was filled from, so that an old page does not write over a newer frame; absent for a new one. */
const revision = z.number().int().optional();

const file = {
  name,
  fileName: z.string().trim().max(120),
  text: z.string().max(2_200_000),
  revision,
};

const coordinate = z.number({ error: 'Please give a number in mm.' });
const jointIndex = z.number().int().min(0);
/** Joints, struts and faces as typed in a table; what they make together is checked as a whole (`validateFrame`). */
const geometry = z.strictObject({
  joints: z.array(z.strictObject({ x: coordinate, y: coordinate, z: coordinate })).max(FRAME_LIMITS.joints),
  struts: z.array(z.tuple([jointIndex, jointIndex])).max(FRAME_LIMITS.struts),
  faces: z.array(z.array(jointIndex).max(FRAME_LIMITS.joints)).max(FRAME_LIMITS.struts),
});

export const createFrameSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('shape'), name, shape: shapeSchema, revision }),
  z.strictObject({ kind: z.literal('obj'), ...file }),
  z.strictObject({ kind: z.literal('csv'), ...file }),
  z.strictObject({ kind: z.literal('table'), name, geometry, revision }),
]);
export type CreateFrame = z.infer<typeof createFrameSchema>;

/**
 * Where a frame's geometry came from: a shape with its measures, a file, joints and struts typed by number, or a split that made a
 * piece of the drawing.
 */
export type FrameSource =
  | { kind: 'shape'; shape: Shape }
  | { kind: 'obj'; fileName: string }
  | { kind: 'csv'; fileName: string }
  | { kind: 'table' }
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
