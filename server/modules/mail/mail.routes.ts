import type { Deps } from '../../deps';
import { notFound } from '../../http/app-error';
import { route, type AnyRoute } from '../../http/route';
import { readOutbox } from './outbox';

/** The Outbox screen, where letters go to ourselves; elsewhere there is no such address. */
export const mailRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: '/outbox',
    action: 'outbox.read',
    handle: () => {
      if (!deps.config.OUTBOX) throw notFound();
      return { data: readOutbox(deps.data.readHandle) };
    },
  }),
];
