import { SITE_ROLES } from '../../../shared/accounts';
import { DimensionHead, PageHead } from '../../components/ui/heads';
import { AccountsList } from '../../features/accounts/accounts-list';
import { InviteForm } from '../../features/accounts/invite-form';
import { useMay, useSession } from '../../lib/session';
import { SiteFrame } from '../site-frame';

/** Who has an account on this site. */
export function Component() {
  const { data } = useSession();
  const may = useMay();
  const principal = data?.principal;
  const ownId = principal?.kind === 'account' ? principal.accountId : '';
  const seesAll = may('account.read-all');
  return (
    <SiteFrame needs={['account.read-all', 'account.invite']}>
      <PageHead title="Accounts" summary="Who can sign in here, with e-mail and password" />
      <div className={seesAll ? 'with-side' : 'max-w-[26rem]'}>
        {seesAll && (
          <section className="grid content-start gap-4" aria-labelledby="everybody">
            <DimensionHead id="everybody">Everybody</DimensionHead>
            <AccountsList ownId={ownId} />
          </section>
        )}
        <section className="grid content-start gap-4" aria-labelledby="invite">
          <DimensionHead id="invite">Invite somebody</DimensionHead>
          <InviteForm roles={seesAll ? SITE_ROLES : ['member']} />
        </section>
      </div>
    </SiteFrame>
  );
}
