import { describe, expect, it } from 'vitest';
import { buildShape } from '../../../shared/frames';
import type { Frame } from '../../../shared/frames';
import {
  moveStruts,
  pieceAdjacency,
  pieceFrames,
  pieceMeetings,
  splitFigures,
} from '../../../shared/split/pieces';
import type { MoveOptions, SplitState, StrutMove } from '../../../shared/split/pieces';

/** A row of joints 100 mm apart with struts between neighbours: strut k from joint k to joint k + 1. */
function row(struts: number): Frame {
  return {
    joints: Array.from({ length: struts + 1 }, (_, k) => ({ x: 100 * k, y: 0, z: 0 })),
    struts: Array.from({ length: struts }, (_, k): [number, number] => [k, k + 1]),
    faces: [],
  };
}
const split: SplitState = { frame: row(6), pieceOf: [0, 0, 0, 1, 1, 1], pieces: 2 };

function moved(struts: number[], to: number | null, options: MoveOptions = {}): StrutMove {
  const result = moveStruts(split, struts, to, options);
  if (!result.ok) throw new Error(result.refusal.message);
  return result.value;
}

describe('splitFigures', () => {
  it('two halves of a row > counted > one field joint, figures of each, in minutes and kg', () => {
    const figures = splitFigures(split, {
      minutes: [1, 2, 3, 1, 1, 1],
      minutesPerJoint: 2,
      grams: [500, 500, 500, 100, 100, 100],
    });
    expect(figures.fieldJoints).toBe(1);
    expect(figures.pieces[0]).toEqual({
      struts: 3,
      joints: 4,
      fieldJoints: 1,
      minutes: 14,
      massKg: 1.5,
      strutMm: 300,
      sizeMm: [300, 0, 0],
      parts: 1,
    });
    // 14 and 11 minutes: 1.5 from the mean of 12.5.
    expect(figures.imbalancePct).toBeCloseTo(12, 9);
  });

  it('three pieces at one joint > counted > two field joints: the pieces that meet there less one', () => {
    const star: SplitState = {
      frame: {
        joints: row(3).joints,
        struts: [
          [0, 1],
          [0, 2],
          [0, 3],
        ],
        faces: [],
      },
      pieceOf: [0, 1, 2],
      pieces: 3,
    };
    expect(splitFigures(star).fieldJoints).toBe(2);
  });

  it('no struts at all > counted > zeros, no NaN', () => {
    expect(splitFigures({ frame: { joints: [], struts: [], faces: [] }, pieceOf: [], pieces: 1 })).toEqual({
      pieces: [
        {
          struts: 0,
          joints: 0,
          fieldJoints: 0,
          minutes: 0,
          massKg: 0,
          strutMm: 0,
          sizeMm: [0, 0, 0],
          parts: 0,
        },
      ],
      fieldJoints: 0,
      imbalancePct: 0,
    });
  });
});

