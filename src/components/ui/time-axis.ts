/** A label along an axis: its middle and half its width, px. */
type Span = { from: number; to: number };

/** Keeps labels from running into each other: the first come, the first written. */
export class LabelRow {
  private readonly taken: Span[] = [];

  /** @param gap the least room between two labels, px */
  constructor(private readonly gap = 6) {}

  /** Takes the place from `from` to `to` if it is free; says whether it was. */
  take(from: number, to: number): boolean {
    const free = this.taken.every((span) => to + this.gap <= span.from || from - this.gap >= span.to);
    if (free) this.taken.push({ from, to });
    return free;
  }
}

/** About the width of a text in Lexend, px: wide enough to keep labels apart, not for setting type. */
export const textWidth = (text: string, fontPx: number): number => text.length * fontPx * 0.6;
