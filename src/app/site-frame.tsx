import type { ReactNode } from 'react';
import { Navigate, useLocation } from 'react-router-dom';
import type { Action as Act } from '../../shared/accounts';
import { DeskFrame } from '../components/layout/desk-frame';
import type { NavItem } from '../components/layout/nav-item';
import { Pending } from '../components/ui/pending';
import { useMay, useSession } from '../lib/session';
import { MyThings } from './installation-layout';
import { Component as NotFound } from './routes/not-found';

const SCREENS: readonly { to: string; label: string; for: readonly Act[]; demo?: true }[] = [
  { to: '/installations', label: 'Installations', for: ['installation.list'] },
  { to: '/accounts', label: 'Accounts', for: ['account.read-all', 'account.invite'] },
  { to: '/outbox', label: 'Outbox', for: ['outbox.read'], demo: true },
  { to: '/account', label: 'My account', for: ['account.change-password'] },
];

/** The frame of the site's own pages, for people with an account. Whoever may do none of `needs` finds nothing here. */
export function SiteFrame({ needs, children }: { needs: readonly Act[]; children: ReactNode }) {
  const session = useSession();
  const may = useMay();
  const location = useLocation();
  if (session.isPending) return <Pending />;
  const principal = session.data?.principal;
  const demo = session.data?.demo ?? false;
  if (!principal)
    return <Navigate to="/sign-in" replace state={{ from: `${location.pathname}${location.search}` }} />;
  if (principal.kind !== 'account' || !needs.some(may)) return <NotFound />;
  const items = SCREENS.filter((screen) => screen.for.some(may) && (!screen.demo || demo)).map(
    ({ to, label }): NavItem => ({ to, label, group: 'Site', end: to === '/installations' }),
  );
  return (
    <DeskFrame
      items={items}
      home="/installations"
      titleBlock={{ who: `${principal.name}, ${principal.siteRole}`, more: <MyThings /> }}
    >
      {children}
    </DeskFrame>
  );
}
