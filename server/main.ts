import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { systemClock } from '../shared/kernel/clock';
import { createApp } from './app';
import { readConfig } from './config';

/** Read the configuration, build the server and listen until told to stop. */
async function main(): Promise<void> {
  const config = readConfig(process.env);
  mkdirSync(path.dirname(path.resolve(config.DATABASE_FILE)), { recursive: true });
  const app = await createApp(config, systemClock(config.CLOCK_RATE));
  await new Promise<void>((resolve, reject) => {
    app.http.once('error', reject);
    app.http.listen(config.PORT, config.HOST, resolve);
  });
  console.log(`Strutbee listens on ${app.deps.publicUrl()}`);
  process.send?.({ listening: app.deps.publicUrl() });
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
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
