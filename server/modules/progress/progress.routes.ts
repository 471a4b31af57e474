import { changesQuerySchema, dayLogQuerySchema, type DayLogView } from '../../../shared/contracts/progress';
import type { z } from 'zod';
import type { Deps } from '../../deps';
import { route, type AnyRoute } from '../../http/route';
import { readDayLog } from './day-log.repository';

type ChangesQuery = z.infer<typeof changesQuerySchema>;
type DayLogQuery = z.infer<typeof dayLogQuerySchema>;

/** The live path over HTTP, and the day log. */
export const progressRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: '/installations/:installationId/live',
    action: 'live.read',
    handle: ({ installationId, actor }) => ({ data: deps.reader.snapshot(installationId, actor) }),
  }),
  route<undefined, ChangesQuery>({
    method: 'get',
    path: '/installations/:installationId/changes',
    action: 'live.read',
    query: changesQuerySchema,
    handle: ({ installationId, actor, query }) => ({
      data: deps.reader.catchUp(installationId, query.since, actor),
    }),
  }),
  route<undefined, DayLogQuery>({
    method: 'get',
    path: '/installations/:installationId/day-log',
    action: 'day-log.read',
    query: dayLogQuerySchema,
    handle: ({ installationId, query }) => {
      const rows: DayLogView[] = readDayLog(deps.data.readHandle, installationId, query);
      return { data: rows, meta: { more: rows.length === query.limit } };
    },
  }),
];
