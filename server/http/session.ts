import { csrfSync } from 'csrf-sync';
import type { Request, RequestHandler } from 'express';
import session from 'express-session';
import passport from 'passport';
import type { Clock } from '../../shared/kernel/clock';
import type { SessionStore } from './session-store';
import { principalKey, type Principal, type Principals } from './principal';

const DAY_MS = 24 * 3600_000;
/** An account signs in again after thirty days in any case (NIST SP 800-63B-4, AAL1); idle ones the store ends sooner. */
export const ACCOUNT_LIFE_MS = 30 * DAY_MS;
export const DISPLAY_LIFE_MS = 30 * DAY_MS;

declare module 'express-session' {
  interface SessionData {
    /** When the session was signed in, ms of the real clock. */
    signedInAt?: number;
    /** How long it lives from then on whatever is done with it, ms of the real clock. */
    lifeMs?: number;
  }
}

export interface SessionLayer {
  /** Also given to socket.io's engine. */
  session: RequestHandler;
  handlers: RequestHandler[];
  csrf: RequestHandler;
  csrfToken(req: Request): string;
}

/** Cookie session, passport on top, and the synchroniser token against forged requests. */
export function sessionLayer(options: {
  secret: string;
  store: SessionStore;
  principals: Principals;
  clock: Clock;
  secure: boolean;
  trustProxy: boolean;
}): SessionLayer {
  const sessions = session({
    name: 'strutbee',
    secret: options.secret,
    store: options.store,
    resave: false,
    saveUninitialized: false,
    // Secure cookies are dropped on plain http, which is how most halls run it.
    cookie: { httpOnly: true, sameSite: 'lax', secure: options.secure, maxAge: DAY_MS, path: '/' },
    proxy: options.trustProxy,
  });
  const authenticator = new passport.Passport();
  authenticator.serializeUser((user, done) => done(null, principalKey(user as Principal)));
  authenticator.deserializeUser((key: string, done: (error: unknown, user?: Principal | false) => void) => {
    done(null, options.principals.find(key) ?? false);
  });
  const absolute: RequestHandler = (req, _res, next) => {
    const since = req.session.signedInAt;
    if (since === undefined || Date.now() - since < (req.session.lifeMs ?? ACCOUNT_LIFE_MS)) {
      next();
      return;
    }
    req.logout(() => next());
  };
  const { csrfSynchronisedProtection, generateToken } = csrfSync({
    getTokenFromRequest: (req) => req.get('x-csrf-token'),
  });
  return {
    session: sessions,
    handlers: [sessions, authenticator.session() as RequestHandler, absolute],
    csrf: csrfSynchronisedProtection,
    csrfToken: (req) => generateToken(req),
  };
}

/**
 * Sign somebody in on a fresh session, so that a session id known before is worth nothing afterwards (ASVS 5.0 7.2.4).
 * @param lifeMs how long the cookie lives, ms
 */
export function signIn(req: Request, principal: Principal, lifeMs: number): Promise<void> {
  return new Promise((resolve, reject) => {
    req.login(principal, (error: unknown) => {
      if (error) {
        reject(error instanceof Error ? error : new Error('sign-in failed', { cause: error }));
        return;
      }
      req.session.signedInAt = Date.now();
      req.session.lifeMs = lifeMs;
      req.session.cookie.maxAge = lifeMs;
      req.session.save((failed: unknown) =>
        failed
          ? reject(
              failed instanceof Error
                ? failed
                : new Error('the session could not be kept', { cause: failed }),
            )
          : resolve(),
      );
    });
  });
}

/** Sign out and forget the session (ASVS 5.0 7.4.1). */
export function signOut(req: Request): Promise<void> {
  return new Promise((resolve, reject) => {
    req.session.destroy((error: unknown) =>
      error
        ? reject(error instanceof Error ? error : new Error('sign-out failed', { cause: error }))
        : resolve(),
    );
  });
}