describe('moveStruts', () => {
  it('a strut at the border > given to the neighbour > figures of both follow, no problem, the old split is as it was', () => {
    const { split: next, before, after, problems, undo } = moved([3], 0);
    expect(next.pieceOf).toEqual([0, 0, 0, 0, 1, 1]);
    expect(split.pieceOf).toEqual([0, 0, 0, 1, 1, 1]);
    expect(before.pieces.map(({ struts }) => struts)).toEqual([3, 3]);
    expect(after.pieces.map(({ struts }) => struts)).toEqual([4, 2]);
    expect(problems).toEqual([]);
    expect(undo).toBe(split);
  });

  it('a strut from the middle > given away > its piece falls into parts, named with the struts to give on', () => {
    const { after, problems } = moved([4], 0, { codes: ['V-01', 'V-02'] });
    expect(after.fieldJoints).toBe(3);
    expect(problems).toEqual([
      {
        code: 'PIECE_IN_PARTS',
        piece: 0,
        parts: [[0, 1, 2], [4]],
        message:
          'V-01 falls into 2 parts that do not touch; nobody can carry it as one. Give 1 strut (5) to a piece that they touch.',
      },
      {
        code: 'PIECE_IN_PARTS',
        piece: 1,
        parts: [[3], [5]],
        message:
          'V-02 falls into 2 parts that do not touch; nobody can carry it as one. Give 1 strut (6) to a piece that they touch.',
      },
    ]);
  });

  it('all struts of a piece > given away > the piece is empty and says that it goes', () => {
    const { problems, after } = moved([3, 4, 5], 0, { codes: ['V-01', 'V-02'] });
    expect(problems).toEqual([
      { code: 'PIECE_EMPTY', piece: 1, message: 'V-02 has no struts left. It goes when this is kept.' },
    ]);
    expect(after.fieldJoints).toBe(0);
  });

  it('struts > given to a piece of their own > a third piece', () => {
    const { split: next, piece, after } = moved([2], null);
    expect(piece).toBe(2);
    expect(next).toMatchObject({ pieces: 3, pieceOf: [0, 0, 2, 1, 1, 1] });
    expect(after.pieces).toHaveLength(3);
    expect(after.fieldJoints).toBe(2);
  });

  it('limits > exceeded by the move > each named with both numbers', () => {
    const { problems } = moved([3], 0, {
      minutes: [25, 25, 25, 17, 25, 25],
      grams: [1000, 1000, 1000, 1000, 1000, 1000],
      limits: { struts: 3, minutes: 90, massKg: 3.5, boxMm: [200, 350, 900] },
      codes: ['V-06', 'V-05'],
    });
    expect(problems.map((problem) => problem.message)).toEqual([
      'V-06 has 4 struts, 1 over the limit of 3. Give some of its struts to a neighbour.',
      'V-06 has 92 minutes, 2 over the limit of 90. Give some of its struts to a neighbour.',
      'V-06 has 4 kg, 0.5 over the limit of 3.5. Give some of its struts to a neighbour.',
    ]);
    const long = moved([3, 4], 0, { limits: { boxMm: [200, 350, 450] } });
    expect(long.problems).toMatchObject([{ code: 'PIECE_OVER_LIMIT', limit: 'box', is: 500, most: 450 }]);
  });

  it.each([
    [[6], 0, 'STRUT_UNKNOWN', 'There is no strut 7; the drawing has struts 1 to 6.'],
    [[0], 5, 'PIECE_UNKNOWN', 'There is no piece 6; the split has pieces 1 to 2.'],
    [[0, 1], 0, 'NOTHING_TO_MOVE', 'All 2 chosen struts are in that piece already.'],
    [[], 0, 'NOTHING_TO_MOVE', 'No strut is chosen.'],
  ] as const)('struts %j to piece %i > moved > refused with %s', (struts, to, code, words) => {
    const result = moveStruts(split, struts, to);
    expect(result.ok).toBe(false);
    if (!result.ok) {
      expect(result.refusal.code).toBe(code);
      expect(result.refusal.message).toContain(words);
    }
  });
});

describe('pieceMeetings', () => {
  it('a cube in three pieces > neighbours listed > every piece has the same tape at the same place', () => {
    const cube = buildShape({ kind: 'cube', edgeMm: 200 });
    const pieces = pieceFrames(cube, [0, 0, 0, 0, 1, 1, 1, 1, 2, 2, 2, 2]);
    const meetings = pieceMeetings(pieces, ['V-10', 'V-09', 'V-02']);
    expect(meetings.map((list) => list.length)).toEqual([4, 4, 8]);
    const tapes = (piece: number) =>
      meetings[piece]!.map(({ joint, tape }) => [pieces[piece]!.joints[joint], tape]);
    expect(tapes(2).sort()).toEqual([...tapes(0), ...tapes(1)].sort());
    expect(meetings[0]![0]!.tape).toMatch(/^V-02\/\d = V-10\/1$/);
    expect(meetings[1]![0]!.others.map(({ code }) => code)).toEqual(['V-02']);
    expect(pieceAdjacency(pieces)).toEqual([[2], [2], [0, 1]]);
  });

  it('a separate shape > neighbours listed > none', () => {
    const cube = buildShape({ kind: 'cube', edgeMm: 200 });
    expect(
      pieceMeetings(
        pieceFrames(
          cube,
          cube.struts.map(() => 0),
        ),
        ['V-01'],
      ),
    ).toEqual([[]]);
  });
});

describe('pieceFrames', () => {
  it('a cube with its floor as one piece > cut > the floor keeps its face, the rest the faces without floor struts', () => {
    const cube = buildShape({ kind: 'cube', edgeMm: 200 });
    const low = (joint: number) => cube.joints[joint]!.z < 1;
    const pieces = pieceFrames(
      cube,
      cube.struts.map(([a, b]) => (low(a) && low(b) ? 0 : 1)),
    );
    expect(pieces.map(({ frame }) => [frame.joints.length, frame.struts.length, frame.faces.length])).toEqual(
      [
        [4, 4, 1],
        [8, 8, 1],
      ],
    );
    for (const { frame, joints, struts } of pieces)
      frame.struts.forEach((ends, at) => {
        expect(ends.map((end) => joints[end])).toEqual(cube.struts[struts[at]!]);
      });
  });
});
