import supertest from 'supertest';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { SessionView, Snapshot } from '../../shared/contracts/live';
import type { CodeView } from '../../shared/contracts/people';
import { inScope, seedInstallation, seedPerson } from '../support/fixtures';
import { accountClient, rows } from '../support/fixtures-accounts';
import {
  startTestServer,
  TEST_NOW,
  type TestClient,
  type TestReply,
  type TestServer,
} from '../support/test-server';
import { BuildDay } from '../../server/modules/installations/installation.entity';

const HOUR_MS = 3600_000;
const CODE = 'K7MRQA';
const BO = { firstName: 'Bo', initial: 'k', ageBand: '18+' };

let server: TestServer;
let installationId: string;

beforeEach(async () => {
  server = await startTestServer();
  ({ installationId } = await seedInstallation(server.app, { joinCode: CODE }));
});
afterEach(async () => {
  vi.restoreAllMocks();
  await server.close();
});

const join = (client: TestClient, more: object = {}): Promise<TestReply<SessionView>> =>
  client.post<SessionView>('/join', { code: CODE, ...BO, ...more });
const personOf = (reply: TestReply<SessionView>): string => {
  const { principal } = reply.data;
  if (principal?.kind !== 'person') throw new Error(reply.text);
  return principal.personId;
};
const people = () =>
  rows<{ id: string; first_name: string; number: number }>(server, 'SELECT * FROM person ORDER BY number');
const setStatus = (status: string) => rows(server, 'UPDATE installation SET status = ?', status);

async function addDay(date: string, end: string): Promise<void> {
  await inScope(server.app, installationId, async ({ manager }) => {
    await manager.insert(BuildDay, {
      id: `day-${date}`,
      installationId,
      date,
      doors: '09:00',
      start: '09:30',
      clearUp: '17:00',
      end,
      breaks: [],
      revision: 1,
      removedAt: null,
    });
  });
}

describe('looking a code up', () => {
  it('findByCode > the poster code, typed in small letters with spaces > the installation; joining is not being there', async () => {
    await seedPerson(server.app, installationId);
    await join(server.client());
    const reply = await server.client().get<CodeView>('/join/k7m%20rqa');
    expect(reply.data).toEqual({ installationId, name: 'Lantern canopy', venue: 'Weir Hall', onSite: 1 });
  });

  it.each([
    ['draft', 'INSTALLATION_NOT_PUBLISHED'],
    ['closed', 'INSTALLATION_CLOSED'],
  ])('findByCode, join > a %s installation > %s, nobody is added', async (status, code) => {
    await setStatus(status);
    expect((await server.client().get(`/join/${CODE}`)).error?.code).toBe(code);
    expect((await join(server.client())).error?.code).toBe(code);
    expect(await people()).toEqual([]);
  });

  it('findByCode > twenty wrong codes from one session > it waits, with the minutes; another phone does not; right ones never count', async () => {
    const guesser = server.client();
    await guesser.get('/session');
    for (let turn = 0; turn < 30; turn += 1) expect((await guesser.get(`/join/${CODE}`)).status).toBe(200);
    for (let turn = 0; turn < 20; turn += 1) {
      const wrong = `ACE${String(turn).padStart(3, '2')}`;
      expect((await guesser.get(`/join/${wrong}`)).error?.code).toBe('JOIN_CODE_UNKNOWN');
    }
    const held = await guesser.get('/join/ACE999');
    expect(held.error).toMatchObject({ code: 'TOO_MANY_FAILURES', details: { retryAfterSeconds: 900 } });
    expect((await join(server.client())).status).toBe(200);
    server.clock.advance(15 * 60_000);
    expect((await guesser.get(`/join/${CODE}`)).status).toBe(200);
  });

  it('findByCode > one old code typed by 21 phones of a hall > that code waits, the right one does not, no phone does', async () => {
    for (let turn = 0; turn < 20; turn += 1) await server.client().get('/join/QQQ222');
    expect((await server.client().get('/join/QQQ222')).status).toBe(429);
    expect((await join(server.client())).status).toBe(200);
  });
});

