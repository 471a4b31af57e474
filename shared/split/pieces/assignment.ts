/** How much a row and a column have in common; pairs that are not listed have nothing. */
export type Overlap = { row: number; column: number; weight: number };

/** Rows and columns that hang together through overlaps. */
function parts(rows: number, overlaps: readonly Overlap[]): Overlap[][] {
  const parent = new Map<number, number>();
  const root = (node: number): number => {
    const up = parent.get(node);
    if (up === undefined || up === node) return node;
    const top = root(up);
    parent.set(node, top);
    return top;
  };
  for (const { row, column } of overlaps) {
    const [a, b] = [root(row), root(rows + column)];
    if (a !== b) parent.set(Math.max(a, b), Math.min(a, b));
  }
  const found = new Map<number, Overlap[]>();
  for (const overlap of overlaps) {
    const at = root(overlap.row);
    const list = found.get(at);
    if (list) list.push(overlap);
    else found.set(at, [overlap]);
  }
  return [...found.values()];
}

/** The Hungarian method on one part: least cost, rows not more than columns. Returns the column of each row. */
function cheapest(cost: readonly (readonly number[])[]): number[] {
  const [n, m] = [cost.length, cost[0]?.length ?? 0];
  const u = new Array<number>(n + 1).fill(0);
  const v = new Array<number>(m + 1).fill(0);
  const rowOf = new Array<number>(m + 1).fill(0);
  const way = new Array<number>(m + 1).fill(0);
  for (let i = 1; i <= n; i++) {
    rowOf[0] = i;
    let column = 0;
    const least = new Array<number>(m + 1).fill(Infinity);
    const seen = new Array<boolean>(m + 1).fill(false);
    do {
      seen[column] = true;
      const row = rowOf[column]!;
      let delta = Infinity;
      let next = 0;
      for (let j = 1; j <= m; j++) {
        if (seen[j]) continue;
        const reduced = cost[row - 1]![j - 1]! - u[row]! - v[j]!;
        if (reduced < least[j]!) {
          least[j] = reduced;
          way[j] = column;
        }
        if (least[j]! < delta) {
          delta = least[j]!;
          next = j;
        }
      }
      for (let j = 0; j <= m; j++)
        if (seen[j]) {
          u[rowOf[j]!]! += delta;
          v[j]! -= delta;
        } else least[j]! -= delta;
      column = next;
    } while (rowOf[column] !== 0);
    do {
      const before = way[column]!;
      rowOf[column] = rowOf[before]!;
      column = before;
    } while (column !== 0);
  }
  const columnOf = new Array<number>(n).fill(-1);
  for (let j = 1; j <= m; j++) if (rowOf[j]! > 0) columnOf[rowOf[j]! - 1] = j - 1;
  return columnOf;
}

/**
 * Pairs rows with columns so that the paired overlaps add up to as much as possible.
 * @param rows how many rows
 * @param overlaps pairs with a weight above 0, each pair at most once; whole numbers keep the sum exact
 * @returns per row its column, or -1; only pairs that overlap. The same input gives the same pairs.
 * Source: H. W. Kuhn, Naval Research Logistics Quarterly 2 (1955) 83-97, with potentials after J. Munkres (1957); parts that share
 *   nothing are solved by themselves.
 */
export function greatestAssignment(rows: number, overlaps: readonly Overlap[]): number[] {
  const columnOf = new Array<number>(rows).fill(-1);
  for (const part of parts(rows, overlaps)) {
    const own = [...new Set(part.map(({ row }) => row))].sort((a, b) => a - b);
    const others = [...new Set(part.map(({ column }) => column))].sort((a, b) => a - b);
    const weight = new Map(part.map(({ row, column, weight: value }) => [`${row}:${column}`, value]));
    // As many columns without overlap as there are rows: any row may stay without a partner.
    const cost = own.map((row) => [
      ...others.map((column) => -(weight.get(`${row}:${column}`) ?? 0)),
      ...own.map(() => 0),
    ]);
    cheapest(cost).forEach((at, index) => {
      const column = others[at];
      const row = own[index]!;
      if (column !== undefined && weight.has(`${row}:${column}`)) columnOf[row] = column;
    });
  }
  return columnOf;
}
