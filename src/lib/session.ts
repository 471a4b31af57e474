import { useQuery, useQueryClient } from '@tanstack/react-query';
import { may, type Action, type Rights } from '../../shared/accounts';
import type { Membership, SessionView } from '../../shared/contracts/live';
import { fetchSession, forgetToken } from './api';
import { setServerTime } from './server-clock';
import { SESSION_KEY } from './session-key';

/** Who is signed in. */
export function useSession() {
  return useQuery({
    queryKey: SESSION_KEY,
    queryFn: async () => {
      const view = await fetchSession();
      setServerTime(view.now, view.clockRate);
      return view;
    },
    staleTime: 60_000,
  });
}

/** Take a new session view after a sign-in, or forget everything that belonged to the old one. */
export function useChangeSession() {
  const client = useQueryClient();
  return async (view: SessionView | null) => {
    forgetToken();
    client.removeQueries({ predicate: (query) => query.queryKey[0] !== SESSION_KEY[0] });
    if (view) client.setQueryData(SESSION_KEY, view);
    await client.invalidateQueries({ queryKey: SESSION_KEY });
  };
}

/** The signed-in person's place in an installation, or null. */
export function membershipIn(
  session: SessionView | undefined,
  installationId: string | undefined,
): Membership | null {
  const principal = session?.principal;
  if (!principal || principal.kind === 'display') return null;
  return principal.installations.find((membership) => membership.installationId === installationId) ?? null;
}

/** Rights in an installation (or on the site, when it is undefined), for the permission table. */
export function rightsIn(session: SessionView | undefined, installationId?: string): Rights | null {
  const principal = session?.principal;
  if (!principal) return null;
  if (principal.kind === 'display') return { siteRole: null, duties: [], confirmed: false, display: true };
  const membership = membershipIn(session, installationId);
  return {
    siteRole: principal.kind === 'account' ? principal.siteRole : null,
    duties: membership?.duties ?? [],
    confirmed: membership?.confirmed ?? false,
    display: false,
  };
}

/** Whether the signed-in person may take an action, by the one permission table. */
export const useMay = (installationId?: string) => {
  const { data } = useSession();
  const rights = rightsIn(data, installationId);
  return (action: Action) => may(rights, action);
};
