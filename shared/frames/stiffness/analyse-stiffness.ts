import { ok, refuse } from '../../kernel/result';
import type { Result } from '../../kernel/result';
import type { Frame, Joint } from '../frame';
import { separateShapes } from '../separate-shapes';
import { denseNullSpace, orthogonalPart } from './dense';
import { dissection, workOf } from './dissection';
import { eliminate } from './elimination';
import type { Elimination } from './elimination';
import { rigidMotions, settle } from './flatness';
import type { Extent } from './flatness';
import { freeMovements, leastHoldOf, mixture } from './movements';
import { equilibriumMatrix, rigidityMatrix, stretches } from './rigidity-matrix';
import type { RigidityMatrix } from './rigidity-matrix';
import { stiffParts } from './stiff-parts';

/**
 * Singular values of the rigidity matrix up to this count as zero. Its rows have length 1, so it is a share of movement: a joint that could
 * move 1 m while every strut stretched less than a thousandth of a millimetre is free. Rounding of coordinates lies near 1e-12, the
 * softest real hold of a chain of five hundred bays near 1e-5.
 */
const TOLERANCE = 1e-6;
/** More work than this is not begun: some ten seconds on a small machine. */
const MOST_OPERATIONS = 1.5e10;
const MOST_NUMBERS = 4e7;
/** Ways of moving are listed while putting them at right angles stays below this many operations. */
const MOST_BASIS = 1.6e9;
/** States of self-stress are listed for frames of up to so many struts. */
const MOST_STRESSED = 700;
/** A hold weaker than this rests on offsets of tenths of a millimetre per metre. */
const SOFT = 1e-4;

/** How stiff a frame is as a pin-jointed model in space. */
export type StiffnessCounts = {
  joints: number;
  struts: number;
  rank: number;
  /** Movements of the frame as a whole: 6, or 5 when all joints lie in one line. */
  rigidMotions: number;
  /** Ways in which joints move against each other while no strut changes its length, to first order. */
  mechanisms: number;
  /** Struts more than are needed where they are: as many independent ways in which struts can strain against each other. */
  selfStress: number;
  /** Struts less what a frame of so many joints needs to be just stiff. */
  maxwell: number;
  extent: Extent;
  /** For a flat frame the mechanisms within its plane and out of it; null otherwise. */
  flat: { inPlane: number; outOfPlane: number } | null;
  /** Separate shapes, and joints without a strut, which move freely against each other. */
  bits: number;
  /** Whether both checks on the rank agree: what counted is held, and what is free stretches nothing. */
  certain: boolean;
};

/** Counts, and the movements themselves. Movements are three numbers per joint. */
export type Stiffness = StiffnessCounts & {
  /** The smallest singular value that counted: how far struts stretch against a movement of length 1. Infinity where nothing is held. */
  leastHold: number;
  /** Held by a hair: offsets of a tenth of a millimetre per metre decide whether it is loose. Never said where `basis` is null. */
  soft: boolean;
  /** Orthonormal basis of the mechanisms, at right angles to the movements as a whole; null where there are too many to list. */
  basis: Float64Array[] | null;
  /** Parts that keep their shape, the largest first; joints rising. */
  parts: number[][];
  /** Joints that move when the largest part is held, rising; all that have struts where no part keeps its shape. */
  moving: number[];
  /** Struts that take part in a self-stress, rising: their lengths must fit each other; null where it was not looked for. */
  strained: number[] | null;
};

export type StiffnessRefusal = {
  code: 'STIFFNESS_NO_STRUTS' | 'STIFFNESS_NOT_A_NUMBER' | 'STIFFNESS_MISSING_JOINT' | 'STIFFNESS_TOO_LARGE';
  message: string;
};

type Prepared = {
  joints: Joint[];
  matrix: RigidityMatrix;
  elimination: Elimination;
  whole: Float64Array[];
  extent: Extent;
};

function problemOf({ joints, struts }: Frame): StiffnessRefusal | null {
  if (struts.length === 0)
    return {
      code: 'STIFFNESS_NO_STRUTS',
      message: 'The frame has no struts, so there is nothing to be stiff. Add struts first.',
    };
  for (const [at, joint] of joints.entries())
    if (![joint.x, joint.y, joint.z].every(Number.isFinite))
      return {
        code: 'STIFFNESS_NOT_A_NUMBER',
        message: `Joint ${at + 1} is at (${joint.x}, ${joint.y}, ${joint.z}), which is no place. Give it three numbers in mm, then ask again.`,
      };
  for (const [at, ends] of struts.entries())
    for (const end of ends)
      if (!joints[end])
        return {
          code: 'STIFFNESS_MISSING_JOINT',
          message: `Strut ${at + 1} ends at joint ${end + 1}; the frame has joints 1 to ${joints.length}. Choose one of those, then ask again.`,
        };
  return null;
}

