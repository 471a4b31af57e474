import type { SiteRole } from '../../../shared/accounts';
import type { AccountView, Invite } from '../../../shared/contracts/accounts';
import { newId } from '../../../shared/kernel/ids';
import { SERVER_ACTOR, type WriteScope } from '../../db/write';
import type { Deps } from '../../deps';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { Account } from './account.entity';
import { accountByEmail, accountById, countAdmins, loadAccount, toAccountView } from './accounts.repository';
import { inviteLetter, passwordChangedLetter, resetLetter } from './letters';
import { issueLink, passwordProblems } from './links.service';
import { hashPassword, passwordMatches } from './passwords';

interface Inviter {
  name: string;
  siteRole: SiteRole;
}

/**
 * Invite somebody by mail; asked again for somebody who has not accepted, a new letter goes out and the old link ends.
 * @throws AppError NOT_ALLOWED when a site organiser invites anything but a member, EMAIL_TAKEN for an account in use
 */
export async function inviteAccount(
  scope: WriteScope,
  publicUrl: string,
  inviter: Inviter,
  input: Invite,
): Promise<AccountView> {
  const { manager } = scope;
  const known = await loadAccount(manager, { email: input.email });
  const isAdmin = inviter.siteRole === 'admin';
  if (!isAdmin && (input.siteRole !== 'member' || (known !== null && known.site_role !== 'member'))) {
    throw new AppError(
      'NOT_ALLOWED',
      'An organiser invites members. For another role ask an administrator.',
      {
        details: { who: ['site admin'] },
      },
    );
  }
  if (known && (known.password_hash !== null || known.disabled_at !== null)) {
    throw new AppError('EMAIL_TAKEN', `There is an account with ${input.email} already. Nothing was sent.`, {
      fields: [{ path: 'email', code: 'taken', message: 'There is an account with this address already.' }],
    });
  }
  const id = known?.id ?? newId();
  if (known) {
    await manager.update(Account, { id }, { name: input.name, siteRole: input.siteRole });
  } else {
    await manager.insert(Account, {
      id,
      email: input.email,
      name: input.name,
      passwordHash: null,
      siteRole: input.siteRole,
      createdAt: scope.now,
      disabledAt: null,
    });
  }
  const url = await issueLink(scope, publicUrl, 'invite', id);
  await scope.mail(inviteLetter(input.email, input.name, inviter.name, url));
  await scope.log({ action: 'account.invited', subject: { accountId: id, siteRole: input.siteRole } });
  return {
    id,
    email: input.email,
    name: input.name,
    siteRole: input.siteRole,
    pending: true,
    disabled: false,
  };
}

const lastAdmin = () =>
  new AppError(
    'LAST_ADMIN',
    'This is the only administrator who can sign in. Make somebody else an administrator first.',
  );

async function guardLastAdmin(
  scope: WriteScope,
  account: { site_role: SiteRole; password_hash: string | null; disabled_at: number | null },
) {
  const counts =
    account.site_role === 'admin' && account.password_hash !== null && account.disabled_at === null;
  if (counts && (await countAdmins(scope.manager)) <= 1) throw lastAdmin();
}

/**
 * Change an account's role on the site.
 * @throws AppError LAST_ADMIN
 */
export async function changeRole(
  scope: WriteScope,
  accountId: string,
  siteRole: SiteRole,
): Promise<AccountView> {
  const account = await loadAccount(scope.manager, { id: accountId });
  if (!account) throw notFound();
  if (siteRole !== 'admin') await guardLastAdmin(scope, account);
  await scope.manager.update(Account, { id: accountId }, { siteRole });
  await scope.log({
    action: 'account.role-changed',
    subject: { accountId, from: account.site_role, to: siteRole },
  });
  return toAccountView({ ...account, site_role: siteRole });
}

/**
 * Disable an account or let it in again. The caller ends its sessions after the commit.
 * @throws AppError LAST_ADMIN
 */
export async function setDisabled(
  scope: WriteScope,
  accountId: string,
  disabled: boolean,
): Promise<AccountView> {
  const account = await loadAccount(scope.manager, { id: accountId });
  if (!account) throw notFound();
  if (disabled) await guardLastAdmin(scope, account);
  const disabledAt = disabled ? scope.now : null;
  await scope.manager.update(Account, { id: accountId }, { disabledAt });
  if (disabled)
    await scope.manager.query('DELETE FROM one_time_link WHERE account_id = ? AND used_at IS NULL', [
      accountId,
    ]);
  await scope.log({ action: disabled ? 'account.disabled' : 'account.enabled', subject: { accountId } });
  return toAccountView({ ...account, disabled_at: disabledAt });
}

/**
 * Send a link for a new password (or the invitation again, where it was never accepted). Says nothing of whether the
 * account exists: the caller has answered already.
 */
export async function sendReset(deps: Deps, email: string): Promise<void> {
  const account = accountByEmail(deps.data.readHandle, email);
  if (!account || account.disabled_at !== null) return;
  await deps.writer.runPlain({ maker: SERVER_ACTOR, installationId: null }, async (scope) => {
    const pending = account.password_hash === null;
    const url = await issueLink(scope, deps.publicUrl(), pending ? 'invite' : 'reset', account.id);
    await scope.mail(
      pending
        ? inviteLetter(email, account.name, 'The organisers', url)
        : resetLetter(email, account.name, url),
    );
    await scope.log({ action: 'account.reset-asked', subject: { accountId: account.id } });
  });
}

/**
 * Check a new password against the old one and the rules, outside any unit of work.
 * @returns the new hash
 * @throws AppError VALIDATION
 */
export async function prepareNewPassword(
  deps: Deps,
  accountId: string,
  input: { current: string; next: string },
): Promise<string> {
  const account = accountById(deps.data.readHandle, accountId);
  if (!account) throw notFound();
  if (!(await passwordMatches(account.password_hash, input.current)))
    throw fieldError('current', 'wrong', 'This is not your password now. Nothing was changed.');
  const [problem] = passwordProblems(deps, 'next', input.next, account);
  if (problem) throw fieldError(problem.path, problem.code, problem.message);
  return hashPassword(input.next);
}

/** Keep a new password and tell its owner by mail. The caller ends the other sessions after the commit. */
export async function changePassword(
  scope: WriteScope,
  accountId: string,
  passwordHash: string,
): Promise<null> {
  const account = await loadAccount(scope.manager, { id: accountId });
  if (!account) throw notFound();
  await scope.manager.update(Account, { id: accountId }, { passwordHash });
  await scope.manager.query('DELETE FROM one_time_link WHERE account_id = ? AND used_at IS NULL', [
    accountId,
  ]);
  await scope.mail(passwordChangedLetter(account.email, account.name));
  await scope.log({ action: 'account.password-changed', subject: { accountId } });
  return null;
}

/**
 * An account with a password, for seeds.
 * @param passwordHash from `hashPassword`, made outside the unit of work
 */
export async function createAccount(
  scope: WriteScope,
  input: { email: string; name: string; siteRole: SiteRole; passwordHash: string },
): Promise<string> {
  const id = newId();
  await scope.manager.insert(Account, { id, ...input, createdAt: scope.now, disabledAt: null });
  await scope.log({ action: 'account.accepted', subject: { accountId: id, kind: 'seed' } });
  return id;
}
