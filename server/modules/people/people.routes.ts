import { z } from 'zod';
import {
  addMemberSchema,
  confirmSchema,
  dutySchema,
  joinSchema,
  type AddMember,
  type Confirm,
  type Join,
} from '../../../shared/contracts/people';
import { newId, normaliseCode } from '../../../shared/kernel/ids';
import type { ChangeMaker } from '../../db/write';
import type { Deps } from '../../deps';
import { AppError, notFound } from '../../http/app-error';
import { FailureLimit } from '../../http/failure-limit';
import { principalKey, type Principal } from '../../http/principal';
import { route, type AnyRoute } from '../../http/route';
import { signIn, type SessionLayer } from '../../http/session';
import { sessionView } from '../accounts';
import { findByCode, joinInstallation, volunteerLifeMs } from './join.service';
import { addMember, changeDuty, confirmPerson, erasePerson, leaveSite, removePerson } from './people.service';

const PEOPLE = '/installations/:installationId/people';
const nothingSchema = z.strictObject({});

/** Twenty wrong codes in a quarter of an hour, for a session and for a code; right ones count nowhere. */
const CODE_LIMIT = { max: 20, windowMs: 15 * 60_000 };

/** Joining, the muster desk, and duties. */
export const peopleRoutes = (deps: Deps, layer: SessionLayer): AnyRoute[] => [
  ...joinRoutes(deps, layer),
  ...deskRoutes(),
  ...organiserRoutes(deps),
];

function joinRoutes(deps: Deps, layer: SessionLayer): AnyRoute[] {
  const limit = new FailureLimit(deps.clock, CODE_LIMIT);
  const find = (sessionId: string, code: string) => {
    const keys = [`session:${sessionId}`, `code:${normaliseCode(code)}`];
    limit.begin(keys);
    try {
      const view = findByCode(deps, code);
      limit.succeed(keys);
      return view;
    } catch (error) {
      if (error instanceof AppError && error.code !== 'JOIN_CODE_UNKNOWN') limit.succeed(keys);
      throw error;
    }
  };
  return [
    route({
      method: 'get',
      path: '/join/:code',
      action: 'person.look-up-code',
      handle: ({ req, params }) => ({ data: find(req.sessionID, params.code ?? '') }),
    }),
    route<Join>({
      method: 'post',
      path: '/join',
      action: 'person.join',
      body: joinSchema,
      unkeyed: true,
      handle: async ({ req, body, principal }) => {
        const { code, ...answers } = body;
        const { installationId } = find(req.sessionID, code);
        const id = newId();
        const personId = await deps.writer.runPlain(
          { maker: joiner(deps, principal, installationId, id), installationId },
          (scope) => joinInstallation(scope, installationId, answers, principal, id),
        );
        // An account keeps its own session: it takes part through its account.
        if (principal?.kind === 'account') return { data: sessionView(deps, layer, req, principal) };
        const joined = deps.principals.find(`person:${personId}`);
        if (!joined) throw notFound();
        await signIn(req, joined, volunteerLifeMs(deps, installationId));
        return { data: sessionView(deps, layer, req, joined) };
      },
    }),
  ];
}

/** Who the day log says has joined: the account, who they are here already, or the person they become. */
function joiner(deps: Deps, principal: Principal | null, installationId: string, newId: string): ChangeMaker {
  const known = principal && deps.principals.actorIn(principal, installationId);
  if (known) return known.maker;
  if (principal?.kind === 'account') return { actor: principalKey(principal), personId: null };
  return { actor: `person:${newId}`, personId: newId };
}

const deskRoutes = (): AnyRoute[] => [
  route<Confirm>({
    method: 'post',
    path: `${PEOPLE}/:personId/confirm`,
    action: 'person.confirm',
    body: confirmSchema,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => confirmPerson(scope, installationId, params.personId ?? '', body)),
  }),
  route<z.infer<typeof nothingSchema>>({
    method: 'post',
    path: `${PEOPLE}/:personId/sign-out`,
    action: 'person.sign-out-site',
    body: nothingSchema,
    handle: ({ installationId, params, write }) =>
      write((scope) => leaveSite(scope, installationId, params.personId ?? '', 'person.signed-out')),
  }),
  route<z.infer<typeof nothingSchema>>({
    method: 'post',
    path: '/installations/:installationId/leave',
    action: 'person.leave',
    body: nothingSchema,
    handle: ({ installationId, actor, write }) => {
      const { personId } = actor;
      if (personId === null) throw notFound();
      return write((scope) => leaveSite(scope, installationId, personId, 'person.left'));
    },
  }),
];

const organiserRoutes = (deps: Deps): AnyRoute[] => [
  route<AddMember>({
    method: 'post',
    path: PEOPLE,
    action: 'person.give-duty',
    body: addMemberSchema,
    handle: ({ installationId, body, write }) =>
      write((scope) => addMember(scope, installationId, body), 201),
  }),
  route<z.infer<typeof dutySchema>>({
    method: 'put',
    path: `${PEOPLE}/:personId/duties`,
    action: 'person.give-duty',
    body: dutySchema,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => changeDuty(scope, installationId, params.personId ?? '', body.duty, body.on)),
  }),
  route({
    method: 'delete',
    path: `${PEOPLE}/:personId`,
    action: 'person.remove',
    handle: async ({ installationId, params, write }) => {
      const personId = params.personId ?? '';
      const reply = await write((scope) => removePerson(scope, installationId, personId));
      await deps.endSessions(`person:${personId}`);
      return reply;
    },
  }),
  route<z.infer<typeof nothingSchema>>({
    method: 'post',
    path: `${PEOPLE}/:personId/erase`,
    action: 'person.erase',
    body: nothingSchema,
    handle: async ({ installationId, params, write }) => {
      const personId = params.personId ?? '';
      const reply = await write((scope) => erasePerson(scope, installationId, personId));
      await deps.endSessions(`person:${personId}`);
      return reply;
    },
  }),
];
