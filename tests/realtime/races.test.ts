import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import path from 'node:path';
import Database from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { io, type Socket } from 'socket.io-client';
import { newId } from '../../shared/kernel/ids';
import { seededRandom } from '../../shared/kernel/random';
import type { ClientEvents, ServerEvents, Snapshot } from '../../shared/contracts/live';
import { fromSnapshot, withRange, type LiveState } from '../../src/lib/live-state';
import { benchEnv, CSRF, seedBench, type Seeded } from '../bench/live/seed';
import { startChild, type ChildServer } from '../support/child-server';

let folder: string;
let file: string;
let server: ChildServer | null;

beforeEach(() => {
  const cache = path.resolve('node_modules/.cache/strutbee-tests');
  mkdirSync(cache, { recursive: true });
  folder = mkdtempSync(path.join(cache, 'races-'));
  file = path.join(folder, 'races.sqlite');
  server = null;
});
afterEach(async () => {
  await server?.stop();
  rmSync(folder, { recursive: true, force: true });
});

interface Answer {
  status: number;
  code: string | undefined;
}

/** Claim a step; null when the connection broke before the answer. */
async function claim(
  url: string,
  seeded: Seeded,
  person: number,
  stepId: string,
  key = newId(),
  abort?: AbortSignal,
): Promise<Answer | null> {
  try {
    const response = await fetch(`${url}/api/installations/${seeded.installationId}/steps/${stepId}/claim`, {
      method: 'POST',
      headers: {
        cookie: seeded.cookies[person] as string,
        'x-csrf-token': CSRF,
        'idempotency-key': key,
        'content-type': 'application/json',
      },
      body: '{}',
      ...(abort ? { signal: abort } : {}),
    });
    const body = (await response.json()) as { error?: { code: string } };
    return { status: response.status, code: body.error?.code };
  } catch {
    return null;
  }
}

const rows = <T>(sql: string): T[] => {
  const db = new Database(file, { readonly: true });
  try {
    return db.prepare(sql).all() as T[];
  } finally {
    db.close();
  }
};

