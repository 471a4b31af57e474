import { distance } from './vector';

/** A point where struts meet, millimetres, z upwards. */
export type Joint = { x: number; y: number; z: number };

/** A pair of joints by index, counted from 0. People are shown numbers counted from 1. */
export type Strut = [number, number];

/**
 * One wireframe shape. A face is a ring of joint indexes; for closed shapes it runs anticlockwise seen from outside.
 */
export type Frame = { joints: Joint[]; struts: Strut[]; faces: number[][] };

/** Two lengths, or two places, closer than this are the same, mm. The saw works in steps of 0.1 mm. */
export const SAME_WITHIN_MM = 0.1;

/**
 * The length of each strut.
 * @param frame a frame whose struts name existing joints
 * @returns millimetres from centre to centre of the joints, in the order of the struts; NaN where a joint is missing
 */
export function strutLengths(frame: Frame): number[] {
  return frame.struts.map(([a, b]) => {
    const from = frame.joints[a];
    const to = frame.joints[b];
    return from && to ? distance(from, to) : Number.NaN;
  });
}

/**
 * How many pieces are cut from stock for one frame: one per strut.
 * @param frame any frame
 */
export const cutCount = (frame: Frame): number => frame.struts.length;

/**
 * How many joints one frame has. Ends that stay open on the bench count: they are joined later, on site.
 * @param frame any frame
 */
export const jointCount = (frame: Frame): number => frame.joints.length;

/**
 * How many strut ends are glued on one frame: two per strut.
 * @param frame any frame
 */
export const glueEnds = (frame: Frame): number => 2 * frame.struts.length;
