import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { AccountView, LinkView } from '../../shared/contracts/accounts';
import type { SessionView } from '../../shared/contracts/live';
import { ensureFirstAdminLink } from '../../server/modules/accounts';
import { accountClient, letters, PASSWORD, rows, secretIn, seedAccount } from '../support/fixtures-accounts';
import { startTestServer, type TestClient, type TestServer } from '../support/test-server';

const HOUR_MS = 3600_000;
const NEXT = 'a heron sleeps on one leg';

let server: TestServer;

beforeEach(async () => {
  server = await startTestServer({ OUTBOX: '1' });
});
afterEach(() => server.close());

const lookUp = (secret: string) => server.client().post<LinkView>('/links/look-up', { secret });
const accept = (secret: string, more: object = {}, client: TestClient = server.client()) =>
  client.post<SessionView>('/links/accept', { secret, password: NEXT, ...more });
const signIn = (email: string, password: string) => server.client().post('/session', { email, password });
const firstSecret = async () => secretIn((await ensureFirstAdminLink(server.app.deps)) ?? '');

describe('the first administrator', () => {
  it('ensureFirstAdminLink > no administrator > a link with the secret in its fragment, only its hash stored', async () => {
    const url = (await ensureFirstAdminLink(server.app.deps)) ?? '';
    expect(url).toMatch(/^http:\/\/localhost:\d+\/link#[\w-]{43}$/);
    const [row] = await rows<{ secret_hash: string; expires_at: number }>(
      server,
      'SELECT * FROM one_time_link',
    );
    expect(JSON.stringify(row)).not.toContain(secretIn(url));
    expect(row?.expires_at).toBe(server.clock.now() + 24 * HOUR_MS);
  });

  it('acceptLink > first administrator with e-mail, name and password > account, signed in, then no link any more', async () => {
    const secret = await firstSecret();
    expect((await lookUp(secret)).data).toEqual({ kind: 'first-admin', email: null, name: null });
    const client = server.client();
    const reply = await accept(secret, { email: 'Mara@Hall.example', name: 'Mara Quill' }, client);
    expect(reply.data.principal).toMatchObject({
      kind: 'account',
      email: 'mara@hall.example',
      siteRole: 'admin',
    });
    expect((await client.get('/accounts')).status).toBe(200);
    expect(await ensureFirstAdminLink(server.app.deps)).toBeNull();
    expect((await accept(secret, { email: 'b@hall.example', name: 'Bo' })).error?.code).toBe('LINK_SPENT');
    const [log] = await rows(server, 'SELECT action, installation_id FROM day_log');
    expect(log).toEqual({ action: 'account.accepted', installation_id: null });
  });

  it('ensureFirstAdminLink > the server starts again > the earlier link is worth nothing', async () => {
    const first = await firstSecret();
    const second = await firstSecret();
    expect((await lookUp(first)).error?.code).toBe('LINK_SPENT');
    expect((await lookUp(second)).status).toBe(200);
  });

  it('acceptLink > e-mail, name and a good password all missing > every field named at once, the link still works', async () => {
    const secret = await firstSecret();
    const short = await accept(secret, { password: 'short', email: 'nothing' });
    expect(short.error?.fields?.map((field) => field.path).sort()).toEqual(['email', 'password']);
    const reply = await accept(secret, { password: 'strutbee strutbee' });
    expect(reply.error?.fields?.map((field) => field.path).sort()).toEqual(['email', 'name', 'password']);
    expect((await accept(secret, { email: 'mara@hall.example', name: 'Mara' })).status).toBe(200);
  });

  it('acceptLink > two browsers use the link at once > one administrator', async () => {
    const secret = await firstSecret();
    const replies = await Promise.all([
      accept(secret, { email: 'a@hall.example', name: 'Ada' }),
      accept(secret, { email: 'b@hall.example', name: 'Bo' }),
    ]);
    expect(replies.map((reply) => reply.status).sort()).toEqual([200, 410]);
    expect(await rows(server, 'SELECT 1 FROM account')).toHaveLength(1);
  });
});

describe('invitations', () => {
  const invite = (client: TestClient, siteRole: string, email = 'cy@hall.example', key?: string) =>
    client.post<AccountView>('/accounts', { email, name: 'Cy Marsh', siteRole }, key);

  it('inviteAccount > by an administrator > pending account, letter with a link of 72 hours, accepted with a password', async () => {
    const { client } = await accountClient(server, 'root@hall.example', 'admin');
    const reply = await invite(client, 'organiser');
    expect(reply.status).toBe(201);
    expect(reply.data).toMatchObject({ pending: true, siteRole: 'organiser' });
    const [letter] = await letters(server, 1);
    expect(letter).toMatchObject({ to: 'cy@hall.example', subject: 'Your sign-in for Strutbee' });
    expect(letter?.text).toContain('Mara Quill invites you');
    const secret = secretIn(letter?.text ?? '');
    expect((await lookUp(secret)).data).toEqual({
      kind: 'invite',
      email: 'cy@hall.example',
      name: 'Cy Marsh',
    });
    server.clock.advance(72 * HOUR_MS - 1);
    const accepted = await accept(secret, { name: 'Cyra Marsh' });
    expect(accepted.data.principal).toMatchObject({
      email: 'cy@hall.example',
      name: 'Cyra Marsh',
      siteRole: 'organiser',
    });
    expect((await accept(secret)).error?.code).toBe('LINK_SPENT');
    expect((await signIn('cy@hall.example', NEXT)).status).toBe(200);
  });

  it('inviteAccount > 72 hours later > LINK_SPENT; invited again > the new link works, one account', async () => {
    const { client } = await accountClient(server, 'root@hall.example', 'admin');
    await invite(client, 'member');
    const [first] = await letters(server, 1);
    server.clock.advance(72 * HOUR_MS);
    expect((await lookUp(secretIn(first?.text ?? ''))).status).toBe(410);
    const later = await accountClient(server, 'second@hall.example', 'admin');
    expect((await invite(later.client, 'member')).status).toBe(201);
    const [second] = await letters(server, 2);
    expect((await lookUp(secretIn(second?.text ?? ''))).status).toBe(200);
    expect(await rows(server, `SELECT 1 FROM account WHERE email = 'cy@hall.example'`)).toHaveLength(1);
  });

  it('inviteAccount > the same key twice > one letter, the first answer', async () => {
    const { client } = await accountClient(server, 'root@hall.example', 'admin');
    const first = await invite(client, 'member', 'cy@hall.example', 'invite-key-1');
    const again = await invite(client, 'member', 'cy@hall.example', 'invite-key-1');
    expect(again.data).toEqual(first.data);
    expect(again.headers['idempotent-replay']).toBe('true');
    expect(await rows(server, 'SELECT 1 FROM mail')).toHaveLength(1);
  });

  it('inviteAccount > a site organiser invites an organiser > NOT_ALLOWED; a member > invited; a plain member invites > NOT_ALLOWED', async () => {
    const { client } = await accountClient(server, 'organiser@hall.example', 'organiser');
    expect((await invite(client, 'organiser')).error?.code).toBe('NOT_ALLOWED');
    expect((await invite(client, 'admin')).error?.code).toBe('NOT_ALLOWED');
    expect(await rows(server, 'SELECT 1 FROM mail')).toEqual([]);
    expect((await invite(client, 'member')).status).toBe(201);
    const member = await accountClient(server, 'member@hall.example', 'member');
    expect((await invite(member.client, 'member', 'dot@hall.example')).status).toBe(403);
  });

  it('inviteAccount > a site organiser invites a pending organiser again > NOT_ALLOWED, the role stays', async () => {
    const admin = await accountClient(server, 'root@hall.example', 'admin');
    await invite(admin.client, 'organiser');
    const { client } = await accountClient(server, 'organiser@hall.example', 'organiser');
    expect((await invite(client, 'member')).error?.code).toBe('NOT_ALLOWED');
    expect(await rows(server, `SELECT site_role FROM account WHERE email = 'cy@hall.example'`)).toEqual([
      { site_role: 'organiser' },
    ]);
  });

  it('inviteAccount > an address in use > EMAIL_TAKEN beside the field, no letter', async () => {
    const { client } = await accountClient(server, 'root@hall.example', 'admin');
    const reply = await invite(client, 'member', 'root@hall.example');
    expect(reply.error).toMatchObject({ code: 'EMAIL_TAKEN', fields: [{ path: 'email' }] });
    expect(await rows(server, 'SELECT 1 FROM mail')).toEqual([]);
  });
});

describe('resets', () => {
  const ask = async (email: string) => {
    const reply = await server.client().post('/reset', { email });
    await server.app.deps.unitOfWork.idle();
    return reply;
  };

  it('reset > known, unknown and disabled address (ASVS 5.0 6.3.8) > one answer; only the known one gets a letter', async () => {
    await seedAccount(server, 'mara@hall.example');
    await seedAccount(server, 'gone@hall.example');
    await rows(server, `UPDATE account SET disabled_at = 1 WHERE email = 'gone@hall.example'`);
    const replies = [
      await ask('mara@hall.example'),
      await ask('nobody@hall.example'),
      await ask('gone@hall.example'),
    ];
    for (const reply of replies) expect([reply.status, reply.text]).toEqual([200, '{"data":null}']);
    const sent = await letters(server, 1);
    expect(sent.map((letter) => letter.to)).toEqual(['mara@hall.example']);
  });

  it('reset > used > new password, every other session ends, the link works once (ASVS 5.0 6.4.1)', async () => {
    const { client, accountId } = await accountClient(server, 'mara@hall.example');
    await ask('mara@hall.example');
    const [letter] = await letters(server, 1);
    const secret = secretIn(letter?.text ?? '');
    expect((await lookUp(secret)).data).toMatchObject({ kind: 'reset', email: 'mara@hall.example' });
    const here = server.client();
    expect((await accept(secret, {}, here)).data.principal).toMatchObject({ accountId });
    expect((await client.get<SessionView>('/session')).data.principal).toBeNull();
    expect((await here.get<SessionView>('/session')).data.principal).toMatchObject({ accountId });
    expect((await signIn('mara@hall.example', PASSWORD)).status).toBe(401);
    expect((await signIn('mara@hall.example', NEXT)).status).toBe(200);
    expect((await accept(secret)).error?.code).toBe('LINK_SPENT');
  });

  it('reset > two browsers use the link at once > one is signed in, the other is told that it is spent', async () => {
    await seedAccount(server, 'mara@hall.example');
    await ask('mara@hall.example');
    const [letter] = await letters(server, 1);
    const secret = secretIn(letter?.text ?? '');
    const replies = await Promise.all([accept(secret), accept(secret)]);
    expect(replies.map((reply) => reply.status).sort()).toEqual([200, 410]);
  });

  it('reset > an hour later > LINK_SPENT, the old password stays', async () => {
    await seedAccount(server, 'mara@hall.example');
    await ask('mara@hall.example');
    const [letter] = await letters(server, 1);
    server.clock.advance(HOUR_MS);
    expect((await accept(secretIn(letter?.text ?? ''))).status).toBe(410);
    expect((await signIn('mara@hall.example', PASSWORD)).status).toBe(200);
  });

  it('reset > asked ten times in an hour > three letters, the newest link works', async () => {
    await seedAccount(server, 'mara@hall.example');
    for (let turn = 0; turn < 10; turn += 1) expect((await ask('mara@hall.example')).status).toBe(200);
    const sent = await letters(server, 3);
    expect(await rows(server, 'SELECT 1 FROM mail')).toHaveLength(3);
    const statuses = await Promise.all(sent.map((letter) => lookUp(secretIn(letter.text))));
    expect(statuses.map((reply) => reply.status).sort()).toEqual([200, 410, 410]);
  });

  it('links > a secret that was never made > LINK_SPENT, as for a used one', async () => {
    expect((await lookUp('never-made-never-made')).error?.code).toBe('LINK_SPENT');
  });
});

describe('roles', () => {
  it('changeRole, setDisabled > the only administrator > LAST_ADMIN; with a second one > done and logged', async () => {
    const { client, accountId } = await accountClient(server, 'root@hall.example', 'admin');
    const role = (siteRole: string) => client.patch(`/accounts/${accountId}/role`, { siteRole });
    expect((await role('member')).error?.code).toBe('LAST_ADMIN');
    expect((await client.patch(`/accounts/${accountId}/disabled`, { disabled: true })).error?.code).toBe(
      'LAST_ADMIN',
    );
    // An invited administrator who never accepted cannot sign in, so does not count.
    const pending = await seedAccount(server, 'pending@hall.example', 'admin');
    await rows(server, 'UPDATE account SET password_hash = NULL WHERE id = ?', pending);
    expect((await role('organiser')).error?.code).toBe('LAST_ADMIN');
    await seedAccount(server, 'second@hall.example', 'admin');
    expect((await role('organiser')).data).toMatchObject({ siteRole: 'organiser' });
    expect((await client.get('/accounts')).status).toBe(403);
    const [log] = await rows<{ subject: string }>(
      server,
      `SELECT subject FROM day_log WHERE action = 'account.role-changed'`,
    );
    expect(JSON.parse(log?.subject ?? '')).toEqual({ accountId, from: 'admin', to: 'organiser' });
  });

  it('accounts > unknown id > 404', async () => {
    const { client } = await accountClient(server, 'root@hall.example', 'admin');
    expect((await client.patch('/accounts/nobody/role', { siteRole: 'member' })).status).toBe(404);
    expect((await client.patch('/accounts/nobody/disabled', { disabled: true })).status).toBe(404);
  });
});
