import type { z } from 'zod';
import {
  moveStrutsSchema,
  splitWishSchema,
  takeSplitSchema,
  type SplitWish,
  type TakeSplit,
} from '../../../shared/contracts/split';
import type { Deps } from '../../deps';
import { route, type AnyRoute } from '../../http/route';
import { drawingOf } from '../frames';
import { leaveBegun } from './leave-begun';
import { sheetOf } from './sheet';
import { splitsOf } from './split.repository';
import { discardProposal, moveStruts, startSplit } from './split.service';
import { takeSplit } from './take.service';

type MoveStruts = z.infer<typeof moveStrutsSchema>;

const ROOT = '/installations/:installationId';

/** The split: ask for one, follow it, change it by hand, make travellers of it; and the sheet of one piece. */
export const splitRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: `${ROOT}/split`,
    action: 'split.read',
    handle: ({ installationId }) => {
      const { readHandle } = deps.data;
      return { data: splitsOf(readHandle, installationId, drawingOf(readHandle, installationId).revision) };
    },
  }),
  route<SplitWish>({
    method: 'post',
    path: `${ROOT}/split/runs`,
    action: 'split.edit',
    body: splitWishSchema,
    // Starting to compute writes nothing; a second start while it runs is refused.
    unkeyed: true,
    handle: ({ installationId, body, actor }) => ({
      data: startSplit(deps, actor.maker, installationId, body),
      status: 202,
    }),
  }),
  route({
    method: 'get',
    path: `${ROOT}/runs/:runId`,
    action: 'split.edit',
    handle: ({ installationId, params }) => ({ data: deps.runs.find(installationId, params.runId ?? '') }),
  }),
  route({
    method: 'delete',
    path: `${ROOT}/runs/:runId`,
    action: 'split.edit',
    unkeyed: true,
    handle: ({ installationId, params }) => ({ data: deps.runs.stop(installationId, params.runId ?? '') }),
  }),
  route<MoveStruts>({
    method: 'post',
    path: `${ROOT}/split/move`,
    action: 'split.edit',
    body: moveStrutsSchema,
    handle: async ({ installationId, body, write }) => {
      const revised = await moveStruts(deps, installationId, body);
      return write(revised);
    },
  }),
  route<TakeSplit>({
    method: 'post',
    path: `${ROOT}/split/take`,
    action: 'split.edit',
    body: takeSplitSchema,
    handle: async ({ installationId, body, actor, write }) => {
      const ready = await leaveBegun(deps, actor.maker, installationId, body);
      return write((scope) => takeSplit(scope, installationId, ready), 201);
    },
  }),
  route({
    method: 'delete',
    path: `${ROOT}/split`,
    action: 'split.edit',
    handle: ({ installationId, write }) => write((scope) => discardProposal(scope, installationId)),
  }),
  route({
    method: 'get',
    path: `${ROOT}/sub-assemblies/:subAssemblyId/sheet`,
    action: 'frame.read',
    handle: ({ installationId, params }) => ({
      data: sheetOf(deps.data.readHandle, installationId, params.subAssemblyId ?? ''),
    }),
  }),
];
