import { strutLengths } from './frame';
import type { Frame } from './frame';
import { anglesAtJoints } from './joint-angles';
import type { JointAngles, StrutPair } from './joint-angles';

/** Below this a joint is hard to glue and its struts are set back far, degrees. */
const SHARP_DEGREES = 30;

/** A strut that loses more than this share of its length to its two set-backs is named. */
const LARGE_SET_BACK = 0.1;

/** Struts closer than this to one direction lie on each other or run straight on, degrees. */
const SAME_DIRECTION_DEGREES = 0.5;

/** One strut's length both ways, mm. */
export type CutLength = {
  /** From centre to centre of its joints. */
  centreMm: number;
  /** With both ends set back; 0 where the set-backs leave nothing. */
  setBackMm: number;
  /** What is taken off at its first and its second joint. */
  ends: [number, number];
};

export type CutWarningCode =
  'ANGLE_SHARP' | 'SET_BACK_LARGE' | 'SET_BACK_ALL' | 'STRUTS_OVERLAP' | 'STRUT_WITHOUT_LENGTH';

/** Something to look at before the saw starts. Strut and joint are indexes from 0; the message counts from 1, as people do. */
export type CutWarning = { code: CutWarningCode; message: string; strut?: number; joint?: number };

/** Both lengths of every strut, and what to look at. */
export type CutLengths = {
  struts: CutLength[];
  warnings: CutWarning[];
  /** Pairs that run straight on through a joint, which may be one stick or butt against each other. */
  straight: { joint: number; struts: [number, number] }[];
};

/**
 * How far an end is cut back so that two round struts just clear each other where they meet.
 * @param diameterMm diameter of both, mm, above 0
 * @param degrees angle between them, above 0 to 180
 * @returns mm from the joint's centre, (d/2) cot(t/2); 0 where the struts run straight on; infinite at 0 degrees
 * Source: plane geometry; the same as (d/2) / tan(t/2) of the trade.
 */
export function setBack(diameterMm: number, degrees: number): number {
  if (degrees >= 180) return 0;
  return degrees <= 0 ? Infinity : diameterMm / 2 / Math.tan((degrees * Math.PI) / 360);
}

const mm = (value: number): string => `${value.toFixed(1)} mm`;

/** For every strut the least angle it makes with another one, at its first and its second joint; null at a loose end. */
function sharpestByEnd(frame: Frame, angles: readonly JointAngles[]): [number | null, number | null][] {
  const sharpest = frame.struts.map((): [number | null, number | null] => [null, null]);
  for (const { joint, pairs } of angles)
    for (const { struts, degrees } of pairs) {
      // Struts on each other cannot be cut clear of each other; they are named, and the other angles decide.
      if (degrees < SAME_DIRECTION_DEGREES) continue;
      for (const strut of struts) {
        const end = frame.struts[strut]![0] === joint ? 0 : 1;
        const known = sharpest[strut]![end];
        if (known === null || degrees < known) sharpest[strut]![end] = degrees;
      }
    }
  return sharpest;
}

function jointWarnings({ joint, pairs }: JointAngles): CutWarning[] {
  const warnings: CutWarning[] = [];
  let sharpest: StrutPair | null = null;
  let sharp = 0;
  for (const pair of pairs) {
    const [a, b] = [pair.struts[0] + 1, pair.struts[1] + 1];
    if (pair.degrees < SAME_DIRECTION_DEGREES)
      warnings.push({
        code: 'STRUTS_OVERLAP',
        joint,
        message: `Struts ${a} and ${b} leave joint ${joint + 1} in the same direction and lie on each other. Leave one out or move an end.`,
      });
    else if (pair.degrees < SHARP_DEGREES) {
      sharp += 1;
      if (sharpest === null || pair.degrees < sharpest.degrees) sharpest = pair;
    }
  }
  if (sharpest !== null) {
    const [a, b] = [sharpest.struts[0] + 1, sharpest.struts[1] + 1];
    const more = sharp > 1 ? `, the sharpest of ${sharp} such angles here` : '';
    warnings.push({
      code: 'ANGLE_SHARP',
      joint,
      message: `At joint ${joint + 1} struts ${a} and ${b} meet at ${sharpest.degrees.toFixed(1)} degrees${more}; under ${SHARP_DEGREES} the ends are hard to glue. Build a test piece of this joint first.`,
    });
  }
  return warnings;
}

function strutWarning(strut: number, cut: CutLength): CutWarning | null {
  const taken = cut.ends[0] + cut.ends[1];
  if (!(cut.centreMm > 0))
    return {
      code: 'STRUT_WITHOUT_LENGTH',
      strut,
      message: `Strut ${strut + 1} has no length. Leave it out or move an end.`,
    };
  if (taken >= cut.centreMm)
    return {
      code: 'SET_BACK_ALL',
      strut,
      message: `Strut ${strut + 1} is ${mm(cut.centreMm)} from centre to centre and would be set back by ${mm(taken)}: nothing is left to cut. Take thinner stock, a larger frame or lengths from centre to centre.`,
    };
  if (taken <= LARGE_SET_BACK * cut.centreMm) return null;
  return {
    code: 'SET_BACK_LARGE',
    strut,
    message: `Strut ${strut + 1} loses ${mm(taken)} of ${mm(cut.centreMm)} to its set-backs, ${Math.round((100 * taken) / cut.centreMm)} %. Check the joints on a test piece.`,
  };
}

/**
 * How long each strut is cut: from centre to centre of its joints, and set back at each end so that round struts clear each other.
 * @param frame joints in mm; struts of no length and missing joints give lengths of 0
 * @param diameterMm diameter of the stock, mm, above 0
 * @returns per strut, in the frame's order, both lengths and the set-back of each end, (d/2) cot(t/2) for the least angle t between that
 *   strut and another one at that joint; a loose end and one that runs straight on are not set back. Every number is finite. Warnings
 *   by joint, then by strut: angles under 30 degrees, set-backs above a tenth of a strut, struts that lie on each other.
 * Source: facts of the trade (square-cut ends of round stock); checked at 60, 90 and 108 degrees: 0.866 d, 0.5 d, 0.363 d.
 */
export function cutLengths(frame: Frame, diameterMm: number): CutLengths {
  const angles = anglesAtJoints(frame);
  const sharpest = sharpestByEnd(frame, angles);
  const struts = strutLengths(frame).map((length, strut): CutLength => {
    const centreMm = Number.isFinite(length) ? length : 0;
    const [from, to] = sharpest[strut]!.map((degrees) =>
      degrees === null ? 0 : setBack(diameterMm, degrees),
    );
    const ends: [number, number] = [from!, to!];
    return { centreMm, setBackMm: Math.max(0, centreMm - ends[0] - ends[1]), ends };
  });
  return {
    struts,
    warnings: [
      ...angles.flatMap(jointWarnings),
      ...struts.flatMap((cut, strut) => strutWarning(strut, cut) ?? []),
    ],
    straight: angles.flatMap(({ joint, pairs }) =>
      pairs
        .filter(({ degrees }) => degrees > 180 - SAME_DIRECTION_DEGREES)
        .map(({ struts: pair }) => ({ joint, struts: pair })),
    ),
  };
}
