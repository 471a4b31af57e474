import { DimensionHead, PageHead } from '../../components/ui/heads';
import { ChangePasswordForm } from '../../features/accounts/change-password-form';
import { SignOutEverywhere } from '../../features/accounts/sign-out-everywhere';
import { useSession } from '../../lib/session';
import { SiteFrame } from '../site-frame';

/** My account. */
export function Component() {
  const { data } = useSession();
  const principal = data?.principal;
  return (
    <SiteFrame needs={['account.change-password']}>
      {principal?.kind === 'account' && (
        <>
          <PageHead
            title="My account"
            summary={`${principal.name}, ${principal.email}, ${principal.siteRole} on this site`}
          />
          <div className="grid gap-10">
            <section className="grid gap-5" aria-labelledby="change-password">
              <DimensionHead id="change-password">Password</DimensionHead>
              <ChangePasswordForm email={principal.email} />
            </section>
            <section className="grid gap-5" aria-labelledby="elsewhere">
              <DimensionHead id="elsewhere">Other phones and computers</DimensionHead>
              <SignOutEverywhere />
            </section>
          </div>
        </>
      )}
    </SiteFrame>
  );
}
