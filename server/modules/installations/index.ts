export { installationsLive } from './installations.live';
export { installationByCode } from './installations.repository';
export { installationsRoutes } from './installations.routes';
export { assertOpen, type WhenMade } from './installations.service';
export { SAFETY_LEADS_NEEDED } from './publish-checks';
