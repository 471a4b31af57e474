import { useQuery, useQueryClient } from '@tanstack/react-query';
import type { TemplateView } from '../../../shared/contracts/travellers';
import { get } from '../../lib/api';
import { useLive } from '../../lib/live';

const templatesKey = (installationId: string) => ['templates', installationId] as const;

/** Templates of an installation by name. */
export function useTemplates(installationId: string) {
  // Templates are no live records; whoever has changed one has raised the installation's revision.
  const revision = useLive(installationId, (state) => state.cursor);
  return useQuery({
    queryKey: [...templatesKey(installationId), revision],
    queryFn: async () => {
      const templates = await get<TemplateView[]>(`/installations/${installationId}/templates`);
      return templates.sort((a, b) => a.name.localeCompare(b.name));
    },
    placeholderData: (before) => before,
    gcTime: 10_000,
  });
}

/** Fetches templates again after one was kept or taken out. */
export function useReloadTemplates(installationId: string) {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: templatesKey(installationId) });
}
