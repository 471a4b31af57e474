/** A rectangle on the page, px. */
export type Box = { left: number; top: number; right: number; bottom: number };
export type Segment = { x1: number; y1: number; x2: number; y2: number };
export type Place = { x: number; y: number };

/** Width of a digit of Lexend's digit cells, in em; height of a digit with a little air. */
const DIGIT_EM = 0.625;
const HEIGHT_EM = 0.9;
const CELL_PX = 24;

/** Half the size of a number's label, px. */
export const labelHalf = (text: string, fontPx: number): { w: number; h: number } => ({
  w: (text.length * DIGIT_EM * fontPx) / 2,
  h: (HEIGHT_EM * fontPx) / 2,
});

/** The box of a label of half size `half` (px) round its centre. */
export const boxAround = ({ x, y }: Place, half: { w: number; h: number }): Box => ({
  left: x - half.w,
  top: y - half.h,
  right: x + half.w,
  bottom: y + half.h,
});

const meet = (a: Box, b: Box): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

/** Whether a line passes through a box (clipping after Liang and Barsky 1984). */
export function crosses({ x1, y1, x2, y2 }: Segment, box: Box): boolean {
  let [enter, leave] = [0, 1];
  const sides: [number, number][] = [
    [x1 - x2, x1 - box.left],
    [x2 - x1, box.right - x1],
    [y1 - y2, y1 - box.top],
    [y2 - y1, box.bottom - y1],
  ];
  for (const [slope, room] of sides) {
    if (slope === 0) {
      if (room < 0) return false;
    } else if (slope < 0) enter = Math.max(enter, room / slope);
    else leave = Math.min(leave, room / slope);
  }
  return enter <= leave;
}

/** What is already on the page, in cells so that only the near things are compared. */
export class PageContent {
  private readonly lines = new Map<string, Segment[]>();
  private readonly boxes = new Map<string, Box[]>();

  /**
   * An empty page.
   * @param page the paper: labels outside it cannot be read
   */
  constructor(private readonly page: Box) {}

  private *cells(box: Box): Generator<string> {
    for (let cx = Math.floor(box.left / CELL_PX); cx <= Math.floor(box.right / CELL_PX); cx++)
      for (let cy = Math.floor(box.top / CELL_PX); cy <= Math.floor(box.bottom / CELL_PX); cy++)
        yield `${cx},${cy}`;
  }

  addLine(line: Segment): void {
    const around: Box = {
      left: Math.min(line.x1, line.x2),
      right: Math.max(line.x1, line.x2),
      top: Math.min(line.y1, line.y2),
      bottom: Math.max(line.y1, line.y2),
    };
    for (const cell of this.cells(around)) {
      const [cx, cy] = cell.split(',').map(Number) as [number, number];
      const box = { left: cx * CELL_PX, top: cy * CELL_PX, right: 0, bottom: 0 };
      [box.right, box.bottom] = [box.left + CELL_PX, box.top + CELL_PX];
      if (!crosses(line, box)) continue;
      const list = this.lines.get(cell);
      if (list) list.push(line);
      else this.lines.set(cell, [line]);
    }
  }

  addBox(box: Box): void {
    for (const cell of this.cells(box)) {
      const list = this.boxes.get(cell);
      if (list) list.push(box);
      else this.boxes.set(cell, [box]);
    }
  }

  /** How much a label in this box would cover: other labels and joints weigh most, then the page's edge, then lines. */
  cover(box: Box): number {
    let cost = 0;
    const seen = new Set<Segment | Box>();
    for (const cell of this.cells(box)) {
      for (const line of this.lines.get(cell) ?? [])
        if (!seen.has(line) && crosses(line, box)) {
          seen.add(line);
          cost += 10;
        }
      for (const other of this.boxes.get(cell) ?? [])
        if (!seen.has(other) && meet(other, box)) {
          seen.add(other);
          cost += 40;
        }
    }
    const { left, top, right, bottom } = this.page;
    if (box.left < left || box.top < top || box.right > right || box.bottom > bottom) cost += 30;
    return cost;
  }

  /**
   * Puts a number down at the first candidate with the least cover and keeps its place taken.
   * @param candidates places from the most wanted, px; at least one
   * @returns the place, and whether it covers nothing
   */
  place(text: string, fontPx: number, candidates: readonly Place[]): Place & { clear: boolean } {
    const half = labelHalf(text, fontPx);
    let best = candidates[0]!;
    let least = Number.POSITIVE_INFINITY;
    for (const candidate of candidates) {
      const cost = this.cover(boxAround(candidate, half));
      if (cost < least) [best, least] = [candidate, cost];
      if (cost === 0) break;
    }
    this.addBox(boxAround(best, half));
    return { x: best.x, y: best.y, clear: least === 0 };
  }
}
