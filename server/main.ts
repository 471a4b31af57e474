import { systemClock } from '../shared/kernel/clock';
import { readConfig } from './config';
import { ensureFirstAdminLink } from './modules/accounts';
import { serve } from './serve';

async function main(): Promise<void> {
  const config = readConfig(process.env);
  const app = await serve(config, systemClock(config.CLOCK_RATE));
  const url = app.deps.publicUrl();
  console.log(`Strutbee listens on ${url}`);
  const link = await ensureFirstAdminLink(app.deps);
  if (link)
    console.log(
      `Nobody looks after this server yet. Become its administrator, once, within a day:\n  ${link}`,
    );
  process.send?.({ listening: url });
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
