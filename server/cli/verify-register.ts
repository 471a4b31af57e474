import { parseArgs } from 'node:util';
import Database from 'better-sqlite3';
import type { PrintedHead } from '../../shared/safety';
import { readConfig } from '../config';
import { readRegister, registeredInstallations } from '../modules/safety';

const USE = `Checks the chain of every installation's sign-off register, and one of them against a printed extract.
Use: npm run verify:register -- [--database FILE] [--installation ID] [--count N --head HASH]`;

interface Wish {
  database: string;
  installation: string | undefined;
  printed: PrintedHead | undefined;
}

class WrongUse extends Error {}

function readWish(): Wish {
  const { values } = parseArgs({
    options: {
      database: { type: 'string' },
      installation: { type: 'string' },
      count: { type: 'string' },
      head: { type: 'string' },
    },
  });
  const { count, head } = values;
  if ((count === undefined) !== (head === undefined))
    throw new WrongUse('--count and --head go together: an extract prints both.');
  if (count !== undefined && !/^\d{1,9}$/.test(count))
    throw new WrongUse('--count is the number of rows, such as 128.');
  if (head !== undefined && !/^[0-9a-f]{64}$/i.test(head))
    throw new WrongUse('--head is the whole hash as printed: 64 digits and letters a to f.');
  return {
    database: values.database ?? readConfig(process.env).DATABASE_FILE,
    installation: values.installation,
    printed:
      count === undefined || head === undefined
        ? undefined
        : { count: Number(count), headHash: head.toLowerCase() },
  };
}

/** Check what was asked for and say it, a line for each installation. @returns whether all is well */
function verify(db: Database.Database, { installation, printed }: Wish): boolean {
  const all = registeredInstallations(db);
  // An unknown id is checked too: with an extract in hand, its rows are the ones that are gone.
  const wanted =
    installation === undefined
      ? all
      : [all.find((one) => one.id === installation) ?? { id: installation, name: null }];
  if (printed && wanted.length !== 1)
    throw new WrongUse(`There are ${wanted.length} installations: say which with --installation.`);
  let allWell = true;
  for (const { id, name } of wanted) {
    const { verified, count, headHash } = readRegister(db, id, printed);
    const whose = `${id} ${name === null ? '(no such installation)' : `"${name}"`}`;
    if (verified.ok) {
      const against = printed ? `, and it holds the ${printed.count} rows of the extract` : '';
      console.log(`intact  ${whose}: ${count} rows, head ${headHash}${against}`);
    } else {
      allWell = false;
      console.log(`BROKEN  ${whose}: row ${verified.seq}: ${verified.why}; ${count} rows, head ${headHash}`);
    }
  }
  if (wanted.length === 0) console.log('There is no installation in this file, and no register.');
  return allWell;
}

try {
  const wish = readWish();
  const db = new Database(wish.database, { readonly: true, fileMustExist: true });
  const allWell = verify(db, wish);
  db.close();
  process.exitCode = allWell ? 0 : 1;
} catch (error) {
  const wrongUse =
    error instanceof WrongUse || (error as { code?: string }).code?.startsWith('ERR_PARSE_ARGS');
  console.error(error instanceof Error ? error.message : error);
  if (wrongUse) console.error(USE);
  process.exitCode = 2;
}
