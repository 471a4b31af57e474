import { copyFileSync, existsSync, mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import path from 'node:path';
import supertest from 'supertest';
import { manualClock } from '../../shared/kernel/clock';
import { newId } from '../../shared/kernel/ids';
import { createApp, type App } from '../../server/app';
import { readConfig } from '../../server/config';
import { openDataSources } from '../../server/db/data-sources';

const CACHE = path.resolve('node_modules/.cache/strutbee-tests');
/** 12 June 2027, 10:00 in Lisbon: the test installation's build day has begun. */
export const TEST_NOW = Date.UTC(2027, 5, 12, 9, 0);

type CookieJar = ReturnType<typeof supertest.agent>['jar'];

let base: Promise<string> | undefined;

/** A migrated, empty database, made once for each test file and copied for each server. */
async function migratedBase(): Promise<string> {
  mkdirSync(CACHE, { recursive: true });
  const file = path.join(mkdtempSync(path.join(CACHE, 'base-')), 'base.sqlite');
  const data = await openDataSources(file);
  // Everything into the one file, so that copying it copies all.
  await data.writer.query('PRAGMA wal_checkpoint(TRUNCATE)');
  await data.close();
  return file;
}

export interface TestServer {
  app: App;
  clock: ReturnType<typeof manualClock>;
  url: string;
  databaseFile: string;
  /** A browser of its own: cookies, CSRF token, a new idempotency key for every change. */
  client(): TestClient;
  close(): Promise<void>;
}

/**
 * The real server on a file database and a free port of the loopback interface.
 * @param env more configuration, such as `OUTBOX: '1'`
 */
export async function startTestServer(env: Record<string, string> = {}): Promise<TestServer> {
  base ??= migratedBase();
  const folder = mkdtempSync(path.join(CACHE, 'run-'));
  const databaseFile = path.join(folder, 'test.sqlite');
  copyFileSync(await base, databaseFile);
  const clock = manualClock(TEST_NOW);
  const config = readConfig({
    NODE_ENV: 'test',
    HOST: '127.0.0.1',
    PORT: '0',
    DATABASE_FILE: databaseFile,
    LOG_LEVEL: 'silent',
    ...env,
  });
  const app = await createApp(config, clock);
  await new Promise<void>((resolve) => app.http.listen(0, '127.0.0.1', resolve));
  const address = app.http.address();
  if (address === null || typeof address === 'string') throw new Error('the test server has no port');
  const url = `http://127.0.0.1:${address.port}`;
  return {
    app,
    clock,
    url,
    databaseFile,
    client: () => new TestClient(url),
    close: async () => {
      await app.close();
      if (existsSync(folder)) rmSync(folder, { recursive: true, force: true });
    },
  };
}

interface ReplyBody {
  data?: unknown;
  meta?: unknown;
  error?: {
    code: string;
    message: string;
    fields?: { path: string; message: string }[];
    details?: Record<string, unknown>;
  };
}
export interface TestReply<T> {
  status: number;
  data: T;
  error: NonNullable<ReplyBody['error']> | undefined;
  headers: Record<string, string>;
  text: string;
}

/** One browser's worth of cookies, talking to the API as the client does. */
export class TestClient {
  private readonly agent;
  private token: string | null = null;

  constructor(readonly url: string) {
    this.agent = supertest.agent(url);
  }

  /** The cookie header, for a socket of the same browser. */
  cookie(): string {
    const access: unknown = { domain: '127.0.0.1', path: '/', script: false, secure: false };
    return this.agent.jar.getCookies(access as Parameters<CookieJar['getCookies']>[0]).toValueString();
  }

  /** Take over a session that was made elsewhere, as `signedInClient` of the fixtures does. */
  adopt(cookie: string, csrfToken: string): this {
    this.agent.jar.setCookie(cookie, '127.0.0.1', '/');
    this.token = csrfToken;
    return this;
  }

  async get<T = unknown>(route: string): Promise<TestReply<T>> {
    return toReply<T>(await this.agent.get(`/api${route}`));
  }

  post<T = unknown>(route: string, body: object = {}, key = newId()): Promise<TestReply<T>> {
    return this.send<T>('post', route, body, key);
  }
  put<T = unknown>(route: string, body: object = {}, key = newId()): Promise<TestReply<T>> {
    return this.send<T>('put', route, body, key);
  }
  patch<T = unknown>(route: string, body: object = {}, key = newId()): Promise<TestReply<T>> {
    return this.send<T>('patch', route, body, key);
  }
  delete<T = unknown>(route: string, body: object = {}, key = newId()): Promise<TestReply<T>> {
    return this.send<T>('delete', route, body, key);
  }

  /** Forget the CSRF token, as a page does that was loaded before a sign-in. */
  forgetToken(): void {
    this.token = null;
  }

  private async send<T>(
    method: 'post' | 'put' | 'patch' | 'delete',
    route: string,
    body: object,
    key: string,
  ): Promise<TestReply<T>> {
    this.token ??= (await this.get<{ csrfToken: string }>('/session')).data.csrfToken;
    const reply = await this.agent[method](`/api${route}`)
      .set('x-csrf-token', this.token)
      .set('idempotency-key', key)
      .send(body);
    // A sign-in or sign-out starts a fresh session with a token of its own.
    if (reply.headers['set-cookie']) this.token = null;
    return toReply<T>(reply);
  }
}

function toReply<T>(reply: supertest.Response): TestReply<T> {
  const body = (reply.body ?? {}) as ReplyBody;
  return {
    status: reply.status,
    data: body.data as T,
    error: body.error,
    headers: reply.headers,
    text: reply.text,
  };
}
