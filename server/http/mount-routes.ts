import express, {
  type NextFunction,
  type Request,
  type RequestHandler,
  type Response,
  type Router,
} from 'express';
import type { z } from 'zod';
import { denial, whoMay, type Action } from '../../shared/accounts';
import { fieldProblems } from '../../shared/contracts/problems';
import type { Idempotency, Writer } from '../db/write';
import { AppError, notFound } from './app-error';
import { principalKey, type Actor, type Principal, type Principals } from './principal';
import type { AnyRoute, Reply, RouteRequest, RouteSpec } from './route';

export interface MountDeps {
  writer: Writer;
  principals: Principals;
  csrf: RequestHandler;
}

const DEFAULT_BODY_LIMIT = 100_000;

/** The principal that passport put on the request. */
export const principalOf = (req: Request): Principal | null => (req.user as Principal | undefined) ?? null;

/** Put every declared route on a router, each with the same gates in the same order. */
export function mountRoutes(router: Router, routes: readonly AnyRoute[], deps: MountDeps): void {
  for (const declared of routes) {
    const spec = declared as unknown as RouteSpec;
    const handlers: RequestHandler[] = [];
    if (spec.method !== 'get')
      handlers.push(deps.csrf, express.json({ limit: spec.bodyLimit ?? DEFAULT_BODY_LIMIT }));
    handlers.push((req, res, next) => {
      serve(spec, deps, req, res).catch(next);
    });
    router[spec.method](spec.path, ...handlers);
  }
}

async function serve(spec: RouteSpec, deps: MountDeps, req: Request, res: Response): Promise<void> {
  const principal = principalOf(req);
  const params = req.params as Record<string, string>;
  const installationId = params.installationId;
  const actor = admit(spec.action, principal, installationId, deps.principals);
  const body = spec.body ? checked(spec.body, req.body ?? {}) : undefined;
  const query = spec.query ? checked(spec.query, req.query) : undefined;
  const request: RouteRequest<unknown, unknown> = {
    params,
    body,
    query,
    principal,
    get actor(): Actor {
      if (!actor) throw new Error(`${spec.path} has no actor: it is not below an installation, or public.`);
      return actor;
    },
    installationId: installationId ?? '',
    write: async (work, status = 200, madeId) => {
      const maker = actor?.maker ?? {
        actor: principal ? principalKey(principal) : `visitor:${req.ip ?? ''}`,
        personId: null,
      };
      const idempotency = spec.unkeyed ? undefined : keyOf(req, spec, params, body);
      const outcome = await deps.writer.run(
        { maker, installationId: madeId ?? installationId ?? null, idempotency },
        work,
        status,
      );
      return 'kept' in outcome ? outcome : { data: outcome.value ?? null, status };
    },
    req,
    res,
  };
  send(res, await spec.handle(request));
}

/** Let somebody in, or say why not; who may not see an installation is told nothing of it. */
function admit(
  action: Action,
  principal: Principal | null,
  installationId: string | undefined,
  principals: Principals,
): Actor | null {
  const actor =
    principal && installationId !== undefined ? principals.actorIn(principal, installationId) : null;
  const rights =
    actor?.rights ?? (principal && installationId === undefined ? principals.siteRights(principal) : null);
  const why = denial(rights, action);
  if (why === null) return actor;
  if (!principal)
    throw new AppError(
      'SIGN_IN_NEEDED',
      'You are not signed in here. Sign in, or join with the code on the poster.',
    );
  if (!rights) throw notFound();
  if (why === 'confirm') {
    throw new AppError(
      'PERSON_NOT_CONFIRMED',
      'The muster desk has not confirmed you yet. Go there and say your name.',
    );
  }
  throw new AppError('NOT_ALLOWED', `This is for: ${whoMay(action).join(', ')}. Ask one of them.`, {
    details: { action, who: whoMay(action) },
  });
}

function checked<T>(schema: z.ZodType<T>, input: unknown): T {
  const parsed = schema.safeParse(input, { reportInput: true });
  if (parsed.success) return parsed.data;
  const fields = fieldProblems(parsed.error.issues);
  throw new AppError(
    'VALIDATION',
    fields.length === 1 ? 'One field needs another look.' : `${fields.length} fields need another look.`,
    { fields },
  );
}

const KEY_FORM = /^[\w-]{8,100}$/;

function keyOf(req: Request, spec: RouteSpec, params: Record<string, string>, body: unknown): Idempotency {
  const key = req.get('idempotency-key') ?? '';
  if (!KEY_FORM.test(key)) {
    throw new AppError(
      'IDEMPOTENCY_KEY_MISSING',
      'This change came without its key and was not made. Load the page again.',
    );
  }
  // The same key for another address is another request: the address is part of what is compared. How long it lay in
  // the phone's queue is not, or a second try would look like a different request.
  const { queuedMs: _queued, ...rest } = (body ?? {}) as Record<string, unknown>;
  return { key, body: { method: spec.method, path: spec.path, params, body: rest } };
}

function send(res: Response, reply: Reply): void {
  if (res.headersSent) return;
  if ('kept' in reply) {
    const { status, reply: body } = reply.kept;
    res.set('Idempotent-Replay', 'true');
    const refused = body as { error?: Record<string, unknown> };
    res
      .status(status)
      .json(
        refused.error
          ? { error: { ...refused.error, requestId: String(res.getHeader('x-request-id') ?? '') } }
          : body,
      );
    return;
  }
  if ('text' in reply) {
    if (reply.fileName) res.attachment(reply.fileName);
    res.type(reply.type).send(reply.text);
    return;
  }
  const { data, meta, status } = reply;
  res.status(status ?? 200).json(meta ? { data, meta } : { data });
}

/** Anything below `/api` that no route took. */
export function noSuchRoute(req: Request, _res: Response, next: NextFunction): void {
  next(
    principalOf(req)
      ? notFound()
      : new AppError(
          'SIGN_IN_NEEDED',
          'You are not signed in here. Sign in, or join with the code on the poster.',
        ),
  );
}
