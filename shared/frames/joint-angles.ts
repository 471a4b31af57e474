import type { Frame } from './frame';
import { cross, dot, size, subtract } from './vector';
import type { Vector } from './vector';

/** Two struts that meet at a joint and the angle between them, 0 to 180 degrees. `struts` are indexes from 0, the lower first. */
export type StrutPair = { struts: [number, number]; degrees: number };

/** All angles between struts at one joint; `smallest` is null where fewer than two struts end. `joint` is an index from 0. */
export type JointAngles = { joint: number; pairs: StrutPair[]; smallest: StrutPair | null };

type End = { strut: number; direction: Vector };

/** For every joint the struts that end there, with their directions away from it; struts without a length have none. */
function endsByJoint({ joints, struts }: Frame): End[][] {
  const ends: End[][] = joints.map(() => []);
  struts.forEach(([a, b], strut) => {
    const [from, to] = [joints[a], joints[b]];
    if (!from || !to) return;
    const direction = subtract(to, from);
    const length = size(direction);
    if (!(length > 0 && Number.isFinite(length))) return;
    ends[a]!.push({ strut, direction });
    ends[b]!.push({ strut, direction: subtract(from, to) });
  });
  return ends;
}

/** The angle between two directions. By both sine and cosine, since the cosine alone is blind near 0 and 180 degrees. */
export const degreesBetween = (a: Vector, b: Vector): number =>
  (Math.atan2(size(cross(a, b)), dot(a, b)) * 180) / Math.PI;

/**
 * The angles between struts at every joint.
 * @param frame joints in mm; struts that name missing joints or have no length count for nothing
 * @returns one entry per joint in the order of the joints; its pairs in the order of the struts, `smallest` the first of the least angle
 * Source: own.
 */
export function anglesAtJoints(frame: Frame): JointAngles[] {
  return endsByJoint(frame).map((ends, joint) => {
    const pairs: StrutPair[] = [];
    let smallest: StrutPair | null = null;
    for (const [at, one] of ends.entries())
      for (const other of ends.slice(at + 1)) {
        const pair: StrutPair = {
          struts: [one.strut, other.strut],
          degrees: degreesBetween(one.direction, other.direction),
        };
        pairs.push(pair);
        if (smallest === null || pair.degrees < smallest.degrees) smallest = pair;
      }
    return { joint, pairs, smallest };
  });
}
