import { useEffect, useState, useSyncExternalStore, type ReactNode } from 'react';
import { useMutation } from '@tanstack/react-query';
import type { SessionView } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { ApiError, send } from '../../lib/api';
import { usePageTitle } from '../../lib/page-title';
import { useChangeSession, useSession } from '../../lib/session';

/** A closed address may be one that the server could not read just then: it is tried again, but not hastily. */
const CLOSED_RETRY_MS = 30_000;
const NETWORK_RETRY_MS = 4000;

const onHash = (listener: () => void) => {
  window.addEventListener('hashchange', listener);
  return () => window.removeEventListener('hashchange', listener);
};

/** The token in the address; it stays there, so that a projector that is switched off and on comes back by itself. */
const useToken = (): string => useSyncExternalStore(onHash, () => window.location.hash.slice(1));

/**
 * Lets a projector in by the token of its address, and again when its session has ended.
 * @param children the wall of an installation
 */
export function ProjectorDoor({ children }: { children: (installationId: string) => ReactNode }) {
  const token = useToken();
  // Another address is another beginning: nothing of the one before counts.
  return (
    <Door key={token} token={token}>
      {children}
    </Door>
  );
}

function Door({ token, children }: { token: string; children: (installationId: string) => ReactNode }) {
  const { data: session, isPending } = useSession();
  const principal = session?.principal ?? null;
  const [entered, setEntered] = useState(false);
  const [agreed, setAgreed] = useState(false);
  const changeSession = useChangeSession();
  const enter = useMutation({
    mutationFn: () => send<SessionView>('POST', '/display-session', { token }),
    onSuccess: async (view) => {
      await changeSession(view);
      setEntered(true);
    },
  });
  const somebody = principal !== null && principal.kind !== 'display';
  const inside = principal?.kind === 'display' && (token === '' || entered);
  const wants = token !== '' && !inside && !isPending && (!somebody || agreed);
  const { mutate } = enter;
  const { error, isIdle } = enter;
  useEffect(() => {
    if (!wants) return;
    if (isIdle) {
      mutate();
      return;
    }
    if (!error) return;
    const wait = error instanceof ApiError ? CLOSED_RETRY_MS : NETWORK_RETRY_MS;
    const timer = setTimeout(() => mutate(), wait);
    return () => clearTimeout(timer);
  }, [wants, isIdle, error, mutate]);
  // A session that ended after it had been entered is asked for anew.
  const lost = wants && enter.isSuccess;
  const { reset } = enter;
  useEffect(() => {
    if (lost) reset();
  }, [lost, reset]);

  if (principal?.kind === 'display' && (inside || (error && !(error instanceof ApiError))))
    return children(principal.installationId);
  if (isPending || (wants && !error)) return <DoorSheet title="One moment" />;
  if (token === '')
    return (
      <DoorSheet title="This is where a projector shows the build.">
        Open the whole address that an organiser got on the Plan page; it ends in a long word after a #.
      </DoorSheet>
    );
  if (somebody && !agreed)
    return (
      <DoorSheet title="Somebody is signed in on this browser.">
        Showing the projector signs them out here.{' '}
        <Action look="crossed" onClick={() => setAgreed(true)}>
          Show the projector
        </Action>
      </DoorSheet>
    );
  if (error instanceof ApiError)
    return (
      <DoorSheet title="This projector is closed.">
        {error.code === 'LINK_SPENT'
          ? 'An organiser opens a new address on the Plan page. Open that here, and the picture comes back.'
          : error.message}
      </DoorSheet>
    );
  return (
    <DoorSheet title="There is no network, or the server does not answer.">
      It is tried again every few seconds; nothing needs to be done here.
    </DoorSheet>
  );
}

/** Words on the wall while there is no picture; as large as everything there. */
function DoorSheet({ title, children }: { title: string; children?: ReactNode }) {
  usePageTitle('Projector');
  return (
    <div className="wall" data-theme="night">
      <main id="main" className="wall-sheet wall-door">
        <h1>{title}</h1>
        {children !== undefined && <div role="status">{children}</div>}
      </main>
    </div>
  );
}
