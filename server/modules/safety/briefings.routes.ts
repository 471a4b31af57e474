import {
  answerSchema,
  briefingQuerySchema,
  proposeVersionSchema,
  revokeSchema,
  secondVersionSchema,
  signSchema,
} from '../../../shared/contracts/safety';
import { noBodySchema } from '../../../shared/contracts/travellers';
import type { z } from 'zod';
import type { Deps } from '../../deps';
import { notFound } from '../../http/app-error';
import type { Actor } from '../../http/principal';
import { route, type AnyRoute } from '../../http/route';
import { answerSheet, signBriefing } from './answers.service';
import { readBriefingText, readNewestVersion, readProposals, readSignature } from './briefings.repository';
import { proposeVersion } from './briefings.service';
import { secondCorrection, withdrawProposal } from './corrections.service';
import { countersignSignOff, noteTalk, revokeSignOff } from './sign-offs.service';

/** A person's id; a site admin who takes no part in the installation has none and signs nothing. */
export function personOf(actor: Actor): string {
  if (actor.personId === null) throw notFound();
  return actor.personId;
}

const BRIEFING = '/installations/:installationId/briefings/:key';
const SIGN_OFF = '/installations/:installationId/sign-offs/:signOffId';
/** A briefing's text with its questions and sources may be long. */
const TEXT_LIMIT = 400_000;

type BriefingQuery = z.infer<typeof briefingQuerySchema>;

const keyOf = (params: Record<string, string>) => params.key ?? '';
const signOffOf = (params: Record<string, string>) => params.signOffId ?? '';
const versionOf = (params: Record<string, string>) => Number(params.version);

/** Reading, answering and signing; countersigning; changing a text. */
export const briefingsRoutes = (deps: Deps): AnyRoute[] => [
  route<undefined, BriefingQuery>({
    method: 'get',
    path: BRIEFING,
    action: 'briefing.read',
    query: briefingQuerySchema,
    handle: ({ installationId, params, query }) => {
      const now = deps.clock.now();
      const text = readBriefingText(deps.data.readHandle, installationId, keyOf(params), query.version, now);
      if (!text) throw notFound();
      return { data: text };
    },
  }),
  route<z.infer<typeof answerSchema>>({
    method: 'post',
    path: `${BRIEFING}/answers`,
    action: 'briefing.answer',
    body: answerSchema,
    handle: ({ write, actor, installationId, params, body }) => {
      const personId = personOf(actor);
      return write((scope) => answerSheet(scope, installationId, personId, keyOf(params), body));
    },
  }),
  route<z.infer<typeof signSchema>>({
    method: 'post',
    path: `${BRIEFING}/sign`,
    action: 'briefing.sign',
    body: signSchema,
    handle: ({ write, actor, installationId, params, body }) => {
      const personId = personOf(actor);
      return write((scope) => signBriefing(scope, installationId, personId, keyOf(params), body));
    },
  }),
  ...signOffRoutes(deps),
  ...versionRoutes(deps),
];

const signOffRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: `${SIGN_OFF}/signature`,
    action: 'briefing.countersign',
    handle: ({ installationId, params }) => {
      const signature = readSignature(deps.data.readHandle, installationId, signOffOf(params));
      if (!signature) throw notFound();
      return { data: signature };
    },
  }),
  route({
    method: 'post',
    path: `${SIGN_OFF}/talk`,
    action: 'briefing.talk',
    body: noBodySchema,
    handle: ({ write, actor, installationId, params }) => {
      const leadId = personOf(actor);
      return write((scope) => noteTalk(scope, installationId, leadId, signOffOf(params)));
    },
  }),
  route({
    method: 'post',
    path: `${SIGN_OFF}/countersign`,
    action: 'briefing.countersign',
    body: noBodySchema,
    handle: ({ write, actor, installationId, params }) => {
      const leadId = personOf(actor);
      return write((scope) => countersignSignOff(scope, installationId, leadId, signOffOf(params)));
    },
  }),
  route<z.infer<typeof revokeSchema>>({
    method: 'post',
    path: `${SIGN_OFF}/revoke`,
    action: 'briefing.revoke',
    body: revokeSchema,
    handle: ({ write, actor, installationId, params, body }) => {
      const leadId = personOf(actor);
      return write((scope) => revokeSignOff(scope, installationId, leadId, signOffOf(params), body.reason));
    },
  }),
];

const versionRoutes = (deps: Deps): AnyRoute[] => [
  route<z.infer<typeof proposeVersionSchema>>({
    method: 'post',
    path: `${BRIEFING}/versions`,
    action: 'briefing.edit',
    body: proposeVersionSchema,
    bodyLimit: TEXT_LIMIT,
    handle: ({ write, actor, installationId, params, body }) => {
      const leadId = personOf(actor);
      return write((scope) => proposeVersion(scope, installationId, leadId, keyOf(params), body));
    },
  }),
  route({
    method: 'get',
    path: `${BRIEFING}/versions`,
    action: 'briefing.edit',
    handle: ({ installationId, params }) => {
      const newest = readNewestVersion(deps.data.readHandle, installationId, keyOf(params));
      if (!newest) throw notFound();
      return { data: newest };
    },
  }),
  route({
    method: 'get',
    path: `${BRIEFING}/proposals`,
    action: 'briefing.edit',
    handle: ({ installationId, params }) => {
      const proposals = readProposals(deps.data.readHandle, installationId, keyOf(params));
      if (!proposals) throw notFound();
      return { data: proposals };
    },
  }),
  route<z.infer<typeof secondVersionSchema>>({
    method: 'post',
    path: `${BRIEFING}/proposals/:version/second`,
    action: 'briefing.edit',
    body: secondVersionSchema,
    handle: ({ write, actor, installationId, params, body }) => {
      const secondId = personOf(actor);
      return write((scope) =>
        secondCorrection(scope, installationId, secondId, keyOf(params), versionOf(params), body.proposedAt),
      );
    },
  }),
  route({
    method: 'delete',
    path: `${BRIEFING}/proposals/:version`,
    action: 'briefing.edit',
    handle: ({ write, installationId, params }) =>
      write((scope) => withdrawProposal(scope, installationId, keyOf(params), versionOf(params))),
  }),
];
