import { useQuery } from '@tanstack/react-query';
import type { JoinCodeView } from '../../shared/contracts/installations';
import { get } from './api';

/** Where the join code stands in the query cache. */
export const joinCodeKey = (installationId: string) => ['join-code', installationId] as const;

/** The installation's join code; for those who may see it. */
export const useJoinCode = (installationId: string) =>
  useQuery({
    queryKey: joinCodeKey(installationId),
    queryFn: () => get<JoinCodeView>(`/installations/${installationId}/join-code`),
  });
