import {
  buildDaySchema,
  stationSchema,
  type BuildDayInput,
  type StationInput,
} from '../../../shared/contracts/installations';
import { route, type AnyRoute } from '../../http/route';
import {
  addBuildDay,
  addStation,
  editBuildDay,
  editStation,
  removeBuildDay,
  removeStation,
} from './days-stations.service';

const DAYS = '/installations/:installationId/build-days';
const STATIONS = '/installations/:installationId/stations';

/** Build days and stations. */
export const daysStationsRoutes = (): AnyRoute[] => [
  route<BuildDayInput>({
    method: 'post',
    path: DAYS,
    action: 'installation.edit',
    body: buildDaySchema,
    handle: ({ installationId, body, write }) =>
      write((scope) => addBuildDay(scope, installationId, body), 201),
  }),
  route<BuildDayInput>({
    method: 'put',
    path: `${DAYS}/:buildDayId`,
    action: 'installation.edit',
    body: buildDaySchema,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => editBuildDay(scope, installationId, params.buildDayId ?? '', body)),
  }),
  route({
    method: 'delete',
    path: `${DAYS}/:buildDayId`,
    action: 'installation.edit',
    handle: ({ installationId, params, write }) =>
      write((scope) => removeBuildDay(scope, installationId, params.buildDayId ?? '')),
  }),
  route<StationInput>({
    method: 'post',
    path: STATIONS,
    action: 'installation.edit',
    body: stationSchema,
    handle: ({ installationId, body, write }) =>
      write((scope) => addStation(scope, installationId, body), 201),
  }),
  route<StationInput>({
    method: 'put',
    path: `${STATIONS}/:stationId`,
    action: 'installation.edit',
    body: stationSchema,
    handle: ({ installationId, params, body, write }) =>
      write((scope) => editStation(scope, installationId, params.stationId ?? '', body)),
  }),
  route({
    method: 'delete',
    path: `${STATIONS}/:stationId`,
    action: 'installation.edit',
    handle: ({ installationId, params, write }) =>
      write((scope) => removeStation(scope, installationId, params.stationId ?? '')),
  }),
];