describe('claimStep', () => {
  it('claimStep > 2,000 claims by 200 people on 100 places, some of them hanging up > exactly one winner per place, everybody else told who has it', async () => {
    const seeded = await seedBench(file, 200, 100);
    server = await startChild('server/main.ts', benchEnv(file));
    const { url } = server;
    const random = seededRandom(2000);
    const wishes = Array.from({ length: 2000 }, (_, index) => ({
      person: index % 200,
      stepId: seeded.stepIds[Math.floor(random() * 100)] as string,
      hangsUpAfter: random() < 0.1 ? Math.floor(random() * 20) : null,
    }));
    const answers = await Promise.all(
      wishes.map(({ person, stepId, hangsUpAfter }) =>
        claim(
          url,
          seeded,
          person,
          stepId,
          newId(),
          hangsUpAfter === null ? undefined : AbortSignal.timeout(hangsUpAfter),
        ),
      ),
    );
    const won = answers.flatMap((answer, index) => (answer?.status === 200 ? [wishes[index]?.stepId] : []));
    expect(new Set(won).size).toBe(won.length);
    const codes = new Set(
      answers.filter((answer) => answer && answer.status !== 200).map((answer) => answer?.code),
    );
    expect([...codes].every((code) => code === 'STEP_CREW_FULL' || code === 'STEP_ALREADY_YOURS')).toBe(true);
    const held = rows<{ step_id: string; held: number }>(
      'SELECT step_id, count(*) AS held FROM claim WHERE ended_at IS NULL GROUP BY step_id',
    );
    expect(held.filter((row) => row.held !== 1)).toEqual([]);
    const wanted = new Set(
      wishes.filter(({ hangsUpAfter }) => hangsUpAfter === null).map(({ stepId }) => stepId),
    );
    expect(held.length).toBeGreaterThanOrEqual(wanted.size);
    for (const stepId of won) expect(held.some((row) => row.step_id === stepId)).toBe(true);
  });

  it('claimStep > the server is killed in the middle of 1,000 claims and started again > every acknowledged claim is there, day log and state agree, boards catch up by themselves', async () => {
    const seeded = await seedBench(file, 50, 1000);
    server = await startChild('server/main.ts', benchEnv(file));
    const port = new URL(server.url).port;
    const boards = await Promise.all(
      [0, 1, 2].map((person) => watchAlways((server as ChildServer).url, seeded, person)),
    );
    const acknowledged: string[] = [];
    const unanswered: { person: number; stepId: string; key: string }[] = [];
    let next = 0;
    let kill: Promise<void> | null = null;
    const { url } = server;
    await Promise.all(
      Array.from({ length: 50 }, async (_, person) => {
        while (next < seeded.stepIds.length) {
          const stepId = seeded.stepIds[next++] as string;
          const key = newId();
          const answer = await claim(url, seeded, person, stepId, key);
          if (answer?.status === 200) acknowledged.push(stepId);
          else unanswered.push({ person, stepId, key });
          if (acknowledged.length === 400) kill ??= (server as ChildServer).kill();
        }
      }),
    );
    await (kill as Promise<void> | null);
    expect(acknowledged.length).toBeGreaterThanOrEqual(400);
    expect(unanswered.length).toBeGreaterThan(0);
    server = await startChild('server/main.ts', { ...benchEnv(file), PORT: port });
    const held = new Set(
      rows<{ step_id: string }>('SELECT step_id FROM claim WHERE ended_at IS NULL').map((row) => row.step_id),
    );
    expect(acknowledged.filter((id) => !held.has(id))).toEqual([]);
    // What was asked and never answered is asked again under its key: it happens once, whether or not it had happened.
    const again = await Promise.all(
      unanswered.map(({ person, stepId, key }) => claim(url, seeded, person, stepId, key)),
    );
    expect(again.every((answer) => answer?.status === 200)).toBe(true);
    const logged = rows<{ step: string }>(
      `SELECT json_extract(subject, '$.stepId') AS step FROM day_log WHERE action = 'step.claimed'`,
    ).map((row) => row.step);
    expect(logged.length).toBe(1000);
    expect(new Set(logged).size).toBe(1000);
    expect(rows<{ n: number }>(`SELECT count(*) AS n FROM step WHERE state = 'in hand'`)).toEqual([
      { n: 1000 },
    ]);
    const response = await fetch(`${url}/api/installations/${seeded.installationId}/live`, {
      headers: { cookie: seeded.cookies[0] as string },
    });
    const truth = fromSnapshot(((await response.json()) as { data: Snapshot }).data);
    for (const board of boards) {
      await board.reached(truth.cursor);
      expect(board.state()?.records.steps).toEqual(truth.records.steps);
      board.close();
    }
  });
});

/** A board that reconnects by itself, as the page does. */
async function watchAlways(url: string, seeded: Seeded, person: number) {
  const socket: Socket<ServerEvents, ClientEvents> = io(url, {
    extraHeaders: { cookie: seeded.cookies[person] as string },
    forceNew: true,
    reconnectionDelay: 100,
    reconnectionDelayMax: 500,
  });
  let state: LiveState | null = null;
  const followers: (() => void)[] = [];
  const settle = () => {
    for (const follow of followers) follow();
  };
  const watch = () =>
    new Promise<void>((resolve) => {
      const wish = { installationId: seeded.installationId, since: state?.cursor ?? null };
      socket.emit('watch', wish, (answer) => {
        if (answer.ok) {
          const { catchUp } = answer;
          const next = catchUp.reset ? fromSnapshot(catchUp.snapshot) : state && withRange(state, catchUp);
          if (next && next !== 'gap') state = next;
        }
        settle();
        resolve();
      });
    });
  socket.on('range', (message) => {
    const next = state ? withRange(state, message) : 'gap';
    if (next === 'gap') void watch();
    else state = next;
    settle();
  });
  await new Promise<void>((resolve) => {
    socket.on('connect', () => void watch().then(resolve));
  });
  return {
    state: () => state,
    close: () => socket.disconnect(),
    reached: (cursor: number) =>
      new Promise<void>((resolve, reject) => {
        const timer = setTimeout(() => reject(new Error('the board did not catch up')), 15_000);
        const follow = () => {
          if ((state?.cursor ?? -1) < cursor) return;
          clearTimeout(timer);
          resolve();
        };
        followers.push(follow);
        follow();
      }),
  };
}
