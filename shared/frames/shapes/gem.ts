import { z } from 'zod';
import type { Frame, Joint } from '../frame';
import { bridge, floor, frameOfFaces, funnel, lid, ringJoints } from '../stacked-rings';
import type { Ring } from '../stacked-rings';
import { lengthMm, refuseManyStruts, refuseShortStruts, SHAPE_LIMITS, twistDegrees, whole } from './measures';
import type { Refuse } from './measures';

const ringSides = (name: string) => whole(name, SHAPE_LIMITS.leastSides, SHAPE_LIMITS.mostSides);

/**
 * A cut gem: a table ring on top, the girdle ring where it is joined on, and below a point or a second table. Widths are measured over
 * the corners; a ring that is not turned has a side in front.
 */
export const gemSchema = z.object({
  kind: z.literal('gem'),
  tableSides: ringSides('The number of sides of the table'),
  tableWidthMm: lengthMm('The width of the table'),
  /** Table above girdle. */
  crownMm: lengthMm('The height of the table above the girdle'),
  tableTwist: twistDegrees('The turn of the table'),
  girdleSides: ringSides('The number of sides of the girdle'),
  girdleWidthMm: lengthMm('The width of the girdle'),
  /** Girdle above the point or the second table. */
  depthMm: lengthMm('The height of the girdle above the foot'),
  girdleTwist: twistDegrees('The turn of the girdle'),
  foot: z.enum(['point', 'table'], { error: 'Say whether the gem ends in a point or in a second table.' }),
  footSides: ringSides('The number of sides of the second table').optional(),
  footWidthMm: lengthMm('The width of the second table').optional(),
  footTwist: twistDegrees('The turn of the second table').optional(),
});
type Gem = z.infer<typeof gemSchema>;

/** Refuses a gem that lacks measures of its second table, has too many struts or some too short to cut, each at its field. */
export function checkGem(gem: Gem, refuse: Refuse): void {
  let whole = true;
  if (gem.foot === 'table')
    for (const [key, name] of [
      ['footSides', 'the number of sides'],
      ['footWidthMm', 'the width'],
      ['footTwist', 'the turn, 0 for none,'],
    ] as const)
      if (gem[key] === undefined) {
        whole = false;
        refuse(key, `Give ${name} of the second table, or let the gem end in a point.`);
      }
  if (!whole) return;
  const advice = 'Make the ring wider or give it fewer sides.';
  for (const [key, sides, width] of [
    ['tableWidthMm', gem.tableSides, gem.tableWidthMm],
    ['girdleWidthMm', gem.girdleSides, gem.girdleWidthMm],
    ['footWidthMm', gem.footSides ?? 3, gem.foot === 'table' ? gem.footWidthMm : undefined],
  ] as const) {
    const side = (width ?? Infinity) * Math.sin(Math.PI / sides);
    if (side < SHAPE_LIMITS.leastStrutMm) {
      whole = false;
      refuse(
        key,
        `With ${sides} sides its struts would be ${side.toFixed(1)} mm; at least ${SHAPE_LIMITS.leastStrutMm} mm can be cut. ${advice}`,
      );
    }
  }
  if (!whole) return;
  const frame = buildGem(gem);
  if (!refuseManyStruts(frame.struts.length, refuse, 'girdleSides'))
    refuseShortStruts(frame, refuse, 'crownMm', 'Make the rings taller or differ more in width.');
}

/** A ring's turn in halves of its sides, as `ringJoints` counts it. */
const halfSteps = (sides: number, degrees: number): number => (degrees * sides) / 180;

/**
 * A cut gem.
 * @param gem measures in mm and degrees, as `shapeSchema` lets them through
 * @returns the point or second table first, then the girdle, then the table; between two rings the faces of their convex hull
 */
export function buildGem(gem: Gem): Frame {
  const joints: Joint[] = [];
  const add = (sides: number, widthMm: number, height: number, degrees: number): Ring => {
    const ring = { start: joints.length, sides, halfSteps: halfSteps(sides, degrees) };
    joints.push(...ringJoints(sides, widthMm / 2, height, ring.halfSteps));
    return ring;
  };
  const faces: number[][] = [];
  let foot: Ring | null = null;
  if (gem.foot === 'table')
    foot = add(gem.footSides ?? gem.tableSides, gem.footWidthMm ?? gem.tableWidthMm, 0, gem.footTwist ?? 0);
  else joints.push({ x: 0, y: 0, z: 0 });
  const girdle = add(gem.girdleSides, gem.girdleWidthMm, gem.depthMm, gem.girdleTwist);
  const table = add(gem.tableSides, gem.tableWidthMm, gem.depthMm + gem.crownMm, gem.tableTwist);
  if (foot) faces.push(floor(foot.start, foot.sides), ...bridge(foot, girdle));
  else faces.push(...funnel(girdle.start, girdle.sides, 0));
  faces.push(...bridge(girdle, table), lid(table.start, table.sides));
  return frameOfFaces(joints, faces);
}
