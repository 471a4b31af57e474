import { dihedralAngles } from './dihedral';
import { glueEnds, jointCount, SAME_WITHIN_MM, strutLengths } from './frame';
import type { Frame } from './frame';
import { boxOf, subtract } from './vector';
import type { Vector } from './vector';

/** Dihedral angles closer than this are listed as one, degrees. */
const SAME_ANGLE_DEGREES = 0.05;

/** Struts that can be cut at one setting of the stop. `struts` are indexes from 0. */
export type LengthClass = { lengthMm: number; count: number; struts: number[] };

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

/** Group indexes of values whose whole spread stays within a tolerance, largest value first. */
function classesOf(values: number[], within: number): { value: number; indexes: number[] }[] {
  const order = values.map((_, index) => index).sort((a, b) => values[b]! - values[a]! || a - b);
  const classes: { top: number; sum: number; indexes: number[] }[] = [];
  for (const index of order) {
    const value = values[index]!;
    const last = classes.at(-1);
    // Compared with the longest of the class, not with the neighbour: a chain of near lengths must not creep away.
    if (last && last.top - value <= within + 1e-9) {
      last.sum += value;
      last.indexes.push(index);
    } else classes.push({ top: value, sum: value, indexes: [index] });
  }
  return classes.map(({ sum, indexes }) => ({
    value: sum / indexes.length,
    indexes: indexes.sort((a, b) => a - b),
  }));
}

/**
 * Counts, lengths, box and dihedral angles of a frame.
 * @param frame a valid frame (see `validateFrame`), coordinates in mm
 * @returns lengths in mm between joint centres; length classes from the longest, struts within 0.1 mm of the longest of their
 *   class together and `lengthMm` their mean; `boxMm` the extent along x, y and z; dihedral angles inside the shape in
 *   degrees from the largest, with how many struts have each. A frame without struts has zeros.
 */
export function frameFigures(frame: Frame): FrameFigures {
  const lengths = strutLengths(frame);
  const total = lengths.reduce((sum, length) => sum + length, 0);
  const { least, most } = boxOf(frame.joints);
  const angles = dihedralAngles(frame).map(({ degrees }) => degrees);
  return {
    joints: jointCount(frame),
    struts: frame.struts.length,
    faces: frame.faces.length,
    lengthClasses: classesOf(lengths, SAME_WITHIN_MM).map(({ value, indexes }) => ({
      lengthMm: value,
      count: indexes.length,
      struts: indexes,
    })),
    totalStrutMm: total,
    meanStrutMm: lengths.length === 0 ? 0 : total / lengths.length,
    longestStrutMm: lengths.reduce((a, b) => Math.max(a, b), 0),
    shortestStrutMm: lengths.length === 0 ? 0 : lengths.reduce((a, b) => Math.min(a, b)),
    glueEnds: glueEnds(frame),
    boxMm: subtract(most, least),
    dihedrals: classesOf(angles, SAME_ANGLE_DEGREES).map(({ value, indexes }) => ({
      degrees: value,
      count: indexes.length,
    })),
  };
}
