import { dihedralAngles } from './dihedral';
import { glueEnds, jointCount, SAME_WITHIN_MM, strutLengths } from './frame';
import type { Frame } from './frame';
import { groupByValue, lengthClasses } from './length-classes';
import type { LengthClass } from './length-classes';
import { boxOf, subtract } from './vector';
import type { Vector } from './vector';

/** Dihedral angles closer than this are listed as one, degrees. */
const SAME_ANGLE_DEGREES = 0.05;

/** What can be counted and measured on a frame. */
export type FrameFigures = {
  joints: number;
  struts: number;
  faces: number;
  lengthClasses: LengthClass[];
  totalStrutMm: number;
  meanStrutMm: number;
  longestStrutMm: number;
  shortestStrutMm: number;
  glueEnds: number;
  boxMm: Vector;
  dihedrals: { degrees: number; count: number }[];
};

/**
 * Counts, lengths, box and dihedral angles of a frame.
 * @param frame a valid frame (see `validateFrame`), coordinates in mm
 * @param withinMm lengths are one class within this, mm, 0 or more; 0.1 when left out
 * @returns lengths in mm between joint centres; length classes from the longest, struts within the tolerance of the longest of their
 *   class together and `lengthMm` their mean; `boxMm` the extent along x, y and z; dihedral angles inside the shape in
 *   degrees from the largest, with how many struts have each. A frame without struts has zeros.
 */
export function frameFigures(frame: Frame, withinMm: number = SAME_WITHIN_MM): FrameFigures {
  const lengths = strutLengths(frame);
  const total = lengths.reduce((sum, length) => sum + length, 0);
  const { least, most } = boxOf(frame.joints);
  const angles = dihedralAngles(frame).map(({ degrees }) => degrees);
  return {
    joints: jointCount(frame),
    struts: frame.struts.length,
    faces: frame.faces.length,
    lengthClasses: lengthClasses(lengths, withinMm),
    totalStrutMm: total,
    meanStrutMm: lengths.length === 0 ? 0 : total / lengths.length,
    longestStrutMm: lengths.reduce((a, b) => Math.max(a, b), 0),
    shortestStrutMm: lengths.length === 0 ? 0 : lengths.reduce((a, b) => Math.min(a, b)),
    glueEnds: glueEnds(frame),
    boxMm: subtract(most, least),
    dihedrals: groupByValue(angles, SAME_ANGLE_DEGREES).map(({ value, indexes }) => ({
      degrees: value,
      count: indexes.length,
    })),
  };
}
