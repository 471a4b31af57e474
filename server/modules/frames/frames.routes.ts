import type { z } from 'zod';
import {
  drawingSettingsSchema,
  placementSchema,
  type PlacementInput,
} from '../../../shared/contracts/drawing';
import { createFrameSchema, type CreateFrame } from '../../../shared/contracts/frames';
import type { Deps } from '../../deps';
import { route, type AnyRoute } from '../../http/route';
import { drawingOf } from './drawing.repository';
import { removePlacement, saveDrawingSettings, savePlacement } from './drawing.service';
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
  route({
    method: 'get',
    path: '/installations/:installationId/drawing',
    action: 'frame.read',
    handle: ({ installationId }) => ({ data: drawingOf(deps.data.readHandle, installationId) }),
  }),
  route<z.infer<typeof drawingSettingsSchema>>({
    method: 'put',
    path: '/installations/:installationId/drawing/settings',
    action: 'frame.edit',
    body: drawingSettingsSchema,
    handle: ({ installationId, body, write }) =>
      write((scope) => saveDrawingSettings(scope, installationId, body)),
  }),
  route<PlacementInput>({
    method: 'post',
    path: '/installations/:installationId/placements',
    action: 'frame.edit',
    body: placementSchema,
    handle: ({ installationId, body, write }) =>
      write((scope) => savePlacement(scope, installationId, null, body), 201),
  }),
  route<PlacementInput>({
    method: 'put',
    path: '/installations/:installationId/placements/:placementId',
    action: 'frame.edit',
    body: placementSchema,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => savePlacement(scope, installationId, params.placementId ?? '', body)),
  }),
  route({
    method: 'delete',
    path: '/installations/:installationId/placements/:placementId',
    action: 'frame.edit',
    handle: ({ installationId, params, write }) =>
      write((scope) => removePlacement(scope, installationId, params.placementId ?? '')),
  }),
];
