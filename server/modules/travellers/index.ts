import type { Deps } from '../../deps';
import type { AnyRoute } from '../../http/route';
import type { AnyLiveSource } from '../../realtime/live-source';
import { stepsSource } from './steps.live';
import { stepsRoutes } from './steps.routes';

export { endDueDrying } from './drying.job';
export { commandStep, ageRulesOf, releasePlaces } from './steps.service';

export const travellersRoutes = (_deps: Deps): AnyRoute[] => [...stepsRoutes()];

export const travellersLive: AnyLiveSource[] = [stepsSource];
