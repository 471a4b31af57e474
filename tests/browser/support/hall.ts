import type { Browser, Page } from 'playwright-core';
import { buildShape } from '../../../shared/frames';
import { newId } from '../../../shared/kernel/ids';
import { Frame } from '../../../server/modules/frames/frame.entity';
import type { StepRow } from '../../../server/modules/travellers/traveller.entity';
import {
  inScope,
  seedInstallation,
  seedPerson,
  signedInClient,
  type PersonWish,
} from '../../support/fixtures';
import { signsOff, type Hall as SafetyHall } from '../../support/fixtures-safety';
import { seedTraveller } from '../../support/fixtures-steps';
import { startTestServer, type TestServer } from '../../support/test-server';
import { openPage, type Size } from './browser';

/** A hall with real pages: the built client, the real server, a published installation. */
export interface BrowserHall {
  server: TestServer;
  installationId: string;
  glueId: string;
  joinCode: string;
  /** Where the browser finds it; another name than localhost when asked for. */
  url: string;
  person(wish?: PersonWish): Promise<string>;
  /** A person whose hot-glue briefing is signed and countersigned. */
  briefed(wish?: PersonWish): Promise<string>;
  /** A piece with a traveller of one step after the other. */
  piece(code: string, steps: readonly Partial<StepRow>[]): Promise<{ pieceId: string; stepIds: string[] }>;
  /** A page signed in as that person, at a path of the installation. */
  pageOf(
    browser: Browser,
    personId: string,
    path: string,
    size?: Size,
  ): Promise<{ page: Page; errors: string[] }>;
  close(): Promise<void>;
}

/**
 * Open a hall.
 * @param host name under which the browser asks for it
 */
export async function openBrowserHall(
  host = 'localhost',
  env: Record<string, string> = {},
): Promise<BrowserHall> {
  const server = await startTestServer({ CLIENT_DIR: 'dist/client', OUTBOX: '1', ...env });
  const { app } = server;
  const { installationId, glueId } = await seedInstallation(app);
  const url = server.url.replace('127.0.0.1', host);
  const frameId = newId();
  await inScope(app, installationId, async (scope) => {
    await scope.manager.insert(Frame, {
      id: frameId,
      installationId,
      name: 'Octahedron',
      source: { kind: 'shape', shape: { kind: 'octahedron', edgeMm: 300 } },
      geometry: buildShape({ kind: 'octahedron', edgeMm: 300 }),
      revision: await scope.revision(),
      removedAt: null,
    });
    await scope.manager.query(
      `INSERT INTO build_day (id, installation_id, date, doors, start, clear_up, end, breaks, revision)
       VALUES (?, ?, '2027-06-12', '09:00', '09:30', '17:00', '18:00', '[{"from":"12:30","to":"13:15","label":"lunch"}]', ?)`,
      [newId(), installationId, await scope.revision()],
    );
  });
  const leadId = await seedPerson(app, installationId, {
    firstName: 'Lena',
    initial: 'W',
    duties: ['safety lead', 'volunteer'],
  });
  const lead = await signedInClient(server, leadId);
  const [row] = await app.deps.data.writer.query<{ join_code: string }[]>(
    'SELECT join_code FROM installation WHERE id = ?',
    [installationId],
  );
  const person = (wish: PersonWish = {}) => seedPerson(app, installationId, wish);
  return {
    server,
    installationId,
    glueId,
    joinCode: row?.join_code ?? '',
    url,
    person,
    briefed: async (wish) => {
      const id = await person(wish);
      const hall = { server, base: `/installations/${installationId}`, installationId } as SafetyHall;
      await signsOff(hall, await signedInClient(server, id), lead);
      return id;
    },
    piece: (code, steps) =>
      seedTraveller(
        app,
        installationId,
        glueId,
        steps.map((step) => ({ name: 'lay out', ...step })),
        code,
        { frameId, name: `Piece ${code}` },
      ),
    pageOf: async (browser, personId, path, size = 'phone') => {
      const client = await signedInClient(server, personId);
      const { context, page, errors } = await openPage(browser, size);
      const [name = '', value = ''] = client.cookie().split('=');
      await context.addCookies([{ name, value, domain: host, path: '/' }]);
      await page.goto(`${url}/i/${installationId}/${path}`);
      return { page, errors };
    },
    close: () => server.close(),
  };
}
