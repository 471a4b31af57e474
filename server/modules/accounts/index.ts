import type { Deps } from '../../deps';
import type { AnyRoute } from '../../http/route';
import type { SessionLayer } from '../../http/session';

export const accountsRoutes = (_deps: Deps, _layer: SessionLayer): AnyRoute[] => [];
