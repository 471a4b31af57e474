import type { z } from 'zod';
import {
  clearTagSchema,
  lendSchema,
  tagSchema,
  takeBackSchema,
  toolSchema,
  type Lend,
  type TakeBack,
  type ToolInput,
} from '../../../shared/contracts/crib';
import { notFound } from '../../http/app-error';
import type { Actor } from '../../http/principal';
import { route, type AnyRoute } from '../../http/route';
import { lendTool, takeBackTool } from './lend.service';
import { addTool, clearTag, editTool, removeTool, tagTool } from './tools.service';

const TOOLS = '/installations/:installationId/tools';
const TOOL = `${TOOLS}/:toolId`;

/** Lending and tags stand in somebody's name. */
function named({ personId }: Actor): string {
  if (personId === null) throw notFound();
  return personId;
}

/** The crib: the list of tools, out and back, out-of-use tags. */
export const cribRoutes = (): AnyRoute[] => [
  route<ToolInput>({
    method: 'post',
    path: TOOLS,
    action: 'tool.edit',
    body: toolSchema,
    handle: ({ installationId, body, write }) => write((scope) => addTool(scope, installationId, body), 201),
  }),
  route<ToolInput>({
    method: 'put',
    path: TOOL,
    action: 'tool.edit',
    body: toolSchema,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => editTool(scope, installationId, params.toolId ?? '', body)),
  }),
  route({
    method: 'delete',
    path: TOOL,
    action: 'tool.edit',
    handle: ({ installationId, params, write }) =>
      write((scope) => removeTool(scope, installationId, params.toolId ?? '')),
  }),
  route<Lend>({
    method: 'post',
    path: `${TOOL}/lend`,
    action: 'tool.lend',
    body: lendSchema,
    handle: ({ installationId, params, body, actor, write }) => {
      const keeper = named(actor);
      return write((scope) => lendTool(scope, installationId, keeper, params.toolId ?? '', body));
    },
  }),
  route<TakeBack>({
    method: 'post',
    path: `${TOOL}/take-back`,
    action: 'tool.take-back',
    body: takeBackSchema,
    handle: ({ installationId, params, body, actor, write }) => {
      const taker = named(actor);
      return write((scope) => takeBackTool(scope, installationId, taker, params.toolId ?? '', body));
    },
  }),
  route<z.infer<typeof tagSchema>>({
    method: 'post',
    path: `${TOOL}/tag`,
    action: 'tool.tag',
    body: tagSchema,
    handle: ({ installationId, params, body, actor, write }) => {
      const by = named(actor);
      return write((scope) => tagTool(scope, installationId, params.toolId ?? '', by, body.reason));
    },
  }),
  route<z.infer<typeof clearTagSchema>>({
    method: 'post',
    path: `${TOOL}/clear-tag`,
    action: 'tool.clear-tag',
    body: clearTagSchema,
    handle: ({ installationId, params, body, actor, write }) => {
      const by = named(actor);
      return write((scope) => clearTag(scope, installationId, params.toolId ?? '', by, body.reason));
    },
  }),
];
