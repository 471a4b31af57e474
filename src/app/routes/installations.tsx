import { Action } from '../../components/ui/action';
import { PageHead } from '../../components/ui/heads';
import { InstallationsList } from '../../features/installations/installations-list';
import { useMay, useSession } from '../../lib/session';
import { SiteFrame } from '../site-frame';

/** The installations somebody takes part in. */
export function Component() {
  const may = useMay();
  const { data } = useSession();
  const mayCreate = may('installation.create');
  const isAdmin = data?.principal?.kind === 'account' && data.principal.siteRole === 'admin';
  return (
    <SiteFrame needs={['installation.list']}>
      <PageHead
        title="Installations"
        aside={
          mayCreate ? (
            <Action look="main" to="/installations/new">
              Start a new one
            </Action>
          ) : undefined
        }
      />
      <InstallationsList isAdmin={isAdmin} mayCreate={mayCreate} />
    </SiteFrame>
  );
}
