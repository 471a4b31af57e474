import { beforeAll, describe, expect, it } from 'vitest';
import { openHighs } from '../../../server/jobs/highs-solver';
import { buildShape } from '../../../shared/frames';
import type { Frame, Shape } from '../../../shared/frames';
import type { LinearSolver } from '../../../shared/kernel/linear-program';
import { chooseFlats } from '../../../shared/split/pieces';

let solver: LinearSolver;
beforeAll(async () => {
  solver = await openHighs();
});

/** Faces that share a strut, per face: the dual graph. */
function dualGraph(frame: Frame): Set<number>[] {
  const edges = frame.faces.map(
    (face) =>
      new Set(
        face.map((a, at) => {
          const b = face[(at + 1) % face.length]!;
          return `${Math.min(a, b)}-${Math.max(a, b)}`;
        }),
      ),
  );
  return edges.map(
    (own, face) =>
      new Set(
        edges.flatMap((other, at) => (at !== face && [...own].some((edge) => other.has(edge)) ? [at] : [])),
      ),
  );
}

/** Most nodes of a graph of which no two are joined, by looking at every set of nodes. */
function independenceNumber(graph: Set<number>[]): number {
  let most = 0;
  for (let set = 0; set < 2 ** graph.length; set++) {
    const nodes = graph.flatMap((_, node) => (set & (1 << node) ? [node] : []));
    if (nodes.length > most && nodes.every((a) => nodes.every((b) => !graph[a]!.has(b)))) most = nodes.length;
  }
  return most;
}

/**
 * Solid, independence number of its dual graph, struts in flats, flats. Independence numbers: the dual of the cube is the octahedral graph
 * K(2,2,2), 2; the dual of the dodecahedron the icosahedral graph, 3 (E. W. Weisstein, MathWorld, "Octahedral Graph", "Icosahedral
 * Graph"); recomputed here. Octahedron: every joint has four struts, so that all can stand in rings (Veblen 1912); its three
 * equators are squares.
 */
const VALUES: [Shape, number, number, number][] = [
  [{ kind: 'cube', edgeMm: 200 }, 2, 8, 2],
  [{ kind: 'dodecahedron', edgeMm: 150 }, 3, 15, 3],
  [{ kind: 'octahedron', edgeMm: 200 }, 4, 12, 3],
];

describe.each(VALUES)('flats of %o', (shape, independent, struts, flats) => {
  const frame = buildShape(shape);

  it('faces without a common strut > counted on the dual graph > the published independence number', () => {
    expect(independenceNumber(dualGraph(frame))).toBe(independent);
  });

  it('chosen exactly > struts in flats > the check value, proven, all rings looked at', () => {
    const found = chooseFlats(frame, { solver });
    expect(found).toMatchObject({
      strutsInFlats: struts,
      struts: frame.struts.length,
      proven: true,
      allRings: true,
    });
    expect(found.flats).toHaveLength(flats);
  });

  it('without its faces > chosen exactly > the same value: rings are found from the struts alone', () => {
    expect(chooseFlats({ ...frame, faces: [] }, { solver }).strutsInFlats).toBe(struts);
  });

  it('without the solver > searched > the same value', () => {
    expect(chooseFlats(frame)).toMatchObject({ strutsInFlats: struts, proven: true });
  });
});

describe('chooseFlats', () => {
  it('cuboctahedron > chosen > its four hexagons with all 24 struts (H. S. M. Coxeter, Regular Polytopes, 2.3)', () => {
    const joints = [-1, 1].flatMap((a) =>
      [-1, 1].flatMap((b) => [
        { x: 100 * a, y: 100 * b, z: 0 },
        { x: 100 * a, y: 0, z: 100 * b },
        { x: 0, y: 100 * a, z: 100 * b },
      ]),
    );
    const struts = joints.flatMap((p, a) =>
      joints.flatMap((q, b): [number, number][] =>
        a < b && Math.abs(Math.hypot(p.x - q.x, p.y - q.y, p.z - q.z) - 100 * Math.SQRT2) < 1e-6
          ? [[a, b]]
          : [],
      ),
    );
    const found = chooseFlats({ joints, struts, faces: [] }, { solver });
    expect(found.flats.map((ring) => ring.joints.length)).toEqual([6, 6, 6, 6]);
    expect(found).toMatchObject({ strutsInFlats: 24, struts: 24, proven: true });
  });
});
