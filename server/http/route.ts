import type { Request, Response } from 'express';
import type { z } from 'zod';
import type { Action } from '../../shared/accounts';
import type { Kept, WriteScope } from '../db/write';
import type { Actor, Principal } from './principal';

/** What a handler answers with. */
export type Reply =
  | { data: unknown; meta?: Record<string, unknown>; status?: number }
  | { kept: Kept }
  | { text: string; type: string; fileName?: string };

/** What a handler works with. */
export interface RouteRequest<B, Q> {
  params: Record<string, string>;
  body: B;
  query: Q;
  principal: Principal | null;
  /** Set on every route below `/api/installations/:installationId`; anything else is an error of the server. */
  actor: Actor;
  installationId: string;
  /**
   * Run a use case under the request's key and answer with what it returns.
   * @param madeId the installation that this very use case makes; otherwise it is the path's
   */
  write: (work: (scope: WriteScope) => Promise<unknown>, status?: number, madeId?: string) => Promise<Reply>;
  req: Request;
  res: Response;
}

export interface RouteSpec<B = unknown, Q = unknown> {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Below `/api`. */
  path: string;
  action: Action;
  body?: z.ZodType<B>;
  query?: z.ZodType<Q>;
  /** Largest body in bytes; 100 kB when not given. */
  bodyLimit?: number;
  /** A change that carries no idempotency key: sign-in and the like, before anybody is known. */
  unkeyed?: true;
  handle(request: RouteRequest<B, Q>): Promise<Reply> | Reply;
}

/** A route whose body and query types are known only to itself. */
export type AnyRoute = RouteSpec<never, never>;

/** Declare a route; the list of all of them drives the server and the permission test. */
export function route<B = undefined, Q = undefined>(spec: RouteSpec<B, Q>): AnyRoute {
  return spec as unknown as AnyRoute;
}
