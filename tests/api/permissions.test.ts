import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  ACTIONS,
  denial,
  DUTIES,
  SITE_ROLES,
  type Duty,
  type Rights,
  type SiteRole,
} from '../../shared/accounts';
import { addDisplay, newDisplayToken } from '../../server/modules/installations/displays.service';
import type { AnyRoute } from '../../server/http/route';
import { inScope, seedInstallation, seedPerson, signedInClient } from '../support/fixtures';
import { seedAccount } from '../support/fixtures-accounts';
import { startTestServer, type TestClient, type TestReply, type TestServer } from '../support/test-server';

let server: TestServer;
let installationId: string;
let otherInstallationId: string;

beforeAll(async () => {
  server = await startTestServer({ OUTBOX: '1' });
  ({ installationId } = await seedInstallation(server.app));
  ({ installationId: otherInstallationId } = await seedInstallation(server.app));
});
afterAll(() => server.close());

const NOBODY_IN_PARTICULAR: Rights = { siteRole: null, duties: [], confirmed: false, display: false };

/** Somebody who asks: how they sign in, and what they are in the installation and on the site by what was seeded. */
interface Asker {
  name: string;
  /** A new browser of theirs; null when nobody is signed in. */
  client(): Promise<TestClient>;
  signedIn: boolean;
  here: Rights | null;
  site: Rights;
}

const counter = { n: 0 };
const account = async (siteRole: SiteRole): Promise<string> => {
  counter.n += 1;
  return seedAccount(server, `asker${counter.n}@hall.example`, siteRole);
};

/** An asker whose principal is seeded once. */
function asker(
  name: string,
  seed: () => Promise<string>,
  rights: { here: Partial<Rights> | null; site?: Partial<Rights> },
): Asker {
  let key: Promise<string> | undefined;
  return {
    name,
    signedIn: true,
    client: async () => signedInClient(server, await (key ??= seed())),
    here: rights.here && { ...NOBODY_IN_PARTICULAR, ...rights.here },
    site: { ...NOBODY_IN_PARTICULAR, ...rights.site },
  };
}

const person = (duty: Duty, confirmed: boolean) =>
  asker(
    `${duty}, ${confirmed ? 'confirmed' : 'not confirmed'}`,
    () => seedPerson(server.app, installationId, { duties: [duty], confirmed }),
    { here: { duties: [duty], confirmed } },
  );

const ASKERS: Asker[] = [
  {
    name: 'nobody',
    client: () => Promise.resolve(server.client()),
    signedIn: false,
    here: null,
    site: NOBODY_IN_PARTICULAR,
  },
  ...SITE_ROLES.map((siteRole) =>
    asker(`site ${siteRole} without a place here`, async () => `account:${await account(siteRole)}`, {
      // An administrator sees every installation, the others only their own.
      here: siteRole === 'admin' ? { siteRole } : null,
      site: { siteRole },
    }),
  ),
  ...DUTIES.flatMap((duty) => [person(duty, true), person(duty, false)]),
  asker(
    'site member who is organiser here',
    async () => {
      const accountId = await account('member');
      await seedPerson(server.app, installationId, { accountId, duties: ['organiser'] });
      return `account:${accountId}`;
    },
    { here: { siteRole: 'member', duties: ['organiser'], confirmed: true }, site: { siteRole: 'member' } },
  ),
  asker('volunteer who has left', () => seedPerson(server.app, installationId, { leftAt: 1 }), {
    here: { duties: ['volunteer'], confirmed: false },
  }),
  asker(
    'organiser of another installation',
    () => seedPerson(server.app, otherInstallationId, { duties: ['organiser', 'safety lead'] }),
    { here: null },
  ),
  asker('projector of this installation', () => display(installationId), {
    here: { display: true },
    site: { display: true },
  }),
  asker('projector of another installation', () => display(otherInstallationId), {
    here: null,
    site: { display: true },
  }),
];

async function display(id: string): Promise<string> {
  const view = await inScope(server.app, id, (scope) => addDisplay(scope, id, 'wall', newDisplayToken()));
  return `display:${view.id}`;
}

const isBelow = (route: AnyRoute) => route.path.includes(':installationId');
const address = (route: AnyRoute, id = installationId) =>
  route.path.replace(':installationId', id).replace(/:\w+/g, 'no-such-id');

/** Ask without an idempotency key, so that a route that lets the asker in still changes nothing. */
const ask = (client: TestClient, route: AnyRoute, id?: string): Promise<TestReply<unknown>> =>
  route.method === 'get' ? client.get(address(route, id)) : client[route.method](address(route, id), {}, '');

/** What the table says an asker gets. */
function expected(who: Asker, route: AnyRoute): string {
  const rights = isBelow(route) ? who.here : who.signedIn ? who.site : null;
  const why = denial(rights, route.action);
  if (why === null) return 'let in';
  if (!who.signedIn) return '401 SIGN_IN_NEEDED';
  if (rights === null) return '404 NOT_FOUND';
  return why === 'confirm' ? '409 PERSON_NOT_CONFIRMED' : '403 NOT_ALLOWED';
}

