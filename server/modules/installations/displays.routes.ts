import type { z } from 'zod';
import {
  displaySignInSchema,
  displayTokenSchema,
  type DisplayTokenView,
} from '../../../shared/contracts/installations';
import type { Deps } from '../../deps';
import { route, type AnyRoute } from '../../http/route';
import { DISPLAY_LIFE_MS, signIn, type SessionLayer } from '../../http/session';
import { sessionView } from '../accounts';
import { addDisplay, closeDisplay, displayUrl, findDisplay, newDisplayToken } from './displays.service';
import { displaysOf } from './installations.repository';

const DISPLAYS = '/installations/:installationId/displays';

/** Projectors. */
export const displaysRoutes = (deps: Deps, layer: SessionLayer): AnyRoute[] => [
  route({
    method: 'get',
    path: DISPLAYS,
    action: 'display.manage',
    handle: ({ installationId }) => ({ data: displaysOf(deps.data.readHandle, installationId) }),
  }),
  route<z.infer<typeof displayTokenSchema>>({
    method: 'post',
    path: DISPLAYS,
    action: 'display.manage',
    body: displayTokenSchema,
    handle: async ({ installationId, body, write }) => {
      const token = newDisplayToken();
      const reply = await write((scope) => addDisplay(scope, installationId, body.label, token), 201);
      if (!('data' in reply)) return reply;
      // The address is added outside the kept answer, which would otherwise keep the token readable.
      const view = reply.data as DisplayTokenView;
      return {
        ...reply,
        data: { ...view, url: displayUrl(deps.publicUrl(), token) } satisfies DisplayTokenView,
      };
    },
  }),
  route({
    method: 'delete',
    path: `${DISPLAYS}/:displayId`,
    action: 'display.manage',
    handle: async ({ installationId, params, write }) => {
      const id = params.displayId ?? '';
      const reply = await write((scope) => closeDisplay(scope, installationId, id));
      await deps.endSessions(`display:${id}`);
      return reply;
    },
  }),
  route<z.infer<typeof displaySignInSchema>>({
    method: 'post',
    path: '/display-session',
    action: 'display.sign-in',
    body: displaySignInSchema,
    unkeyed: true,
    handle: async ({ req, body }) => {
      const principal = findDisplay(deps, body.token);
      await signIn(req, principal, DISPLAY_LIFE_MS);
      return { data: sessionView(deps, layer, req, principal) };
    },
  }),
];
