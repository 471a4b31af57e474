import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import path from 'node:path';
import { readConfig, type Config } from '../../server/config';
import { seedDemo, type DemoHall } from '../../server/db/seeds/demo';

/** The demo on a file of its own. */
export interface SeededDemo {
  hall: DemoHall;
  config: Config;
  remove(): void;
}

/** Make the demo as `npm run demo` does. */
export async function makeDemo(): Promise<SeededDemo> {
  const cache = path.resolve('node_modules/.cache/strutbee-tests');
  mkdirSync(cache, { recursive: true });
  const folder = mkdtempSync(path.join(cache, 'demo-'));
  const config = readConfig({
    NODE_ENV: 'test',
    HOST: '127.0.0.1',
    PORT: '0',
    DATABASE_FILE: path.join(folder, 'demo.sqlite'),
    CLIENT_DIR: 'dist/client',
    OUTBOX: '1',
    DEMO: '1',
    LOG_LEVEL: 'silent',
  });
  const hall = await seedDemo(config);
  return { hall, config, remove: () => rmSync(folder, { recursive: true, force: true }) };
}
