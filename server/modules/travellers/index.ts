import type { Deps } from '../../deps';
import type { AnyRoute } from '../../http/route';
import type { AnyLiveSource } from '../../realtime/live-source';
import { subAssembliesSource } from './planning.live';
import { planningRoutes } from './planning.routes';
import { stepsSource } from './steps.live';
import { stepsRoutes } from './steps.routes';

export { endDueDrying } from './drying.job';
export { codeOf, insertPieces, redrawPiece, rehomePiece, retirePiece, type NewPiece } from './pieces.service';
export { highestNumber, loadTemplate } from './planning.repository';
export { ageRulesOf, releasePlaces } from './steps.service';

export const travellersRoutes = (deps: Deps): AnyRoute[] => [...planningRoutes(deps), ...stepsRoutes()];

export const travellersLive: AnyLiveSource[] = [subAssembliesSource, stepsSource];
