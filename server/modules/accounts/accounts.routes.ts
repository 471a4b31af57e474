import { z } from 'zod';
import {
  acceptLinkSchema,
  askResetSchema,
  changePasswordSchema,
  changeRoleSchema,
  disableSchema,
  inviteSchema,
  signInSchema,
} from '../../../shared/contracts/accounts';
import type { Deps } from '../../deps';
import { AppError, notFound } from '../../http/app-error';
import { FailureLimit } from '../../http/failure-limit';
import type { Principal } from '../../http/principal';
import { route, type AnyRoute } from '../../http/route';
import { ACCOUNT_LIFE_MS, signIn, signOut, type SessionLayer } from '../../http/session';
import { allAccounts, loadAccount } from './accounts.repository';
import {
  changePassword,
  changeRole,
  inviteAccount,
  prepareNewPassword,
  sendReset,
  setDisabled,
} from './accounts.service';
import { acceptLink, lookUpLink } from './links.service';
import { sessionView } from './session-view';
import { passwordSignIn } from './sign-in';

const lookUpSchema = z.strictObject({ secret: z.string().max(200) });
const nothingSchema = z.strictObject({});

/** Three letters in an hour, so that nobody can fill a stranger's mailbox. */
const RESET_LIMIT = { max: 3, windowMs: 3600_000 };

function accountOf(principal: Principal | null) {
  if (principal?.kind !== 'account')
    throw new Error('The permission table let in somebody without an account.');
  return principal;
}

/** Sign-in, one-time links and the accounts of the site. */
export const accountsRoutes = (deps: Deps, layer: SessionLayer): AnyRoute[] => [
  ...sessionRoutes(deps, layer),
  ...linkRoutes(deps, layer),
  ...siteRoutes(deps),
];

function sessionRoutes(deps: Deps, layer: SessionLayer): AnyRoute[] {
  const askWho = passwordSignIn(deps);
  return [
    route({
      method: 'get',
      path: '/session',
      action: 'session.read',
      handle: ({ req, principal }) => ({ data: sessionView(deps, layer, req, principal) }),
    }),
    route<z.infer<typeof signInSchema>>({
      method: 'post',
      path: '/session',
      action: 'session.sign-in',
      body: signInSchema,
      unkeyed: true,
      handle: async ({ req, res, body }) => {
        const principal = await askWho(req, res, body);
        await signIn(req, principal, ACCOUNT_LIFE_MS);
        return { data: sessionView(deps, layer, req, principal) };
      },
    }),
    route({
      method: 'delete',
      path: '/session',
      action: 'session.sign-out',
      unkeyed: true,
      handle: async ({ req, res }) => {
        const { sessionID } = req;
        await signOut(req);
        deps.endSockets(sessionID);
        res.clearCookie('strutbee', { path: '/' });
        return { data: null };
      },
    }),
    route<z.infer<typeof changePasswordSchema>>({
      method: 'post',
      path: '/account/password',
      action: 'account.change-password',
      body: changePasswordSchema,
      // A kept answer would keep a fast hash of both passwords beside it.
      unkeyed: true,
      handle: changePasswordHandler(deps),
    }),
    route<z.infer<typeof nothingSchema>>({
      method: 'post',
      path: '/account/end-sessions',
      action: 'account.change-password',
      body: nothingSchema,
      handle: async ({ req, principal, write }) => {
        const { accountId } = accountOf(principal);
        const reply = await write(async (scope) => {
          await scope.log({ action: 'account.sessions-ended', subject: { accountId } });
          return null;
        });
        await deps.endSessions(`account:${accountId}`, req.sessionID);
        return reply;
      },
    }),
  ];
}

