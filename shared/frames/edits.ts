import { ok, refuse } from '../kernel/result';
import type { Result } from '../kernel/result';
import { edgeKey, ringEdges } from './edge-key';
import { SAME_WITHIN_MM } from './frame';
import type { Frame, Joint, Strut } from './frame';
import { FRAME_LIMITS } from './validate-frame';
import { distance } from './vector';

/** One change of a frame in its table. Joints and struts by index from 0, places in mm. */
export type FrameEdit =
  | { kind: 'add-joint'; at: Joint }
  | { kind: 'move-joint'; joint: number; to: Joint }
  /** Its struts and faces go with it; later joints count one less. */
  | { kind: 'delete-joint'; joint: number }
  | { kind: 'add-strut'; from: number; to: number }
  /** Faces that it bounds go with it. */
  | { kind: 'delete-strut'; strut: number }
  /** A new joint on the strut at a share of its length from its first joint, above 0 and below 1; faces keep it as a corner. */
  | { kind: 'split-strut'; strut: number; share: number }
  /** One joint of two: `drop` goes, its struts end at `keep`; struts and faces that fold up or double go. */
  | { kind: 'merge-joints'; keep: number; drop: number }
  /** A frame as it was; what undoing a change is made of. */
  | { kind: 'put-back'; frame: Frame };

export type EditRefusalCode =
  | 'EDIT_MISSING_JOINT'
  | 'EDIT_MISSING_STRUT'
  | 'EDIT_NOT_A_PLACE'
  | 'EDIT_SAME_PLACE'
  | 'EDIT_SAME_JOINT'
  | 'EDIT_DOUBLED_STRUT'
  | 'EDIT_BAD_SHARE'
  | 'EDIT_TOO_LARGE';

/** Why a change was refused, in words; numbers in the message count from 1. */
export type EditRefusal = { code: EditRefusalCode; message: string };

/** The frame after a change, and the change that undoes it. */
export type EditedFrame = { frame: Frame; inverse: FrameEdit };

const no = (code: EditRefusalCode, message: string) => refuse<EditRefusal>({ code, message });

function missingJoint({ joints }: Frame, ...wanted: number[]): EditRefusal | null {
  const lost = wanted.find((joint) => !joints[joint]);
  return lost === undefined
    ? null
    : {
        code: 'EDIT_MISSING_JOINT',
        message: `There is no joint ${lost + 1}; the frame has joints 1 to ${joints.length}. Choose one of those.`,
      };
}

const missingStrut = ({ struts }: Frame, strut: number): EditRefusal | null =>
  struts[strut]
    ? null
    : {
        code: 'EDIT_MISSING_STRUT',
        message: `There is no strut ${strut + 1}; the frame has struts 1 to ${struts.length}. Choose one of those.`,
      };

/** What is wrong with a place for a joint; `except` is the joint that is moved there. */
function badPlace({ joints }: Frame, at: Joint, except: number | null): EditRefusal | null {
  const reach = Math.max(Math.abs(at.x), Math.abs(at.y), Math.abs(at.z));
  // Written so that a place that is no number is refused too.
  if (!(reach <= FRAME_LIMITS.coordinateMm))
    return {
      code: 'EDIT_NOT_A_PLACE',
      message: `(${at.x}, ${at.y}, ${at.z}) is no place within 1 km of the origin. Give three numbers in mm.`,
    };
  const other = joints.findIndex((joint, index) => index !== except && distance(joint, at) < SAME_WITHIN_MM);
  return other < 0
    ? null
    : {
        code: 'EDIT_SAME_PLACE',
        message: `Joint ${other + 1} is at this place already, within ${SAME_WITHIN_MM} mm. Use that one, or make the two one joint.`,
      };
}

function tooMany(frame: Frame, part: 'joints' | 'struts'): EditRefusal | null {
  const limit = FRAME_LIMITS[part];
  return frame[part].length < limit
    ? null
    : {
        code: 'EDIT_TOO_LARGE',
        message: `The frame has ${limit.toLocaleString('en')} ${part}, the most one frame can have. Split it into several frames.`,
      };
}

/** The frame without a joint: later joints count one less. */
function withoutJoint({ joints, struts, faces }: Frame, gone: number): Frame {
  const number = (joint: number): number => (joint > gone ? joint - 1 : joint);
  return {
    joints: joints.filter((_, joint) => joint !== gone),
    struts: struts.filter((strut) => !strut.includes(gone)).map(([a, b]): Strut => [number(a), number(b)]),
    faces: faces.filter((face) => !face.includes(gone)).map((face) => face.map(number)),
  };
}

function withoutStrut({ joints, struts, faces }: Frame, gone: number): Frame {
  const [a, b] = struts[gone]!;
  const key = edgeKey(a, b);
  return {
    joints,
    struts: struts.filter((_, strut) => strut !== gone),
    faces: faces.filter((face) => !ringEdges(face).some(([from, to]) => edgeKey(from, to) === key)),
  };
}

