import type { AnyLiveSource } from '../../realtime/live-source';
import type { Deps } from '../../deps';
import type { AnyRoute } from '../../http/route';
import type { SessionLayer } from '../../http/session';

export const peopleRoutes = (_deps: Deps, _layer: SessionLayer): AnyRoute[] => [];

export const peopleLive: AnyLiveSource[] = [];
