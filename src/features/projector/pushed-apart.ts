/**
 * Places for labels on a line that would cover each other: as near to where they belong as they can be.
 * @param labels where the middle of each belongs, and how wide it is, px
 * @param width of the line; labels stay inside as long as they fit in all
 * @returns the middle of each label, in the order given
 */
export function pushedApart(labels: readonly { at: number; size: number }[], width: number): number[] {
  const order = labels.map((label, i) => ({ ...label, i })).sort((a, b) => a.at - b.at || a.i - b.i);
  const left: number[] = [];
  let edge = 0;
  for (const { at, size } of order) {
    const from = Math.max(edge, at - size / 2);
    left.push(from);
    edge = from + size;
  }
  // What ran over the right end goes back, and takes its neighbours along.
  let most = width;
  for (let k = order.length - 1; k >= 0; k--) {
    const size = order[k]?.size ?? 0;
    left[k] = Math.min(left[k] ?? 0, most - size);
    most = left[k] ?? 0;
  }
  const middles: number[] = [];
  order.forEach(({ i, size }, k) => {
    middles[i] = (left[k] ?? 0) + size / 2;
  });
  return middles;
}
