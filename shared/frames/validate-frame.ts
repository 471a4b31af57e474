import { edgeKey, ringEdges } from './edge-key';
import { SAME_WITHIN_MM } from './frame';
import type { Frame, Joint } from './frame';
import { firstAtPlace } from './near-points';
import { distance } from './vector';

/** The largest frame that is taken: as much as a whole drawing, since one may come as a single connected structure. */
export const FRAME_LIMITS = { joints: 20_000, struts: 20_000, coordinateMm: 1_000_000 } as const;

export type FrameProblemCode =
  | 'FRAME_TOO_LARGE'
  | 'FRAME_WITHOUT_STRUTS'
  | 'FRAME_NOT_A_NUMBER'
  | 'FRAME_TOO_FAR'
  | 'FRAME_SAME_PLACE'
  | 'FRAME_LOOSE_JOINT'
  | 'FRAME_MISSING_JOINT'
  | 'FRAME_ZERO_LENGTH'
  | 'FRAME_DOUBLED_STRUT'
  | 'FRAME_BAD_FACE';

/** One thing wrong with a frame. Joint, strut and face numbers count from 1, as people see them. */
export type FrameProblem = {
  code: FrameProblemCode;
  message: string;
  joint?: number;
  strut?: number;
  face?: number;
};

const finite = (joint: Joint): boolean =>
  Number.isFinite(joint.x) && Number.isFinite(joint.y) && Number.isFinite(joint.z);

function jointProblems({ joints }: Frame): FrameProblem[] {
  const problems: FrameProblem[] = [];
  const first = firstAtPlace(
    joints.map((joint) => (finite(joint) ? joint : null)),
    SAME_WITHIN_MM,
  );
  joints.forEach((at, index) => {
    const joint = index + 1;
    if (!finite(at))
      problems.push({
        code: 'FRAME_NOT_A_NUMBER',
        joint,
        message: `Joint ${joint} is at (${at.x}, ${at.y}, ${at.z}), which is no place. Give it three numbers in mm.`,
      });
    else if (Math.max(Math.abs(at.x), Math.abs(at.y), Math.abs(at.z)) > FRAME_LIMITS.coordinateMm)
      problems.push({
        code: 'FRAME_TOO_FAR',
        joint,
        message: `Joint ${joint} is more than 1 km from the origin. Check the unit, or move the frame to the origin.`,
      });
    const other = first[index]!;
    if (other !== index)
      problems.push({
        code: 'FRAME_SAME_PLACE',
        joint,
        message: `Joints ${other + 1} and ${joint} are at the same place, within ${SAME_WITHIN_MM} mm. Make them one joint.`,
      });
  });
  return problems;
}

function strutProblems({ joints, struts }: Frame): FrameProblem[] {
  const problems: FrameProblem[] = [];
  const seen = new Map<number, number>();
  struts.forEach(([a, b], index) => {
    const strut = index + 1;
    const [from, to] = [joints[a], joints[b]];
    for (const [end, found] of [
      [a, from],
      [b, to],
    ] as const)
      if (!found)
        problems.push({
          code: 'FRAME_MISSING_JOINT',
          strut,
          message: `Strut ${strut} ends at joint ${end + 1}; the frame has joints 1 to ${joints.length}. Choose one of those.`,
        });
    if (!from || !to) return;
    if (a === b || (finite(from) && finite(to) && distance(from, to) < SAME_WITHIN_MM))
      problems.push({
        code: 'FRAME_ZERO_LENGTH',
        strut,
        message: `Strut ${strut}, from joint ${a + 1} to joint ${b + 1}, has no length: it is shorter than ${SAME_WITHIN_MM} mm. Leave it out or move an end.`,
      });
    const other = seen.get(edgeKey(a, b));
    if (other !== undefined)
      problems.push({
        code: 'FRAME_DOUBLED_STRUT',
        strut,
        message: `Struts ${other} and ${strut} both join ${a + 1} and ${b + 1}. Leave one out.`,
      });
    else seen.set(edgeKey(a, b), strut);
  });
  return problems;
}

function faceProblems({ joints, struts, faces }: Frame): FrameProblem[] {
  const known = new Set(struts.map(([a, b]) => edgeKey(a, b)));
  const problems: FrameProblem[] = [];
  faces.forEach((ring, index) => {
    const face = index + 1;
    const bad = (message: string) => problems.push({ code: 'FRAME_BAD_FACE', face, message });
    if (ring.length < 3) bad(`Face ${face} has ${ring.length} joints; a face needs at least 3.`);
    const missing = ring.filter((joint) => !joints[joint]);
    for (const joint of missing)
      bad(`Face ${face} names joint ${joint + 1}; the frame has joints 1 to ${joints.length}.`);
    if (missing.length > 0 || ring.length < 3) return;
    if (new Set(ring).size !== ring.length) {
      bad(`Face ${face} passes the same joint twice. Give each of its joints once, in order round it.`);
      return;
    }
    for (const [a, b] of ringEdges(ring))
      if (!known.has(edgeKey(a, b)))
        bad(
          `Face ${face} has an edge from joint ${a + 1} to joint ${b + 1} without a strut. Add the strut or change the face.`,
        );
  });
  return problems;
}

function looseJoints({ joints, struts }: Frame): FrameProblem[] {
  const held = new Set(struts.flat());
  return joints.flatMap((_, index): FrameProblem[] =>
    held.has(index)
      ? []
      : [
          {
            code: 'FRAME_LOOSE_JOINT',
            joint: index + 1,
            message: `Joint ${index + 1} belongs to no strut. Join it to another joint or leave it out.`,
          },
        ],
  );
}

/**
 * Everything that is wrong with a frame, at once.
 * @param frame joints in mm, struts and faces as joint indexes from 0; any numbers at all
 * @returns an empty list for a frame that can be built; otherwise limits first, then joints, struts, faces, loose joints.
 *   Limits: 20,000 joints, 20,000 struts, 1 km from the origin; places and lengths below 0.1 mm are the same or none.
 */
export function validateFrame(frame: Frame): FrameProblem[] {
  const problems: FrameProblem[] = [];
  for (const part of ['joints', 'struts'] as const) {
    const count = frame[part].length;
    if (count > FRAME_LIMITS[part])
      problems.push({
        code: 'FRAME_TOO_LARGE',
        message: `The frame has ${count} ${part}; at most ${FRAME_LIMITS[part].toLocaleString('en')} can be one frame. Split it into several frames.`,
      });
  }
  if (frame.struts.length === 0)
    problems.push({
      code: 'FRAME_WITHOUT_STRUTS',
      message: 'The frame has no struts, so there is nothing to cut. Add at least one strut.',
    });
  return [
    ...problems,
    ...jointProblems(frame),
    ...strutProblems(frame),
    ...faceProblems(frame),
    ...looseJoints(frame),
  ];
}
