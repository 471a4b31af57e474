import { firstAtPlace } from '../near-points';
import type { Vector } from '../vector';

/** The thirteen solids with their faces in words. */
export const ARCHIMEDEAN_SOLIDS = {
  'truncated-tetrahedron': 'truncated tetrahedron, 4 triangles, 4 hexagons',
  cuboctahedron: 'cuboctahedron, 8 triangles, 6 squares',
  'truncated-cube': 'truncated cube, 8 triangles, 6 octagons',
  'truncated-octahedron': 'truncated octahedron, 6 squares, 8 hexagons',
  rhombicuboctahedron: 'rhombicuboctahedron, 8 triangles, 18 squares',
  'truncated-cuboctahedron': 'truncated cuboctahedron, 12 squares, 8 hexagons, 6 octagons',
  'snub-cube': 'snub cube, 32 triangles, 6 squares',
  icosidodecahedron: 'icosidodecahedron, 20 triangles, 12 pentagons',
  'truncated-dodecahedron': 'truncated dodecahedron, 20 triangles, 12 decagons',
  'truncated-icosahedron': 'truncated icosahedron (football), 12 pentagons, 20 hexagons',
  rhombicosidodecahedron: 'rhombicosidodecahedron, 20 triangles, 30 squares, 12 pentagons',
  'truncated-icosidodecahedron': 'truncated icosidodecahedron, 30 squares, 20 hexagons, 12 decagons',
  'snub-dodecahedron': 'snub dodecahedron, 80 triangles, 12 pentagons',
} as const;

export type ArchimedeanSolid = keyof typeof ARCHIMEDEAN_SOLIDS;

type Seed = readonly [number, number, number];
/** Which places of a seed count: all orders or the even ones, all signs or those with an even number of minus signs, or the snub rule. */
type Rule = 'all' | 'even orders' | 'all, even minus' | 'even orders, even plus' | 'snub';

const EVEN: readonly Seed[] = [
  [0, 1, 2],
  [1, 2, 0],
  [2, 0, 1],
];
const ODD: readonly Seed[] = [
  [0, 2, 1],
  [2, 1, 0],
  [1, 0, 2],
];

function signsOf(plusEven: boolean | null): Seed[] {
  const all: Seed[] = [];
  for (const x of [1, -1])
    for (const y of [1, -1])
      for (const z of [1, -1]) {
        const plus = [x, y, z].filter((sign) => sign > 0).length;
        if (plusEven === null || (plus % 2 === 0) === plusEven) all.push([x, y, z]);
      }
  return all;
}

function placesOf(seed: Seed, rule: Rule): Vector[] {
  const place = (order: Seed, signs: Seed): Vector => ({
    x: seed[order[0]]! * signs[0],
    y: seed[order[1]]! * signs[1],
    z: seed[order[2]]! * signs[2],
  });
  const combine = (orders: readonly Seed[], signs: readonly Seed[]): Vector[] =>
    orders.flatMap((order) => signs.map((sign) => place(order, sign)));
  switch (rule) {
    case 'all':
      return combine([...EVEN, ...ODD], signsOf(null));
    case 'even orders':
      return combine(EVEN, signsOf(null));
    // Three signs: an even number of minus signs is an odd number of plus signs.
    case 'all, even minus':
      return combine([...EVEN, ...ODD], signsOf(false));
    case 'even orders, even plus':
      return combine(EVEN, signsOf(true));
    case 'snub':
      return [...combine(EVEN, signsOf(true)), ...combine(ODD, signsOf(false))];
  }
}

/** The root above 1 of a cubic that rises there, by Newton's method to the last digit. */
function rootFrom(start: number, value: (x: number) => number, slope: (x: number) => number): number {
  let x = start;
  for (let step = 0; step < 60; step++) x -= value(x) / slope(x);
  return x;
}

const R2 = Math.SQRT2;
const PHI = (1 + Math.sqrt(5)) / 2;

