import { useQuery } from '@tanstack/react-query';
import type { FrameView } from '../../shared/contracts/frames';
import { get } from './api';
import { useLive } from './live';

export const framesKey = (installationId: string) => ['frames', installationId] as const;

/**
 * The frames of an installation by id. They are plan data: fetched once, and again when pieces were added or changed.
 */
export function useFrames(installationId: string): ReadonlyMap<string, FrameView> {
  const pieces = useLive(installationId, (state) => state.records.subAssemblies);
  const version = pieces
    ? [...pieces.values()].reduce((newest, piece) => Math.max(newest, piece.revision), 0)
    : 0;
  const { data } = useQuery({
    queryKey: [...framesKey(installationId), version],
    queryFn: async () => {
      const frames = await get<FrameView[]>(`/installations/${installationId}/frames`);
      return new Map(frames.map((frame) => [frame.id, frame]));
    },
    staleTime: Infinity,
    placeholderData: (before) => before,
  });
  return data ?? NONE;
}

const NONE: ReadonlyMap<string, FrameView> = new Map();
