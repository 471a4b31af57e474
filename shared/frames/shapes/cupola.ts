import { z } from 'zod';
import type { Frame } from '../frame';
import { bridge, floor, frameOfFaces, lid, radiusOfEdge, ringJoints } from '../stacked-rings';
import { lengthMm, SHAPE_LIMITS, whole } from './measures';
import type { Refuse } from './measures';

/** A ring over one of twice its sides, joined by squares and triangles in turn. */
export const cupolaSchema = z.object({
  kind: z.literal('cupola'),
  /** Of the upper ring; the lower one has twice as many. */
  sides: whole('The number of sides above', SHAPE_LIMITS.leastSides, SHAPE_LIMITS.mostSides / 2),
  /** Of both rings. */
  edgeMm: lengthMm('The edge'),
  /** Every strut as long as the edge; the height follows and `heightMm` is not read. */
  uniform: z.boolean({ error: 'Say whether all struts are to be of one length.' }),
  heightMm: lengthMm('The height').optional(),
});
type Cupola = z.infer<typeof cupolaSchema>;

/** With more sides the lower ring reaches farther out than the struts are long. */
const MOST_UNIFORM_SIDES = 5;

/** Refuses a cupola whose struts do not meet, or that is too wide, each at its field. */
export function checkCupola(shape: Cupola, refuse: Refuse): void {
  if (shape.uniform && shape.sides > MOST_UNIFORM_SIDES)
    refuse(
      'uniform',
      `Struts of one length close a cupola of 3, 4 or 5 sides; with ${shape.sides} they do not reach up. Give a height instead, or fewer sides.`,
    );
  if (!shape.uniform && shape.heightMm === undefined)
    refuse('heightMm', 'Give the height, or choose all struts of one length.');
  const radius = radiusOfEdge(shape.edgeMm, 2 * shape.sides);
  if (radius > SHAPE_LIMITS.mostMm)
    refuse(
      'edgeMm',
      `With ${2 * shape.sides} sides below, the ring would reach ${Math.round(radius)} mm from its centre; at most ${SHAPE_LIMITS.mostMm} mm. Make the edge shorter or give it fewer sides.`,
    );
}

/**
 * A cupola.
 * @param shape measures in mm, as `shapeSchema` lets them through
 * @returns the lower ring first, then the upper one
 * @throws RangeError when it is neither uniform nor has a height
 */
export function buildCupola({ sides, edgeMm, uniform, heightMm }: Cupola): Frame {
  // The slanted side of a square face is the edge; its run is the difference of the rings' inner radii.
  const height = uniform ? edgeMm * Math.sqrt(1 - 1 / (4 * Math.sin(Math.PI / sides) ** 2)) : heightMm;
  if (height === undefined) throw new RangeError('A cupola needs a height or equal struts.');
  const below = { start: 0, sides: 2 * sides, halfSteps: 0 };
  const above = { start: 2 * sides, sides, halfSteps: 0 };
  const joints = [
    ...ringJoints(2 * sides, radiusOfEdge(edgeMm, 2 * sides), 0, 0),
    ...ringJoints(sides, radiusOfEdge(edgeMm, sides), height, 0),
  ];
  return frameOfFaces(joints, [floor(0, 2 * sides), ...bridge(below, above), lid(2 * sides, sides)]);
}
