/** A matrix column by column: entry (row, column) stands at `data[column * rows + row]`. */
export type Dense = { rows: number; cols: number; data: Float64Array };

/** A downdated squared norm below this share of the last one computed in full has lost its digits. */
const STALE = 1e-8;
const MOST_PASSES = 3;

/** A matrix of zeros. */
export const zeros = (rows: number, cols: number): Dense => ({
  rows,
  cols,
  data: new Float64Array(rows * cols),
});

/** Reflects column `col` below `row` onto its first entry and carries the reflection through the columns from `next` on. */
function reflect({ rows, cols, data }: Dense, row: number, col: number, next: number): void {
  const start = col * rows;
  let below = 0;
  for (let i = row + 1; i < rows; i++) below += data[start + i]! ** 2;
  const head = data[start + row]!;
  if (below === 0) return;
  const length = Math.sqrt(head * head + below);
  // Away from the head, so that nothing cancels.
  const first = head > 0 ? head + length : head - length;
  const weight = 2 / (first * first + below);
  data[start + row] = first;
  for (let j = next; j < cols; j++) {
    const at = j * rows;
    let share = 0;
    for (let i = row; i < rows; i++) share += data[start + i]! * data[at + i]!;
    share *= weight;
    if (share !== 0) for (let i = row; i < rows; i++) data[at + i]! -= share * data[start + i]!;
  }
  data[start + row] = head > 0 ? -length : length;
  data.fill(0, start + row + 1, start + rows);
}

const squareBelow = ({ rows, data }: Dense, row: number, col: number): number => {
  let sum = 0;
  for (let i = row; i < rows; i++) sum += data[col * rows + i]! ** 2;
  return sum;
};

function swapColumns({ rows, data }: Dense, a: number, b: number): void {
  if (a === b) return;
  const kept = data.slice(a * rows, (a + 1) * rows);
  data.copyWithin(a * rows, b * rows, (b + 1) * rows);
  data.set(kept, b * rows);
}

/**
 * Turns the first columns of a matrix into a triangle, the longest column first, until what is left of them is nothing.
 * @param matrix changed in place; its first `rank` rows end as the triangle with what stands beside it, the rows below as what is left of
 *   the columns from `own` on
 * @param own how many columns, from the first, take part in the choice, 0 to all
 * @param tolerance columns that are shorter after taking out what is known count as nothing, above 0
 * @returns `rank` of the first columns, and per place the column that stood there before
 * Source: Householder QR with column pivoting, Businger & Golub 1965; Golub & Van Loan, Matrix Computations, 5.4.
 */
export function pivotedTriangle(
  matrix: Dense,
  own: number,
  tolerance: number,
): { rank: number; order: Int32Array } {
  const { rows, data } = matrix;
  const order = Int32Array.from({ length: own }, (_, col) => col);
  const squares = Float64Array.from(order, (col) => squareBelow(matrix, 0, col));
  const full = squares.slice();
  let rank = 0;
  for (; rank < Math.min(rows, own); rank++) {
    let longest = rank;
    for (let col = rank + 1; col < own; col++) if (squares[col]! > squares[longest]!) longest = col;
    // The downdated norms choose, a norm computed in full decides.
    squares[longest] = squareBelow(matrix, rank, longest);
    if (Math.sqrt(squares[longest]!) <= tolerance) {
      let most = 0;
      for (let col = rank; col < own; col++) {
        squares[col] = squareBelow(matrix, rank, col);
        if (squares[col]! > most) [most, longest] = [squares[col]!, col];
      }
      if (Math.sqrt(most) <= tolerance) break;
    }
    swapColumns(matrix, rank, longest);
    for (const list of [order, squares, full]) [list[rank], list[longest]] = [list[longest]!, list[rank]!];
    reflect(matrix, rank, rank, rank + 1);
    for (let col = rank + 1; col < own; col++) {
      squares[col] = Math.max(0, squares[col]! - data[col * rows + rank]! ** 2);
      if (squares[col]! < STALE * full[col]!) squares[col] = full[col] = squareBelow(matrix, rank + 1, col);
    }
  }
  return { rank, order };
}

/**
 * Turns the lower right corner of a matrix into a triangle, without choice of columns.
 * @param matrix changed in place
 * @param fromRow first row of the corner
 * @param fromCol first column of the corner
 * @returns how many of its rows may still hold something; those below are zero
 */
export function plainTriangle(matrix: Dense, fromRow: number, fromCol: number): number {
  const steps = Math.min(matrix.rows - fromRow, matrix.cols - fromCol);
  for (let k = 0; k < steps; k++) reflect(matrix, fromRow + k, fromCol + k, fromCol + k + 1);
  return Math.max(0, steps);
}

