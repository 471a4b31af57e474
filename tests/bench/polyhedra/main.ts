import { readFileSync } from 'node:fs';
import path from 'node:path';
import { csvRows } from '../../../shared/frames/csv-rows';
import { checkSolid, type Published, type Solid } from './check-solid';

/** A row of the table is whole with all its columns, or without the class and the last two, as some have it. */
const WHOLE = 13;
const SHORT = 10;

/** `computed_reference.csv` by the name of the solid, whole rows only. */
function publishedIn(folder: string): Map<string, Published> {
  const { rows } = csvRows(readFileSync(path.join(folder, 'computed_reference.csv'), 'utf8'));
  const published = new Map<string, Published>();
  for (const { cells } of rows.slice(1)) {
    if (cells.length !== WHOLE && cells.length !== SHORT) continue;
    const [V, E, F, faces] = cells.slice(cells.length === WHOLE ? 2 : 1);
    published.set(cells[0]!, { V: Number(V), E: Number(E), F: Number(F), faces: faces ?? '' });
  }
  return published;
}

/** Takes every solid of a folder in and out through OBJ and CSV and prints one JSON object; wrong ones are named and end with code 1. */
function main(): void {
  const folder = process.argv[2];
  if (folder === undefined) throw new Error('Give the folder of unit_edge_polished.json.');
  const solids = Object.entries(
    JSON.parse(readFileSync(path.join(folder, 'unit_edge_polished.json'), 'utf8')) as Record<string, Solid>,
  );
  const published = publishedIn(folder);
  const wrong = solids.flatMap(([name, solid]) =>
    checkSolid(solid, published.get(name) ?? null).map((what) => `${name}: ${what}`),
  );
  console.log(
    JSON.stringify({
      solids: solids.length,
      withoutRow: solids.filter(([name]) => !published.has(name)).map(([name]) => name),
      wrong: wrong.length,
    }),
  );
  for (const line of wrong) console.error(line);
  if (wrong.length > 0 || solids.length === 0) process.exitCode = 1;
}

main();
