import { describe, expect, it } from 'vitest';
import { buildShape } from '../../../shared/frames';
import type { Frame } from '../../../shared/frames';
import { identicalPieces, numberedPieces } from '../../../shared/split/pieces';

const at = (x: number, y: number, z = 0) => ({ x, y, z });
const shifted = (frame: Frame, x: number): Frame => ({
  ...frame,
  joints: frame.joints.map((p) => ({ ...p, x: p.x + x })),
});
const cube = buildShape({ kind: 'cube', edgeMm: 200 });

describe('identicalPieces', () => {
  it('a copy set beside the first > compared > not turned, although a cube fits in 24 ways', () => {
    const { likenesses } = identicalPieces([{ frame: cube }, { frame: shifted(cube, 900) }]);
    expect(likenesses[1]!.motion).toEqual({
      rotation: [at(1, 0, 0), at(0, 1, 0), at(0, 0, 1)].map((row) => ({
        x: expect.closeTo(row.x, 9),
        y: expect.closeTo(row.y, 9),
        z: expect.closeTo(row.z, 9),
      })),
      offset: { x: expect.closeTo(900, 6), y: expect.closeTo(0, 6), z: expect.closeTo(0, 6) },
    });
    expect(likenesses[1]!.joints).toEqual([0, 1, 2, 3, 4, 5, 6, 7]);
  });

  it('two shapes, several copies > compared > two groups in the order of their first pieces', () => {
    const tetrahedron = buildShape({ kind: 'tetrahedron', edgeMm: 200 });
    const { groups } = identicalPieces(
      [cube, tetrahedron, shifted(cube, 500), shifted(tetrahedron, 500), cube].map((frame) => ({ frame })),
    );
    expect(groups.map(({ first, pieces }) => [first, pieces])).toEqual([
      [0, [0, 2, 4]],
      [1, [1, 3]],
    ]);
  });

  it('the same shape with one strut of other stock > compared > two groups; the same stock elsewhere on a cube > one', () => {
    const stock = (thick: number) => cube.struts.map((_, strut) => (strut === thick ? '8 mm' : '6 mm'));
    const plain = cube.struts.map(() => '6 mm');
    const groupsOf = (a: string[], b: string[]) =>
      identicalPieces([
        { frame: cube, strutKinds: a },
        { frame: cube, strutKinds: b },
      ]).groups.length;
    expect(groupsOf(plain, stock(3))).toBe(2);
    expect(groupsOf(stock(0), stock(7))).toBe(1);
    // One thick strut at every joint both times, so that all joints look alike: four parallel ones, or two and two crosswise.
    const thick = (pairs: [number, number][]) =>
      cube.struts.map((ends) =>
        pairs.some((pair) => pair.every((joint) => ends.includes(joint))) ? '8 mm' : '6 mm',
      );
    const upright: [number, number][] = [
      [0, 4],
      [1, 5],
      [2, 6],
      [3, 7],
    ];
    const crosswise: [number, number][] = [
      [0, 1],
      [2, 3],
      [4, 7],
      [5, 6],
    ];
    expect(groupsOf(thick(upright), thick(crosswise))).toBe(2);
    expect(groupsOf(thick(upright), thick(upright))).toBe(1);
  });

  it('cubes of 200 and 201 mm > compared at 0.5 mm and at 1 mm > apart, then one group', () => {
    const larger = buildShape({ kind: 'cube', edgeMm: 201 });
    const pair = [{ frame: cube }, { frame: larger }];
    expect(identicalPieces(pair).groups).toHaveLength(2);
    expect(identicalPieces(pair, 1).groups).toHaveLength(1);
  });

  it('a single strut, struts in a line > compared with copies standing upright > same', () => {
    const line = (joints: [number, number, number][]): Frame => ({
      joints: joints.map(([x, y, z]) => at(x, y, z)),
      struts: joints.slice(1).map((_, k): [number, number] => [k, k + 1]),
      faces: [],
    });
    const { groups, likenesses } = identicalPieces(
      [
        line([
          [0, 0, 0],
          [300, 0, 0],
        ]),
        line([
          [5, 5, 300],
          [5, 5, 0],
        ]),
        line([
          [0, 0, 0],
          [300, 0, 0],
          [400, 0, 0],
        ]),
        line([
          [0, 0, 100],
          [0, 0, 0],
          [0, 0, -300],
        ]),
      ].map((frame) => ({ frame })),
    );
    expect(groups.map(({ pieces, handed }) => [pieces, handed])).toEqual([
      [[0, 1], false],
      [[2, 3], false],
    ]);
    expect(likenesses[3]!.joints).toEqual([2, 1, 0]);
  });

  it('no pieces, or a piece without struts > compared > no groups, or one', () => {
    expect(identicalPieces([])).toEqual({ groups: [], likenesses: [] });
    expect(identicalPieces([{ frame: { joints: [], struts: [], faces: [] } }]).groups).toHaveLength(1);
  });

  it.each([0, -1, Number.NaN])('a tolerance of %d > given > refused', (within) => {
    expect(() => identicalPieces([{ frame: cube }], within)).toThrow(RangeError);
  });
});

describe('numberedPieces', () => {
  it('a drawing of two cubes joined by a strut > cut > both cubes numbered alike, faces too, the strut by itself', () => {
    const far = shifted(cube, 1000);
    const drawing: Frame = {
      joints: [...cube.joints, ...far.joints],
      struts: [...cube.struts, ...far.struts.map(([a, b]): [number, number] => [b + 8, a + 8]), [1, 8]],
      faces: [...cube.faces, ...far.faces.map((face) => face.map((joint) => joint + 8))],
    };
    const pieceOf = drawing.struts.map((_, strut) => Math.min(2, Math.floor(strut / 12)));
    const { pieces, groups } = numberedPieces(drawing, pieceOf);
    expect(groups.map((group) => group.pieces)).toEqual([[0, 1], [2]]);
    expect(pieces[1]!.joints).toEqual([8, 9, 10, 11, 12, 13, 14, 15]);
    expect(pieces[1]!.frame.faces).toEqual(pieces[0]!.frame.faces);
    expect(pieces[1]!.frame.faces).toHaveLength(6);
    expect(pieces[2]!.struts).toEqual([24]);
  });
});
