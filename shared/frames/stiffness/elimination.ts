import { pivotedTriangle, plainTriangle, zeros } from './dense';
import type { Dense } from './dense';
import type { Front } from './dissection';
import type { RigidityMatrix } from './rigidity-matrix';

/** What a front leaves behind: `rank` rows over its columns, the ones that hold first, then those left free, then the border's. */
type Reduced = {
  rank: number;
  own: number;
  /** Column of the whole matrix (three per joint) per place. */
  columns: Int32Array;
  /** Column by column, `rank` numbers each. */
  rows: Float64Array;
  /** First front of its tree. */
  first: number;
};

/** A rigidity matrix worked off: a sparse triangle, and which movements of joints stay free. */
export type Elimination = {
  size: number;
  rank: number;
  fronts: Reduced[];
  /** Free columns, each with the front that left it free. */
  free: { column: number; front: number }[];
};

/** Rows that a front hands to its parent. */
type Handed = { columns: Int32Array; count: number; matrix: Dense; fromRow: number; fromCol: number };

/**
 * Works off a rigidity matrix front by front.
 * @param matrix its rows
 * @param fronts from `dissection` of the same frame
 * @param tolerance what is shorter counts as nothing, above 0
 * @returns the triangle; its rank is that of the matrix, exactly so for one that differs from it by about the tolerance
 * Source: multifrontal sparse QR with rank detection (J. W. H. Liu 1986; T. A. Davis, ACM TOMS 38, 2011), here with columns chosen inside
 *   each front, which decides more safely than one diagonal at a time.
 */
export function eliminate(matrix: RigidityMatrix, fronts: readonly Front[], tolerance: number): Elimination {
  const size = 3 * matrix.joints;
  const found: Elimination = { size, rank: 0, fronts: [], free: [] };
  const handed: (Handed | null)[] = [];
  const placeOf = new Int32Array(size);
  fronts.forEach((front, at) => {
    const columns = Int32Array.from(
      [...front.own, ...front.border].flatMap((j) => [3 * j, 3 * j + 1, 3 * j + 2]),
    );
    const own = 3 * front.own.length;
    const parts = front.children.map((child) => handed[child]!);
    const rows = front.struts.length + parts.reduce((sum, part) => sum + part.count, 0);
    const dense = zeros(rows, columns.length);
    columns.forEach((column, place) => (placeOf[column] = place));
    readStruts(dense, matrix, front.struts, placeOf);
    readHanded(dense, parts, front.struts.length, placeOf);
    front.children.forEach((child) => (handed[child] = null));
    const { rank, order } = pivotedTriangle(dense, own, tolerance);
    const count = plainTriangle(dense, rank, own);
    handed.push({ columns, count, matrix: dense, fromRow: rank, fromCol: own });
    found.fronts.push(reduced(dense, columns, order, rank, front.first));
    for (let k = rank; k < own; k++) found.free.push({ column: columns[order[k]!]!, front: at });
    found.rank += rank;
  });
  return found;
}

function readStruts(
  dense: Dense,
  { ends, along }: RigidityMatrix,
  struts: readonly number[],
  placeOf: Int32Array,
): void {
  struts.forEach((s, row) => {
    for (let axis = 0; axis < 3; axis++) {
      const value = along[3 * s + axis]!;
      dense.data[placeOf[3 * ends[2 * s]! + axis]! * dense.rows + row]! += value;
      dense.data[placeOf[3 * ends[2 * s + 1]! + axis]! * dense.rows + row]! -= value;
    }
  });
}

function readHanded(dense: Dense, parts: readonly Handed[], from: number, placeOf: Int32Array): void {
  let row = from;
  for (const { columns, count, matrix, fromRow, fromCol } of parts) {
    for (let col = fromCol; col < columns.length; col++) {
      const source = col * matrix.rows + fromRow;
      dense.data.set(
        matrix.data.subarray(source, source + count),
        placeOf[columns[col]!]! * dense.rows + row,
      );
    }
    row += count;
  }
}

function reduced(dense: Dense, columns: Int32Array, order: Int32Array, rank: number, first: number): Reduced {
  const rows = new Float64Array(rank * columns.length);
  for (let col = 0; col < columns.length; col++)
    rows.set(dense.data.subarray(col * dense.rows, col * dense.rows + rank), col * rank);
  const placed = columns.slice();
  order.forEach((from, place) => (placed[place] = columns[from]!));
  return { rank, own: order.length, columns: placed, rows, first };
}

/** Sets the held columns of one front so that its rows come to `right`, with all other columns given. */
function solveFront({ rank, columns, rows }: Reduced, x: Float64Array, right: Float64Array): void {
  for (let col = rank; col < columns.length; col++) {
    const value = x[columns[col]!]!;
    if (value !== 0) for (let i = 0; i < rank; i++) right[i]! -= rows[col * rank + i]! * value;
  }
  for (let i = rank - 1; i >= 0; i--) {
    const value = right[i]! / rows[i * rank + i]!;
    x[columns[i]!] = value;
    if (value !== 0) for (let k = 0; k < i; k++) right[k]! -= rows[i * rank + k]! * value;
  }
}

/**
 * A movement that stretches no strut, from given movements of the free columns.
 * @param elimination of a rigidity matrix
 * @param x the free columns set, all others zero; filled in place
 * @param top the last front whose columns may move; those after it stay as they are
 */
export function fillMovement({ fronts }: Elimination, x: Float64Array, top = fronts.length - 1): void {
  for (let at = top; at >= fronts[top]!.first; at--) {
    const front = fronts[at]!;
    solveFront(front, x, new Float64Array(front.rank));
  }
}

/**
 * One step of inverse iteration on the held columns: x such that (matrix transposed times matrix) x = w there.
 * @param elimination of a rigidity matrix
 * @param w three numbers per joint; changed in place
 * @returns x, zero in the free columns
 */
export function solveSquare({ fronts, size }: Elimination, w: Float64Array): Float64Array {
  const rights = fronts.map(({ rank, columns, rows }) => {
    const y = new Float64Array(rank);
    for (let i = 0; i < rank; i++) {
      let sum = w[columns[i]!]!;
      for (let k = 0; k < i; k++) sum -= rows[i * rank + k]! * y[k]!;
      y[i] = sum / rows[i * rank + i]!;
    }
    for (let col = rank; col < columns.length; col++) {
      let sum = 0;
      for (let i = 0; i < rank; i++) sum += rows[col * rank + i]! * y[i]!;
      w[columns[col]!]! -= sum;
    }
    return y;
  });
  const x = new Float64Array(size);
  for (let at = fronts.length - 1; at >= 0; at--) solveFront(fronts[at]!, x, rights[at]!);
  return x;
}
