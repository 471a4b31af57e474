import type { z } from 'zod';
import {
  createSubAssembliesSchema,
  renameSubAssemblySchema,
  templateSchema,
} from '../../../shared/contracts/travellers';
import type { Deps } from '../../deps';
import { route, type AnyRoute } from '../../http/route';
import { templatesOf } from './planning.repository';
import {
  createSubAssemblies,
  removeSubAssembly,
  removeTemplate,
  renameSubAssembly,
  saveTemplate,
} from './planning.service';

type TemplateInput = z.infer<typeof templateSchema>;
type PiecesInput = z.infer<typeof createSubAssembliesSchema>;
type NameInput = z.infer<typeof renameSubAssemblySchema>;

const ROOT = '/installations/:installationId';

/** Templates and sub-assemblies. */
export const planningRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: `${ROOT}/templates`,
    action: 'template.read',
    handle: ({ installationId }) => ({ data: templatesOf(deps.data.readHandle, installationId) }),
  }),
  route<TemplateInput>({
    method: 'post',
    path: `${ROOT}/templates`,
    action: 'template.edit',
    body: templateSchema,
    handle: ({ installationId, body, write }) =>
      write((scope) => saveTemplate(scope, installationId, null, body), 201),
  }),
  route<TemplateInput>({
    method: 'put',
    path: `${ROOT}/templates/:templateId`,
    action: 'template.edit',
    body: templateSchema,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => saveTemplate(scope, installationId, params.templateId ?? '', body)),
  }),
  route({
    method: 'delete',
    path: `${ROOT}/templates/:templateId`,
    action: 'template.edit',
    handle: ({ installationId, params, write }) =>
      write((scope) => removeTemplate(scope, installationId, params.templateId ?? '')),
  }),
  route<PiecesInput>({
    method: 'post',
    path: `${ROOT}/sub-assemblies`,
    action: 'sub-assembly.edit',
    body: createSubAssembliesSchema,
    handle: ({ installationId, body, write }) =>
      write((scope) => createSubAssemblies(scope, installationId, body), 201),
  }),
  route<NameInput>({
    method: 'patch',
    path: `${ROOT}/sub-assemblies/:subAssemblyId`,
    action: 'sub-assembly.edit',
    body: renameSubAssemblySchema,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => renameSubAssembly(scope, installationId, params.subAssemblyId ?? '', body.name)),
  }),
  route({
    method: 'delete',
    path: `${ROOT}/sub-assemblies/:subAssemblyId`,
    action: 'sub-assembly.edit',
    handle: ({ installationId, params, write }) =>
      write((scope) => removeSubAssembly(scope, installationId, params.subAssemblyId ?? '')),
  }),
];