/**
 * An orthonormal basis of what a matrix sends to zero.
 * @param matrix changed in place
 * @param tolerance as for `pivotedTriangle`
 * @returns one vector per free dimension, each as long as the matrix has columns
 */
export function denseNullSpace(matrix: Dense, tolerance: number): Float64Array[] {
  const { rows, cols, data } = matrix;
  const { rank, order } = pivotedTriangle(matrix, cols, tolerance);
  const found: Float64Array[] = [];
  for (let free = rank; free < cols; free++) {
    const vector = new Float64Array(cols);
    vector[order[free]!] = 1;
    for (let i = rank - 1; i >= 0; i--) {
      let sum = data[free * rows + i]!;
      for (let j = i + 1; j < rank; j++) sum += data[j * rows + i]! * vector[order[j]!]!;
      vector[order[i]!] = -sum / data[i * rows + i]!;
    }
    found.push(vector);
  }
  return orthonormal(found);
}

const product = (a: Float64Array, b: Float64Array): number => {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
};

/** Where a vector is not zero: from one place to before another. */
export type Range = readonly [number, number];

/**
 * Vectors at right angles and of length 1 that span the same as some independent ones.
 * @param vectors changed in place, independent
 * @param ranges per vector where it may differ from zero; of any two, one holds the other, and then stands later, or they have nothing in
 *   common. Left out: everywhere.
 * @returns the same count in the same order; the first k span what the first k spanned
 * Source: modified Gram-Schmidt with reorthogonalisation, Björck 1994.
 */
export function orthonormal(vectors: readonly Float64Array[], ranges?: readonly Range[]): Float64Array[] {
  vectors.forEach((vector, at) => {
    const [low, high] = ranges?.[at] ?? [0, vector.length];
    let length = Math.sqrt(product(vector, vector));
    for (let pass = 0; pass < MOST_PASSES; pass++) {
      for (let k = 0; k < at; k++) {
        const known = vectors[k]!;
        const [from, to] = ranges?.[k] ?? [0, vector.length];
        if (from < low || to > high) continue;
        let share = 0;
        for (let i = from; i < to; i++) share += vector[i]! * known[i]!;
        if (share !== 0) for (let i = from; i < to; i++) vector[i]! -= share * known[i]!;
      }
      const before = length;
      length = Math.sqrt(product(vector, vector));
      // What lost less than half its length lost no digits that count.
      if (length > 0.5 * before) break;
    }
    if (length > 0) for (let i = 0; i < vector.length; i++) vector[i]! /= length;
  });
  return [...vectors];
}

/**
 * What is left of an orthonormal basis when some directions inside it are taken away.
 * @param basis orthonormal vectors, changed in place
 * @param without orthonormal vectors inside the span of the basis, fewer than the basis or as many
 * @returns orthonormal vectors at right angles to `without`, as many fewer than the basis
 * Source: Householder reflections of the coordinates of `without` in the basis.
 */
export function orthogonalPart(
  basis: readonly Float64Array[],
  without: readonly Float64Array[],
): Float64Array[] {
  const count = basis.length;
  const taken = Math.min(without.length, count);
  // The last vectors reach farthest, so they give way first and the ones that stay near a few joints stay so.
  const turned = [...basis].reverse();
  const coordinates = without.slice(0, taken).map((one) => Float64Array.from(turned, (b) => product(b, one)));
  for (let k = 0; k < taken; k++) {
    const mirror = coordinates[k]!.slice();
    mirror.fill(0, 0, k);
    const length = Math.sqrt(product(mirror, mirror));
    mirror[k]! += mirror[k]! > 0 ? length : -length;
    const square = product(mirror, mirror);
    if (square === 0) continue;
    for (const one of coordinates.slice(k)) {
      const share = (2 * product(mirror, one)) / square;
      for (let i = k; i < count; i++) one[i]! -= share * mirror[i]!;
    }
    const along = new Float64Array(turned[0]?.length ?? 0);
    for (let i = k; i < count; i++) {
      const share = mirror[i]!;
      if (share !== 0) for (let r = 0; r < along.length; r++) along[r]! += share * turned[i]![r]!;
    }
    for (let i = k; i < count; i++) {
      const share = (2 * mirror[i]!) / square;
      if (share !== 0) for (let r = 0; r < along.length; r++) turned[i]![r]! -= share * along[r]!;
    }
  }
  return turned.slice(taken).reverse();
}
