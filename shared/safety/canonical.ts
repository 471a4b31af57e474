/** A value that has exactly one canonical text: no undefined, no fractions, no class instances. */
export type CanonicalValue =
  string | number | boolean | null | readonly CanonicalValue[] | { readonly [key: string]: CanonicalValue };

/**
 * One text for one value, whatever the order in which its keys were set: JSON without spaces, keys sorted by UTF-16
 * code unit, numbers only as safe integers.
 * @param value plain data
 * @returns the text, the same on every machine
 * @throws TypeError for a fraction, an unsafe or infinite number, undefined, or anything that is not plain data
 * @source after RFC 8785 (JSON Canonicalization Scheme), narrowed to integers so that no number formatting is in doubt
 */
export function canonicalJson(value: CanonicalValue): string {
  return write(value);
}

function write(value: unknown): string {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value);
  if (typeof value === 'number') {
    if (!Number.isSafeInteger(value)) throw new TypeError('a canonical number is a safe integer');
    return JSON.stringify(value);
  }
  if (Array.isArray(value)) return `[${Array.from(value, write).join(',')}]`;
  if (typeof value === 'object' && isPlain(value)) {
    const entries = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
    return `{${entries.map(([key, entry]) => `${JSON.stringify(key)}:${write(entry)}`).join(',')}}`;
  }
  throw new TypeError('a canonical value is plain data');
}

function isPlain(value: object): boolean {
  const prototype: unknown = Object.getPrototypeOf(value);
  return prototype === Object.prototype || prototype === null;
}
