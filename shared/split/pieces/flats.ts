import type { Frame } from '../../frames/frame';
import type { LinearSolver } from '../../kernel/linear-program';
import { solveFlats } from './flats-program';
import { isBetter, searchFlats, valueOf } from './flats-search';
import type { RingChoice } from './flats-search';
import { planarRings, RING_LIMITS } from './planar-rings';
import { areLinked, ringPlane } from './ring-plane';
import type { Ring } from './ring-plane';

/** Which rings of a piece are glued flat on the bench before it is raised. */
export type Flats = {
  /** Without a common strut; the largest first, then the lowest. */
  flats: Ring[];
  /** How many struts stand in them, of how many. */
  strutsInFlats: number;
  struts: number;
  /** Whether no other choice among the rings found has more struts in flats; false says that it may be improved. */
  proven: boolean;
  /** Whether all planar rings of the piece were found; false for large flat nets (`RING_LIMITS`). */
  allRings: boolean;
};

export type FlatsOptions = {
  /** Solves it exactly; without one a short search says itself whether it is proven. */
  solver?: LinearSolver;
  /** How far a joint may lie off the plane of its ring, mm. */
  withinMm?: number;
  /** Time for the solver to prove the struts in flats, seconds of wall clock; half as much each for fewest and largest flats. */
  seconds?: number;
};

const SECONDS = 10;
/** Rings that the search without a solver looks at: a few tenths of a second. */
const LOOKS = 60_000;
/** Rings that hang in each other are found one choice at a time; far more rounds than any frame was seen to need. */
const ROUNDS = 40;
/** More than any sum of tilts can reach, so that size decides before tilt. */
const SIZE_BEFORE_TILT = 10_000;
const TILT_STEPS = 100;

/**
 * What decides between choices that have as many struts in as many flats. Larger rings first: an outline carries what is added, two
 * middling ones carry each other. Then rings that lie level in the drawing: the piece is built standing, and such a flat stays where
 * it was glued.
 */
function scoreOf(ring: Ring, frame: Frame): number {
  const { normal } = ringPlane(ring.joints.map((joint) => frame.joints[joint]!));
  const tilt = Math.round(TILT_STEPS * (1 - Math.abs(normal.z)));
  return SIZE_BEFORE_TILT * ring.struts.length ** 2 - tilt;
}

/** The first two chosen rings that hang in each other. */
function linkedPair(
  chosen: readonly number[],
  linked: (a: number, b: number) => boolean,
): [number, number] | undefined {
  for (const [at, a] of chosen.entries())
    for (const b of chosen.slice(at + 1)) if (linked(a, b)) return [a, b];
  return undefined;
}

function solved(
  rings: readonly Ring[],
  scores: readonly number[],
  linked: (a: number, b: number) => boolean,
  solver: LinearSolver,
  seconds: number,
): RingChoice | null {
  const apart: [number, number][] = [];
  for (let round = 0; round < ROUNDS; round++) {
    const choice = solveFlats(rings, scores, apart, solver, seconds);
    if (!choice) return null;
    const pair = linkedPair(choice.chosen, linked);
    if (!pair) return choice;
    apart.push(pair);
  }
  return null;
}

/**
 * The flats of a piece: planar rings without a common strut that hold as many struts as possible.
 * @param frame a valid frame, mm
 * @param options the solver (a port; the server brings it), the tolerance, the time
 * @returns a choice with as many struts in flats as possible; among those the fewest flats, because each costs a laying out, a wait
 *   and a lift; then the largest rings, then those level in the drawing. Rings that hang in each other like links of a chain are
 *   never both chosen: closed ones could not be put together.
 * Source: own; set packing as an integer program. Rings take an even number of struts at each joint (O. Veblen, Annals of Mathematics 14
 *   (1912) 86-94), so at least half as many struts as there are joints with an odd number stay out of flats.
 */
export function chooseFlats(frame: Frame, options: FlatsOptions = {}): Flats {
  const { rings, complete } = planarRings(frame, options.withinMm ?? RING_LIMITS.withinMm);
  const scores = rings.map((ring) => scoreOf(ring, frame));
  const known = new Map<number, boolean>();
  const linked = (a: number, b: number): boolean => {
    const key = Math.min(a, b) * rings.length + Math.max(a, b);
    let found = known.get(key);
    if (found === undefined) {
      found = areLinked(rings[a]!, rings[b]!, frame.joints);
      known.set(key, found);
    }
    return found;
  };
  const { solver, seconds = SECONDS } = options;
  const exact = solver && rings.length > 0 ? solved(rings, scores, linked, solver, seconds) : null;
  const own = exact?.proven ? null : searchFlats(rings, scores, linked, LOOKS);
  const better = (a: RingChoice, b: RingChoice): RingChoice =>
    isBetter(valueOf(rings, scores, b.chosen), valueOf(rings, scores, a.chosen)) ? b : a;
  const choice = exact && own ? better(exact, own) : (exact ?? own ?? { chosen: [], proven: true });
  const height = (ring: Ring): number =>
    ring.joints.reduce((sum, joint) => sum + frame.joints[joint]!.z, 0) / ring.joints.length;
  const flats = choice.chosen
    .map((ring) => rings[ring]!)
    .sort(
      (a, b) =>
        b.struts.length - a.struts.length ||
        height(a) - height(b) ||
        Math.min(...a.struts) - Math.min(...b.struts),
    );
  return {
    flats,
    strutsInFlats: flats.reduce((sum, { struts }) => sum + struts.length, 0),
    struts: frame.struts.length,
    proven: choice.proven,
    allRings: complete,
  };
}
