import { createHash, createHmac } from 'node:crypto';
import { systemClock } from '../../../shared/kernel/clock';
import { newId } from '../../../shared/kernel/ids';
import { createApp } from '../../../server/app';
import { readConfig } from '../../../server/config';
import { SERVER_ACTOR } from '../../../server/db/write';

export const SECRET = 'benchmark-secret-benchmark-secret-benchmark';
export const CSRF = 'benchmark-token';

export interface Seeded {
  installationId: string;
  personIds: string[];
  stepIds: string[];
  /** Cookie header of each person. */
  cookies: string[];
}

/** The environment of the server under test. */
export const benchEnv = (databaseFile: string): Record<string, string> => ({
  NODE_ENV: 'production',
  HOST: '127.0.0.1',
  PORT: '0',
  DATABASE_FILE: databaseFile,
  SESSION_SECRET: SECRET,
  LOG_LEVEL: 'error',
});

/**
 * A published installation with confirmed people, each signed in, and steps that are ready.
 * @param crewMax places on each step
 */
export async function seedBench(
  databaseFile: string,
  people: number,
  steps: number,
  crewMax = 1,
): Promise<Seeded> {
  const app = await createApp(readConfig(benchEnv(databaseFile)), systemClock());
  const { writer, data } = app.deps;
  const installationId = newId();
  const now = Date.now();
  const seeded: Seeded = { installationId, personIds: [], stepIds: [], cookies: [] };
  await data.writer.query(
    `INSERT INTO installation (id, name, venue, time_zone, unit, hall_limit, status, join_code, join_code_at, settings, created_at, revision, own_revision)
     VALUES (?, 'Benchmark', '', 'UTC', 'mm', 5000, 'published', 'BENCH2', ?, ?, ?, 0, 0)`,
    [installationId, now, JSON.stringify({ maxInHand: 100_000, ageChanges: [] }), now],
  );
  await writer.runPlain({ maker: SERVER_ACTOR, installationId }, async (scope) => {
    const { manager } = scope;
    const at = await scope.revision();
    const stationId = newId();
    await manager.query(
      `INSERT INTO station (id, installation_id, name, kind, places, position, revision) VALUES (?, ?, 'bench', 'bench', 10, 1, ?)`,
      [stationId, installationId, at],
    );
    for (let index = 0; index < people; index += 1) {
      const id = newId();
      seeded.personIds.push(id);
      await manager.query(
        `INSERT INTO person (id, installation_id, number, first_name, initial, age_band, duties, joined_at, confirmed_at, revision)
         VALUES (?, ?, ?, ?, 'K', '18+', '["volunteer"]', ?, ?, ?)`,
        [id, installationId, index + 1, `Person ${index + 1}`, now, now, at],
      );
      const sid = newId();
      seeded.cookies.push(cookieOf(sid));
      await insertSession(manager, sid, id, now);
    }
    for (let index = 0; index < steps; index += 1) {
      if (index % 8 === 0) {
        await manager.query(
          `INSERT INTO sub_assembly (id, installation_id, frame_id, code, name, position, traveller_revision, revision)
           VALUES (?, ?, 'frame', ?, 'Benchmark piece', ?, 1, ?)`,
          [`piece-${index / 8}`, installationId, `V-${index / 8}`, index / 8, at],
        );
      }
      const id = newId();
      seeded.stepIds.push(id);
      await manager.query(
        `INSERT INTO step (id, installation_id, sub_assembly_id, position, operation, name, station_id, hazards, tool_kinds,
           crew_min, crew_max, planned_seconds, needs_check, state, flags, revision)
         VALUES (?, ?, ?, ?, 'lay out', 'lay out', ?, '[]', '[]', 1, ?, 600, 1, 'ready', '[]', ?)`,
        [id, installationId, `piece-${Math.floor(index / 8)}`, (index % 8) + 1, stationId, crewMax, at],
      );
    }
  });
  await data.writer.query('PRAGMA wal_checkpoint(TRUNCATE)');
  await app.close();
  return seeded;
}

interface Queries {
  query(sql: string, parameters: unknown[]): Promise<unknown>;
}

async function insertSession(manager: Queries, sid: string, personId: string, now: number): Promise<void> {
  const life = 24 * 3600_000;
  const cookie = {
    originalMaxAge: life,
    expires: new Date(now + life).toISOString(),
    httpOnly: true,
    path: '/',
    sameSite: 'lax',
    secure: false,
  };
  await manager.query('INSERT INTO session (id, principal, data, expires_at) VALUES (?, ?, ?, ?)', [
    createHash('sha256').update(sid).digest('base64url'),
    `person:${personId}`,
    JSON.stringify({ cookie, passport: { user: `person:${personId}` }, csrfToken: CSRF, signedInAt: now }),
    now + life,
  ]);
}

/** The cookie express-session would have set: the id, signed with HMAC-SHA256. */
function cookieOf(sid: string): string {
  const signature = createHmac('sha256', SECRET).update(sid).digest('base64').replace(/=+$/, '');
  return `strutbee=${encodeURIComponent(`s:${sid}.${signature}`)}`;
}
