import { edgeKey } from '../../frames/edge-key';
import type { Frame } from '../../frames/frame';
import { strutLengths } from '../../frames/frame';
import { distance } from '../../frames/vector';
import type { Vector } from '../../frames/vector';
import { centreOf } from './rigid-motion';

/** A piece to be compared with others: its frame, and what else its struts must agree in (stock, colour), if anything. */
export type PieceShape = { frame: Frame; strutKinds?: readonly (string | number)[] };

/** What turning and mirroring leave as it is. */
export type PieceTraits = {
  frame: Frame;
  kinds: readonly (string | number)[];
  strutAt: Map<number, number>;
  centre: Vector;
  /** Distance of each joint from the centre of the joints, mm. */
  radii: number[];
  /** A number per joint, equal for joints whose surroundings are connected alike. */
  colours: number[];
  sortedRadii: number[];
  sortedLengths: number[];
  /** Equal for all pieces that could be identical as far as connections go. */
  key: string;
};

/** How far apart joints look at their neighbours' neighbours. */
const ROUNDS = 3;

const rising = (values: readonly number[]): number[] => [...values].sort((a, b) => a - b);

/**
 * A function that reads the traits of pieces; traits of the same reader can be compared with each other.
 * Source: colour refinement after B. Weisfeiler and A. Leman (1968).
 */
export function traitsReader(): (piece: PieceShape) => PieceTraits {
  const numbers = new Map<string, number>();
  const numberOf = (text: string): number => {
    const known = numbers.get(text);
    if (known !== undefined) return known;
    numbers.set(text, numbers.size);
    return numbers.size - 1;
  };
  return ({ frame, strutKinds }) => {
    const kinds = strutKinds ?? frame.struts.map(() => 0);
    const around: { joint: number; kind: string }[][] = frame.joints.map(() => []);
    frame.struts.forEach(([a, b], strut) => {
      const kind = String(kinds[strut] ?? '');
      around[a]!.push({ joint: b, kind });
      around[b]!.push({ joint: a, kind });
    });
    let colours = around.map((list) => numberOf(`of ${list.length}`));
    for (let round = 0; round < ROUNDS; round++) {
      const before = colours;
      colours = around.map((list, joint) => {
        const near = list.map((other) => `${before[other.joint]}:${other.kind}`).sort();
        return numberOf(`${before[joint]}<${near.join()}>`);
      });
    }
    const centre = centreOf(frame.joints);
    const radii = frame.joints.map((joint) => distance(joint, centre));
    return {
      frame,
      kinds,
      strutAt: new Map(frame.struts.map(([a, b], strut) => [edgeKey(a, b), strut])),
      centre,
      radii,
      colours,
      sortedRadii: rising(radii),
      sortedLengths: rising(strutLengths(frame)),
      key: `${frame.struts.length}/${rising(colours).join()}`,
    };
  };
}

/** Whether two rising lists are equal within a tolerance, place by place. */
const near = (a: readonly number[], b: readonly number[], within: number): boolean =>
  a.every((value, at) => Math.abs(value - b[at]!) <= within);

/**
 * Whether two pieces could be the same up to turning and mirroring; false is certain, true is not.
 * @param a traits of one reader
 * @param b traits of the same reader
 * @param withinMm how far a joint may lie from its place, mm
 */
export const couldBeAlike = (a: PieceTraits, b: PieceTraits, withinMm: number): boolean =>
  a.key === b.key &&
  // A joint moved by the tolerance moves the centre too, and a strut has two ends: twice the tolerance for both lists.
  near(a.sortedLengths, b.sortedLengths, 2 * withinMm) &&
  near(a.sortedRadii, b.sortedRadii, 2 * withinMm);
