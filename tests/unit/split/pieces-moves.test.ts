import { describe, expect, it } from 'vitest';
import { buildShape } from '../../../shared/frames';
import type { Frame, Shape } from '../../../shared/frames';
import {
  assemblyMoves,
  chooseFlats,
  moveText,
  pieceFrames,
  pieceMeetings,
  strutNames,
  strutsInOrder,
} from '../../../shared/split/pieces';
import type { Move } from '../../../shared/split/pieces';

const at = (x: number, y: number, z = 0) => ({ x, y, z });
const movesOf = (frame: Frame): Move[] => assemblyMoves(frame, chooseFlats(frame).flats);
const textsOf = (frame: Frame, unit: 'mm' | 'inch' = 'mm'): string[] =>
  movesOf(frame).map((move) => moveText(move, strutNames(frame), unit));
const shaped = (shape: Shape): Frame => buildShape(shape);
const kindsOf = (moves: readonly Move[]): string[] => moves.map(({ kind }) => kind);

describe('assemblyMoves', () => {
  it('cube > ordered > floor, lid, brace, lid held over the floor by four struts, brace, second layer, clean', () => {
    expect(textsOf(shaped({ kind: 'cube', edgeMm: 200 }))).toEqual([
      'Move 1. Flat 1: lay struts 1 to 4 (all A, 200 mm) on wax paper as a ring round joints 1, 2, 3, 4. Put a dot of glue at each joint. Let it cool.',
      'Move 2. Flat 2: lay struts 5 to 8 (all A, 200 mm) on wax paper as a ring round joints 5, 6, 7, 8. Put a dot of glue at each joint. Let it cool.',
      'Move 3. Flat 2 bends easily until its second layer of glue. Before you lift it, tape a temporary stick across joints 5 and 7.',
      'Move 4. Hold flat 2 above flat 1, 200 mm apart. Glue strut 9 (A, 200 mm) from joint 2 to joint 6.',
      'Move 5. Keep holding flat 2. Glue strut 12 (A, 200 mm) from joint 4 to joint 8.',
      'Move 6. Keep holding flat 2. Glue strut 10 (A, 200 mm) from joint 1 to joint 5.',
      'Move 7. Keep holding flat 2. Glue strut 11 (A, 200 mm) from joint 3 to joint 7.',
      'Move 8. While the glue is warm the piece can still move in 5 ways. Tape temporary sticks at least across joints 1 and 3, joints 1 and 6 and joints 1 and 8, compare the shape with the drawing, and turn it with two people.',
      'Move 9. Second layer: go round joints 1 to 8 with glue, from all sides. Let it cool.',
      'Move 10. When everything is cool, take off the sticks across joints 5 and 7, joints 1 and 3, joints 1 and 6 and joints 1 and 8.',
      'Move 11. Pull off the strings of glue at joints 1 to 8.',
    ]);
  });

  it('cube in inches > worded > lengths to a sixteenth of an inch', () => {
    expect(textsOf(shaped({ kind: 'cube', edgeMm: 203.2 }), 'inch')[3]).toBe(
      'Move 4. Hold flat 2 above flat 1, 8 in apart. Glue strut 9 (A, 8 in) from joint 2 to joint 6.',
    );
  });

  it('octahedron > ordered > three squares joined at shared joints, stiff without a brace of the whole', () => {
    const moves = movesOf(shaped({ kind: 'octahedron', edgeMm: 200 }));
    expect(kindsOf(moves)).toEqual([
      'flat',
      'flat',
      'flat',
      'brace',
      'join',
      'brace',
      'join',
      'glue-out',
      'take-off',
      'clean',
    ]);
    const braces = moves.flatMap((move) => (move.kind === 'take-off' ? move.braces : []));
    expect(new Set(braces.map(([a, b]) => `${a}-${b}`)).size).toBe(2);
  });

  it('tetrahedron > ordered > a triangle, then its apex with three struts at once, no brace', () => {
    const moves = movesOf(shaped({ kind: 'tetrahedron', edgeMm: 200 }));
    expect(kindsOf(moves)).toEqual(['flat', 'raise', 'glue-out', 'clean']);
    expect(moves[1]).toMatchObject({ joint: 3, prop: false });
    expect(moves[1]!.struts).toHaveLength(3);
  });

  it('square pyramid > raised over a square that stays lying > no stick before, one across the square at the end', () => {
    const pyramid = shaped({ kind: 'pyramid', sides: 4, baseBy: 'edge', baseMm: 200, heightMm: 200 });
    const base = {
      joints: [0, 1, 2, 3],
      struts: [0, 1, 2, 3].map((k) => strutBetween(pyramid, k, (k + 1) % 4)),
    };
    const moves = assemblyMoves(pyramid, [base]);
    expect(kindsOf(moves)).toEqual(['flat', 'raise', 'strut', 'brace', 'glue-out', 'take-off', 'clean']);
    expect(moves[1]!.struts).toHaveLength(3);
    expect(moves[3]).toMatchObject({ flat: null, mechanisms: 1, braces: [[0, 2]], board: false });
  });

  it('ring with two struts across > ordered > laid while it lies there; it needs no stick then', () => {
    const pentagon = Array.from({ length: 5 }, (_, k) =>
      at(200 * Math.cos((k * 2 * Math.PI) / 5), 200 * Math.sin((k * 2 * Math.PI) / 5)),
    );
    const lifted = pentagon.map((p) => ({ ...p, z: 200 }));
    const ring = [0, 1, 2, 3, 4];
    const frame: Frame = {
      joints: [...pentagon, ...lifted],
      struts: [
        ...ring.map((k): [number, number] => [k, (k + 1) % 5]),
        ...ring.map((k): [number, number] => [5 + k, 5 + ((k + 1) % 5)]),
        ...ring.map((k): [number, number] => [k, 5 + k]),
        [5, 7],
        [5, 8],
      ],
      faces: [],
    };
    const flats = [
      { joints: ring, struts: ring },
      { joints: ring.map((k) => 5 + k), struts: ring.map((k) => 5 + k) },
    ];
    const moves = assemblyMoves(frame, flats);
    expect(kindsOf(moves).slice(0, 5)).toEqual(['flat', 'flat', 'lay', 'lay', 'strut']);
    expect(moves[3]).toMatchObject({ flat: 1, struts: [16], joints: [5, 8] });
    const bare = { ...frame, struts: frame.struts.slice(0, 15) };
    expect(kindsOf(assemblyMoves(bare, flats)).slice(0, 4)).toEqual(['flat', 'flat', 'brace', 'strut']);
  });

  it('lid of twelve sides > braced > a board instead of nine sticks, taken off at the end', () => {
    const prism = shaped({ kind: 'prism', sides: 12, baseBy: 'edge', baseMm: 100, heightMm: 150 });
    const moves = movesOf(prism);
    expect(moves.find(({ kind }) => kind === 'brace')).toMatchObject({
      flat: 1,
      board: true,
      braces: [],
      mechanisms: 9,
    });
    const texts = textsOf(prism);
    expect(texts[2]).toContain('Slide a stiff board under it');
    expect(texts.at(-2)).toContain('the board under flat 2');
  });

  it('a net that is flat as a whole > ordered > everything on the bench: nothing is held, propped or braced flat by flat', () => {
    const net = shaped({
      kind: 'vault-bay',
      lengthMm: 1500,
      widthMm: 1200,
      riseMm: 0,
      divisionsAlong: 5,
      divisionsAcross: 4,
      diagonals: 'none',
    });
    const moves = movesOf(net);
    expect(kindsOf(moves)).toContain('join');
    for (const move of moves) {
      if ('lying' in move) expect(move.lying).toBe(true);
      if (move.kind === 'brace') expect(move.flat).toBeNull();
    }
    expect(textsOf(net).join(' ')).not.toMatch(/Hold flat|Prop/);
  });

  it('frame without rings > ordered > a low strut on the bench, the next ones propped, each from a joint that is there', () => {
    const frame: Frame = {
      joints: [at(0, 0, 500), at(100, 0), at(100, 100), at(0, 50, 200)],
      struts: [
        [0, 1],
        [1, 2],
        [2, 3],
      ],
      faces: [],
    };
    expect(textsOf(frame).slice(0, 3)).toEqual([
      'Move 1. Lay strut 2 (C, 100 mm) on the bench: one end is joint 2, the other joint 3.',
      'Move 2. Glue strut 1 (A, 510 mm) from joint 2; its far end is joint 1. Prop it until the next strut holds it.',
      'Move 3. Glue strut 3 (B, 229 mm) from joint 3; its far end is joint 4. Prop it until the next strut holds it.',
    ]);
  });

  it('a strut through the middle of a ring > ordered > it waits until the ring is in its place', () => {
    // A square held over a base square by posts, and a mast on the base that goes up through the upper square.
    const square = (z: number) => [at(0, 0, z), at(200, 0, z), at(200, 200, z), at(0, 200, z)];
    const frame: Frame = {
      joints: [...square(0), ...square(200), at(100, 100, 100), at(100, 100, 300)],
      struts: [
        [0, 1],
        [1, 2],
        [2, 3],
        [3, 0],
        [4, 5],
        [5, 6],
        [6, 7],
        [7, 4],
        [0, 4],
        [0, 8],
        [1, 8],
        [2, 8],
        [8, 9],
      ],
      faces: [],
    };
    const flats = [
      { joints: [0, 1, 2, 3], struts: [0, 1, 2, 3] },
      { joints: [4, 5, 6, 7], struts: [4, 5, 6, 7] },
    ];
    const moves = assemblyMoves(frame, flats);
    const held = moves.findIndex((move) => move.kind === 'strut' && move.hold?.first);
    const mast = moves.findIndex(({ struts }) => struts.includes(12));
    expect(held).toBeGreaterThan(0);
    expect(mast).toBeGreaterThan(held);
  });

  it('piece with neighbours > ordered > its field joints kept slim and marked with the same tape as the neighbour has', () => {
    const cube = shaped({ kind: 'cube', edgeMm: 200 });
    const post: Frame = {
      joints: [...cube.joints, at(0, 0, 900)],
      struts: [...cube.struts, [4, 8]],
      faces: cube.faces,
    };
    const pieces = pieceFrames(post, [...cube.struts.map(() => 0), 1]);
    const meetings = pieceMeetings(pieces, ['V-07', 'V-08']);
    const { frame } = pieces[0]!;
    const moves = assemblyMoves(frame, chooseFlats(frame).flats, { meetings: meetings[0]! });
    const texts = moves.map((move) => moveText(move, strutNames(frame), 'mm'));
    expect(texts.at(-1)).toBe(
      `Move ${moves.length}. Stick a tape at each joint where another piece comes, and write on it: joint 5: V-07/5 = V-08/1.`,
    );
    expect(texts.find((text) => text.includes('Second layer'))).toContain(
      'Keep joint 5 slim: other pieces are joined there on site.',
    );
    expect(meetings[1]).toEqual([
      { joint: 0, others: [{ piece: 0, code: 'V-07', joint: 4 }], tape: 'V-07/5 = V-08/1' },
    ]);
  });

  it('one strut alone, and no strut at all > ordered > one move to make it, or none', () => {
    const one: Frame = { joints: [at(0, 0), at(100, 0)], struts: [[0, 1]], faces: [] };
    expect(kindsOf(assemblyMoves(one, []))).toEqual(['begin']);
    expect(assemblyMoves({ joints: [], struts: [], faces: [] }, [])).toEqual([]);
  });

  it('struts of the moves > listed > the order in which they light up, each once', () => {
    const frame = shaped({ kind: 'dodecahedron', edgeMm: 150 });
    const order = strutsInOrder(movesOf(frame));
    expect([...order].sort((a, b) => a - b)).toEqual(frame.struts.map((_, strut) => strut));
  });
});

describe('strutNames', () => {
  it('struts of three lengths > named > A the longest, one letter per length', () => {
    const bipyramid = shaped({
      kind: 'bipyramid',
      sides: 6,
      baseBy: 'radius',
      baseMm: 200,
      upperMm: 150,
      lowerMm: 300,
    });
    const { labels, lengthsMm } = strutNames(bipyramid);
    expect([...new Set(labels)].sort()).toEqual(['A', 'B', 'C']);
    expect(lengthsMm[labels.indexOf('A')]).toBeGreaterThan(lengthsMm[labels.indexOf('B')]!);
  });

  it('thirty lengths > named > after Z come AA to AD', () => {
    const frame: Frame = {
      joints: [at(0, 0), ...Array.from({ length: 30 }, (_, k) => at(100 + 10 * k, k))],
      struts: Array.from({ length: 30 }, (_, k): [number, number] => [0, k + 1]),
      faces: [],
    };
    expect(strutNames(frame).labels.slice(0, 5).reverse()).toEqual(['Z', 'AA', 'AB', 'AC', 'AD']);
  });
});

function strutBetween(frame: Frame, a: number, b: number): number {
  return frame.struts.findIndex((ends) => ends.includes(a) && ends.includes(b));
}
