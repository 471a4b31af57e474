import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import path from 'node:path';
import { parseArgs } from 'node:util';
import Database from 'better-sqlite3';
import type { Socket } from 'socket.io-client';
import type { RangeMessage } from '../../../shared/contracts/live';
import { newId } from '../../../shared/kernel/ids';
import { startChild } from '../../support/child-server';
import { Phones, percentiles, type ClaimResult, type Target } from './clients';
import { benchEnv, CSRF, seedBench, type Seeded } from './seed';

/** Writes of one claim: step, claim, installation, day log, kept answer. */
const WRITES_OF_A_CLAIM = 5;
/** How many people ask at the same time in the steady part. */
const AT_ONCE = 10;

interface Run {
  claimsPerSecond: number;
  claims: number;
  replyMs: ReturnType<typeof percentiles>;
  seenMs: ReturnType<typeof percentiles>;
  burstMs: number;
  messages: number;
  acknowledged: string[];
}

/** The steady part, then the burst. */
async function measure(target: Target, seeded: Seeded, people: number): Promise<Run> {
  const phones = new Phones(target);
  await phones.connect(people);
  await phones.warm('/api/session');
  const steps = [...seeded.stepIds];
  const burst = steps.splice(0, people);
  const warmUp = steps.splice(0, Math.min(100, steps.length));
  const steady = steps.slice(0, 1000);
  await drive(phones, warmUp, people);
  const from = performance.now();
  const results = await drive(phones, steady, people);
  const seconds = (performance.now() - from) / 1000;
  await phones.allSeen(steady);
  const before = phones.messages;
  const started = performance.now();
  const burstResults = await Promise.all(burst.map((stepId, phone) => phones.claim(phone, stepId, newId())));
  await phones.allSeen(burst);
  const burstMs = performance.now() - started;
  const messages = phones.messages - before;
  phones.close();
  const good = (result: ClaimResult) => result.status === 200;
  return {
    claims: results.length,
    claimsPerSecond: Math.round(results.length / seconds),
    replyMs: percentiles(results.map((result) => result.repliedAt - result.sentAt)),
    seenMs: percentiles(results.map((result) => (phones.seenAt(result.stepId) ?? Infinity) - result.sentAt)),
    burstMs: Math.round(burstMs),
    messages,
    acknowledged: [...results, ...burstResults].filter(good).map((result) => result.stepId),
  };
}

/** A few people at a time, each asking again as soon as they are answered. */
async function drive(phones: Phones, steps: readonly string[], people: number): Promise<ClaimResult[]> {
  const results: ClaimResult[] = [];
  let next = 0;
  await Promise.all(
    Array.from({ length: AT_ONCE }, async () => {
      while (next < steps.length) {
        const index = next++;
        results.push(await phones.claim(index % people, steps[index] as string, newId()));
      }
    }),
  );
  return results;
}

const strutbee = (url: string, seeded: Seeded): Target => ({
  url,
  claimPath: (stepId) => `/api/installations/${seeded.installationId}/steps/${stepId}/claim`,
  claimedIn: (event, message) =>
    event === 'range'
      ? ((message as RangeMessage).changed.steps ?? [])
          .filter((step) => step.crew.length > 0)
          .map((step) => step.id)
      : [],
  headersOf: (phone) => ({ cookie: seeded.cookies[phone] as string, 'x-csrf-token': CSRF }),
  join: async (socket: Socket) => {
    const answer = (await socket.emitWithAck('watch', {
      installationId: seeded.installationId,
      since: 1,
    })) as { ok: boolean };
    if (!answer.ok) throw new Error('a phone may not watch');
  },
});

const floorTarget = (url: string): Target => ({
  url,
  claimPath: (stepId) => `/api/claim/${stepId}`,
  claimedIn: (event, message) => (event === 'claimed' ? [(message as { stepId: string }).stepId] : []),
  headersOf: () => ({}),
  join: () => Promise.resolve(),
});

/** Acknowledged claims that the file does not hold, and places held twice. */
function audit(
  databaseFile: string,
  acknowledged: readonly string[],
): { lost: number; doubleWinners: number } {
  const db = new Database(databaseFile, { readonly: true });
  const held = new Map(
    (
      db
        .prepare('SELECT step_id, count(*) AS held FROM claim WHERE ended_at IS NULL GROUP BY step_id')
        .all() as { step_id: string; held: number }[]
    ).map((row) => [row.step_id, row.held]),
  );
  db.close();
  return {
    lost: acknowledged.filter((id) => !held.has(id)).length,
    doubleWinners: [...held.values()].filter((count) => count > 1).length,
  };
}

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      people: { type: 'string', default: '150' },
      steps: { type: 'string', default: '2000' },
    },
  });
  const people = Number(values.people);
  const steps = Number(values.steps);
  if (steps < people * 2) throw new Error('There must be at least twice as many steps as people.');
  const cache = path.resolve('node_modules/.cache/strutbee-bench');
  mkdirSync(cache, { recursive: true });
  const folder = mkdtempSync(path.join(cache, 'live-'));
  const databaseFile = path.join(folder, 'live.sqlite');
  try {
    const seeded = await seedBench(databaseFile, people, steps);
    const floorServer = await startChild('tests/bench/live/floor-server.ts', {}, [
      path.join(folder, 'floor.sqlite'),
      '650',
      String(WRITES_OF_A_CLAIM),
    ]);
    const floor = await measure(floorTarget(floorServer.url), seeded, people);
    await floorServer.stop();
    const server = await startChild('server/main.ts', benchEnv(databaseFile));
    const run = await measure(strutbee(server.url, seeded), seeded, people);
    await server.stop();
    const { lost, doubleWinners } = audit(databaseFile, run.acknowledged);
    const { acknowledged: _acknowledged, messages, ...figures } = run;
    console.log(
      `burst: ${run.burstMs} ms with ${messages} messages; floor ${floor.burstMs} ms with ${floor.messages} messages`,
    );
    console.log(
      JSON.stringify({
        people,
        ...figures,
        lost,
        doubleWinners,
        floor: {
          claimsPerSecond: floor.claimsPerSecond,
          replyMs: floor.replyMs,
          seenMs: floor.seenMs,
          burstMs: floor.burstMs,
        },
      }),
    );
    if (lost > 0 || doubleWinners > 0) process.exitCode = 1;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

main().catch((error: unknown) => {
  console.error(error);
  process.exit(1);
});