describe('joining', () => {
  it('joinInstallation > name and age band > one request: session, number, row, log with ids only, no names to be seen', async () => {
    await seedPerson(server.app, installationId, { firstName: 'Lena' });
    const client = server.client();
    const reply = await join(client, { email: 'Bo@Hall.example' });
    const personId = personOf(reply);
    expect(reply.data.principal).toEqual({
      kind: 'person',
      personId,
      installations: [
        {
          installationId,
          name: 'Lantern canopy',
          status: 'published',
          personId,
          duties: ['volunteer'],
          confirmed: false,
        },
      ],
    });
    expect(await people()).toMatchObject([
      { number: 1 },
      {
        id: personId,
        number: 2,
        first_name: 'Bo',
        initial: 'K',
        email: 'bo@hall.example',
        age_band: '18+',
        confirmed_at: null,
      },
    ]);
    const [log] = await rows<{ subject: string }>(
      server,
      `SELECT * FROM day_log WHERE action = 'person.joined'`,
    );
    expect(log).toMatchObject({
      actor: `person:${personId}`,
      for_person_id: personId,
      installation_id: installationId,
    });
    expect(JSON.parse(log?.subject ?? '')).toEqual({ personId });
    const state = (await client.get<Snapshot>(`/installations/${installationId}/live`)).data;
    expect(state.audience).toBe('door');
    expect(state.records.people.map((person) => person.name)).toEqual(['Bo K']);
    expect((await client.get(`/installations/${installationId}/join-code`)).status).toBe(403);
  });

  it('joinInstallation > every field wrong > every problem at once beside its field, in words; nobody is added', async () => {
    const reply = await server.client().post('/join', {
      code: '',
      firstName: ' ',
      initial: '7',
      ageBand: 'old',
      email: 'nothing',
    });
    expect(reply.error?.fields?.map((field) => field.path).sort()).toEqual([
      'ageBand',
      'code',
      'email',
      'firstName',
      'initial',
    ]);
    const minor = await join(server.client(), { ageBand: '13-15' });
    expect(minor.error?.fields).toMatchObject([
      { path: 'adultName', message: 'Which adult is here with you? Their first name and initial.' },
    ]);
    expect(await people()).toEqual([]);
  });

  it('joinInstallation > a wrong code > JOIN_CODE_UNKNOWN, nobody is added', async () => {
    const reply = await join(server.client(), { code: 'ACE234' });
    expect([reply.status, reply.error?.code]).toEqual([404, 'JOIN_CODE_UNKNOWN']);
    expect(await people()).toEqual([]);
  });

  it('joinInstallation > twice from the same phone > the same person; until the desk confirms, what was typed is corrected', async () => {
    const client = server.client();
    const first = personOf(await join(client));
    expect(personOf(await join(client))).toBe(first);
    expect(personOf(await join(client, { firstName: 'Bodo', ageBand: '16-17', adultName: 'Lena M' }))).toBe(
      first,
    );
    expect(await people()).toMatchObject([
      { id: first, first_name: 'Bodo', age_band: '16-17', adult_name: 'Lena M' },
    ]);
    await rows(server, 'UPDATE person SET confirmed_at = 1');
    expect(personOf(await join(client, { firstName: 'Other', ageBand: '18+' }))).toBe(first);
    expect(await people()).toMatchObject([{ first_name: 'Bodo', age_band: '16-17' }]);
    const log = await rows<{ action: string }>(server, 'SELECT action FROM day_log ORDER BY seq');
    expect(log.map((row) => row.action)).toEqual(['person.joined', 'person.corrected']);
  });

  it('joinInstallation > two phones > two people with their own numbers', async () => {
    const one = personOf(await join(server.client()));
    const two = personOf(await join(server.client()));
    expect(one).not.toBe(two);
    expect((await people()).map((row) => row.number)).toEqual([1, 2]);
  });

  it('joinInstallation > somebody signed in to an account > takes part through it, the session stays the account’s', async () => {
    const { client, accountId } = await accountClient(server, 'mara@hall.example');
    const reply = await join(client);
    expect(reply.data.principal).toMatchObject({
      kind: 'account',
      accountId,
      installations: [{ duties: ['volunteer'] }],
    });
    await join(client);
    expect(await people()).toMatchObject([{ account_id: accountId, number: 1 }]);
  });

  it('joinInstallation > the session id before (ASVS 5.0 7.2.4) > replaced', async () => {
    const client = server.client();
    await client.get('/session');
    const before = client.cookie();
    await join(client);
    expect(client.cookie()).not.toBe(before);
    const old = await supertest(server.url).get('/api/session').set('Cookie', before);
    expect((old.body as { data: SessionView }).data.principal).toBeNull();
  });
});

describe('a volunteer’s session', () => {
  /** How long the cookie of a join lives, in hours. */
  const hours = async () => {
    const cookie = String((await join(server.client())).headers['set-cookie']);
    const until = Date.parse(/Expires=([^;]+)/.exec(cookie)?.[1] ?? '');
    return Math.round(((until - Date.now()) / HOUR_MS) * 10) / 10;
  };

  it('volunteerLifeMs > no build day > twelve hours', async () => {
    expect(await hours()).toBe(12);
  });

  it('volunteerLifeMs > the last of two days ends 18:00 in Lisbon (UTC+1 in June) > until six hours later', async () => {
    await addDay('2027-06-12', '22:00');
    await addDay('2027-06-13', '18:00');
    // 13 June 18:00 in Lisbon is 17:00 UTC; six hours later is 23:00 UTC.
    expect(await hours()).toBe((Date.UTC(2027, 5, 13, 23) - TEST_NOW) / HOUR_MS);
  });

  it('volunteerLifeMs > the day ended already > twelve hours from now', async () => {
    await addDay('2027-06-11', '18:00');
    expect(await hours()).toBe(12);
  });

  it('session > used all day, but its life is over > signed out on the server too (ASVS 5.0 7.3.2)', async () => {
    const client = server.client();
    const personId = personOf(await join(client));
    const cookie = client.cookie();
    const session = async () =>
      ((await supertest(server.url).get('/api/session').set('Cookie', cookie)).body as { data: SessionView })
        .data;
    const now = Date.now();
    vi.spyOn(Date, 'now').mockReturnValue(now + 12 * HOUR_MS - 1000);
    expect((await session()).principal).toMatchObject({ personId });
    vi.spyOn(Date, 'now').mockReturnValue(now + 12 * HOUR_MS);
    expect((await session()).principal).toBeNull();
  });
});