/** The tribonacci constant, root of t^3 = t^2 + t + 1. */
const TRIBONACCI = rootFrom(
  1.84,
  (t) => t ** 3 - t ** 2 - t - 1,
  (t) => 3 * t ** 2 - 2 * t - 1,
);

/** Seeds of the snub dodecahedron from the root of x^3 - 2x = phi. */
function snubDodecahedron(): Seed[] {
  const xi = rootFrom(
    1.7,
    (x) => x ** 3 - 2 * x - PHI,
    (x) => 3 * x ** 2 - 2,
  );
  const a = xi - 1 / xi;
  const b = xi * PHI + PHI ** 2 + PHI / xi;
  return [
    [2 * a, 2, 2 * b],
    [a + b / PHI + PHI, -a * PHI + b + 1 / PHI, a / PHI + b * PHI - 1],
    [a + b / PHI - PHI, a * PHI - b + 1 / PHI, a / PHI + b * PHI + 1],
    [-a / PHI + b * PHI + 1, -a + b / PHI - PHI, a * PHI + b - 1 / PHI],
    [-a / PHI + b * PHI - 1, a - b / PHI - PHI, a * PHI + b + 1 / PHI],
  ];
}

const SEEDS: Readonly<Record<ArchimedeanSolid, { seeds: readonly Seed[]; rule: Rule }>> = {
  'truncated-tetrahedron': { seeds: [[1, 1, 3]], rule: 'all, even minus' },
  cuboctahedron: { seeds: [[1, 1, 0]], rule: 'all' },
  'truncated-cube': { seeds: [[R2 - 1, 1, 1]], rule: 'all' },
  'truncated-octahedron': { seeds: [[0, 1, 2]], rule: 'all' },
  rhombicuboctahedron: { seeds: [[1, 1, 1 + R2]], rule: 'all' },
  'truncated-cuboctahedron': { seeds: [[1, 1 + R2, 1 + 2 * R2]], rule: 'all' },
  'snub-cube': { seeds: [[1, 1 / TRIBONACCI, TRIBONACCI]], rule: 'snub' },
  icosidodecahedron: {
    seeds: [
      [0, 0, 2 * PHI],
      [1, PHI, PHI ** 2],
    ],
    rule: 'even orders',
  },
  'truncated-dodecahedron': {
    seeds: [
      [0, 1 / PHI, 2 + PHI],
      [1 / PHI, PHI, 2 * PHI],
      [PHI, 2, PHI + 1],
    ],
    rule: 'even orders',
  },
  'truncated-icosahedron': {
    seeds: [
      [0, 1, 3 * PHI],
      [1, 2 + PHI, 2 * PHI],
      [PHI, 2, 2 * PHI + 1],
    ],
    rule: 'even orders',
  },
  rhombicosidodecahedron: {
    seeds: [
      [1, 1, PHI ** 3],
      [PHI ** 2, PHI, 2 * PHI],
      [2 + PHI, 0, PHI ** 2],
    ],
    rule: 'even orders',
  },
  'truncated-icosidodecahedron': {
    seeds: [
      [1 / PHI, 1 / PHI, 3 + PHI],
      [2 / PHI, PHI, 1 + 2 * PHI],
      [1 / PHI, PHI ** 2, 3 * PHI - 1],
      [2 * PHI - 1, 2, 2 + PHI],
      [PHI, 3, 2 * PHI],
    ],
    rule: 'even orders',
  },
  'snub-dodecahedron': { seeds: snubDodecahedron(), rule: 'even orders, even plus' },
};

/**
 * The corners of an Archimedean solid about its centre, edge of its own length.
 * Source: Cundy & Rollett, Mathematical Models (1961), and Coxeter, Longuet-Higgins & Miller (1954), from memory; that all edges are
 * equal and the counts right is tested.
 */
export function archimedeanPoints(solid: ArchimedeanSolid): Vector[] {
  const { seeds, rule } = SEEDS[solid];
  const points = seeds.flatMap((seed) => placesOf(seed, rule));
  // Zeros and equal numbers in a seed give the same place more than once.
  const first = firstAtPlace(points, 1e-6);
  return points.filter((_, at) => first[at] === at);
}
