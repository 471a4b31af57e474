import { execFile } from 'node:child_process';
import path from 'node:path';
import Database from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { RegisterView } from '../../shared/contracts/safety';
import { genesisHash, HOT_GLUE_BODY } from '../../shared/safety';
import { erasePersonFromRegister, readRegister } from '../../server/modules/safety';
import { appendToRegister, sha256 } from '../../server/modules/safety/register.service';
import { inScope, seedInstallation } from '../support/fixtures';
import { answersWith, openHall, signs, signsOff, stored, TYPED, type Hall } from '../support/fixtures-safety';

let hall: Hall;

beforeEach(async () => {
  hall = await openHall();
});
afterEach(() => hall.server.close());

const register = async () => (await hall.organiser.get<RegisterView>(`${hall.base}/register`)).data;

/** Straight into the file, as somebody does who has it and wants something gone. */
function tamper(sql: string, ...params: unknown[]): void {
  const db = new Database(hall.server.databaseFile);
  db.prepare(sql).run(...params);
  db.close();
}

/** The command as people run it, in a process of its own. */
function command(...args: string[]): Promise<{ code: number; out: string; error: string }> {
  const tsx = path.resolve('node_modules/tsx/dist/cli.mjs');
  const script = path.resolve('server/cli/verify-register.ts');
  const all = [tsx, script, '--database', hall.server.databaseFile, ...args];
  return new Promise((resolve) => {
    execFile(process.execPath, all, (failed, out, error) => {
      resolve({ code: failed ? Number(failed.code) : 0, out, error });
    });
  });
}

/** Sign-offs of four people, one of them revoked and made again: twelve rows. */
async function fill(): Promise<void> {
  const own = await signsOff(hall, hall.ines);
  await signsOff(hall, hall.second);
  await signsOff(hall, hall.lead, hall.second);
  await signsOff(hall, hall.organiser);
  hall.server.clock.advance(1000);
  await hall.lead.post(`${hall.base}/sign-offs/${own}/revoke`, { reason: 'left a hot gun lying' });
  await signsOff(hall, hall.ines);
}

describe('the register', () => {
  it('readRegister > everything that makes or ends a sign-off > one row each, chained from the installation on', async () => {
    const { ines, lead, base, server } = hall;
    const wrong = { version: 1, answers: answersWith(['how-long']) };
    await ines.post(`${base}/briefings/hot-glue/answers`, wrong);
    await ines.post(`${base}/briefings/hot-glue/answers`, wrong);
    const [open] = await stored<{ id: string }>(hall, 'SELECT id FROM sign_off WHERE installation_id = ?');
    await lead.post(`${base}/sign-offs/${open?.id}/talk`);
    const signOffId = await signsOff(hall, ines);
    await lead.post(`${base}/sign-offs/${signOffId}/revoke`, { reason: 'careless with the gun' });
    await lead.post(`${base}/briefings/hot-glue/versions`, {
      kind: 'change',
      body: HOT_GLUE_BODY,
      whatChanged: 'A new rule.',
      effectiveFrom: server.clock.now(),
      basedOn: 1,
    });
    const view = await register();
    expect(view.rows.map((row) => row.kind)).toEqual([
      'version-published',
      'talked',
      'signed',
      'countersigned',
      'revoked',
      'version-published',
      'voided',
    ]);
    expect(view).toMatchObject({ count: 7, headHash: view.rows.at(-1)?.hash, verified: { ok: true } });
    expect(view.rows[2]?.personal).toMatchObject({ name: 'Ines K.', ageBand: '18+', briefing: 'Hot glue' });
    expect(JSON.stringify(view.rows.map((row) => row.ids))).not.toContain('Ines');
    const [first] = await stored<{ prev_hash: string }>(
      hall,
      'SELECT prev_hash FROM register_row WHERE installation_id = ? ORDER BY seq',
    );
    expect(first?.prev_hash).toBe(genesisHash(sha256, 'sign-offs', hall.installationId));
  });

  it('appendToRegister > the use case is refused after it > no row, the chain goes on', async () => {
    const before = await register();
    const failing = inScope(hall.server.app, hall.installationId, async (scope) => {
      await appendToRegister(scope, hall.installationId, {
        kind: 'revoked',
        ids: {},
        personId: null,
        personal: {},
      });
      throw new Error('on purpose');
    });
    await expect(failing).rejects.toThrow('on purpose');
    await signs(hall, hall.ines);
    const after = await register();
    expect(after).toMatchObject({ count: before.count + 1, verified: { ok: true } });
  });

  it('readRegister > a volunteer asks > refused', async () => {
    expect((await hall.ines.get(`${hall.base}/register`)).error?.code).toBe('NOT_ALLOWED');
    expect((await hall.ines.get(`${hall.base}/register/extract`)).error?.code).toBe('NOT_ALLOWED');
  });

  it('registerExtract > printed > count, head hash, verified state, names, the command that checks it', async () => {
    await fill();
    const { count, headHash } = await register();
    const { text, headers } = await hall.lead.get(`${hall.base}/register/extract`);
    expect(headers['content-type']).toContain('text/plain');
    expect(text).toContain(`Rows          ${count}\n`);
    expect(text).toContain(`Head hash     ${headHash}\n`);
    expect(text).toContain('Chain         verified');
    expect(text).toContain(
      `verify:register -- --installation ${hall.installationId} --count ${count} --head ${headHash}`,
    );
    expect(text).toMatch(/countersigned +Ines K\. .*by Lena M\. as safety lead/);
    expect(text).toContain('"left a hot gun lying"');
  });

  it('erasePersonFromRegister > a person with rows > name, salt and signature gone, the chain verifies, the extract too', async () => {
    await fill();
    await inScope(hall.server.app, hall.installationId, (scope) =>
      erasePersonFromRegister(scope, hall.installationId, hall.inesId),
    );
    const view = await register();
    expect(view.verified).toEqual({ ok: true });
    expect(view.rows.at(-1)).toMatchObject({ kind: 'erased', ids: { personId: hall.inesId } });
    const kept = await stored<Record<string, unknown>>(
      hall,
      'SELECT salt, personal FROM register_row WHERE installation_id = ? AND person_id = ?',
      hall.inesId,
    );
    expect(kept.length).toBeGreaterThan(3);
    for (const row of kept) expect(row).toEqual({ salt: null, personal: null });
    const signOffs = await stored<Record<string, unknown>>(
      hall,
      'SELECT signature, revoke_reason FROM sign_off WHERE installation_id = ? AND person_id = ?',
      hall.inesId,
    );
    expect(signOffs).toEqual([
      { signature: null, revoke_reason: null },
      { signature: null, revoke_reason: null },
    ]);
    expect(JSON.stringify(view)).not.toContain(TYPED.value);
    expect((await hall.lead.get(`${hall.base}/register/extract`)).text).toContain('(erased)');
  });
});

