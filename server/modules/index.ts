import type { Deps } from '../deps';
import type { AnyRoute } from '../http/route';
import type { SessionLayer } from '../http/session';
import type { AnyLiveSource } from '../realtime/live-source';
import { accountsRoutes } from './accounts';
import { cribLive, cribRoutes } from './crib';
import { framesRoutes } from './frames';
import { installationsLive, installationsRoutes, type WhenMade } from './installations';
import { mailRoutes } from './mail';
import { addFirstOrganiser, peopleLive, peopleRoutes } from './people';
import { progressRoutes } from './progress';
import { installShippedBriefings, safetyLive, safetyRoutes } from './safety';
import { splitRoutes } from './split';
import { travellersLive, travellersRoutes } from './travellers';

/** What areas add to an installation that was just made; they know of installations, not the other way round. */
const whenInstallationMade: readonly WhenMade[] = [
  addFirstOrganiser,
  async (scope, { installationId }) => {
    await installShippedBriefings(scope, installationId);
  },
];

/** Every route of the server; the permission test walks this list. */
export const allRoutes = (deps: Deps, layer: SessionLayer): AnyRoute[] => [
  ...accountsRoutes(deps, layer),
  ...installationsRoutes(deps, layer, whenInstallationMade),
  ...peopleRoutes(deps, layer),
  ...safetyRoutes(deps),
  ...framesRoutes(deps),
  ...splitRoutes(deps),
  ...cribRoutes(),
  ...travellersRoutes(deps),
  ...progressRoutes(deps),
  ...mailRoutes(deps),
];

/** Every live collection. */
export const liveSources: readonly AnyLiveSource[] = [
  ...installationsLive,
  ...peopleLive,
  ...safetyLive,
  ...cribLive,
  ...travellersLive,
];
