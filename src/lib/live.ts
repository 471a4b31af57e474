import { useQuery } from '@tanstack/react-query';
import type { LiveCollections, LiveKind } from '../../shared/contracts/live';
import { createStore } from './store';
import type { LiveState } from './live-state';

/** Where the live state of an installation stands in the query cache. */
export const liveKey = (installationId: string) => ['live', installationId] as const;

/** The link to the server. */
export interface Link {
  state: 'connecting' | 'live' | 'broken';
  /** Server time of the last sign of life, ms; null before the first. */
  heardAt: number | null;
  /** Phones with a live link, as the last beat said. */
  phones: number;
}

export const link = createStore<Link>({ state: 'connecting', heardAt: null, phones: 0 });

/**
 * Follow a part of the live state.
 * @param select must give the same thing for the same state: a collection, or something derived in a memo elsewhere
 * @returns undefined until the first snapshot is there
 */
export function useLive<T>(installationId: string, select: (state: LiveState) => T): T | undefined {
  const { data } = useQuery<LiveState, Error, T>({
    queryKey: liveKey(installationId),
    // The realtime connection fills it; nothing is fetched from here.
    enabled: false,
    queryFn: () => Promise.reject(new Error('the live state comes from the socket')),
    staleTime: Infinity,
    gcTime: Infinity,
    structuralSharing: false,
    select,
  });
  return data;
}

const NONE: ReadonlyMap<string, never> = new Map<string, never>();

/** One live collection by id; empty until the first snapshot. */
export function useLiveMap<K extends LiveKind>(
  installationId: string,
  kind: K,
): ReadonlyMap<string, LiveCollections[K]> {
  return (
    useLive(installationId, (state) => state.records[kind] as ReadonlyMap<string, LiveCollections[K]>) ?? NONE
  );
}
