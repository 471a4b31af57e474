import { edgeKey } from '../../frames/edge-key';
import { cross, distance, size, subtract, unit } from '../../frames/vector';
import type { Vector } from '../../frames/vector';
import type { PieceTraits } from './piece-traits';
import { acrossFrom, fitMotion, moved, motionThrough, rotationBetween, UNTURNED } from './rigid-motion';
import type { Motion } from './rigid-motion';

/** How one piece lies as another one. */
export type Congruence = {
  motion: Motion;
  /** For each joint of the second piece the joint of the first that it is. */
  joints: number[];
  /** For each strut of the second piece the strut of the first that it is. */
  struts: number[];
  /** The farthest that a joint lies from its place, mm. */
  worstMm: number;
};

/**
 * Two joints fix a turn about the centre, each known to twice the tolerance; with anchors at least 0.7 as far out as any joint, no
 * other joint is then off by more than this many tolerances.
 */
const LOOSE = 8;
const FAR_ENOUGH = 0.7;

/** For each joint of the first piece the nearest joint of the second that is connected alike; null when one has none or shares it. */
function partners(first: PieceTraits, other: PieceTraits, motion: Motion, reach: number): number[] | null {
  const taken = new Set<number>();
  const partner: number[] = [];
  for (const [at, joint] of first.frame.joints.entries()) {
    const place = moved(motion, joint);
    let best = -1;
    let bestAway = reach;
    for (const [candidate, there] of other.frame.joints.entries()) {
      if (other.colours[candidate] !== first.colours[at]) continue;
      const away = distance(place, there);
      if (away <= bestAway) [best, bestAway] = [candidate, away];
    }
    if (best < 0 || taken.has(best)) return null;
    taken.add(best);
    partner.push(best);
  }
  return partner;
}

/** For each strut of the second piece its partner in the first; null when one has none of its kind. */
function strutPartners(first: PieceTraits, other: PieceTraits, partner: readonly number[]): number[] | null {
  const struts = new Array<number>(other.frame.struts.length);
  for (const [strut, [a, b]] of first.frame.struts.entries()) {
    const there = other.strutAt.get(edgeKey(partner[a]!, partner[b]!));
    if (there === undefined || other.kinds[there] !== first.kinds[strut]) return null;
    struts[there] = strut;
  }
  return struts;
}

/** Tries one motion: pairs the joints, fits the motion to the pairs, and accepts it when every joint lies within the tolerance. */
function confirm(
  first: PieceTraits,
  other: PieceTraits,
  guess: Motion,
  mirrored: boolean,
  within: number,
): Congruence | null {
  let motion = guess;
  let reach = LOOSE * within;
  for (let round = 0; round < 2; round++) {
    const partner = partners(first, other, motion, reach);
    const struts = partner && strutPartners(first, other, partner);
    if (!partner || !struts) return null;
    const places = partner.map((joint) => other.frame.joints[joint]!);
    motion = fitMotion(first.frame.joints, places, mirrored);
    const fitted = motion;
    const worstMm = first.frame.joints.reduce(
      (worst, joint, at) => Math.max(worst, distance(moved(fitted, joint), places[at]!)),
      0,
    );
    if (worstMm <= within) {
      const joints = new Array<number>(partner.length);
      partner.forEach((there, here) => (joints[there] = here));
      return { motion, joints, struts, worstMm };
    }
    // Pairs made from a rough guess may have been crossed: once more with the better motion.
    reach = worstMm;
  }
  return null;
}

type Anchors = { p: number; q: number | null; arms: [Vector, Vector] };

/** The joint out of some with the fewest like it, the farthest and the first among equals. */
function rarest(
  candidates: number[],
  likes: (joint: number) => number,
  far: (joint: number) => number,
): number {
  return candidates
    .map((joint) => ({ joint, like: likes(joint), away: far(joint) }))
    .sort((a, b) => a.like - b.like || b.away - a.away || a.joint - b.joint)[0]!.joint;
}

/** How far a joint's arm stands off the line through the centre and another joint, mm. */
const offLine = (arm: Vector, along: Vector): number => size(cross(unit(along), arm));

/** Two joints that fix how the piece is turned about its centre, chosen so that few joints of the other piece could be theirs. */
function anchorsOf(traits: PieceTraits, within: number): Anchors {
  const { frame, centre, radii, colours } = traits;
  const arms = frame.joints.map((joint) => subtract(joint, centre));
  const all = frame.joints.map((_, joint) => joint);
  const like = (joint: number) => (other: number) =>
    colours[other] === colours[joint] && Math.abs(radii[other]! - radii[joint]!) <= 2 * within;
  const farthest = Math.max(...radii);
  const p = rarest(
    all.filter((joint) => radii[joint]! >= FAR_ENOUGH * farthest),
    (joint) => all.filter(like(joint)).length,
    (joint) => radii[joint]!,
  );
  const along = arms[p]!;
  const off = arms.map((arm) => offLine(arm, along));
  const widest = Math.max(...off);
  if (widest <= 2 * within) return { p, q: null, arms: [along, acrossFrom(along)] };
  const q = rarest(
    all.filter((joint) => off[joint]! >= FAR_ENOUGH * widest),
    (joint) => all.filter(like(joint)).length,
    (joint) => off[joint]!,
  );
  return { p, q, arms: [along, arms[q]!] };
}

/**
 * Whether one piece is another one turned, or its mirror image.
 * @param first traits of the piece that is the pattern
 * @param other traits, from the same reader, of the piece that may be like it
 * @param mirrored look for a mirroring instead of a turn
 * @param withinMm how far a joint may lie from its place after the least-squares fit, mm
 * @returns the first motion found, the unturned one before all others, then in the order of the joints; null when there is none
 * Source: own; search over the images of two anchor joints about the centre, each fitted and verified.
 */
export function congruence(
  first: PieceTraits,
  other: PieceTraits,
  mirrored: boolean,
  withinMm: number,
): Congruence | null {
  if (first.frame.joints.length === 0) return null;
  if (!mirrored) {
    const unturned = motionThrough(UNTURNED, first.centre, other.centre);
    const found = confirm(first, other, unturned, false, withinMm);
    if (found) return found;
  }
  const { p, q, arms } = anchorsOf(first, withinMm);
  const joints = other.frame.joints;
  const alike = (mine: number) =>
    joints.flatMap((_, joint) =>
      other.colours[joint] === first.colours[mine] &&
      Math.abs(other.radii[joint]! - first.radii[mine]!) <= 2 * withinMm
        ? [joint]
        : [],
    );
  const apart = q === null ? 0 : distance(first.frame.joints[p]!, first.frame.joints[q]!);
  const forQ = q === null ? [] : alike(q);
  for (const imageP of alike(p)) {
    const arm = subtract(joints[imageP]!, other.centre);
    const seconds =
      q === null
        ? [acrossFrom(arm)]
        : forQ
            .filter((image) => Math.abs(distance(joints[imageP]!, joints[image]!) - apart) <= 2 * withinMm)
            .map((image) => subtract(joints[image]!, other.centre));
    for (const second of seconds) {
      const guess = motionThrough(rotationBetween(arms, [arm, second], mirrored), first.centre, other.centre);
      const found = confirm(first, other, guess, mirrored, withinMm);
      if (found) return found;
    }
  }
  return null;
}
