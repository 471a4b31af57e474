/** Struts that can be cut at one setting of the stop. `struts` are indexes from 0, `name` is A for the longest, then B, C ... */
export type LengthClass = { name: string; lengthMm: number; count: number; struts: number[] };

/** Rounding of sums of coordinates: two lengths exactly a tolerance apart on paper still count as within it. */
const ROUNDING = 1e-9;

/**
 * Groups values whose whole spread stays within a tolerance.
 * @param values any numbers; those that are not finite are left out
 * @param within greatest spread of a group, in the unit of the values, 0 or more
 * @returns groups from the largest value down, each with its mean and the indexes of its values in rising order
 */
export function groupByValue(
  values: readonly number[],
  within: number,
): { value: number; indexes: number[] }[] {
  const order = values
    .map((_, index) => index)
    .filter((index) => Number.isFinite(values[index]))
    .sort((a, b) => values[b]! - values[a]! || a - b);
  const groups: { top: number; sum: number; indexes: number[] }[] = [];
  for (const index of order) {
    const value = values[index]!;
    const last = groups.at(-1);
    // Compared with the longest of the group, not with the neighbour: a chain of near lengths must not creep away.
    if (last && last.top - value <= within + ROUNDING) {
      last.sum += value;
      last.indexes.push(index);
    } else groups.push({ top: value, sum: value, indexes: [index] });
  }
  return groups.map(({ sum, indexes }) => ({
    value: sum / indexes.length,
    indexes: indexes.sort((a, b) => a - b),
  }));
}

/**
 * The name of the n-th length class: A to Z, then AA, AB and on, as columns of a table are named.
 * @param at from 0
 */
export function className(at: number): string {
  const letter = String.fromCharCode(65 + (at % 26));
  return at < 26 ? letter : className(Math.floor(at / 26) - 1) + letter;
}

/**
 * Lengths that are cut at one setting of the stop, named by falling length.
 * @param lengths mm, in the order of the struts; those that are not finite belong to no class
 * @param withinMm greatest spread within one class, mm, 0 or more: what the saw and the joints forgive
 * @returns classes from the longest, `lengthMm` the mean of the class; no two lengths of a class are further apart than `withinMm`
 * Source: own.
 */
export const lengthClasses = (lengths: readonly number[], withinMm: number): LengthClass[] =>
  groupByValue(lengths, withinMm).map(({ value, indexes }, at) => ({
    name: className(at),
    lengthMm: value,
    count: indexes.length,
    struts: indexes,
  }));
