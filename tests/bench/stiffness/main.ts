import { readFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';
import { seededRandom } from '../../../shared/kernel/random';
import type { Frame, Joint, Strut } from '../../../shared/frames';
import { analyseStiffness, countStiffness } from '../../../shared/frames/stiffness';

/** Edge of the solids, mm: as they are built, not of length 1. */
const EDGE_MM = 250;

const solidsSchema = z.record(
  z.string(),
  z.object({
    vertices: z.array(z.tuple([z.number(), z.number(), z.number()])),
    edges: z.array(z.tuple([z.number().int(), z.number().int()])),
  }),
);
const casesSchema = z.array(
  z.object({
    name: z.string(),
    dim: z.union([z.literal(2), z.literal(3)]),
    V: z.number().int(),
    generic_rank: z.number().int(),
    internal_mechanisms: z.number().int(),
    self_stress: z.number().int(),
    edges: z.array(z.tuple([z.number().int(), z.number().int()])),
  }),
);

interface Compared {
  group: string;
  cases: number;
  agree: number;
  /** Told wrongly or declined, with what was expected and found. */
  differ: { name: string; expected: unknown; found: unknown }[];
  seconds: number;
  /** Lines of the table that are not in either layout, and solids that it has no line for. */
  unreadable?: string[];
  rowless?: string[];
}

interface Counts {
  rank: number;
  mechanisms: number;
  selfStress: number;
}

/** Both ways of counting, which must agree with each other too. */
function countsOf(frame: Frame, plane: boolean): Counts | string {
  const full = analyseStiffness(frame);
  const short = countStiffness(frame);
  if (!full.ok) return full.refusal.message;
  if (!short.ok) return short.refusal.message;
  const { rank, selfStress, flat, mechanisms, certain } = full.value;
  if (short.value.rank !== rank) return `rank ${rank} in full, ${short.value.rank} counted only`;
  if (!certain || !short.value.certain) return 'not certain';
  return { rank, mechanisms: plane ? (flat?.inPlane ?? Number.NaN) : mechanisms, selfStress };
}

function compare(
  group: string,
  cases: readonly { name: string; frame: Frame; plane: boolean; expected: Counts }[],
): Compared {
  const started = performance.now();
  const differ = cases.flatMap(({ name, frame, plane, expected }) => {
    const found = countsOf(frame, plane);
    return JSON.stringify(found) === JSON.stringify(expected) ? [] : [{ name, expected, found }];
  });
  const seconds = Math.round(performance.now() - started) / 1000;
  return { group, cases: cases.length, agree: cases.length - differ.length, differ, seconds };
}

/** The numbers of a row by how many fields it has; some rows of the table came without class, length and error. */
const LAYOUTS: Readonly<Record<number, { rank: number; mechanisms: number; selfStress: number }>> = {
  13: { rank: 7, mechanisms: 8, selfStress: 9 },
  10: { rank: 6, mechanisms: 7, selfStress: 8 },
};

function referenceRows(text: string): { rows: Map<string, Counts>; unreadable: string[] } {
  const rows = new Map<string, Counts>();
  const unreadable: string[] = [];
  for (const line of text.trim().split(/\r?\n/).slice(1)) {
    const cells = line.split(',');
    const layout = LAYOUTS[cells.length];
    const number = (at: number): number => Number(cells[at] ?? Number.NaN);
    const counts = layout && {
      rank: number(layout.rank),
      mechanisms: number(layout.mechanisms),
      selfStress: number(layout.selfStress),
    };
    if (counts && Object.values(counts).every(Number.isInteger)) rows.set(cells[0] ?? '', counts);
    else unreadable.push(line.slice(0, 60));
  }
  return { rows, unreadable };
}

function solids(folder: string): Compared[] {
  const { rows, unreadable } = referenceRows(
    readFileSync(path.join(folder, 'computed_reference.csv'), 'utf8'),
  );
  const read = (file: string): unknown => JSON.parse(readFileSync(path.join(folder, file), 'utf8'));
  const all = Object.entries(solidsSchema.parse(read('unit_edge_polished.json'))).map(
    ([name, { vertices, edges }]) => {
      const joints = vertices.map(([x, y, z]): Joint => ({ x: EDGE_MM * x, y: EDGE_MM * y, z: EDGE_MM * z }));
      return { name, frame: { joints, struts: edges, faces: [] }, plane: false };
    },
  );
  const table = all.flatMap((one) => {
    const expected = rows.get(one.name);
    return expected ? [{ ...one, expected }] : [];
  });
  // The skeleton of a convex polyhedron has rank E (Cauchy, Dehn, Alexandrov), whatever the table says.
  const theorem = all.map((one) => {
    const { joints, struts } = one.frame;
    const mechanisms = 3 * joints.length - 6 - struts.length;
    return { ...one, expected: { rank: struts.length, mechanisms, selfStress: 0 } };
  });
  const rowless = all.filter(({ name }) => !rows.has(name)).map(({ name }) => name);
  return [
    { ...compare('solids against the table', table), unreadable, rowless },
    compare('solids against the theorem', theorem),
  ];
}

/** Generic rank is that of almost all places: joints are scattered by a seeded stream, a few times over. */
function frameworks(folder: string): Compared[] {
  const cases = casesSchema.parse(JSON.parse(readFileSync(path.join(folder, 'rigidity_cases.json'), 'utf8')));
  const scattered = [1, 2, 3].flatMap((seed) =>
    cases.map((one) => {
      const random = seededRandom(seed);
      const place = (): number => 1000 * random();
      const joints = Array.from({ length: one.V }, (): Joint => {
        const [x, y, z] = [place(), place(), place()];
        return { x, y, z: one.dim === 2 ? 0 : z };
      });
      return {
        name: `${one.name}, seed ${seed}`,
        frame: { joints, struts: one.edges.map(([a, b]): Strut => [a, b]), faces: [] },
        plane: one.dim === 2,
        expected: {
          rank: one.generic_rank,
          mechanisms: one.internal_mechanisms,
          selfStress: one.self_stress,
        },
      };
    }),
  );
  return [compare('frameworks', scattered)];
}

const folder = process.argv[2];
if (folder === undefined) {
  console.error('Name the folder of the solids: trial:stiffness -- FOLDER');
  process.exitCode = 1;
} else
  try {
    for (const result of [...solids(folder), ...frameworks(folder)]) {
      console.log(JSON.stringify(result));
      if (result.agree < result.cases) process.exitCode = 1;
    }
  } catch (error) {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  }
