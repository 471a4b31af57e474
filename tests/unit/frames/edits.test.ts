import { describe, expect, it } from 'vitest';
import {
  applyFrameEdit,
  buildShape,
  validateFrame,
  type Frame,
  type FrameEdit,
} from '../../../shared/frames';

const cube = buildShape({ kind: 'cube', edgeMm: 200 });
const apply = (frame: Frame, edit: FrameEdit): Frame => {
  const result = applyFrameEdit(frame, edit);
  if (!result.ok) throw new Error(result.refusal.message);
  return result.value.frame;
};
const refusal = (edit: FrameEdit, frame = cube) => {
  const result = applyFrameEdit(frame, edit);
  if (result.ok) throw new Error('done');
  return result.refusal;
};
const counts = (frame: Frame) => [frame.joints.length, frame.struts.length, frame.faces.length];

describe('applyFrameEdit', () => {
  it('add-joint and add-strut > a cube gets a tip > new ones stand last, the cube is as it was', () => {
    const joint = apply(cube, { kind: 'add-joint', at: { x: 0, y: 0, z: 400 } });
    const strut = apply(joint, { kind: 'add-strut', from: 8, to: 4 });
    expect(counts(strut)).toEqual([9, 13, 6]);
    expect(strut.struts.at(-1)).toEqual([8, 4]);
    expect(validateFrame(strut)).toEqual([]);
    expect(counts(cube)).toEqual([8, 12, 6]);
  });

  it('move-joint > to another place > only that joint moves', () => {
    const moved = apply(cube, { kind: 'move-joint', joint: 4, to: { x: 1, y: 2, z: 300 } });
    expect(moved.joints[4]).toEqual({ x: 1, y: 2, z: 300 });
    expect(moved.joints.filter((joint, at) => joint !== cube.joints[at])).toHaveLength(1);
  });

  it('move-joint > a hair away from where it is > not taken for another joint there', () => {
    const { x, y, z } = cube.joints[0]!;
    expect(apply(cube, { kind: 'move-joint', joint: 0, to: { x: x + 0.05, y, z } }).joints[0]!.x).toBe(
      x + 0.05,
    );
  });

  it('delete-joint > a corner of a cube > 3 struts and 3 faces go with it, the rest keeps its shape', () => {
    const cut = apply(cube, { kind: 'delete-joint', joint: 2 });
    expect(counts(cut)).toEqual([7, 9, 3]);
    expect(validateFrame(cut)).toEqual([]);
    expect(cut.joints).toEqual(cube.joints.filter((_, joint) => joint !== 2));
  });

  it('delete-strut > an edge of a cube > its two faces go with it', () => {
    const cut = apply(cube, { kind: 'delete-strut', strut: 0 });
    expect(counts(cut)).toEqual([8, 11, 4]);
    expect(validateFrame(cut)).toEqual([]);
  });

  it('split-strut > an edge of a cube at a quarter > a joint there, two struts, both faces have a corner more', () => {
    const split = apply(cube, { kind: 'split-strut', strut: 0, share: 0.25 });
    expect(counts(split)).toEqual([9, 13, 6]);
    const [a, b] = cube.struts[0]!;
    expect(split.struts[0]).toEqual([a, 8]);
    expect(split.struts[12]).toEqual([8, b]);
    expect(split.joints[8]!.x).toBeCloseTo(cube.joints[a]!.x * 0.75 + cube.joints[b]!.x * 0.25, 9);
    expect(split.faces.map((face) => face.length).sort()).toEqual([4, 4, 4, 4, 5, 5]);
    expect(validateFrame(split)).toEqual([]);
  });

  it('merge-joints > the two ends of an edge > one joint less, two faces become triangles, nothing doubled', () => {
    const [keep, drop] = cube.struts[0]!;
    const merged = apply(cube, { kind: 'merge-joints', keep, drop });
    expect(counts(merged)).toEqual([7, 11, 6]);
    expect(merged.faces.map((face) => face.length).sort()).toEqual([3, 3, 4, 4, 4, 4]);
    expect(validateFrame(merged)).toEqual([]);
  });

  it('merge-joints > two corners of a tetrahedron > a triangle: doubled struts and faces are one, folded faces gone', () => {
    const flat = apply(buildShape({ kind: 'tetrahedron', edgeMm: 200 }), {
      kind: 'merge-joints',
      keep: 3,
      drop: 0,
    });
    expect(counts(flat)).toEqual([3, 3, 1]);
    expect(validateFrame(flat)).toEqual([]);
  });

  it.each<[string, FrameEdit, string, string]>([
    ['a place that is none', { kind: 'add-joint', at: { x: NaN, y: 0, z: 0 } }, 'EDIT_NOT_A_PLACE', '1 km'],
    ['a place too far', { kind: 'add-joint', at: { x: 0, y: 0, z: 2e6 } }, 'EDIT_NOT_A_PLACE', '2000000'],
    ['a place taken', { kind: 'add-joint', at: cube.joints[3]! }, 'EDIT_SAME_PLACE', 'Joint 4'],
    ['onto another', { kind: 'move-joint', joint: 0, to: cube.joints[3]! }, 'EDIT_SAME_PLACE', 'Joint 4'],
    ['no such joint', { kind: 'delete-joint', joint: 8 }, 'EDIT_MISSING_JOINT', 'joints 1 to 8'],
    ['no such strut', { kind: 'delete-strut', strut: 12 }, 'EDIT_MISSING_STRUT', 'struts 1 to 12'],
    ['both ends one joint', { kind: 'add-strut', from: 2, to: 2 }, 'EDIT_SAME_JOINT', 'joint 3'],
    ['a strut that is there', { kind: 'add-strut', from: 1, to: 0 }, 'EDIT_DOUBLED_STRUT', 'joins 2 and 1'],
    ['a share of 1', { kind: 'split-strut', strut: 0, share: 1 }, 'EDIT_BAD_SHARE', 'gave 1'],
    ['a share that is none', { kind: 'split-strut', strut: 0, share: NaN }, 'EDIT_BAD_SHARE', 'NaN'],
    ['too near the end', { kind: 'split-strut', strut: 0, share: 1e-5 }, 'EDIT_SAME_PLACE', 'within 0.1 mm'],
    ['one joint twice', { kind: 'merge-joints', keep: 5, drop: 5 }, 'EDIT_SAME_JOINT', 'joint 6'],
  ])('%s > refused with the numbers', (_, edit, code, words) => {
    const { code: found, message } = refusal(edit);
    expect(found).toBe(code);
    expect(message).toContain(words);
  });

  it('more than 20,000 joints > refused', () => {
    const joints = Array.from({ length: 20_000 }, (_, at) => ({ x: at, y: 0, z: 0 }));
    const full: Frame = { joints, struts: [[0, 1]], faces: [] };
    const places: FrameEdit = { kind: 'add-joint', at: { x: 0, y: 5, z: 0 } };
    expect(refusal(places, full).code).toBe('EDIT_TOO_LARGE');
  });
});
