import type { Frame, Joint } from '../frame';
import type { Stiffness } from './analyse-stiffness';
import { fastestOne } from './movements';
import { heldAt } from './stiff-parts';

/**
 * One mechanism as it is shown: where each joint goes while no strut changes its length.
 * @param frame of which the stiffness was computed
 * @param stiffness of the frame
 * @param way which mechanism, from 0, below the length of its basis
 * @param hold `largest part`: the largest part that keeps its shape stands still, if there is one; `nothing`: the frame moves about its middle
 * @returns a direction per joint, in the order of the joints; the fastest joint moves 1. Add a share of them, in mm, to the places of the
 *   joints; for large shares struts seem to grow, since a mechanism is exact only where it starts.
 * @throws RangeError where there is no such mechanism or the basis was not listed
 */
export function shownMovement(
  frame: Frame,
  stiffness: Stiffness,
  way: number,
  hold: 'largest part' | 'nothing' = 'largest part',
): Joint[] {
  const movement = stiffness.basis?.[way];
  if (!movement)
    throw new RangeError(
      `There is no way of moving number ${way + 1} among the ${stiffness.basis?.length ?? 0} listed.`,
    );
  const part = hold === 'largest part' ? stiffness.parts[0] : undefined;
  const seen = fastestOne(part ? heldAt(frame.joints, movement, part) : movement);
  return frame.joints.map((_, joint) => ({
    x: seen[3 * joint]!,
    y: seen[3 * joint + 1]!,
    z: seen[3 * joint + 2]!,
  }));
}
