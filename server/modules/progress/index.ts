import type { Deps } from '../../deps';
import type { AnyRoute } from '../../http/route';

export const progressRoutes = (_deps: Deps): AnyRoute[] => [];
