import { describe, expect, it } from 'vitest';
import {
  PIECE_COLOURS,
  PIECE_PATTERNS,
  pieceCodes,
  pieceLetter,
  pieceMarks,
} from '../../../shared/split/pieces';
import { contrast, difference, rgbOf, seenAs, SIGHTS } from '../ui/colours';

const GROUND = { paper: '#fbfaf6', night: '#12161f' } as const;
/** Machado, Oliveira and Fernandes 2009, tritan, severity 1.0. */
const TRITAN = [
  [1.255528, -0.076749, -0.178779],
  [-0.078411, 0.930809, 0.147602],
  [0.004733, 0.691367, 0.3039],
] as const;

describe.each(['paper', 'night'] as const)('colours of pieces on %s', (theme) => {
  const colours = PIECE_COLOURS.map((colour) => colour[theme]);

  it('each colour > on its ground > at least 4.5:1, so that codes may be written in it (WCAG 2.2, 1.4.3)', () => {
    for (const colour of colours) expect(contrast(colour, GROUND[theme])).toBeGreaterThanOrEqual(4.5);
  });

  it.each([...Object.entries(SIGHTS), ['tritan (Machado)', TRITAN] as const])(
    'any two colours > in %s sight > at least 28 apart (CIE76)',
    (_, sight) => {
      const seen = colours.map((colour) => seenAs(rgbOf(colour), sight));
      seen.forEach((a, k) =>
        seen.slice(k + 1).forEach((b) => expect(difference(a, b)).toBeGreaterThanOrEqual(28)),
      );
    },
  );
});

describe('pieceMarks', () => {
  it('36 pieces without neighbours > marked > 36 pairs of colour and pattern, no letter twice, none misheard', () => {
    const { marks, clashes } = pieceMarks(36);
    expect(clashes).toEqual([]);
    expect(new Set(marks.map(({ colour, pattern }) => `${colour} ${pattern}`)).size).toBe(
      PIECE_COLOURS.length * PIECE_PATTERNS.length,
    );
    expect(new Set(marks.map(({ letter }) => letter)).size).toBe(36);
    expect(marks.map(({ letter }) => letter).join('')).not.toMatch(/[OIBDP]/);
  });

  it('six pieces that all meet each other > marked > all colours and all patterns differ', () => {
    const all = [0, 1, 2, 3, 4, 5];
    const { marks, clashes } = pieceMarks(
      6,
      all.map((piece) => all.filter((other) => other !== piece)),
    );
    expect(clashes).toEqual([]);
    expect(new Set(marks.map(({ colour }) => colour)).size).toBe(6);
    expect(new Set(marks.map(({ pattern }) => pattern)).size).toBe(6);
  });

  it('seven pieces that all meet each other > marked > one pair has to share, and is named', () => {
    const all = [0, 1, 2, 3, 4, 5, 6];
    const { clashes } = pieceMarks(
      7,
      all.map((piece) => all.filter((other) => other !== piece)),
    );
    expect(clashes.length).toBeGreaterThan(0);
    for (const { pieces, colour, pattern } of clashes) {
      expect(pieces[0]).toBeLessThan(pieces[1]);
      expect(colour || pattern).toBe(true);
    }
  });

  it('no piece > marked > nothing', () => {
    expect(pieceMarks(0)).toEqual({ marks: [], clashes: [] });
  });
});

describe('pieceLetter', () => {
  it('letters after the last > named > two letters, in order', () => {
    expect([0, 1, 2, 20, 21, 22, 42].map(pieceLetter)).toEqual(['A', 'C', 'E', 'Z', 'AA', 'AC', 'CA']);
  });
});

describe('pieceCodes', () => {
  it('codes that exist > three more > numbered on from the highest of the letter', () => {
    expect(pieceCodes('v', 3, ['V-07', 'V-02', 'W-31', 'lantern'])).toEqual(['V-08', 'V-09', 'V-10']);
  });

  it('no code yet > asked for 100 > V-01 to V-100', () => {
    const codes = pieceCodes('V', 100);
    expect([codes[0], codes[98], codes[99]]).toEqual(['V-01', 'V-99', 'V-100']);
  });

  it.each(['O', 'I', 'B', 'D', 'P', '', 'VVV', '7'])(
    'letter "%s" > asked for > refused: it is misheard',
    (letter) => {
      expect(() => pieceCodes(letter, 1)).toThrow(RangeError);
    },
  );

  it('999 codes used > one more > refused with what is left', () => {
    expect(() => pieceCodes('V', 2, ['V-998'])).toThrow('V has 1 codes left, not 2');
  });
});
