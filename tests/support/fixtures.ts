import { createHmac } from 'node:crypto';
import type { SessionData } from 'express-session';
import type { App } from '../../server/app';
import { sessionSecret } from '../../server/db/session-secret';
import type { WriteScope } from '../../server/db/write';
import { Installation, Station } from '../../server/modules/installations/installation.entity';
import { Person } from '../../server/modules/people/person.entity';
import { installShippedBriefings } from '../../server/modules/safety';
import type { Duty } from '../../shared/accounts';
import { newId, newSayableCode } from '../../shared/kernel/ids';
import type { AgeBand } from '../../shared/safety';
import { TEST_NOW, type TestClient, type TestServer } from './test-server';

const maker = { actor: 'server', personId: null };

/** Run something in a use case of the server itself, as a seed does. */
export const inScope = <T>(
  app: App,
  installationId: string,
  work: (scope: WriteScope) => Promise<T>,
): Promise<T> => app.deps.writer.runPlain({ maker, installationId }, work);

/**
 * An installation with two stations and the shipped briefings, published unless asked otherwise.
 * @returns its id and its stations' ids
 */
export async function seedInstallation(
  app: App,
  changes: Partial<Installation> = {},
): Promise<{ installationId: string; glueId: string; paintId: string }> {
  const installationId = changes.id ?? newId();
  const station = (name: string, kind: string, position: number) => ({
    id: newId(),
    installationId,
    name,
    kind,
    places: 6,
    position,
    revision: 1,
    removedAt: null,
  });
  const glue = station('Glue bench', 'glue', 1);
  const paint = station('Paint bay', 'paint', 2);
  await inScope(app, installationId, async ({ manager }) => {
    await manager.insert(Installation, {
      id: installationId,
      name: 'Lantern canopy',
      venue: 'Weir Hall',
      timeZone: 'Europe/Lisbon',
      unit: 'mm',
      hallLimit: 80,
      status: 'published',
      joinCode: newSayableCode(6),
      joinCodeAt: TEST_NOW,
      settings: { maxInHand: 2, ageChanges: [] },
      createdAt: TEST_NOW,
      revision: 1,
      ownRevision: 1,
      ...changes,
    });
    await manager.insert(Station, [glue, paint]);
  });
  await inScope(app, installationId, (scope) => installShippedBriefings(scope, installationId));
  return { installationId, glueId: glue.id, paintId: paint.id };
}

/** What `seedPerson` takes; everything else of the row may be given too. */
export interface PersonWish extends Partial<Person> {
  duties?: Duty[];
  /** Confirmed by the desk and on site; yes unless asked otherwise. */
  confirmed?: boolean;
  ageBand?: AgeBand;
}

/**
 * Somebody in an installation, confirmed and of age unless asked otherwise.
 * @returns the person's id
 */
export async function seedPerson(app: App, installationId: string, wish: PersonWish = {}): Promise<string> {
  const { confirmed = true, ...columns } = wish;
  const id = wish.id ?? newId();
  await inScope(app, installationId, async (scope) => {
    const revision = await scope.revision();
    const [last] = await scope.manager.query<{ number: number | null }[]>(
      'SELECT max(number) AS number FROM person WHERE installation_id = ?',
      [installationId],
    );
    await scope.manager.insert(Person, {
      id,
      installationId,
      accountId: null,
      number: (last?.number ?? 0) + 1,
      firstName: 'Ines',
      initial: 'K',
      email: null,
      ageBand: '18+',
      adultName: null,
      duties: ['volunteer'],
      joinedAt: scope.now,
      confirmedAt: confirmed ? scope.now : null,
      confirmedBy: null,
      leftAt: null,
      removedAt: null,
      erasedAt: null,
      revision,
      ...columns,
    });
    scope.changed('people', id);
  });
  return id;
}

/**
 * A browser of somebody who is signed in: the session goes through the server's own store, as after joining.
 * @param principal a person's id, or a whole key such as `account:ID` or `display:ID`
 */
export async function signedInClient(server: TestServer, principal: string): Promise<TestClient> {
  const { sessions, config } = server.app.deps;
  const sid = newId();
  const csrfToken = newId();
  const data = {
    cookie: { originalMaxAge: 24 * 3600_000, httpOnly: true, sameSite: 'lax', path: '/' },
    passport: { user: principal.includes(':') ? principal : `person:${principal}` },
    signedInAt: Date.now(),
    csrfToken,
  } as unknown as SessionData;
  await new Promise<void>((resolve, reject) => {
    sessions.set(sid, data, (error?: unknown) =>
      error ? reject(new Error('the session was not kept', { cause: error })) : resolve(),
    );
  });
  const secret = config.SESSION_SECRET ?? sessionSecret(config.DATABASE_FILE);
  // The cookie as express-session signs it.
  const signature = createHmac('sha256', secret).update(sid).digest('base64').replace(/=+$/, '');
  return server.client().adopt(`strutbee=${encodeURIComponent(`s:${sid}.${signature}`)}`, csrfToken);
}
