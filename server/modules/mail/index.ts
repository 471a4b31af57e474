import type { Deps } from '../../deps';
import type { AnyRoute } from '../../http/route';

export const mailRoutes = (_deps: Deps): AnyRoute[] => [];
