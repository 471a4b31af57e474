import { SAYABLE_LETTERS } from '../../kernel/ids';

/** A code that is read aloud has at most three figures. */
const HIGHEST_NUMBER = 999;
const SAYABLE = new RegExp(`^[${SAYABLE_LETTERS}]{1,2}$`);

/**
 * Codes for new pieces, such as `V-07`, numbered on from the highest one of the letter.
 * @param letter one or two letters that are heard rightly: no O, I, B, D, P; any case
 * @param count how many, 0 or more
 * @param known codes that exist or ever existed; other letters and other texts are passed over
 * @returns codes in order, two figures or three
 * @throws RangeError for another letter, or when the numbers to 999 do not suffice
 * Source: own.
 */
export function pieceCodes(letter: string, count: number, known: Iterable<string> = []): string[] {
  const capital = letter.trim().toUpperCase();
  if (!SAYABLE.test(capital))
    throw new RangeError(
      `"${letter}" is no letter for a code. Take one or two of ${SAYABLE_LETTERS}: the others are misheard.`,
    );
  let highest = 0;
  for (const code of known) {
    const [, of, number] = /^([A-Z]{1,2})-(\d{1,3})$/.exec(code) ?? [];
    if (of === capital) highest = Math.max(highest, Number(number));
  }
  if (highest + count > HIGHEST_NUMBER)
    throw new RangeError(
      `${capital} has ${HIGHEST_NUMBER - highest} codes left, not ${count}. Take another letter.`,
    );
  return Array.from({ length: count }, (_, at) => `${capital}-${String(highest + at + 1).padStart(2, '0')}`);
}

/** Letters for pieces in a picture, from 0: A, C, E, F, ... Z, then two letters; none that is misheard. */
export function pieceLetter(index: number): string {
  const base = SAYABLE_LETTERS.length;
  const last = SAYABLE_LETTERS.charAt(index % base);
  return index < base ? last : pieceLetter(Math.floor(index / base) - 1) + last;
}
