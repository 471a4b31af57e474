import { vi } from 'vitest';
import type { SiteRole } from '../../shared/accounts';
import type { OutboxLetter } from '../../shared/contracts/accounts';
import { createAccount, hashPassword } from '../../server/modules/accounts';
import { signedInClient } from './fixtures';
import type { TestClient, TestServer } from './test-server';

export const PASSWORD = 'seven herons over the weir';
let passwordHash: Promise<string> | undefined;

/** An account that was accepted, with `PASSWORD`. @returns its id */
export async function seedAccount(
  server: TestServer,
  email: string,
  siteRole: SiteRole = 'member',
  name = 'Mara Quill',
): Promise<string> {
  passwordHash ??= hashPassword(PASSWORD);
  const hash = await passwordHash;
  return server.app.deps.writer.runPlain(
    { maker: { actor: 'server', personId: null }, installationId: null },
    (scope) => createAccount(scope, { email, name, siteRole, passwordHash: hash }),
  );
}

/** A browser that is signed in to a new account. */
export async function accountClient(
  server: TestServer,
  email: string,
  siteRole: SiteRole = 'member',
): Promise<{ client: TestClient; accountId: string }> {
  const accountId = await seedAccount(server, email, siteRole);
  return { client: await signedInClient(server, `account:${accountId}`), accountId };
}

/** Rows of any query, as stored. */
export const rows = <T>(server: TestServer, sql: string, ...params: unknown[]): Promise<T[]> =>
  server.app.deps.data.writer.query<T[]>(sql, params);

/** Letters in the outbox once there are so many, newest first. */
export const letters = (server: TestServer, count: number): Promise<OutboxLetter[]> =>
  vi.waitFor(
    async () => {
      const found = await rows<OutboxLetter>(
        server,
        'SELECT id, sender AS "from", recipient AS "to", subject, text FROM outbox_letter ORDER BY rowid DESC',
      );
      if (found.length < count) throw new Error(`${found.length} of ${count} letters`);
      return found;
    },
    { timeout: 5000, interval: 20 },
  );

/** The secret in the link of a letter. */
export const secretIn = (text: string): string => {
  const secret = /\/link#([\w-]+)/.exec(text)?.[1];
  if (!secret) throw new Error('the letter has no link');
  return secret;
};
