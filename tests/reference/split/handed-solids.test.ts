import { describe, expect, it } from 'vitest';
import type { Frame, Joint } from '../../../shared/frames';
import { buildShape } from '../../../shared/frames';
import { identicalPieces } from '../../../shared/split/pieces';

/** Joints at the shortest distance are joined. */
function frameOf(joints: Joint[]): Frame {
  const away = (p: Joint, q: Joint): number => Math.hypot(p.x - q.x, p.y - q.y, p.z - q.z);
  const pairs = joints.flatMap((p, a) => joints.flatMap((q, b) => (a < b ? [{ a, b, mm: away(p, q) }] : [])));
  const shortest = Math.min(...pairs.map(({ mm }) => mm));
  return {
    joints,
    struts: pairs.flatMap(({ a, b, mm }): [number, number][] => (mm < shortest * 1.001 ? [[a, b]] : [])),
    faces: [],
  };
}

/** Signed permutations of (1, 1/t, t), t the tribonacci constant: even ones with an even number of plus signs, odd with odd. */
function snubCube(): Frame {
  const t = 1.8392867552141612;
  const orders = [
    [0, 1, 2],
    [1, 2, 0],
    [2, 0, 1],
    [0, 2, 1],
    [2, 1, 0],
    [1, 0, 2],
  ];
  const values = [1, 1 / t, t].map((value) => 100 * value);
  const joints = orders.flatMap((order, permutation) =>
    [0, 1, 2, 3, 4, 5, 6, 7].flatMap((signs): Joint[] => {
      const plus = [0, 1, 2].filter((bit) => signs & (1 << bit)).length;
      if (plus % 2 !== (permutation < 3 ? 0 : 1)) return [];
      const [x, y, z] = order.map((which, axis) => values[which]! * (signs & (1 << axis) ? 1 : -1)) as [
        number,
        number,
        number,
      ];
      return [{ x, y, z }];
    }),
  );
  return frameOf(joints);
}

/** Triangle, hexagon, turned hexagon, turned triangle: two triangular cupolas on the ends of a hexagonal antiprism. */
function gyroelongatedTriangularBicupola(): Frame {
  const edge = 100;
  const ring = (sides: number, z: number, turn: number): Joint[] =>
    Array.from({ length: sides }, (_, k) => {
      const angle = ((k + turn) * 2 * Math.PI) / sides;
      const radius = edge / (2 * Math.sin(Math.PI / sides));
      return { x: radius * Math.cos(angle), y: radius * Math.sin(angle), z };
    });
  const cap = edge * Math.sqrt(2 / 3);
  const belt = edge * Math.sqrt(Math.sqrt(3) - 1);
  return frameOf([
    ...ring(3, -cap, 0.25),
    ...ring(6, 0, 0),
    ...ring(6, belt, 0.5),
    ...ring(3, belt + cap, 0),
  ]);
}

const mirrorOf = (frame: Frame): Frame => ({
  ...frame,
  joints: frame.joints.map((p) => ({ ...p, x: -p.x })),
});

/**
 * Which solids come in two hands: among the Archimedean ones the snub cube and the snub dodecahedron, among the Johnson ones J44 to J48
 * (N. W. Johnson, Convex polyhedra with regular faces, Canadian Journal of Mathematics 18 (1966) 169-200).
 */
describe('identicalPieces', () => {
  it.each([
    ['snub cube', snubCube(), 24, 60],
    ['gyroelongated triangular bicupola, J44', gyroelongatedTriangularBicupola(), 18, 42],
  ] as const)('%s and its mirror image > compared > left and right', (_, frame, joints, struts) => {
    expect([frame.joints.length, frame.struts.length]).toEqual([joints, struts]);
    const { groups, likenesses } = identicalPieces([{ frame }, { frame: mirrorOf(frame) }]);
    expect(groups).toEqual([{ first: 0, pieces: [0, 1], mirrored: [1], handed: true }]);
    expect(likenesses.map(({ hand }) => hand)).toEqual(['left', 'right']);
  });

  it('solids of Plato and their mirror images > compared > one hand only (Coxeter, Regular Polytopes, 3.1)', () => {
    for (const kind of ['tetrahedron', 'cube', 'octahedron', 'dodecahedron', 'icosahedron'] as const) {
      const frame = buildShape({ kind, edgeMm: 150 });
      const { groups } = identicalPieces([{ frame }, { frame: mirrorOf(frame) }]);
      expect(groups).toEqual([{ first: 0, pieces: [0, 1], mirrored: [], handed: false }]);
    }
  });
});
