import { createFrameSchema, type CreateFrame } from '../../../shared/contracts/frames';
import type { Deps } from '../../deps';
import { route, type AnyRoute } from '../../http/route';
import { framesOf } from './frames.repository';
import { createFrame, editFrame, removeFrame } from './frames.service';

/** A file of two million characters, as JSON. */
const OBJ_BODY_BYTES = 2_600_000;

/** Frames: list, add, edit, remove. */
export const framesRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: '/installations/:installationId/frames',
    action: 'frame.read',
    handle: ({ installationId }) => ({ data: framesOf(deps.data.readHandle, installationId) }),
  }),
  route<CreateFrame>({
    method: 'post',
    path: '/installations/:installationId/frames',
    action: 'frame.edit',
    body: createFrameSchema,
    bodyLimit: OBJ_BODY_BYTES,
    handle: ({ installationId, body, write }) =>
      write((scope) => createFrame(scope, installationId, body), 201),
  }),
  route<CreateFrame>({
    method: 'put',
    path: '/installations/:installationId/frames/:frameId',
    action: 'frame.edit',
    body: createFrameSchema,
    bodyLimit: OBJ_BODY_BYTES,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => editFrame(scope, installationId, params.frameId ?? '', body)),
  }),
  route({
    method: 'delete',
    path: '/installations/:installationId/frames/:frameId',
    action: 'frame.edit',
    handle: ({ installationId, params, write }) =>
      write((scope) => removeFrame(scope, installationId, params.frameId ?? '')),
  }),
];
