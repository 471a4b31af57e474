import { subtract, unit } from '../../frames/vector';
import type { Vector } from '../../frames/vector';

/** Rows shorter than this after taking out what is known add nothing: unit rows, so far above rounding. */
const NOTHING = 1e-7;

/** Counts, strut by strut, in how many independent ways struts hold joints: the rank of the rigidity matrix. */
export type StiffnessCount = {
  /** Adds a strut between two joints; true when it holds something that nothing held before. */
  add(a: number, b: number): boolean;
  readonly rank: number;
};

/**
 * A count of stiffness that struts are added to one after the other.
 * @param joints places of the joints, mm; a plane frame with all heights 0 is counted in its plane
 * @returns a counter at rank 0. A pin-jointed frame of n joints in space is stiff at rank 3 n - 6, in its plane at 2 n - 3.
 * Source: rows of the rigidity matrix, orthogonalised by Gram and Schmidt, twice over for accuracy.
 */
export function stiffnessCount(joints: readonly Vector[]): StiffnessCount {
  const basis: Float64Array[] = [];
  const rest = (a: number, b: number): Float64Array | null => {
    const row = new Float64Array(3 * joints.length);
    const { x, y, z } = unit(subtract(joints[a]!, joints[b]!));
    row.set([x, y, z], 3 * a);
    row.set([-x, -y, -z], 3 * b);
    for (let pass = 0; pass < 2; pass++)
      for (const known of basis) {
        let share = 0;
        for (let k = 0; k < row.length; k++) share += row[k]! * known[k]!;
        if (share !== 0) for (let k = 0; k < row.length; k++) row[k]! -= share * known[k]!;
      }
    const length = Math.hypot(...row);
    return length > NOTHING ? row.map((value) => value / length) : null;
  };
  return {
    add(a, b) {
      const row = rest(a, b);
      if (row) basis.push(row);
      return row !== null;
    },
    get rank() {
      return basis.length;
    },
  };
}
