import type { AnyLiveSource } from '../../realtime/live-source';
import { briefingsSource, signOffsSource, stopsSource } from './safety.live';

export { installShippedBriefings } from './briefings.service';
export { activeStops, missingSignOffs } from './missing-sign-offs';
export { readRegister, registeredInstallations } from './register.repository';
export { erasePersonFromRegister } from './register.service';
export { safetyRoutes } from './safety.routes';

export const safetyLive: AnyLiveSource[] = [briefingsSource, signOffsSource, stopsSource];
