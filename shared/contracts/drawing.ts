import { z } from 'zod';

/** Nothing in a hall lies farther from its zero than 100 m. */
const FARTHEST_MM = 100_000;
const coordinate = z.number().min(-FARTHEST_MM).max(FARTHEST_MM);
const point = z.strictObject({ x: coordinate, y: coordinate, z: coordinate });
const degrees = z.number().min(-360).max(360);
const copies = z.number().int().min(1).max(200);

/** How copies of a frame are set out: alone, in a row, round a ring, in a grid. Steps in mm from copy to copy. */
export const patternSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('single') }),
  z.strictObject({ kind: z.literal('row'), count: copies, step: point }),
  z.strictObject({
    kind: z.literal('ring'),
    count: copies,
    radius: z.number().min(1).max(FARTHEST_MM),
    /** Each copy turns with the ring, so that it shows the centre the same side. */
    turned: z.boolean(),
  }),
  z.strictObject({
    kind: z.literal('grid'),
    counts: z.strictObject({ x: copies, y: copies, z: copies }),
    step: point,
  }),
]);
export type PlacementPattern = z.infer<typeof patternSchema>;

/** Where a frame stands in the drawing. */
export const placementSchema = z.strictObject({
  frameId: z.string().min(1, 'Please choose a frame.').max(40),
  name: z.string().trim().min(1, 'Please fill this in.').max(60),
  /** mm: of the first copy, or of the ring's centre. */
  at: point,
  /** Degrees about x, then y, then z, applied in this order about the frame's own zero. */
  turn: z.strictObject({ x: degrees, y: degrees, z: degrees }),
  pattern: patternSchema,
  /** Revision the form was filled from; absent for a new one. */
  revision: z.number().int().optional(),
});
export type PlacementInput = z.infer<typeof placementSchema>;

/** Most struts of one drawing, copies counted. */
export const MOST_STRUTS = 20_000;

/** What turns lines into wood. */
export const drawingSettingsSchema = z.strictObject({
  strutDiameterMm: z.number().min(1).max(80),
  /** Key of the density table. */
  species: z.string().min(1).max(40),
  /** Joints closer than this are one, mm. */
  joinWithinMm: z.number().min(0).max(50),
  /** Lengths closer than this are one length, mm. */
  cutWithinMm: z.number().min(0.1).max(10),
  cutAs: z.enum(['centre', 'set back']),
  revision: z.number().int().optional(),
});
export type DrawingSettings = Omit<z.infer<typeof drawingSettingsSchema>, 'revision'>;

export const DEFAULT_DRAWING_SETTINGS: DrawingSettings = {
  strutDiameterMm: 8,
  species: 'birch-yellow',
  joinWithinMm: 1,
  cutWithinMm: 1,
  cutAs: 'centre',
};

export interface PlacementView extends Omit<PlacementInput, 'revision'> {
  id: string;
  revision: number;
}

/** The whole drawing: what stands where. Its frames come from their own list. */
export interface DrawingView {
  settings: DrawingSettings;
  settingsRevision: number;
  placements: PlacementView[];
  /** Revision at which anything of the drawing last changed; a split made before it is out of date. */
  revision: number;
}
