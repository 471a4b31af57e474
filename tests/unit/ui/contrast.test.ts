import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { contrast, difference, rgbOf, seenAs, SIGHTS } from './colours';

const css = readFileSync(new URL('../../../src/styles/tokens.css', import.meta.url), 'utf8');

/** The colours of every block of the real file whose selector names it. */
function coloursOf(name: string): Record<string, string> {
  const found: Record<string, string> = {};
  for (const [, selector = '', body = ''] of css.matchAll(/([^{}]+)\{([^{}]*)\}/g)) {
    if (!selector.includes(name)) continue;
    for (const [, key = '', value = ''] of body.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6})\b/gi))
      found[key] = value;
  }
  return found;
}

const fixed = coloursOf(':root');
const themes = {
  paper: { ...fixed, ...coloursOf("[data-theme='paper']") },
  night: { ...fixed, ...coloursOf("[data-theme='night']") },
};
const STATES = ['waiting', 'ready', 'hand', 'drying', 'check', 'passed', 'rework', 'held'].map(
  (s) => `s-${s}`,
);

/** Text and the ground it stands on, as the stylesheets use them. */
const TEXT: [string, string][] = [
  ['ink', 'ground'],
  ['ink', 'tint'],
  ['pencil', 'ground'],
  ['pencil', 'tint'],
  ['on-fill', 'ink'],
  ['ground', 'ink'],
  ['on-madder', 'madder'],
  ['z-white', 'z-red'],
  ['z-black', 'z-orange'],
  ['z-black', 'z-yellow'],
  ['z-white', 'z-blue'],
  ['z-black', 'z-white'],
];
/** Lines that mean something without words: at least 3:1. */
const MARKS: [string, string][] = [
  ...STATES.map((state): [string, string] => [state, 'tint']),
  ['pencil', 'ground'],
  ['on-madder', 'madder'],
  ['z-red', 'z-white'],
];

describe.each(Object.entries(themes))('theme %s', (name, colours) => {
  const colour = (key: string): string => {
    const value = (colours as Record<string, string>)[key];
    if (value === undefined) throw new Error(`${name} has no --${key}`);
    return value;
  };

  it.each(TEXT)('contrast > text %s on %s > at least 4.5:1 (WCAG 2.2, 1.4.3)', (text, ground) => {
    expect(contrast(colour(text), colour(ground))).toBeGreaterThanOrEqual(4.5);
  });

  it.each(STATES)('contrast > state %s on the ground > at least 4.6:1', (state) => {
    expect(contrast(colour(state), colour('ground'))).toBeGreaterThanOrEqual(4.6);
  });

  it.each(MARKS)('contrast > mark %s on %s > at least 3:1 (WCAG 2.2, 1.4.11)', (mark, ground) => {
    expect(contrast(colour(mark), colour(ground))).toBeGreaterThanOrEqual(3);
  });

  describe.each(Object.entries(SIGHTS))('%s sight', (_sight, matrix) => {
    // Rework and held share their colour and differ by mark and word.
    const states = STATES.filter((state) => state !== 's-held');
    const pairs = states.flatMap((a, i) => states.slice(i + 1).map((b): [string, string] => [a, b]));
    it.each(pairs)('difference > %s and %s > at least 19 apart (CIE76)', (a, b) => {
      const [p, q] = [seenAs(rgbOf(colour(a)), matrix), seenAs(rgbOf(colour(b)), matrix)];
      expect(difference(p, q)).toBeGreaterThanOrEqual(19);
    });
  });
});

describe('the arithmetic itself', () => {
  it('contrast > black on white > 21:1, as WCAG says', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5);
  });

  it('contrast > #777777 on white > 4.48, the known near miss of 4.5', () => {
    expect(contrast('#777777', '#ffffff')).toBeCloseTo(4.48, 2);
  });

  it('difference > red and green of sRGB > 170.6 (CIE76 of L*a*b* 53.2, 80.1, 67.2 and 87.7, -86.2, 83.2)', () => {
    expect(difference([255, 0, 0], [0, 255, 0])).toBeCloseTo(170.6, 0);
  });

  it('sights > white and grey > look the same to everybody', () => {
    for (const matrix of Object.values(SIGHTS))
      for (const grey of [255, 119])
        for (const channel of seenAs([grey, grey, grey], matrix)) expect(channel).toBeCloseTo(grey, 1);
  });

  it('tokens > both themes > name the same colours, all there', () => {
    const names = (theme: string): string[] => Object.keys(coloursOf(`[data-theme='${theme}']`)).sort();
    expect(names('night')).toEqual(names('paper'));
    expect(names('night')).toEqual(expect.arrayContaining(STATES));
  });
});
