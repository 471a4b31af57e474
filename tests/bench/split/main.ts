import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { parseObj } from '../../../shared/frames';
import { bitsOf, netOf, partition } from '../../../shared/split';
import { compareWithExact } from './exact';

/** Wall clock of one file, ms, up to a thousand struts and beyond; the number of tries ends it before on most machines. */
const MOST_MS = 1800;
const MOST_MS_LARGE = 4500;
const LARGE = 1000;

interface Line {
  file: string;
  struts: number;
  pieces: number;
  fieldJoints: number;
  imbalancePct: number;
  disconnected: number;
  seconds: number;
  baseline: { randomGrowth: number; coordinateBisection: number };
}

function splitFile(file: string, pieces: number, seed: number, out: string | undefined): Line {
  const read = parseObj(readFileSync(file, 'utf8'));
  if (!read.ok) throw new Error(read.refusal.map((problem) => problem.message).join('\n'));
  const { joints, struts } = read.value.frame;
  const weights = struts.map(() => 1);
  const started = performance.now();
  const found = partition({
    joints,
    struts,
    weights,
    pieces,
    seed,
    milliseconds: struts.length > LARGE ? MOST_MS_LARGE : MOST_MS,
  });
  const seconds = (performance.now() - started) / 1000;
  if (out !== undefined) {
    mkdirSync(out, { recursive: true });
    const name = `${path.basename(file, path.extname(file))}.pieces`;
    writeFileSync(path.join(out, name), `${[...found.pieceOf].join('\n')}\n`);
  }
  // A drawing in several bits cannot have all its pieces in one; only what the split itself tore apart counts.
  const bits = bitsOf(netOf(joints, struts, weights), new Int32Array(struts.length)).length;
  return {
    file: path.basename(file),
    struts: struts.length,
    pieces,
    fieldJoints: found.fieldJoints,
    imbalancePct: Math.round(found.imbalancePct * 100) / 100,
    disconnected: Math.max(0, found.disconnected - (bits - 1)),
    seconds: Math.round(seconds * 1000) / 1000,
    baseline: found.baseline,
  };
}

async function main(): Promise<void> {
  const { values, positionals } = parseArgs({
    allowPositionals: true,
    options: {
      pieces: { type: 'string', default: '12' },
      seed: { type: 'string', default: '1' },
      out: { type: 'string' },
      exact: { type: 'boolean', default: false },
    },
  });
  const pieces = Number(values.pieces);
  const seed = Number(values.seed);
  if (!Number.isInteger(pieces) || pieces < 1) throw new Error('--pieces wants a whole number of 1 or more.');
  if (values.exact) {
    console.log(JSON.stringify(await compareWithExact(100)));
    return;
  }
  if (positionals.length === 0)
    throw new Error('Name at least one file: bench:split -- FILE.obj ... --pieces K');
  for (const file of positionals) {
    try {
      console.log(JSON.stringify(splitFile(file, pieces, seed, values.out)));
    } catch (error) {
      console.error(`${file}: ${error instanceof Error ? error.message : String(error)}`);
      process.exitCode = 1;
    }
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
