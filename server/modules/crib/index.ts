import type { AnyLiveSource } from '../../realtime/live-source';
import type { Deps } from '../../deps';
import type { AnyRoute } from '../../http/route';

export const cribRoutes = (_deps: Deps): AnyRoute[] => [];

export const cribLive: AnyLiveSource[] = [];