/** What an asker got; a refusal of the rules behind the door counts as let in. */
function got(reply: TestReply<unknown>, route: AnyRoute, wanted: string): string {
  const code = reply.error?.code ?? '';
  const outside = ['SIGN_IN_NEEDED', 'PERSON_NOT_CONFIRMED'].includes(code);
  const turnedAway = code === 'NOT_ALLOWED' && reply.error?.details?.action === route.action;
  if (outside || turnedAway) return `${reply.status} ${code}`;
  // An unknown id looks the same from inside: only where the route has no other id is a 404 the door's own.
  const anyId = address(route).includes('no-such-id');
  if (code === 'NOT_FOUND' && !(anyId && wanted === 'let in')) return `${reply.status} ${code}`;
  return 'let in';
}

describe('routes', () => {
  it('routes > their actions > every one is in the table, every action of the table has a route', () => {
    const used = new Set(server.app.routes.map((route) => route.action));
    expect([...used].filter((action) => !ACTIONS.includes(action))).toEqual([]);
    expect(ACTIONS.filter((action) => !used.has(action))).toEqual([]);
  });

  it('routes > those that change something > none goes by an action for reading', () => {
    const reading = /\.(read|read-all|read-code|list|look-up-code)$/;
    const wrong = server.app.routes.filter((route) => route.method !== 'get' && reading.test(route.action));
    expect(wrong.map((route) => `${route.method} ${route.path}`)).toEqual([]);
  });

  it('routes > method and path > none is declared twice', () => {
    const all = server.app.routes.map((route) => `${route.method} ${route.path.replace(/:\w+/g, ':')}`);
    expect(all.length).toBe(new Set(all).size);
  });

  it.each(ASKERS.map((who) => [who.name, who] as const))(
    'every route > asked by %s > exactly what the permission table says',
    async (_name, who) => {
      let client = await who.client();
      const wrong: string[] = [];
      for (const route of server.app.routes) {
        const wanted = expected(who, route);
        const answer = got(await ask(client, route), route, wanted);
        if (answer !== wanted)
          wrong.push(`${route.method} ${route.path}: ${answer}, the table says ${wanted}`);
        // Sign-out is no keyed change: it really ends the session.
        if (route.path === '/session' && route.method === 'delete') client = await who.client();
      }
      expect(wrong).toEqual([]);
    },
  );
});

describe('what an outsider can find out', () => {
  const same = (reply: TestReply<unknown>) => ({
    status: reply.status,
    error: { ...reply.error, requestId: '' },
  });

  it('unknown route, unknown installation, somebody else’s installation > to whoever is not in it > the same status and body', async () => {
    const outsiders = ASKERS.filter((who) => who.signedIn && who.here === null);
    expect(outsiders.length).toBeGreaterThanOrEqual(4);
    for (const who of outsiders) {
      const client = await who.client();
      const unknownRoute = same(await client.get('/no/such/address'));
      expect(unknownRoute).toMatchObject({ status: 404, error: { code: 'NOT_FOUND' } });
      for (const route of server.app.routes.filter((one) => isBelow(one) && one.method === 'get')) {
        expect(same(await ask(client, route, 'no-such-installation'))).toEqual(unknownRoute);
        expect(same(await ask(client, route))).toEqual(unknownRoute);
      }
    }
  });

  it('unknown route, unknown installation, a real one > to somebody who is not signed in > the same status and body', async () => {
    const client = server.client();
    const unknownRoute = same(await client.get('/no/such/address'));
    expect(unknownRoute).toMatchObject({ status: 401, error: { code: 'SIGN_IN_NEEDED' } });
    expect(same(await client.get('/installations/no-such-installation'))).toEqual(unknownRoute);
    expect(same(await client.get(`/installations/${installationId}`))).toEqual(unknownRoute);
  });

  it('unknown installation > to an administrator, who could see every one > 404', async () => {
    const client = await signedInClient(server, `account:${await account('admin')}`);
    expect((await client.get('/installations/no-such-installation')).status).toBe(404);
    expect((await client.get(`/installations/${installationId}`)).status).toBe(200);
  });

  it('unknown id below an installation > to those inside > 404 with the same body as an unknown route', async () => {
    const client = await signedInClient(
      server,
      await seedPerson(server.app, installationId, { duties: ['organiser'] }),
    );
    const unknownRoute = same(await client.get('/no/such/address'));
    const paths = [
      'people/no-such-id',
      'stations/no-such-id',
      'build-days/no-such-id',
      'displays/no-such-id',
    ];
    for (const path of paths) {
      expect(same(await client.delete(`/installations/${installationId}/${path}`))).toEqual(unknownRoute);
    }
  });
});
