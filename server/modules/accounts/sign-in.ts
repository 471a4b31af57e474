import type { Request, Response } from 'express';
import passport from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Deps } from '../../deps';
import { AppError } from '../../http/app-error';
import { FailureLimit } from '../../http/failure-limit';
import { principalKey, type Principal } from '../../http/principal';
import { accountByEmail } from './accounts.repository';
import { passwordMatches } from './passwords';

/** Ten wrong passwords in a quarter of an hour, for an e-mail address and for a session. */
const LIMIT = { max: 10, windowMs: 15 * 60_000 };

/** One answer whatever was wrong: address, password, or an account that is disabled or not accepted yet. */
const failed = () =>
  new AppError(
    'SIGN_IN_FAILED',
    'E-mail and password do not fit together. Try again, or have a link sent to choose a new password.',
  );

async function verify(deps: Deps, email: string, password: string): Promise<Principal | null> {
  const account = accountByEmail(deps.data.readHandle, email);
  const usable = account && account.disabled_at === null ? account : null;
  const matches = await passwordMatches(usable?.password_hash ?? null, password);
  return usable && matches ? deps.principals.find(`account:${usable.id}`) : null;
}

/** Sign-in by e-mail and password: passport's local strategy behind the limit on failures. */
export function passwordSignIn(deps: Deps) {
  const limit = new FailureLimit(deps.clock, LIMIT);
  const authenticator = new passport.Passport();
  authenticator.use(
    new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
      verify(deps, email, password).then(
        (principal) => done(null, principal ?? false),
        (error: unknown) => done(error),
      );
    }),
  );
  // Asking an authenticator puts its own session manager on the request, so it has to know how principals are kept.
  authenticator.serializeUser((user, done) => done(null, principalKey(user as Principal)));

  const ask = (req: Request, res: Response) =>
    new Promise<Principal | null>((resolve, reject) => {
      const answer = (error: unknown, user?: unknown) => {
        if (error) reject(error instanceof Error ? error : new Error('sign-in broke', { cause: error }));
        else resolve((user as Principal | false | undefined) || null);
      };
      const handler = authenticator.authenticate('local', { session: false }, answer) as (
        req: Request,
        res: Response,
        next: (error?: unknown) => void,
      ) => void;
      handler(req, res, reject);
    });

  /**
   * Who it is.
   * @throws AppError SIGN_IN_FAILED or TOO_MANY_FAILURES
   */
  return async (req: Request, res: Response, input: { email: string; password: string }) => {
    const keys = [`email:${input.email}`, `session:${req.sessionID}`];
    limit.begin(keys);
    req.body = input;
    const principal = await ask(req, res);
    if (!principal) {
      deps.log.warn({ event: 'sign-in.failed' }, 'a sign-in failed');
      throw failed();
    }
    limit.succeed(keys);
    return principal;
  };
}
