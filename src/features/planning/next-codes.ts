/** Letters of a code that are heard rightly. */
export const CODE_LETTERS = /^[ACEFGHJKLMNQRSTUVWXYZ]{1,2}$/;

/**
 * The codes that pieces made now would get: numbered on from the highest code of the letter, taken-out pieces included.
 * @param letter one or two letters, any case
 * @param known codes that exist or existed
 * @returns codes in order; empty while the letter or the quantity is none
 */
export function nextCodes(letter: string, quantity: number, known: Iterable<string>): string[] {
  const capital = letter.trim().toUpperCase();
  if (!CODE_LETTERS.test(capital) || !Number.isInteger(quantity) || quantity < 1 || quantity > 99) return [];
  let highest = 0;
  for (const code of known) {
    const [of, number] = code.split('-');
    if (of === capital) highest = Math.max(highest, Number(number));
  }
  return Array.from({ length: quantity }, (_, i) => `${capital}-${String(highest + i + 1).padStart(2, '0')}`);
}