function splitStrut({ joints, struts, faces }: Frame, strut: number, share: number): Frame {
  const [a, b] = struts[strut]!;
  const [from, to] = [joints[a]!, joints[b]!];
  const along = (key: 'x' | 'y' | 'z'): number => from[key] + share * (to[key] - from[key]);
  const middle = joints.length;
  return {
    joints: [...joints, { x: along('x'), y: along('y'), z: along('z') }],
    struts: [...struts.map((one, at): Strut => (at === strut ? [a, middle] : one)), [middle, b]],
    faces: faces.map((face) =>
      face.flatMap((joint, at) => {
        const next = face[(at + 1) % face.length];
        return (joint === a && next === b) || (joint === b && next === a) ? [joint, middle] : [joint];
      }),
    ),
  };
}

function mergeJoints({ joints, struts, faces }: Frame, keep: number, drop: number): Frame {
  const joined = (joint: number): number => (joint === drop ? keep : joint);
  const known = new Set<number>();
  const kept = struts
    .map(([a, b]): Strut => [joined(a), joined(b)])
    .filter(([a, b]) => {
      if (a === b || known.has(edgeKey(a, b))) return false;
      known.add(edgeKey(a, b));
      return true;
    });
  const names = new Set<string>();
  const rings = faces
    .map((face) => face.map(joined).filter((joint, at, ring) => joint !== ring[(at + 1) % ring.length]))
    .filter((face) => {
      const name = [...face].sort((a, b) => a - b).join(' ');
      if (face.length < 3 || new Set(face).size !== face.length || names.has(name)) return false;
      names.add(name);
      return true;
    });
  return withoutJoint({ joints, struts: kept, faces: rings }, drop);
}

/** The frame after a change, or why not. */
function changed(frame: Frame, edit: FrameEdit): Result<Frame, EditRefusal> {
  switch (edit.kind) {
    case 'put-back':
      return ok(edit.frame);
    case 'add-joint': {
      const problem = tooMany(frame, 'joints') ?? badPlace(frame, edit.at, null);
      return problem ? refuse(problem) : ok({ ...frame, joints: [...frame.joints, edit.at] });
    }
    case 'move-joint': {
      const problem = missingJoint(frame, edit.joint) ?? badPlace(frame, edit.to, edit.joint);
      if (problem) return refuse(problem);
      const joints = frame.joints.map((joint, at) => (at === edit.joint ? edit.to : joint));
      return ok({ ...frame, joints });
    }
    case 'delete-joint': {
      const problem = missingJoint(frame, edit.joint);
      return problem ? refuse(problem) : ok(withoutJoint(frame, edit.joint));
    }
    case 'add-strut': {
      const { from, to } = edit;
      const problem = tooMany(frame, 'struts') ?? missingJoint(frame, from, to);
      if (problem) return refuse(problem);
      if (from === to)
        return no('EDIT_SAME_JOINT', `Both ends are joint ${from + 1}. Choose two different joints.`);
      const there = frame.struts.findIndex(([a, b]) => edgeKey(a, b) === edgeKey(from, to));
      if (there >= 0)
        return no(
          'EDIT_DOUBLED_STRUT',
          `Strut ${there + 1} joins ${from + 1} and ${to + 1} already. Choose two other joints.`,
        );
      return ok({ ...frame, struts: [...frame.struts, [from, to]] });
    }
    case 'delete-strut': {
      const problem = missingStrut(frame, edit.strut);
      return problem ? refuse(problem) : ok(withoutStrut(frame, edit.strut));
    }
    case 'split-strut': {
      const problem = missingStrut(frame, edit.strut) ?? tooMany(frame, 'struts') ?? tooMany(frame, 'joints');
      if (problem) return refuse(problem);
      if (!(edit.share > 0 && edit.share < 1))
        return no(
          'EDIT_BAD_SHARE',
          `A strut is split between its ends, at a share above 0 and below 1; you gave ${edit.share}.`,
        );
      const split = splitStrut(frame, edit.strut, edit.share);
      const place = badPlace(frame, split.joints.at(-1)!, null);
      return place ? refuse(place) : ok(split);
    }
    case 'merge-joints': {
      const problem = missingJoint(frame, edit.keep, edit.drop);
      if (problem) return refuse(problem);
      if (edit.keep === edit.drop)
        return no('EDIT_SAME_JOINT', `Both are joint ${edit.keep + 1}. Choose two different joints.`);
      return ok(mergeJoints(frame, edit.keep, edit.drop));
    }
  }
}

/**
 * One change of a frame in its table, with the change that undoes it.
 * @param frame struts and faces that name existing joints; it may have loose joints, since struts come after joints
 * @param edit what to do, see `FrameEdit`
 * @returns a new frame that shares what did not change, and `inverse`, which applied to it gives exactly the frame before (and whose own
 *   inverse does the change again); or why the change was refused. The frame need not be whole yet: `validateFrame` says what is missing.
 * Throws nothing.
 * Source: own.
 */
export function applyFrameEdit(frame: Frame, edit: FrameEdit): Result<EditedFrame, EditRefusal> {
  const result = changed(frame, edit);
  return result.ok
    ? ok({ frame: result.value, inverse: { kind: 'put-back', frame } })
    : refuse(result.refusal);
}