function prepare(frame: Frame): Result<Prepared, StiffnessRefusal> {
  const problem = problemOf(frame);
  if (problem) return refuse(problem);
  const settled = settle(frame.joints);
  const matrix = rigidityMatrix(settled.joints, frame.struts);
  const fronts = dissection(settled.joints, matrix);
  const { operations, largestFront } = workOf(fronts);
  if (operations > MOST_OPERATIONS || largestFront > MOST_NUMBERS)
    return refuse({
      code: 'STIFFNESS_TOO_LARGE',
      message:
        `The stiffness of ${frame.struts.length.toLocaleString('en')} struts linked as closely as these was not computed: it would take about ` +
        `${Math.ceil(operations / 1.5e9).toLocaleString('en')} s. Split the drawing and ask for each piece.`,
    });
  const elimination = eliminate(matrix, fronts, TOLERANCE);
  return ok({
    joints: settled.joints,
    matrix,
    elimination,
    whole: rigidMotions(settled),
    extent: settled.extent,
  });
}

function countsOf(frame: Frame, prepared: Prepared, hold: number): StiffnessCounts {
  const { matrix, elimination, whole, extent } = prepared;
  const { rank } = elimination;
  const joints = frame.joints.length;
  const mechanisms = 3 * joints - rank - whole.length;
  const stretched = stretches(matrix, mixture(elimination, 11)).reduce(
    (most, one) => Math.max(most, Math.abs(one)),
    0,
  );
  const linked = new Set(frame.struts.flat());
  const inPlane = 2 * joints - 3 - rank;
  return {
    joints,
    struts: frame.struts.length,
    rank,
    rigidMotions: whole.length,
    mechanisms,
    selfStress: frame.struts.length - rank,
    maxwell: frame.struts.length - (3 * joints - whole.length),
    extent,
    flat: extent === 'plane' ? { inPlane, outOfPlane: mechanisms - inPlane } : null,
    bits: separateShapes(frame).length + joints - linked.size,
    certain: hold > 4 * TOLERANCE && stretched < TOLERANCE,
  };
}

/**
 * Rank, mechanisms and states of self-stress of a frame as a pin-jointed model in space.
 * @param frame joints in mm; may be flat, in one line, in several bits, with joints without struts
 * @returns the counts, or a refusal for a frame without struts, with missing joints or places, or linked too closely to be computed
 *   within about ten seconds. A lattice of 5,000 struts takes under two.
 * Source: J. C. Maxwell, Philosophical Magazine 27 (1864) 294-299; Pellegrino & Calladine 1986; rank by multifrontal QR, see `eliminate`.
 */
export function countStiffness(frame: Frame): Result<StiffnessCounts, StiffnessRefusal> {
  const prepared = prepare(frame);
  return prepared.ok
    ? ok(countsOf(frame, prepared.value, leastHoldOf(prepared.value.elimination, null)))
    : prepared;
}

/**
 * Counts, movements, stiff parts and strained struts of a frame as a pin-jointed model in space.
 * @param frame as for `countStiffness`
 * @returns see `Stiffness`; refusals as for `countStiffness`
 * Source: as for `countStiffness`.
 */
export function analyseStiffness(frame: Frame): Result<Stiffness, StiffnessRefusal> {
  const prepared = prepare(frame);
  if (!prepared.ok) return prepared;
  const { joints, matrix, elimination, whole } = prepared.value;
  const listed = elimination.size * elimination.free.length ** 2 * 2 <= MOST_BASIS;
  const free = listed ? freeMovements(elimination) : null;
  const leastHold = leastHoldOf(elimination, free);
  const counts = countsOf(frame, prepared.value, leastHold);
  const movements = counts.mechanisms > 0 ? [mixture(elimination, 1), mixture(elimination, 2)] : [];
  const parts = stiffParts(joints, frame.struts, movements);
  const held = new Set(parts[0]);
  const used = [...new Set(frame.struts.flat())].sort((a, b) => a - b);
  return ok({
    ...counts,
    leastHold,
    soft: free !== null && leastHold < SOFT,
    basis: free ? orthogonalPart(free, whole) : null,
    parts,
    moving: counts.mechanisms > 0 ? used.filter((joint) => !held.has(joint)) : [],
    strained: frame.struts.length <= MOST_STRESSED ? strainedStruts(matrix, counts.selfStress) : null,
  });
}

/** Struts that carry something in some state of self-stress. */
function strainedStruts(matrix: RigidityMatrix, states: number): number[] {
  if (states === 0) return [];
  const stresses = denseNullSpace(equilibriumMatrix(matrix), TOLERANCE);
  return Array.from({ length: matrix.struts }, (_, strut) => strut).filter((strut) =>
    stresses.some((stress) => Math.abs(stress[strut]!) > TOLERANCE),
  );
}
