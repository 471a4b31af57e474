import { useQuery, useQueryClient } from '@tanstack/react-query';
import type { RunView } from '../../../shared/contracts/runs';
import type { PieceSheet, SplitView } from '../../../shared/contracts/split';
import type { TemplateView } from '../../../shared/contracts/travellers';
import { get } from '../../lib/api';

const splitKey = (installationId: string) => ['split', installationId] as const;

/** The proposal that waits, and the split that travellers were made from. */
export interface Splits {
  proposed: SplitView | null;
  taken: SplitView | null;
}

export const useSplits = (installationId: string) =>
  useQuery({
    queryKey: splitKey(installationId),
    queryFn: () => get<Splits>(`/installations/${installationId}/split`),
  });

/** Fetches the split again after it was computed, changed or taken. */
export function useReloadSplits(installationId: string) {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: splitKey(installationId) });
}

const ASK_AGAIN_MS = 400;

/** Whether a run goes on. */
export const isUnderWay = (run: RunView | undefined): boolean =>
  run?.status === 'running' || run?.status === 'stopping';

/** How a computation is doing, asked again until it ends. */
export const useRun = (installationId: string, runId: string | null) =>
  useQuery({
    queryKey: ['run', installationId, runId],
    queryFn: () => get<RunView>(`/installations/${installationId}/runs/${runId ?? ''}`),
    enabled: runId !== null,
    refetchInterval: ({ state }) => (state.data && !isUnderWay(state.data) ? false : ASK_AGAIN_MS),
    gcTime: 0,
  });

/** Templates that travellers can be made from. */
export const useTemplateNames = (installationId: string) =>
  useQuery({
    queryKey: ['templates', installationId, 'names'],
    queryFn: () => get<TemplateView[]>(`/installations/${installationId}/templates`),
  });

/** The sheet of one piece. */
export const useSheet = (installationId: string, subAssemblyId: string) =>
  useQuery({
    queryKey: ['sheet', installationId, subAssemblyId],
    queryFn: () => get<PieceSheet>(`/installations/${installationId}/sub-assemblies/${subAssemblyId}/sheet`),
  });
