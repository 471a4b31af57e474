import { z } from 'zod';
import { may } from '../../../shared/accounts';
import {
  createInstallationSchema,
  editInstallationSchema,
  type CreateInstallation,
  type EditInstallation,
  type JoinCodeView,
} from '../../../shared/contracts/installations';
import { newId } from '../../../shared/kernel/ids';
import type { Deps } from '../../deps';
import { notFound } from '../../http/app-error';
import { route, type AnyRoute } from '../../http/route';
import type { SessionLayer } from '../../http/session';
import { daysStationsRoutes } from './days-stations.routes';
import { displaysRoutes } from './displays.routes';
import {
  installationById,
  listInstallations,
  publishCounts,
  toInstallationRecord,
} from './installations.repository';
import {
  closeInstallation,
  createInstallation,
  editInstallation,
  joinUrl,
  publishInstallation,
  renewJoinCode,
  type WhenMade,
} from './installations.service';
import { publishChecks } from './publish-checks';

const ONE = '/installations/:installationId';
const nothingSchema = z.strictObject({});

/** Installations with their days, stations, join code and projectors. */
export const installationsRoutes = (
  deps: Deps,
  layer: SessionLayer,
  whenMade: readonly WhenMade[],
): AnyRoute[] => [
  ...listRoutes(deps, whenMade),
  ...oneRoutes(deps),
  ...codeRoutes(deps),
  ...daysStationsRoutes(),
  ...displaysRoutes(deps, layer),
];

const listRoutes = (deps: Deps, whenMade: readonly WhenMade[]): AnyRoute[] => [
  route({
    method: 'get',
    path: '/installations',
    action: 'installation.list',
    handle: ({ principal }) => {
      if (principal?.kind !== 'account') throw notFound();
      const { accountId, siteRole } = principal;
      return { data: listInstallations(deps.data.readHandle, accountId, siteRole === 'admin') };
    },
  }),
  route<CreateInstallation>({
    method: 'post',
    path: '/installations',
    action: 'installation.create',
    body: createInstallationSchema,
    handle: ({ principal, body, write }) => {
      if (principal?.kind !== 'account') throw notFound();
      const { accountId, name } = principal;
      const id = newId();
      return write((scope) => createInstallation(scope, id, body, { accountId, name }, whenMade), 201, id);
    },
  }),
];

const oneRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: ONE,
    action: 'installation.read',
    handle: ({ installationId, actor }) => {
      const db = deps.data.readHandle;
      return db.transaction(() => {
        const row = installationById(db, installationId);
        if (!row) throw notFound();
        const checks = may(actor.rights, 'installation.publish')
          ? publishChecks(publishCounts(db, installationId))
          : [];
        return { data: { installation: toInstallationRecord(row), publishChecks: checks } };
      })();
    },
  }),
  route<EditInstallation>({
    method: 'put',
    path: ONE,
    action: 'installation.edit',
    body: editInstallationSchema,
    handle: ({ installationId, body, write }) =>
      write((scope) => editInstallation(scope, installationId, body)),
  }),
  route<z.infer<typeof nothingSchema>>({
    method: 'post',
    path: `${ONE}/publish`,
    action: 'installation.publish',
    body: nothingSchema,
    handle: ({ installationId, write }) => write((scope) => publishInstallation(scope, installationId)),
  }),
  route<z.infer<typeof nothingSchema>>({
    method: 'post',
    path: `${ONE}/close`,
    action: 'installation.close',
    body: nothingSchema,
    handle: ({ installationId, write }) => write((scope) => closeInstallation(scope, installationId)),
  }),
];

const codeRoutes = (deps: Deps): AnyRoute[] => [
  route({
    method: 'get',
    path: `${ONE}/join-code`,
    action: 'installation.read-code',
    handle: ({ installationId }) => {
      const row = installationById(deps.data.readHandle, installationId);
      if (!row) throw notFound();
      const data: JoinCodeView = {
        joinCode: row.join_code,
        joinUrl: joinUrl(deps.publicUrl(), row.join_code),
        renewedAt: row.join_code_at,
      };
      return { data };
    },
  }),
  route<z.infer<typeof nothingSchema>>({
    method: 'post',
    path: `${ONE}/join-code`,
    action: 'installation.renew-code',
    body: nothingSchema,
    handle: ({ installationId, write }) =>
      write((scope) => renewJoinCode(scope, installationId, deps.publicUrl())),
  }),
];