function changePasswordHandler(deps: Deps) {
  // Guessing the current password on somebody's open screen is guessing a password.
  const limit = new FailureLimit(deps.clock, { max: 10, windowMs: 15 * 60_000 });
  return async ({
    req,
    principal,
    body,
    write,
  }: Parameters<Parameters<typeof route<z.infer<typeof changePasswordSchema>>>[0]['handle']>[0]) => {
    const { accountId } = accountOf(principal);
    const keys = [`account:${accountId}`];
    limit.begin(keys);
    const passwordHash = await prepareNewPassword(deps, accountId, body);
    limit.succeed(keys);
    const reply = await write((scope) => changePassword(scope, accountId, passwordHash));
    await deps.endSessions(`account:${accountId}`, req.sessionID);
    return reply;
  };
}

function linkRoutes(deps: Deps, layer: SessionLayer): AnyRoute[] {
  const resets = new FailureLimit(deps.clock, RESET_LIMIT);
  return [
    route<z.infer<typeof lookUpSchema>>({
      method: 'post',
      path: '/links/look-up',
      action: 'account.accept-link',
      body: lookUpSchema,
      unkeyed: true,
      handle: ({ body }) => ({ data: lookUpLink(deps, body.secret) }),
    }),
    route<z.infer<typeof acceptLinkSchema>>({
      method: 'post',
      path: '/links/accept',
      action: 'account.accept-link',
      body: acceptLinkSchema,
      unkeyed: true,
      handle: async ({ req, body }) => {
        const accountId = await acceptLink(deps, body);
        const principal = deps.principals.find(`account:${accountId}`);
        if (!principal) throw new Error('The account behind an accepted link cannot be found.');
        await signIn(req, principal, ACCOUNT_LIFE_MS);
        return { data: sessionView(deps, layer, req, principal) };
      },
    }),
    route<z.infer<typeof askResetSchema>>({
      method: 'post',
      path: '/reset',
      action: 'account.ask-reset',
      body: askResetSchema,
      unkeyed: true,
      handle: ({ body }) => {
        // Not awaited: the time until the answer tells nobody whether there is such an account (ASVS 5.0 6.3.8).
        void sendWithin(resets, deps, body.email);
        return { data: null };
      },
    }),
  ];
}

async function sendWithin(limit: FailureLimit, deps: Deps, email: string): Promise<void> {
  try {
    limit.begin([email]);
    await sendReset(deps, email);
  } catch (error) {
    if (!(error instanceof AppError)) deps.log.error({ err: error }, 'a reset letter could not be written');
  }
}

const siteRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: '/accounts',
    action: 'account.read-all',
    handle: () => ({ data: allAccounts(deps.data.readHandle) }),
  }),
  route<z.infer<typeof inviteSchema>>({
    method: 'post',
    path: '/accounts',
    action: 'account.invite',
    body: inviteSchema,
    handle: ({ body, principal, write }) =>
      write((scope) => inviteAccount(scope, deps.publicUrl(), accountOf(principal), body), 201),
  }),
  route<z.infer<typeof changeRoleSchema>>({
    method: 'patch',
    path: '/accounts/:accountId/role',
    action: 'account.change-role',
    body: changeRoleSchema,
    handle: ({ params, body, write }) =>
      write((scope) => changeRole(scope, params.accountId ?? '', body.siteRole)),
  }),
  route<z.infer<typeof disableSchema>>({
    method: 'patch',
    path: '/accounts/:accountId/disabled',
    action: 'account.disable',
    body: disableSchema,
    handle: async ({ params, body, write }) => {
      const accountId = params.accountId ?? '';
      const reply = await write((scope) => setDisabled(scope, accountId, body.disabled));
      if (body.disabled) await deps.endSessions(`account:${accountId}`);
      return reply;
    },
  }),
  route<z.infer<typeof nothingSchema>>({
    method: 'post',
    path: '/accounts/:accountId/end-sessions',
    action: 'account.disable',
    body: nothingSchema,
    handle: async ({ params, write }) => {
      const accountId = params.accountId ?? '';
      const reply = await write(async (scope) => {
        if (!(await loadAccount(scope.manager, { id: accountId }))) throw notFound();
        await scope.log({ action: 'account.sessions-ended', subject: { accountId } });
        return null;
      });
      await deps.endSessions(`account:${accountId}`);
      return reply;
    },
  }),
];
