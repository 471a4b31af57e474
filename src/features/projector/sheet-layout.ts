/** A place for a piece on the sheet, px. */
export interface Cell {
  x: number;
  y: number;
  width: number;
  height: number;
}

const MOST_ASPECT = 4;
const LEAST_ASPECT = 0.3;
/** Room between pieces, as a part of their size. */
const GAP = 0.14;
/** How much smaller each try is than the one before, and where trying ends. */
const STEP = 0.985;
const MOST_TRIES = 600;

interface Row {
  members: number[];
  /** Of all its pieces, without what is between them. */
  width: number;
  height: number;
}

/** How much of a piece's slimness goes into its width: at 0.5 all cover the same area, at 1 all are equally high. */
const SLIM = 0.68;
const boxOf = (aspect: number, size: number) => ({
  width: size * aspect ** SLIM,
  height: size * aspect ** (SLIM - 1),
});

function rowsAt(size: number, aspects: readonly number[], width: number): Row[] {
  const gap = GAP * size;
  const rows: Row[] = [];
  aspects.forEach((aspect, i) => {
    const box = boxOf(aspect, size);
    const row = rows.at(-1);
    if (row && row.width + row.members.length * gap + box.width <= width) {
      row.members.push(i);
      row.width += box.width;
      row.height = Math.max(row.height, box.height);
    } else rows.push({ members: [i], ...box });
  });
  return rows;
}

const heightOf = (rows: readonly Row[], gap: number) =>
  rows.reduce((sum, row) => sum + row.height, 0) + (rows.length - 1) * gap;

/**
 * Pieces laid out on a sheet row by row in their order, about equally large and as large as they can be.
 * @param given width divided by height of each piece, in the order shown
 * @param width of the sheet, px
 * @param height of the sheet, px
 * @returns a place for each; none covers another, none reaches over the sheet
 */
export function sheetLayout(given: readonly number[], width: number, height: number): Cell[] {
  if (given.length === 0) return [];
  const aspects = given.map((aspect) => Math.min(MOST_ASPECT, Math.max(LEAST_ASPECT, aspect)));
  const widest = Math.max(...aspects);
  // From the largest that could ever fit down to the first that does: shrinking can only make rows fuller.
  let size = Math.min(width / widest ** SLIM, height * Math.min(...aspects) ** (1 - SLIM));
  let rows = rowsAt(size, aspects, width);
  for (let i = 0; i < MOST_TRIES && heightOf(rows, GAP * size) > height; i++) {
    size *= STEP;
    rows = rowsAt(size, aspects, width);
  }
  return placed(rows, aspects, size, width, height);
}

function placed(
  rows: readonly Row[],
  aspects: readonly number[],
  size: number,
  width: number,
  height: number,
): Cell[] {
  const cells: Cell[] = [];
  const high = rows.reduce((sum, row) => sum + row.height, 0);
  const between = Math.min((height - high) / Math.max(rows.length - 1, 1), size * 0.4);
  let y = Math.max(0, (height - high - between * (rows.length - 1)) / 2);
  for (const row of rows) {
    const even = (width - row.width) / Math.max(row.members.length - 1, 1);
    // A row of few pieces keeps the distance of its size and does not spread over the whole sheet.
    const gap = Math.min(even, GAP * size * 3);
    let x = Math.max(0, (width - row.width - gap * (row.members.length - 1)) / 2);
    for (const i of row.members) {
      const box = boxOf(aspects[i] ?? 1, size);
      cells[i] = { x, y: y + (row.height - box.height) / 2, ...box };
      x += box.width + gap;
    }
    y += row.height + between;
  }
  return cells;
}
