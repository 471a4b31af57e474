/** A seeded stream of numbers in [0, 1). */
export type Random = () => number;

/**
 * Seeded pseudo-random numbers, mulberry32. Not for secrets.
 * @param seed any integer; the same seed gives the same stream
 */
export function seededRandom(seed: number): Random {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}
