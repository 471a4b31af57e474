import supertest from 'supertest';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { SessionView } from '../../shared/contracts/live';
import { accountClient, PASSWORD, rows, seedAccount } from '../support/fixtures-accounts';
import { startTestServer, type TestClient, type TestServer } from '../support/test-server';

const EMAIL = 'mara@hall.example';

let server: TestServer;
let accountId: string;

beforeEach(async () => {
  server = await startTestServer();
  accountId = await seedAccount(server, EMAIL, 'admin');
});
afterEach(async () => {
  vi.restoreAllMocks();
  await server.close();
});

const signIn = (client: TestClient, email = EMAIL, password = PASSWORD) =>
  client.post<SessionView>('/session', { email, password });
const who = async (client: TestClient) => (await client.get<SessionView>('/session')).data.principal;

describe('sign-in', () => {
  it('signIn > right e-mail in other letters and right password > session of the account, whole view', async () => {
    const client = server.client();
    const reply = await signIn(client, '  MARA@Hall.example ');
    expect(reply.status).toBe(200);
    expect(reply.data).toMatchObject({
      demo: false,
      clockRate: 1,
      principal: {
        kind: 'account',
        accountId,
        name: 'Mara Quill',
        email: EMAIL,
        siteRole: 'admin',
        installations: [],
      },
    });
    expect(await who(client)).toMatchObject({ accountId });
  });

  it('signIn > the same password composed of other code points (NIST SP 800-63B-4: NFKC) > signed in', async () => {
    const typed = 'ﬁfteen herons éverywhere';
    const admin = await accountClient(server, 'root@hall.example', 'admin');
    await rows(server, 'DELETE FROM one_time_link');
    await admin.client.post('/account/password', { current: PASSWORD, next: typed });
    const reply = await signIn(server.client(), 'root@hall.example', 'fifteen herons e\u0301verywhere');
    expect(reply.status).toBe(200);
  });

  it('signIn > wrong password, unknown e-mail, disabled, pending (ASVS 5.0 6.3.8) > the same answer each time', async () => {
    await seedAccount(server, 'disabled@hall.example');
    await seedAccount(server, 'pending@hall.example');
    await rows(server, `UPDATE account SET disabled_at = 1 WHERE email = 'disabled@hall.example'`);
    await rows(server, `UPDATE account SET password_hash = NULL WHERE email = 'pending@hall.example'`);
    const replies = [
      await signIn(server.client(), EMAIL, 'not the right one at all'),
      await signIn(server.client(), 'nobody@hall.example'),
      await signIn(server.client(), 'disabled@hall.example'),
      await signIn(server.client(), 'pending@hall.example'),
    ];
    const bodies = replies.map(({ status, error }) => ({ status, error: { ...error, requestId: '' } }));
    expect(bodies[0]).toMatchObject({ status: 401, error: { code: 'SIGN_IN_FAILED' } });
    for (const body of bodies) expect(body).toEqual(bodies[0]);
  });

  it('signIn > unknown e-mail (ASVS 5.0 6.3.8) > takes as long as a wrong password, within a factor of three', async () => {
    const timeOf = async (email: string) => {
      const client = server.client();
      await client.get('/session');
      const times: number[] = [];
      for (let turn = 0; turn < 5; turn += 1) {
        const started = performance.now();
        await signIn(client, email, 'not the right one at all');
        times.push(performance.now() - started);
      }
      return times.sort((a, b) => a - b)[2] ?? 0;
    };
    await timeOf('warm@hall.example');
    const known = await timeOf(EMAIL);
    const unknown = await timeOf('nobody@hall.example');
    expect(Math.max(known, unknown) / Math.min(known, unknown)).toBeLessThan(3);
  });

  it('signIn > two fields wrong > both named at once, in words', async () => {
    const reply = await server.client().post('/session', { email: 'mara', password: '' });
    expect(reply.error).toMatchObject({ code: 'VALIDATION' });
    expect(reply.error?.fields).toEqual([
      expect.objectContaining({
        path: 'email',
        message: expect.stringContaining('no e-mail address') as string,
      }),
      expect.objectContaining({ path: 'password', message: 'Please fill this in.' }),
    ]);
  });

  it('signIn > stored password > argon2id with at least 19 MiB and two passes (OWASP Password Storage)', async () => {
    const [row] = await rows<{ password_hash: string }>(server, 'SELECT password_hash FROM account');
    expect(row?.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });
});

describe('limits on failures', () => {
  it('signIn > ten wrong passwords for one e-mail from ten browsers > the eleventh try waits, even with the right one; other people do not; after it is over the right one works', async () => {
    for (let turn = 0; turn < 10; turn += 1) {
      expect((await signIn(server.client(), EMAIL, 'not the right one at all')).status).toBe(401);
    }
    const held = await signIn(server.client());
    expect(held.error).toMatchObject({ code: 'TOO_MANY_FAILURES', details: { retryAfterSeconds: 900 } });
    expect(held.status).toBe(429);
    expect(held.error?.message).toContain('Wait 15 minutes');
    await seedAccount(server, 'other@hall.example');
    expect((await signIn(server.client(), 'other@hall.example')).status).toBe(200);
    server.clock.advance(15 * 60_000);
    expect((await signIn(server.client())).status).toBe(200);
  });

  it('signIn > twelve times right > never limited: only failures count', async () => {
    for (let turn = 0; turn < 12; turn += 1) expect((await signIn(server.client())).status).toBe(200);
  });

  it('signIn > ten unknown addresses from one browser > the session waits', async () => {
    const client = server.client();
    for (let turn = 0; turn < 10; turn += 1) await signIn(client, `guess${turn}@hall.example`);
    expect((await signIn(client, 'guess11@hall.example')).status).toBe(429);
  });

  it('signIn > twenty wrong tries at once > no more than ten reach the password', async () => {
    const client = server.client();
    await client.get('/session');
    const replies = await Promise.all(
      Array.from({ length: 20 }, () => signIn(client, EMAIL, 'not the right one at all')),
    );
    expect(replies.filter((reply) => reply.status === 401)).toHaveLength(10);
    expect(replies.filter((reply) => reply.status === 429)).toHaveLength(10);
  });
});

describe('sessions', () => {
  it('signIn > the session id before (ASVS 5.0 7.2.4) > replaced, and the old one is worth nothing', async () => {
    const client = server.client();
    await client.get('/session');
    const before = client.cookie();
    await signIn(client);
    expect(client.cookie()).not.toBe(before);
    const old = await supertest(server.url).get('/api/session').set('Cookie', before);
    expect((old.body as { data: SessionView }).data.principal).toBeNull();
  });

  it('session > its cookie (ASVS 5.0 3.3.2, 3.3.4, 7.2.3) > HttpOnly, SameSite, 128 bits or more, only its hash stored', async () => {
    const client = server.client();
    const reply = await signIn(client);
    const cookie = String(reply.headers['set-cookie']);
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
    const sid = /strutbee=s%3A([\w-]+)\./.exec(cookie)?.[1] ?? '';
    expect(Buffer.from(sid, 'base64url').length).toBeGreaterThanOrEqual(16);
    const stored = await rows<{ id: string; data: string }>(server, 'SELECT id, data FROM session');
    for (const row of stored) expect(JSON.stringify(row)).not.toContain(sid);
  });

  it('signOut > (ASVS 5.0 7.4.1) > the session is gone on the server, its cookie opens nothing', async () => {
    const client = server.client();
    await signIn(client);
    const cookie = client.cookie();
    expect((await client.delete('/session')).status).toBe(200);
    const old = await supertest(server.url).get('/api/accounts').set('Cookie', cookie);
    expect(old.status).toBe(401);
    expect(await rows(server, `SELECT 1 FROM session WHERE principal = ?`, `account:${accountId}`)).toEqual(
      [],
    );
  });

  it('disable > (ASVS 5.0 7.4.2) > every session of the account ends at once; enabled again, it signs in anew', async () => {
    const other = await accountClient(server, 'other@hall.example');
    expect(await who(other.client)).not.toBeNull();
    const admin = server.client();
    await signIn(admin);
    const reply = await admin.patch(`/accounts/${other.accountId}/disabled`, { disabled: true });
    expect(reply.data).toMatchObject({ id: other.accountId, disabled: true });
    expect(await who(other.client)).toBeNull();
    expect(
      await rows(server, 'SELECT 1 FROM session WHERE principal = ?', `account:${other.accountId}`),
    ).toEqual([]);
    expect((await signIn(server.client(), 'other@hall.example')).status).toBe(401);
    await admin.patch(`/accounts/${other.accountId}/disabled`, { disabled: false });
    expect((await signIn(server.client(), 'other@hall.example')).status).toBe(200);
    const log = await rows<{ action: string }>(
      server,
      `SELECT action FROM day_log WHERE action LIKE 'account.%abled' ORDER BY seq`,
    );
    expect(log.map((row) => row.action)).toEqual(['account.disabled', 'account.enabled']);
  });

  it('endSessions > by an administrator (ASVS 5.0 7.4.5) > the account is signed out and may sign in again', async () => {
    const other = await accountClient(server, 'other@hall.example');
    const admin = server.client();
    await signIn(admin);
    expect((await admin.post(`/accounts/${other.accountId}/end-sessions`)).status).toBe(200);
    expect(await who(other.client)).toBeNull();
    expect((await signIn(server.client(), 'other@hall.example')).status).toBe(200);
    expect((await admin.post('/accounts/nobody/end-sessions')).status).toBe(404);
  });

  it('changePassword > (ASVS 5.0 7.4.3) > other sessions end, this one stays, the old password is worth nothing', async () => {
    const here = server.client();
    const elsewhere = server.client();
    await signIn(here);
    await signIn(elsewhere);
    const reply = await here.post('/account/password', {
      current: PASSWORD,
      next: 'a heron sleeps on one leg',
    });
    expect(reply.status).toBe(200);
    expect(await who(here)).toMatchObject({ accountId });
    expect(await who(elsewhere)).toBeNull();
    expect((await signIn(server.client())).status).toBe(401);
    expect((await signIn(server.client(), EMAIL, 'a heron sleeps on one leg')).status).toBe(200);
    const [letter] = await rows<{ recipient: string; subject: string }>(
      server,
      'SELECT recipient, subject FROM mail',
    );
    expect(letter).toMatchObject({ recipient: EMAIL, subject: 'Your password for Strutbee was changed' });
  });

  it.each([
    [
      'the current one is wrong',
      { current: 'not the right one', next: 'a heron sleeps on one leg' },
      'current',
    ],
    ['14 characters', { current: PASSWORD, next: 'x8 kq ZZ 4 vw!' }, 'next'],
    ['a common one', { current: PASSWORD, next: 'passwordpassword' }, 'next'],
    ['made of the own name and address', { current: PASSWORD, next: 'mara quill hall mara' }, 'next'],
  ])('changePassword > %s > refused beside its field, nothing changes', async (_what, body, path) => {
    const here = server.client();
    await signIn(here);
    const reply = await here.post('/account/password', body);
    expect(reply.error).toMatchObject({ code: 'VALIDATION', fields: [{ path }] });
    expect((await signIn(server.client())).status).toBe(200);
    expect(await rows(server, 'SELECT 1 FROM mail')).toEqual([]);
  });

  it('session > its life is over although it was used all the time (ASVS 5.0 7.3.2) > signed out', async () => {
    const client = server.client();
    await signIn(client);
    const cookie = client.cookie();
    const now = Date.now();
    vi.spyOn(Date, 'now').mockReturnValue(now + 31 * 24 * 3600_000);
    const reply = await supertest(server.url).get('/api/accounts').set('Cookie', cookie);
    expect(reply.status).toBe(401);
  });

  it('session > nothing done for three days (ASVS 5.0 7.3.1) > signed out', async () => {
    const client = server.client();
    await signIn(client);
    server.clock.advance(3 * 24 * 3600_000 - 1000);
    expect(await who(client)).not.toBeNull();
    server.clock.advance(3 * 24 * 3600_000 + 1000);
    expect(await who(client)).toBeNull();
  });
});

describe('forged requests', () => {
  it('any change > without the token of the session (ASVS 5.0 3.5.1) > EBADCSRFTOKEN, nothing is changed', async () => {
    const client = server.client();
    await signIn(client);
    const reply = await supertest(server.url)
      .patch(`/api/accounts/${accountId}/role`)
      .set('Cookie', client.cookie())
      .set('idempotency-key', 'forged-request')
      .send({ siteRole: 'member' });
    expect(reply.status).toBe(403);
    expect((reply.body as { error: { code: string } }).error.code).toBe('EBADCSRFTOKEN');
    expect(await rows(server, 'SELECT site_role FROM account')).toEqual([{ site_role: 'admin' }]);
  });

  it('sign-in > with the token of another session > EBADCSRFTOKEN', async () => {
    const mine = (await server.client().get<SessionView>('/session')).data.csrfToken;
    const victim = server.client();
    await victim.get('/session');
    const reply = await supertest(server.url)
      .post('/api/session')
      .set('Cookie', victim.cookie())
      .set('x-csrf-token', mine)
      .send({ email: EMAIL, password: PASSWORD });
    expect(reply.status).toBe(403);
  });
});
