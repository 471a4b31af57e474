import type { Ring } from './ring-plane';

/** Rings chosen by index, and whether nothing better exists among those given. */
export type RingChoice = { chosen: number[]; proven: boolean };

/** How good a choice is: more struts, then fewer flats, then the higher score. */
export type ChoiceValue = { struts: number; flats: number; score: number };

/** Whether one choice is better than another. */
export const isBetter = (a: ChoiceValue, b: ChoiceValue): boolean =>
  a.struts !== b.struts ? a.struts > b.struts : a.flats !== b.flats ? a.flats < b.flats : a.score > b.score;

/** The value of some chosen rings. */
export function valueOf(
  rings: readonly Ring[],
  scores: readonly number[],
  chosen: readonly number[],
): ChoiceValue {
  return {
    struts: chosen.reduce((sum, ring) => sum + rings[ring]!.struts.length, 0),
    flats: chosen.length,
    score: chosen.reduce((sum, ring) => sum + scores[ring]!, 0),
  };
}

/** Takes rings in an order, each that shares no strut with one taken before and does not hang in one. */
function taken(
  rings: readonly Ring[],
  order: readonly number[],
  linked: (a: number, b: number) => boolean,
): number[] {
  const used = new Set<number>();
  const chosen: number[] = [];
  for (const ring of order) {
    const { struts } = rings[ring]!;
    if (struts.some((strut) => used.has(strut)) || chosen.some((other) => linked(ring, other))) continue;
    chosen.push(ring);
    for (const strut of struts) used.add(strut);
  }
  return chosen;
}

/**
 * A choice of rings without a solver: greedy starts, improved by branch and bound until it is done or out of tries.
 * @param rings candidates
 * @param scores per ring what decides between choices with as many struts in as many flats
 * @param linked whether two rings hang in each other
 * @param most how many rings, over all branches, are looked at before it stops
 * @returns indexes of rings without a common strut, and `proven` only when every branch was looked at or cut off
 * Source: own. Bound: at each joint an even number of struts stands in rings.
 */
export function searchFlats(
  rings: readonly Ring[],
  scores: readonly number[],
  linked: (a: number, b: number) => boolean,
  most: number,
): RingChoice {
  const all = rings.map((_, ring) => ring);
  const length = (ring: number): number => rings[ring]!.struts.length;
  const starts = [
    [...all].sort((a, b) => length(b) - length(a) || scores[b]! - scores[a]! || a - b),
    [...all].sort((a, b) => length(a) - length(b) || scores[b]! - scores[a]! || a - b),
    all,
  ];
  let best: number[] = [];
  let bestValue = valueOf(rings, scores, best);
  const offer = (chosen: readonly number[]): void => {
    const value = valueOf(rings, scores, chosen);
    if (isBetter(value, bestValue)) [best, bestValue] = [[...chosen], value];
  };
  for (const order of starts) offer(taken(rings, order, linked));

  let looked = 0;
  const chosen: number[] = [];
  // `open` are rings that can still be taken; none shares a strut with a chosen one.
  const branch = (open: readonly number[], struts: number): void => {
    if (looked > most) return;
    looked += open.length + 1;
    offer(chosen);
    const ringsAt = new Map<number, number>();
    const strutsAt = new Map<number, Set<number>>();
    for (const ring of open)
      rings[ring]!.struts.forEach((strut, at) => {
        ringsAt.set(strut, (ringsAt.get(strut) ?? 0) + 1);
        const { joints } = rings[ring]!;
        for (const joint of [joints[at]!, joints[(at + 1) % joints.length]!]) {
          const list = strutsAt.get(joint);
          if (list) list.add(strut);
          else strutsAt.set(joint, new Set([strut]));
        }
      });
    let ends = 0;
    for (const list of strutsAt.values()) ends += list.size - (list.size % 2);
    const reachable = struts + ends / 2;
    if (reachable < bestValue.struts) return;
    const longest = open.reduce((a, ring) => Math.max(a, length(ring)), 1);
    if (
      reachable === bestValue.struts &&
      chosen.length + Math.ceil((reachable - struts) / longest) > bestValue.flats
    )
      return;

    let strut: number | undefined;
    for (const [candidate, count] of ringsAt)
      if (
        strut === undefined ||
        count < ringsAt.get(strut)! ||
        (count === ringsAt.get(strut) && candidate < strut)
      )
        strut = candidate;
    if (strut === undefined) return;
    const on = strut;
    const [through, rest] = [
      open.filter((ring) => rings[ring]!.struts.includes(on)),
      open.filter((ring) => !rings[ring]!.struts.includes(on)),
    ];
    through.sort((a, b) => length(b) - length(a) || scores[b]! - scores[a]! || a - b);
    for (const ring of through) {
      const own = new Set(rings[ring]!.struts);
      chosen.push(ring);
      branch(
        rest.filter((other) => !rings[other]!.struts.some((s) => own.has(s)) && !linked(ring, other)),
        struts + own.size,
      );
      chosen.pop();
    }
    branch(rest, struts);
  };
  branch(all, 0);
  return { chosen: best, proven: looked <= most };
}
