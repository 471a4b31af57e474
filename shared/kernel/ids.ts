/** Crockford base 32 in lower case: no i, l, o, u, so an id survives being read aloud. */
const ALPHABET = '0123456789abcdefghjkmnpqrstvwxyz';

/** Letters of sayable codes: no O, I, B, D, P (they are misheard) and no zero or one (they are misread). */
export const SAYABLE_LETTERS = 'ACEFGHJKLMNQRSTUVWXYZ';
export const SAYABLE_CHARACTERS = `${SAYABLE_LETTERS}23456789`;

/** Fills an array with random bytes. `crypto.getRandomValues` exists on plain http, `randomUUID` does not. */
export type RandomBytes = (length: number) => Uint8Array;

const systemRandomBytes: RandomBytes = (length) => globalThis.crypto.getRandomValues(new Uint8Array(length));

/**
 * A random identifier of 26 characters, 130 bits.
 * @param bytes where the randomness comes from; seeded in the demo and in tests
 */
export function newId(bytes: RandomBytes = systemRandomBytes): string {
  let id = '';
  for (const byte of bytes(26)) id += ALPHABET.charAt(byte & 31);
  return id;
}

/**
 * A random code that can be said over the noise of a hall, such as `K7MRQA`.
 * @param length number of characters
 * @param bytes where the randomness comes from
 */
export function newSayableCode(length: number, bytes: RandomBytes = systemRandomBytes): string {
  // 256 is no multiple of 29: bytes above the largest multiple are thrown away so that every character is equally likely.
  const limit = 256 - (256 % SAYABLE_CHARACTERS.length);
  let code = '';
  while (code.length < length) {
    for (const byte of bytes(length)) {
      if (byte < limit && code.length < length)
        code += SAYABLE_CHARACTERS.charAt(byte % SAYABLE_CHARACTERS.length);
    }
  }
  return code;
}

/** A typed or scanned code as it is stored: upper case, without spaces and dots. */
export const normaliseCode = (typed: string): string => typed.trim().toUpperCase().replace(/[\s.]/g, '');
