import { pieceLetter } from './codes';

/**
 * Colours that tell pieces apart, on paper and at night. On paper as in the notes to the pictures; the night set was searched for: each
 * at least 4.6:1 on its ground, any two at least 28 apart (CIE76) in normal, protan, deutan and tritan sight. The token is the name of
 * the colour in the stylesheets.
 */
export const PIECE_COLOURS = [
  { token: 'piece-rose', paper: '#c04555', night: '#d45766' },
  { token: 'piece-violet', paper: '#38076d', night: '#995dff' },
  { token: 'piece-ochre', paper: '#956a04', night: '#b2890a' },
  { token: 'piece-blue', paper: '#4072af', night: '#538bbe' },
  { token: 'piece-plum', paper: '#390721', night: '#ffe2ff' },
  { token: 'piece-green', paper: '#0d3e00', night: '#afff97' },
] as const;

/** Line patterns that tell pieces apart without colour; lengths of strokes and gaps in px, none for a solid line. */
export const PIECE_PATTERNS = [
  { name: 'solid', dash: [] },
  { name: 'long dashes', dash: [11, 4] },
  { name: 'short dashes', dash: [5, 3.5] },
  { name: 'dash and dot', dash: [12, 3, 2, 3] },
  { name: 'dots', dash: [2, 4] },
  { name: 'dash and two dots', dash: [12, 3, 2, 3, 2, 3] },
] as const;

export type PieceColour = (typeof PIECE_COLOURS)[number]['token'];
export type PiecePattern = (typeof PIECE_PATTERNS)[number]['name'];

/** How a piece is told from its neighbours in a picture. No two pieces have the same letter. */
export type PieceMark = { letter: string; colour: PieceColour; pattern: PiecePattern };

/** Two neighbours that had to share a colour or a pattern. */
export type MarkClash = { pieces: [number, number]; colour: boolean; pattern: boolean };

/** Pieces ordered so that each has as few neighbours before it as possible. */
function smallestLast(neighbours: readonly ReadonlySet<number>[]): number[] {
  const left = new Set(neighbours.keys());
  const degree = neighbours.map((list) => list.size);
  const order: number[] = [];
  while (left.size > 0) {
    let least = -1;
    // Later pieces are put last, so that with no neighbours the order is that of the pieces.
    for (const piece of left) if (least < 0 || degree[piece]! <= degree[least]!) least = piece;
    left.delete(least);
    order.push(least);
    for (const other of neighbours[least]!) degree[other]! -= 1;
  }
  return order.reverse();
}

/**
 * A letter, a line pattern and a colour for each piece, so that neighbours differ in colour and in pattern.
 * @param count how many pieces
 * @param neighbours per piece the pieces it meets (see `pieceAdjacency`); none when left out
 * @returns marks in the order of the pieces, and neighbours that have to share a colour or a pattern. There are none where every part of
 *   the split has a piece with at most five neighbours in it, as in any split of a surface (planar graphs have one with five or fewer).
 *   The same pair of colour and pattern comes again only where it must; up to 36 pieces without neighbours have 36 pairs.
 * Source: smallest-last ordering, D. W. Matula and L. L. Beck, Journal of the ACM 30 (1983) 417-427.
 */
export function pieceMarks(
  count: number,
  neighbours: readonly (readonly number[])[] = [],
): { marks: PieceMark[]; clashes: MarkClash[] } {
  const around = Array.from({ length: count }, () => new Set<number>());
  neighbours.forEach((list, piece) => {
    for (const other of list)
      if (other !== piece && around[piece] && around[other]) {
        around[piece].add(other);
        around[other].add(piece);
      }
  });
  const chosen: ({ colour: number; pattern: number } | undefined)[] = around.map(() => undefined);
  const used = PIECE_COLOURS.map(() => PIECE_PATTERNS.map(() => 0));
  let taken = 0;
  for (const piece of smallestLast(around)) {
    const near = [...around[piece]!].flatMap((other) => chosen[other] ?? []);
    let best = { cost: Infinity, colour: 0, pattern: 0 };
    PIECE_COLOURS.forEach((_, step) => {
      // Colours take turns, and the pattern moves on when they come round.
      const colour = (taken + step) % PIECE_COLOURS.length;
      PIECE_PATTERNS.forEach((__, turn) => {
        const pattern = (taken + Math.floor(taken / PIECE_COLOURS.length) + turn) % PIECE_PATTERNS.length;
        const shared =
          near.filter((other) => other.colour === colour).length +
          near.filter((other) => other.pattern === pattern).length;
        const cost = shared * count + used[colour]![pattern]!;
        if (cost < best.cost) best = { cost, colour, pattern };
      });
    });
    chosen[piece] = best;
    used[best.colour]![best.pattern]! += 1;
    taken++;
  }
  const clashes: MarkClash[] = [];
  around.forEach((list, piece) => {
    for (const other of list) {
      const [a, b] = [chosen[piece]!, chosen[other]!];
      const [colour, pattern] = [a.colour === b.colour, a.pattern === b.pattern];
      if (other > piece && (colour || pattern)) clashes.push({ pieces: [piece, other], colour, pattern });
    }
  });
  return {
    marks: chosen.map((mark, piece) => ({
      letter: pieceLetter(piece),
      colour: PIECE_COLOURS[mark!.colour]!.token,
      pattern: PIECE_PATTERNS[mark!.pattern]!.name,
    })),
    clashes,
  };
}
