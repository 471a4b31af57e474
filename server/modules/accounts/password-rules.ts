import { dictionary } from '@zxcvbn-ts/language-common';

const COMMON = new Set(dictionary['passwords-common']);
const LONGEST_COMMON = dictionary['passwords-common'].reduce((most, word) => Math.max(most, word.length), 0);

/** Words of the product and its trade that somebody here would think of first (ASVS 5.0 6.2.11). */
const PRODUCT_WORDS = [
  'strutbee', 'installation', 'traveller', 'volunteer', 'organiser', 'organizer', 'makerspace', 'hotglue', 'buildday',
  'administrator', 'admin', 'welcome', 'letmein', 'password', 'passphrase', 'changeme',
]; // prettier-ignore

/** Characters that may stand beside guessable parts without making them any less guessable. */
const SPARE_CHARACTERS = 2;
const SHORTEST_WORD = 4;
const YEAR = /^(19|20)\d\d$/;
const LONGEST_PERIOD = 6;

/** Words of an e-mail address, a name or a title that must not make up a password. */
export const wordsOf = (...texts: readonly string[]): string[] =>
  texts.flatMap((text) => {
    const words = text.toLowerCase().split(/[^\p{L}\p{N}]+/u);
    return [words.join(''), ...words].filter((word) => word.length >= SHORTEST_WORD);
  });

/**
 * Whether a long password is nevertheless a guessable one: on the list of common passwords, one of them repeated or
 * padded with figures, a run of neighbours, or made of words that belong to the person, the product or the installation.
 * There is no rule on which characters it is made of (ASVS 5.0 6.2.4, 6.2.5, 6.2.11).
 * @param ownWords lower case, from `wordsOf`
 */
export function isGuessable(password: string, ownWords: readonly string[]): boolean {
  const plain = password.normalize('NFKC').toLowerCase();
  const dense = plain.replace(/[^\p{L}\p{N}]/gu, '');
  if (COMMON.has(plain) || COMMON.has(dense) || isPeriodic(plain)) return true;
  if (dense.length === 0) return false;
  const free = new Set([...PRODUCT_WORDS, ...ownWords]);
  return ['', ...commonWordsIn(dense)].some((word) => coveredBy(dense, word, free));
}

function isPeriodic(text: string): boolean {
  for (let period = 1; period <= LONGEST_PERIOD && period * 2 < text.length; period += 1) {
    if (
      text ===
      text
        .slice(0, period)
        .repeat(Math.ceil(text.length / period))
        .slice(0, text.length)
    )
      return true;
  }
  return false;
}

function commonWordsIn(text: string): Set<string> {
  const found = new Set<string>();
  for (let from = 0; from < text.length; from += 1) {
    for (let to = from + SHORTEST_WORD; to <= Math.min(text.length, from + LONGEST_COMMON); to += 1) {
      const word = text.slice(from, to);
      if (COMMON.has(word)) found.add(word);
    }
  }
  return found;
}

/** Whether one common word, free words, common figures and runs of neighbours leave hardly anything over. */
function coveredBy(text: string, commonWord: string, free: ReadonlySet<string>): boolean {
  const words = commonWord ? [commonWord, ...free] : [...free];
  // Fewest characters left over up to each position.
  const over = new Array<number>(text.length + 1).fill(Infinity);
  over[0] = 0;
  for (let at = 0; at < text.length; at += 1) {
    const here = over[at] ?? Infinity;
    if (here > SPARE_CHARACTERS) continue;
    const reach = (to: number, left: number) => {
      over[to] = Math.min(over[to] ?? Infinity, left);
    };
    reach(at + 1, here + 1);
    for (const word of words) if (text.startsWith(word, at)) reach(at + word.length, here);
    for (let to = at + 3; to <= runEnd(text, at); to += 1) reach(to, here);
    const figures = /^\d{2,20}/.exec(text.slice(at))?.[0] ?? '';
    for (let length = 2; length <= figures.length; length += 1) {
      const part = figures.slice(0, length);
      if (YEAR.test(part) || COMMON.has(part)) reach(at + length, here);
    }
  }
  return (over[text.length] ?? Infinity) <= SPARE_CHARACTERS;
}

/** Where a run of equal or neighbouring characters that starts here ends, such as `abcdef`, `7777` or `98765`. */
function runEnd(text: string, from: number): number {
  const step = (at: number) => {
    if (text[at] === '9' && text[at + 1] === '0') return 1;
    return text.charCodeAt(at + 1) - text.charCodeAt(at);
  };
  const first = step(from);
  if (Math.abs(first) > 1) return from + 1;
  let end = from + 1;
  while (end < text.length && step(end - 1) === first) end += 1;
  return end;
}

export const GUESSABLE_WORDS =
  'This one is easy to guess: a common password, a repeated one, or made of your name, your e-mail or a word of this place. A sentence that only you would think of is better.';
