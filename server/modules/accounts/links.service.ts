import { createHash, randomBytes } from 'node:crypto';
import type { AcceptLink, LinkView } from '../../../shared/contracts/accounts';
import type { FieldProblem } from '../../../shared/contracts/errors';
import { newId } from '../../../shared/kernel/ids';
import { SERVER_ACTOR, type WriteScope } from '../../db/write';
import type { Deps } from '../../deps';
import { AppError } from '../../http/app-error';
import { Account, OneTimeLink } from './account.entity';
import {
  accountByEmail,
  accountById,
  countAdmins,
  hasAdmin,
  installationTitles,
  usableLink,
  type LinkRow,
} from './accounts.repository';
import { GUESSABLE_WORDS, isGuessable, wordsOf } from './password-rules';
import { hashPassword } from './passwords';

const HOUR_MS = 3600_000;
/** How long each kind of link works. */
const LIFE_MS: Record<LinkView['kind'], number> = {
  'first-admin': 24 * HOUR_MS,
  invite: 72 * HOUR_MS,
  reset: HOUR_MS,
};

const hashOf = (secret: string) => createHash('sha256').update(secret).digest('base64url');

/** Used, expired, replaced or never made: all look the same. */
const spent = () =>
  new AppError(
    'LINK_SPENT',
    'This link does not work: it was used, it is too old, or a newer one was sent. Ask for a new one.',
  );

/**
 * Make a link; earlier ones of the same kind for the same account stop working. Only the secret's hash is kept, and the
 * secret stands in the address's fragment, which no server log ever sees.
 * @returns the whole address
 */
export async function issueLink(
  scope: WriteScope,
  publicUrl: string,
  kind: LinkView['kind'],
  accountId: string | null,
): Promise<string> {
  const secret = randomBytes(32).toString('base64url');
  await scope.manager.query(
    'DELETE FROM one_time_link WHERE kind = ? AND account_id IS ? AND used_at IS NULL',
    [kind, accountId],
  );
  await scope.manager.insert(OneTimeLink, {
    id: newId(),
    kind,
    secretHash: hashOf(secret),
    accountId,
    createdAt: scope.now,
    expiresAt: scope.now + LIFE_MS[kind],
    usedAt: null,
  });
  return `${publicUrl}/link#${secret}`;
}

/**
 * The one-time link that makes the first administrator, made anew at each start while there is none.
 * @returns the address for the console, or null when an administrator can sign in already
 */
export async function ensureFirstAdminLink(deps: Deps): Promise<string | null> {
  if (hasAdmin(deps.data.readHandle)) return null;
  return deps.writer.runPlain({ maker: SERVER_ACTOR, installationId: null }, (scope) =>
    issueLink(scope, deps.publicUrl(), 'first-admin', null),
  );
}

function findLink(deps: Deps, secret: string): LinkRow {
  const db = deps.data.readHandle;
  const link = usableLink(db, hashOf(secret), deps.clock.now());
  if (!link || (link.kind === 'first-admin' && hasAdmin(db))) throw spent();
  return link;
}

/**
 * What a link is good for.
 * @throws AppError LINK_SPENT
 */
export function lookUpLink(deps: Deps, secret: string): LinkView {
  const link = findLink(deps, secret);
  const account = link.account_id === null ? undefined : accountById(deps.data.readHandle, link.account_id);
  return { kind: link.kind, email: account?.email ?? null, name: account?.name ?? null };
}

/** The words nobody's new password may be made of, and whether this one is. */
export function passwordProblems(
  deps: Deps,
  path: string,
  password: string,
  own: { email: string; name: string },
): FieldProblem[] {
  const words = wordsOf(own.email, own.name, ...installationTitles(deps.data.readHandle));
  return isGuessable(password, words) ? [{ path, code: 'guessable', message: GUESSABLE_WORDS }] : [];
}

function problemsOf(
  deps: Deps,
  link: LinkRow,
  input: AcceptLink,
  email: string,
  name: string,
): FieldProblem[] {
  const fields: FieldProblem[] = [];
  if (link.kind === 'first-admin') {
    if (!name) fields.push({ path: 'name', code: 'required', message: 'Please fill this in.' });
    if (!email) fields.push({ path: 'email', code: 'required', message: 'Please fill this in.' });
    else if (accountByEmail(deps.data.readHandle, email))
      fields.push({
        path: 'email',
        code: 'taken',
        message: 'There is an account with this address already.',
      });
  }
  return [...fields, ...passwordProblems(deps, 'password', input.password, { email, name })];
}

/**
 * Use a link: it sets the password, and for the first administrator makes the account. It works once, and every other
 * link and session of the account ends.
 * @returns the account's id, for signing in
 * @throws AppError LINK_SPENT, or VALIDATION with every field that is wrong
 */
export async function acceptLink(deps: Deps, input: AcceptLink): Promise<string> {
  const link = findLink(deps, input.secret);
  const account = link.account_id === null ? undefined : accountById(deps.data.readHandle, link.account_id);
  const email = account?.email ?? input.email ?? '';
  const name = (link.kind === 'reset' ? account?.name : (input.name ?? account?.name)) ?? '';
  const fields = problemsOf(deps, link, input, email, name);
  if (fields.length > 0)
    throw new AppError(
      'VALIDATION',
      fields.length === 1 ? 'One field needs another look.' : `${fields.length} fields need another look.`,
      { fields },
    );
  // Hashing takes its time and waits for no database, so it stands before the unit of work.
  const passwordHash = await hashPassword(input.password);
  const accountId = link.account_id ?? newId();
  await deps.writer.runPlain(
    { maker: { actor: `account:${accountId}`, personId: null }, installationId: null },
    async (scope) => {
      const used = await scope.manager.query<{ id: string }[]>(
        'UPDATE one_time_link SET used_at = ? WHERE id = ? AND used_at IS NULL AND expires_at > ? RETURNING id',
        [scope.now, link.id, scope.now],
      );
      if (used.length !== 1) throw spent();
      if (link.kind === 'first-admin') {
        if ((await countAdmins(scope.manager)) > 0) throw spent();
        await scope.manager.insert(Account, {
          id: accountId,
          email,
          name,
          passwordHash,
          siteRole: 'admin',
          createdAt: scope.now,
          disabledAt: null,
        });
      } else {
        const set = await scope.manager.query<{ id: string }[]>(
          'UPDATE account SET password_hash = ?, name = ? WHERE id = ? AND disabled_at IS NULL RETURNING id',
          [passwordHash, name, accountId],
        );
        if (set.length !== 1) throw spent();
        await scope.manager.query('DELETE FROM one_time_link WHERE account_id = ? AND used_at IS NULL', [
          accountId,
        ]);
      }
      await scope.log({
        action: link.kind === 'reset' ? 'account.password-reset' : 'account.accepted',
        subject: { accountId, kind: link.kind },
      });
    },
  );
  await deps.endSessions(`account:${accountId}`);
  return accountId;
}
