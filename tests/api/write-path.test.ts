import Database from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { manualClock } from '../../shared/kernel/clock';
import { newId } from '../../shared/kernel/ids';
import { createApp } from '../../server/app';
import { readConfig } from '../../server/config';
import { openDataSources } from '../../server/db/data-sources';
import { ENTITIES } from '../../server/db/entities';
import type { WriteScope } from '../../server/db/write';
import { AppError } from '../../server/http/app-error';
import { selectRows } from '../../server/realtime/live-source';
import { startTestServer, TEST_NOW, type TestServer } from '../support/test-server';

const maker = { actor: 'person:tester', personId: null };

let server: TestServer;
let installationId: string;

beforeEach(async () => {
  server = await startTestServer();
  installationId = newId();
  await server.app.deps.data.writer.query(
    `INSERT INTO installation (id, name, venue, time_zone, unit, hall_limit, status, join_code, join_code_at, settings, created_at, revision, own_revision)
     VALUES (?, 'Write path', '', 'UTC', 'mm', 10, 'published', ?, 0, '{}', 0, 0, 0)`,
    [installationId, newId()],
  );
});
afterEach(() => server.close());

const logRows = () =>
  server.app.deps.data.writer.query<{ action: string; revision: number }[]>(
    'SELECT action, revision FROM day_log WHERE installation_id = ? ORDER BY seq',
    [installationId],
  );
const revision = async () =>
  (
    await server.app.deps.data.writer.query<{ revision: number }[]>(
      'SELECT revision FROM installation WHERE id = ?',
      [installationId],
    )
  )[0]?.revision;

const logged = (action: string) => async (scope: WriteScope) => {
  await scope.log({ action, subject: {} });
  return action;
};

describe('UnitOfWork', () => {
  it('UnitOfWork > asked for again inside a unit of work > refused, nothing of either is written', async () => {
    const { unitOfWork } = server.app.deps;
    const nested = unitOfWork.run(async (manager) => {
      await manager.query('UPDATE installation SET name = ? WHERE id = ?', ['changed', installationId]);
      await unitOfWork.run(() => Promise.resolve());
    });
    await expect(nested).rejects.toThrow('cannot be nested');
    const rows = await server.app.deps.data.writer.query<{ name: string }[]>('SELECT name FROM installation');
    expect(rows[0]?.name).toBe('Write path');
  });

  it('UnitOfWork > 200 overlapping units, half of them failing > exactly the others are written, in order', async () => {
    const { writer } = server.app.deps;
    const runs = Array.from({ length: 200 }, (_, index) =>
      writer.run({ maker, installationId }, async (scope) => {
        await scope.log({ action: `test.${index}`, subject: {} });
        await scope.manager.query('SELECT 1');
        if (index % 2 === 1) throw new Error('on purpose');
      }),
    );
    const settled = await Promise.allSettled(runs);
    expect(settled.filter((run) => run.status === 'fulfilled')).toHaveLength(100);
    const rows = await logRows();
    expect(rows.map((row) => row.action)).toEqual(
      Array.from({ length: 100 }, (_, index) => `test.${index * 2}`),
    );
    expect(rows.map((row) => row.revision)).toEqual(Array.from({ length: 100 }, (_, index) => index + 1));
  });
});

describe('group commit', () => {
  it('UnitOfWork > units asked for at different moments of one turn of the event loop > one commit, each with its own answer', async () => {
    const { unitOfWork, data } = server.app.deps;
    const commits = vi.spyOn(data.writer, 'transaction');
    const first = unitOfWork.run(async (manager) => {
      await manager.query('UPDATE installation SET name = ? WHERE id = ?', ['first', installationId]);
      return 'first';
    });
    // As requests come in: each a few microtasks after the one before, in the same turn.
    for (let tick = 0; tick < 50; tick += 1) await Promise.resolve();
    const second = unitOfWork.run(() => Promise.reject(new Error('this one fails')));
    for (let tick = 0; tick < 50; tick += 1) await Promise.resolve();
    const third = unitOfWork.run(() => Promise.resolve('third'));
    await expect(first).resolves.toBe('first');
    await expect(second).rejects.toThrow('this one fails');
    await expect(third).resolves.toBe('third');
    expect(commits).toHaveBeenCalledTimes(1);
    const rows = await data.writer.query<{ name: string }[]>('SELECT name FROM installation');
    expect(rows[0]?.name).toBe('first');
  });

  it('selectRows > rows by id > found by their key, not by walking the installation', () => {
    const { readHandle } = server.app.deps.data;
    const prepare = vi.spyOn(readHandle, 'prepare');
    selectRows(readHandle, 'step', installationId, { ids: ['a', 'b'] });
    const [sql = ''] = prepare.mock.calls[0] ?? [];
    const plan = readHandle.prepare(`EXPLAIN QUERY PLAN ${sql}`).all(installationId, '[]') as {
      detail: string;
    }[];
    expect(plan.map((row) => row.detail).join('; ')).toMatch(
      /SEARCH step USING INDEX sqlite_autoindex_step_1 \(id=\?\)/,
    );
  });
});

