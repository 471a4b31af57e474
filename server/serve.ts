import { mkdirSync } from 'node:fs';
import path from 'node:path';
import type { Clock } from '../shared/kernel/clock';
import { createApp, type App } from './app';
import type { Config } from './config';

/** Make the folder of the database file. */
export const makeDataFolder = (config: Config): void => {
  mkdirSync(path.dirname(path.resolve(config.DATABASE_FILE)), { recursive: true });
};

/** Build the server and listen until the process is told to stop. */
export async function serve(config: Config, clock: Clock): Promise<App> {
  makeDataFolder(config);
  const app = await createApp(config, clock);
  await new Promise<void>((resolve, reject) => {
    app.http.once('error', reject);
    app.http.listen(config.PORT, config.HOST, resolve);
  });
  let stopping = false;
  const stop = () => {
    if (stopping) return;
    stopping = true;
    void app.close().then(() => process.exit(0));
  };
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
  // Bad input never ends the process; what gets here is a fault of ours, and is logged as one.
  process.on('unhandledRejection', (error) => app.deps.log.error({ err: error }, 'an unhandled rejection'));
  return app;
}
