import type { Deps } from '../../deps';
import type { AnyRoute } from '../../http/route';

export const framesRoutes = (_deps: Deps): AnyRoute[] => [];