describe('data sources', () => {
  it('openDataSources > opened a second time > synchronous is FULL and the journal is WAL on both starts', async () => {
    const read = async () => {
      const data = await openDataSources(server.databaseFile);
      const synchronous = await data.writer.query<{ synchronous: number }[]>('PRAGMA synchronous');
      const journal = await data.writer.query<{ journal_mode: string }[]>('PRAGMA journal_mode');
      await data.close();
      return [synchronous[0]?.synchronous, journal[0]?.journal_mode];
    };
    // 2 is FULL, see https://www.sqlite.org/pragma.html#pragma_synchronous
    expect(await read()).toEqual([2, 'wal']);
    expect(await read()).toEqual([2, 'wal']);
  });

  it('openDataSources > the reader is asked to write > refused by SQLite', async () => {
    await expect(server.app.deps.data.reader.query('DELETE FROM installation')).rejects.toThrow(/readonly/);
  });

  it('migrations > run on an empty file > the schema builder has nothing to add', async () => {
    const { writer } = server.app.deps.data;
    expect(writer.entityMetadatas).toHaveLength(ENTITIES.length);
    const { upQueries } = await writer.driver.createSchemaBuilder().log();
    expect(upQueries.map(({ query }) => query)).toEqual([]);
  });
});

describe('Writer', () => {
  const key = newId();
  const request = (body: unknown) => ({ maker, installationId, idempotency: { key, body } });

  it('Writer > the same key a day later > the first answer, no second entry, no new revision', async () => {
    const { writer } = server.app.deps;
    const first = await writer.run(request({ a: 1 }), logged('test.once'));
    server.clock.advance(24 * 3600_000);
    const second = await writer.run(request({ a: 1 }), logged('test.twice'));
    expect(first).toEqual({ value: 'test.once', replayed: false });
    expect(second).toEqual({ kept: { status: 200, reply: { data: 'test.once' }, replayed: true } });
    expect(await logRows()).toEqual([{ action: 'test.once', revision: 1 }]);
    expect(await revision()).toBe(1);
  });

  it('Writer > the same key with another body > refused with IDEMPOTENCY_KEY_REUSED', async () => {
    const { writer } = server.app.deps;
    await writer.run(request({ a: 1 }), logged('test.once'));
    await expect(writer.run(request({ a: 2 }), logged('test.other'))).rejects.toMatchObject({
      code: 'IDEMPOTENCY_KEY_REUSED',
    });
  });

  it('Writer > the same key from another person > a request of its own', async () => {
    const { writer } = server.app.deps;
    await writer.run(request({ a: 1 }), logged('test.once'));
    const other = await writer.run(
      { ...request({ a: 1 }), maker: { actor: 'person:other', personId: null } },
      logged('test.other'),
    );
    expect(other).toEqual({ value: 'test.other', replayed: false });
  });

  it('Writer > a rule refuses > nothing it wrote stays, and a repetition gets the refusal although the rule would allow it now', async () => {
    const { writer } = server.app.deps;
    const refusal = writer.run(request({}), async (scope) => {
      await scope.log({ action: 'test.undone', subject: {} });
      throw new AppError('STEP_CREW_FULL', 'Full.', { details: { places: 1 } });
    });
    await expect(refusal).rejects.toMatchObject({ code: 'STEP_CREW_FULL' });
    expect(await logRows()).toEqual([]);
    expect(await revision()).toBe(0);
    const again = await writer.run(request({}), logged('test.allowed'));
    expect(again).toEqual({
      kept: {
        status: 409,
        reply: { error: { code: 'STEP_CREW_FULL', message: 'Full.', details: { places: 1 } } },
        replayed: true,
      },
    });
  });

  it.each(['NOT_ALLOWED', 'TOO_MANY_FAILURES', 'INTERNAL'] as const)(
    'Writer > %s is thrown > not kept, the repetition is decided anew',
    async (code) => {
      const { writer } = server.app.deps;
      await expect(
        writer.run(request({}), () => Promise.reject(new AppError(code, 'no'))),
      ).rejects.toMatchObject({ code });
      expect(await writer.run(request({}), logged('test.later'))).toEqual({
        value: 'test.later',
        replayed: false,
      });
    },
  );

  it('Writer > the server starts again between the two > the answer is still the first', async () => {
    await server.app.deps.writer.run(request({}), logged('test.once'));
    await server.app.close();
    const config = readConfig({ NODE_ENV: 'test', DATABASE_FILE: server.databaseFile, LOG_LEVEL: 'silent' });
    const restarted = await createApp(config, manualClock(TEST_NOW));
    const again = await restarted.deps.writer.run(request({}), logged('test.twice'));
    expect(again).toMatchObject({ kept: { reply: { data: 'test.once' } } });
    await restarted.close();
    const rows = new Database(server.databaseFile, { readonly: true })
      .prepare('SELECT count(*) AS n FROM day_log')
      .get();
    expect(rows).toEqual({ n: 1 });
    server = await startTestServer();
  });
});
