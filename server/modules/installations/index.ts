export { addBuildDay, addStation } from './days-stations.service';
export { addDisplay, displayUrl, newDisplayToken } from './displays.service';
export { installationsLive } from './installations.live';
export { installationByCode, installationById } from './installations.repository';
export { installationsRoutes } from './installations.routes';
export {
  assertOpen,
  createInstallation,
  editInstallation,
  joinUrl,
  publishInstallation,
  type WhenMade,
} from './installations.service';
export { SAFETY_LEADS_NEEDED } from './publish-checks';
