import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { SessionView } from '../../shared/contracts/live';
import { PASSWORD, rows, seedAccount } from '../support/fixtures-accounts';
import { startTestServer, type TestClient, type TestServer } from '../support/test-server';

const EMAIL = 'mara@hall.example';

let server: TestServer;

beforeEach(async () => {
  server = await startTestServer();
  await seedAccount(server, EMAIL, 'member');
});
afterEach(() => server.close());

const signIn = async (client: TestClient) => client.post('/session', { email: EMAIL, password: PASSWORD });
const who = async (client: TestClient) => (await client.get<SessionView>('/session')).data.principal;

describe('end own sessions', () => {
  it('endOwnSessions > from one of two browsers (ASVS 5.0 7.5.2) > the other is signed out, this one stays, logged', async () => {
    const here = server.client();
    const elsewhere = server.client();
    await signIn(here);
    await signIn(elsewhere);
    expect((await here.post('/account/end-sessions', {})).status).toBe(200);
    expect(await who(elsewhere)).toBeNull();
    expect(await who(here)).toMatchObject({ kind: 'account', email: EMAIL });
    const log = await rows<{ action: string }>(
      server,
      'SELECT action FROM day_log ORDER BY seq DESC LIMIT 1',
    );
    expect(log).toEqual([{ action: 'account.sessions-ended' }]);
  });

  it('endOwnSessions > nobody signed in > refused with SIGN_IN_NEEDED', async () => {
    const reply = await server.client().post('/account/end-sessions', {});
    expect(reply.error?.code).toBe('SIGN_IN_NEEDED');
  });
});
