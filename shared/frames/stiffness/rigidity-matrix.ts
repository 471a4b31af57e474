import type { Frame, Joint } from '../frame';
import { zeros } from './dense';
import type { Dense } from './dense';

/**
 * The rigidity matrix of a frame, sparse: strut s reads the movement of its two ends along itself, with `along` at the first end and
 * its opposite at the second. Rows have no unit, so a tolerance holds for every size of frame.
 */
export type RigidityMatrix = {
  joints: number;
  struts: number;
  /** Two joints per strut, from 0. */
  ends: Int32Array;
  /** Three numbers per strut: the direction from the second end to the first, of length 1; zeros for a strut without length. */
  along: Float64Array;
};

/**
 * The rigidity matrix of a frame as a pin-jointed model in space.
 * @param joints mm, finite
 * @param struts pairs of existing joints; a strut without length gets a row of zeros: it holds nothing
 * @returns one row per strut in the order of the struts
 * Source: S. Pellegrino & C. R. Calladine, International Journal of Solids and Structures 22 (1986) 409-428; rows of length 1 instead
 *   of coordinate differences, which changes neither rank nor mechanisms.
 */
export function rigidityMatrix(joints: readonly Joint[], struts: Frame['struts']): RigidityMatrix {
  const ends = new Int32Array(2 * struts.length);
  const along = new Float64Array(3 * struts.length);
  struts.forEach(([a, b], strut) => {
    const [from, to] = [joints[a]!, joints[b]!];
    ends.set([a, b], 2 * strut);
    const [x, y, z] = [from.x - to.x, from.y - to.y, from.z - to.z];
    const length = Math.hypot(x, y, z);
    if (length > 0) along.set([x / length, y / length, z / length], 3 * strut);
  });
  return { joints: joints.length, struts: struts.length, ends, along };
}

/**
 * How much each strut would have to stretch for a movement of the joints.
 * @param matrix a rigidity matrix
 * @param movement three numbers per joint
 * @returns one number per strut, in the unit of the movement; all zero for a mechanism
 */
export function stretches({ struts, ends, along }: RigidityMatrix, movement: Float64Array): Float64Array {
  const found = new Float64Array(struts);
  for (let s = 0; s < struts; s++) {
    const [a, b] = [3 * ends[2 * s]!, 3 * ends[2 * s + 1]!];
    for (let axis = 0; axis < 3; axis++)
      found[s]! += along[3 * s + axis]! * (movement[a + axis]! - movement[b + axis]!);
  }
  return found;
}

/** The equilibrium matrix, which is the rigidity matrix turned over: three rows per joint, a column per strut. */
export function equilibriumMatrix({ joints, struts, ends, along }: RigidityMatrix): Dense {
  const dense = zeros(3 * joints, struts);
  for (let s = 0; s < struts; s++)
    for (let axis = 0; axis < 3; axis++) {
      const column = s * dense.rows;
      dense.data[column + 3 * ends[2 * s]! + axis]! += along[3 * s + axis]!;
      dense.data[column + 3 * ends[2 * s + 1]! + axis]! -= along[3 * s + axis]!;
    }
  return dense;
}
