import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { DrawingView } from '../../shared/contracts/drawing';
import { joinDrawing, type JoinedDrawing } from '../../shared/frames';
import { get } from './api';
import { useFrames } from './frames';

export const drawingKey = (installationId: string) => ['drawing', installationId] as const;

/** What stands where in the drawing, with its wood and tolerances. */
export const useDrawing = (installationId: string) =>
  useQuery({
    queryKey: drawingKey(installationId),
    queryFn: () => get<DrawingView>(`/installations/${installationId}/drawing`),
  });

/** All placed frames as one, computed by the same code as on the server. */
export function useJoinedDrawing(
  installationId: string,
  view: DrawingView | undefined,
): JoinedDrawing | null {
  const frames = useFrames(installationId);
  return useMemo(() => {
    if (!view || frames.size === 0) return null;
    const geometry = new Map([...frames].map(([id, frame]) => [id, frame.geometry]));
    return joinDrawing(view.placements, geometry, view.settings.joinWithinMm);
  }, [view, frames]);
}

/** Fetches the drawing again after a change of it. */
export function useReloadDrawing(installationId: string) {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: drawingKey(installationId) });
}
