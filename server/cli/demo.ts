import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { networkInterfaces } from 'node:os';
import { parseArgs } from 'node:util';
import Database from 'better-sqlite3';
import { systemClock } from '../../shared/kernel/clock';
import { readConfig, type Config } from '../config';
import { seedDemo, type DemoHall } from '../db/seeds/demo';
import { DEMO_NOW, DEMO_PASSWORD, INSTALLATION, MEMBERS } from '../db/seeds/demo-scenario';
import { makeDataFolder, serve } from '../serve';

/** `npm run demo`: make the demo where there is none, then serve it. */
async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      fresh: { type: 'boolean', default: false },
      lan: { type: 'boolean', default: false },
      clock: { type: 'string' },
      port: { type: 'string' },
    },
  });
  const port = values.port ?? process.env.PORT ?? '4310';
  const address = values.lan ? lanAddress() : null;
  const config = readConfig({
    DATABASE_FILE: 'data/demo.sqlite',
    ...process.env,
    PORT: port,
    OUTBOX: '1',
    DEMO: '1',
    LOG_LEVEL: process.env.LOG_LEVEL ?? 'warn',
    ...(values.clock ? { CLOCK_RATE: values.clock } : {}),
    ...(address
      ? { HOST: '0.0.0.0', PUBLIC_URL: process.env.PUBLIC_URL ?? `http://${address}:${port}` }
      : {}),
  });
  makeDataFolder(config);
  if (values.fresh) removeDemo(config.DATABASE_FILE);
  const hall = await hallOf(config);
  const app = await serve(config, systemClock(config.CLOCK_RATE, resumeAt(config.DATABASE_FILE)));
  print(app.deps.publicUrl(), hall, config, app.deps.clock.now());
}

/** What a start needs to print and the database does not keep: the projector's secret. */
const noteFile = (databaseFile: string) => `${databaseFile}.demo.json`;

const demoFiles = (databaseFile: string) =>
  ['', '-wal', '-shm', '.secret'].map((ending) => `${databaseFile}${ending}`).concat(noteFile(databaseFile));

function removeDemo(databaseFile: string): void {
  for (const file of demoFiles(databaseFile)) rmSync(file, { force: true });
}

/** The demo's hall, made when it is not there yet; a half-made one is made again. */
async function hallOf(config: Config): Promise<DemoHall> {
  const note = noteFile(config.DATABASE_FILE);
  if (existsSync(note) && existsSync(config.DATABASE_FILE))
    return JSON.parse(readFileSync(note, 'utf8')) as DemoHall;
  removeDemo(config.DATABASE_FILE);
  console.log('Making the demo, once: planning the hall, opening the doors, playing the morning ...');
  const hall = await seedDemo(config);
  writeFileSync(note, JSON.stringify(hall));
  return hall;
}

/** The demo's clock stands still while it is off: it goes on where the day log ends. */
function resumeAt(databaseFile: string): number {
  const db = new Database(databaseFile, { readonly: true });
  try {
    const row = db.prepare('SELECT max(recorded_at) AS at FROM day_log').get() as { at: number | null };
    return Math.max(DEMO_NOW, (row.at ?? 0) + 1000);
  } finally {
    db.close();
  }
}

function lanAddress(): string {
  const found = Object.values(networkInterfaces())
    .flat()
    .find((address) => address?.family === 'IPv4' && !address.internal);
  if (!found)
    throw new Error('This machine has no address on a local network. Start the demo without --lan.');
  return found.address;
}

const hallTime = (at: number): string =>
  new Intl.DateTimeFormat('en-GB', {
    hour: '2-digit',
    minute: '2-digit',
    timeZone: INSTALLATION.timeZone,
  }).format(at);

function print(url: string, hall: DemoHall, config: Config, now: number): void {
  const rows = MEMBERS.map(
    ({ email, duties, siteRole }) =>
      `  ${email.padEnd(26)}${[siteRole === 'admin' ? 'admin' : '', ...duties].filter(Boolean).join(', ')}`,
  );
  const time = hallTime(now);
  console.log(`
${INSTALLATION.name}, ${INSTALLATION.venue}: Saturday 12 June 2027, ${time} in the hall${config.CLOCK_RATE > 1 ? `, ${config.CLOCK_RATE} times as fast` : ''}.

Open         ${url}
Sign in with the password "${DEMO_PASSWORD}" as
${rows.join('\n')}
Volunteers   ${url}/join/${hall.joinCode}
Projector    ${url}/projector#${hall.projectorToken}

Stop with Ctrl-C; the data stay. "npm run demo -- --fresh" starts over, "-- --lan" serves the local network.`);
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