// Each starts a process of its own, which takes seconds on a busy machine.
describe('verify:register', { timeout: 120_000 }, () => {
  it('verify-register > the last ten rows deleted straight in the file > the chain alone looks whole, the printed head finds it', async () => {
    await fill();
    const { count, headHash } = await register();
    expect(count).toBeGreaterThan(11);
    const printed = ['--count', String(count), '--head', headHash];
    expect(await command(...printed)).toMatchObject({ code: 0 });
    tamper('DELETE FROM register_row WHERE installation_id = ? AND seq > ?', hall.installationId, count - 10);
    const [chain, found] = await Promise.all([
      command(),
      command('--installation', hall.installationId, ...printed),
    ]);
    expect(chain.code).toBe(0);
    expect(found.code).toBe(1);
    expect(found.out).toContain(`row ${count - 9}: truncated`);
  });

  it('verify-register > the last ten rows replaced by new ones of the same number > other head', async () => {
    await fill();
    const { count, headHash } = await register();
    tamper('DELETE FROM register_row WHERE installation_id = ? AND seq > ?', hall.installationId, count - 10);
    await inScope(hall.server.app, hall.installationId, async (scope) => {
      for (let index = 0; index < 10; index += 1) {
        const entry = { kind: 'signed', ids: { index }, personId: null, personal: {} } as const;
        await appendToRegister(scope, hall.installationId, entry);
      }
    });
    const found = await command('--count', String(count), '--head', headHash);
    expect([found.code, found.out]).toEqual([1, expect.stringContaining(`row ${count}: other head`)]);
  });

  it.each([
    [
      'a time changed',
      'UPDATE register_row SET at = at + 1 WHERE installation_id = ? AND seq = 5',
      'row 5: altered row',
    ],
    [
      'a row taken out',
      'DELETE FROM register_row WHERE installation_id = ? AND seq = 5',
      'row 5: missing row',
    ],
    [
      'another name written in',
      `UPDATE register_row SET personal = '{"name":"Nobody"}' WHERE installation_id = ? AND seq = 5`,
      'row 5: altered personal fields',
    ],
    [
      'a name taken out without an erasure',
      'UPDATE register_row SET personal = NULL, salt = NULL WHERE installation_id = ? AND seq = 5',
      'row 5: personal fields removed',
    ],
    [
      'ids that are no JSON',
      `UPDATE register_row SET ids = '{' WHERE installation_id = ? AND seq = 5`,
      'row 5: altered row',
    ],
  ])('readRegister > %s > found with its row', async (_what, sql, words) => {
    await fill();
    tamper(sql, hall.installationId);
    const { verified } = readRegister(hall.server.app.deps.data.readHandle, hall.installationId);
    expect(verified.ok ? 'intact' : `row ${verified.seq}: ${verified.why}`).toBe(words);
    expect((await hall.lead.get(`${hall.base}/register/extract`)).text).toContain('NOT INTACT at row 5');
  });

  it('verify-register > two installations > both checked; an extract needs to say which', async () => {
    const other = await seedInstallation(hall.server.app);
    const [all, unclear, half, wrong] = await Promise.all([
      command(),
      command('--count', '1', '--head', 'a'.repeat(64)),
      command('--count', '1'),
      command('--colour', 'red'),
    ]);
    expect(all.code).toBe(0);
    expect(all.out).toContain(hall.installationId);
    expect(all.out).toContain(other.installationId);
    expect([unclear.code, unclear.error]).toEqual([2, expect.stringContaining('--installation')]);
    expect([half.code, wrong.code]).toEqual([2, 2]);
  });
});
