/** What was not removed, in an order that stays. */
export const standing = <R extends { removed: boolean }>(
  records: ReadonlyMap<string, R>,
  order: (a: R, b: R) => number,
): R[] => [...records.values()].filter((record) => !record.removed).sort(order);
