import { useQuery, useQueryClient } from '@tanstack/react-query';
import type { FrameView } from '../../../shared/contracts/frames';
import { get } from '../../lib/api';
import { framesKey } from '../../lib/frames';
import { useLive } from '../../lib/live';

/** Frames of an installation by name; fetched again whenever pieces or frames may have changed. */
export function useFrameList(installationId: string) {
  const pieces = useLive(installationId, (state) => state.records.subAssemblies.size) ?? 0;
  return useQuery({
    queryKey: [...framesKey(installationId), 'list', pieces],
    queryFn: async () => {
      const frames = await get<FrameView[]>(`/installations/${installationId}/frames`);
      // Patterns of the split are drawn where their pieces are; they are nobody's to place or change.
      return frames
        .filter((frame) => frame.source.kind !== 'piece')
        .sort((a, b) => a.name.localeCompare(b.name));
    },
    placeholderData: (before) => before,
  });
}

/** Fetches frames again after one was made or changed, here and wherever else they are drawn. */
export function useReloadFrames(installationId: string) {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: framesKey(installationId) });
}

/** Frames that somebody drew: patterns of the split are drawn with their pieces and are nobody's to place or change. */
export const drawnFrames = (frames: readonly FrameView[]): FrameView[] =>
  frames.filter((frame) => frame.source.kind !== 'piece');
