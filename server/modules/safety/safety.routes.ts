import type { z } from 'zod';
import { liftStopSchema, raiseStopSchema } from '../../../shared/contracts/safety';
import { noBodySchema } from '../../../shared/contracts/travellers';
import type { Deps } from '../../deps';
import { route, type AnyRoute } from '../../http/route';
import { briefingsRoutes, personOf } from './briefings.routes';
import { registerExtract } from './register.extract';
import { readRegister } from './register.repository';
import { liftStop, raiseStop, seeStop } from './stops.service';

const REGISTER = '/installations/:installationId/register';
const STOPS = '/installations/:installationId/stops';

/** Briefings and sign-offs, the register, stops. */
export const safetyRoutes = (deps: Deps): AnyRoute[] => [
  ...briefingsRoutes(deps),
  route({
    method: 'get',
    path: REGISTER,
    action: 'register.read',
    handle: ({ installationId }) => ({ data: readRegister(deps.data.readHandle, installationId) }),
  }),
  route({
    method: 'get',
    path: `${REGISTER}/extract`,
    action: 'register.read',
    handle: ({ installationId }) => {
      const db = deps.data.readHandle;
      const now = deps.clock.now();
      const text = db.transaction(() =>
        registerExtract(db, installationId, readRegister(db, installationId), now),
      )();
      return { text, type: 'text/plain', fileName: 'sign-off-register.txt' };
    },
  }),
  route<z.infer<typeof raiseStopSchema>>({
    method: 'post',
    path: STOPS,
    action: 'stop.raise',
    body: raiseStopSchema,
    handle: ({ write, actor, installationId, body }) => {
      const personId = personOf(actor);
      return write((scope) => raiseStop(scope, installationId, personId, body));
    },
  }),
  route({
    method: 'post',
    path: `${STOPS}/:stopId/seen`,
    action: 'stop.see',
    body: noBodySchema,
    handle: ({ write, actor, installationId, params }) => {
      const personId = personOf(actor);
      return write((scope) => seeStop(scope, installationId, personId, params.stopId ?? ''));
    },
  }),
  route<z.infer<typeof liftStopSchema>>({
    method: 'post',
    path: `${STOPS}/:stopId/lift`,
    action: 'stop.lift',
    body: liftStopSchema,
    handle: ({ write, actor, installationId, params, body }) => {
      const leadId = personOf(actor);
      return write((scope) => liftStop(scope, installationId, leadId, params.stopId ?? '', body.note));
    },
  }),
];
