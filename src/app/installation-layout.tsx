import type { ReactNode } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import { Navigate, Outlet, useLocation, useMatches, useNavigate, useParams } from 'react-router-dom';
import { DeskFrame } from '../components/layout/desk-frame';
import type { LinkState } from '../components/layout/link-word';
import { PhoneFrame } from '../components/layout/phone-frame';
import { Action } from '../components/ui/action';
import { DayRuler } from '../components/ui/day-ruler';
import { Pending } from '../components/ui/pending';
import { RaiseStop } from '../features/stop/raise-stop';
import { StopNow } from '../features/stop/stop-now';
import { send } from '../lib/api';
import { formatCalendarDay, formatTime } from '../lib/formats';
import { link, useLive, useLiveMap } from '../lib/live';
import { useMessages } from '../lib/messages';
import { membershipIn, useChangeSession, useMay, useSession } from '../lib/session';
import { SESSION_KEY } from '../lib/session-key';
import { useStore } from '../lib/store';
import { useThemeChoice } from '../lib/theme';
import { useInstallation, useToday } from './day';
import { useRealtime } from './realtime';
import { PHONE_SCREENS, screensFor } from './screens';

/** What a route says of its page. */
export interface PageHandle {
  /** Drawn in the phone's frame, whatever the device. */
  phone?: (messages: ReturnType<typeof useMessages>) => string;
  /** A screen of the day carries the day ruler. */
  day?: true;
}

/** Everything below an installation: signed in, part of it, its live state kept. */
export function InstallationLayout() {
  const { installationId = '' } = useParams();
  const session = useSession();
  const location = useLocation();
  if (session.isPending) return <Pending />;
  const principal = session.data?.principal;
  if (!principal) {
    return <Navigate to="/sign-in" replace state={{ from: `${location.pathname}${location.search}` }} />;
  }
  if (principal.kind === 'display') return <Navigate to="/projector" replace />;
  if (!membershipIn(session.data, installationId)) return <Navigate to="/" replace />;
  return <Live installationId={installationId} key={installationId} />;
}

function Live({ installationId }: { installationId: string }) {
  useRealtime(installationId);
  const matches = useMatches();
  const handle = Object.assign({}, ...matches.map((match) => match.handle ?? {})) as PageHandle;
  const known = useLive(installationId, (state) => state.audience);
  const page: ReactNode = known === undefined ? <Pending /> : <Outlet />;
  return handle.phone ? (
    <Phone installationId={installationId} handle={handle}>
      {page}
    </Phone>
  ) : (
    <Desk installationId={installationId} handle={handle}>
      {page}
    </Desk>
  );
}

/** The signed-in person's first name and initial. */
function useWho(installationId: string): string | undefined {
  const { data } = useSession();
  const people = useLiveMap(installationId, 'people');
  const personId = membershipIn(data, installationId)?.personId;
  if (personId) return people.get(personId)?.name;
  return data?.principal?.kind === 'account' ? data.principal.name : undefined;
}

function useLinkState(installationId: string): LinkState {
  const installation = useInstallation(installationId);
  const now = useStore(link);
  if (now.state !== 'broken') return { live: true };
  const zone = installation?.timeZone;
  return now.heardAt === null || !zone
    ? { live: false }
    : { live: false, since: formatTime(now.heardAt, zone) };
}

function Ruler({ installationId, size }: { installationId: string; size?: 'phone' }) {
  const today = useToday(installationId);
  if (!today) return null;
  const { doors, start, clearUp, end, breaks } = today.day;
  return (
    <DayRuler
      doors={doors}
      start={start}
      clearUp={clearUp}
      end={end}
      breaks={breaks}
      now={today.now}
      size={size}
    />
  );
}

function Desk({
  installationId,
  handle,
  children,
}: {
  installationId: string;
  handle: PageHandle;
  children: ReactNode;
}) {
  const may = useMay(installationId);
  const { data } = useSession();
  const who = useWho(installationId);
  const installation = useInstallation(installationId);
  const today = useToday(installationId);
  const revision = useLive(installationId, (state) => state.cursor);
  const linkState = useLinkState(installationId);
  const duties = (membershipIn(data, installationId)?.duties ?? []).filter((duty) => duty !== 'volunteer');
  const day = today
    ? `${today.count > 1 ? `day ${today.number} of ${today.count}, ` : ''}${formatCalendarDay(today.day.date)}`
    : undefined;
  return (
    <DeskFrame
      items={screensFor(installationId, may)}
      home={data?.principal?.kind === 'account' ? '/installations' : `/i/${installationId}/bench`}
      titleBlock={{
        installation: installation?.name,
        day,
        revision,
        link: linkState,
        who: [who, ...duties.slice(0, 2)].filter(Boolean).join(', '),
        more: (
          <>
            <RaiseStop installationId={installationId} size="desk" />
            <MyThings />
          </>
        ),
      }}
      ruler={handle.day ? <Ruler installationId={installationId} /> : undefined}
      stop={<StopNow installationId={installationId} />}
    >
      {children}
    </DeskFrame>
  );
}

/** Theme and the way out. */
export function MyThings() {
  const client = useQueryClient();
  const change = useChangeSession();
  const navigate = useNavigate();
  const [theme, chooseTheme] = useThemeChoice();
  const signOut = async () => {
    await send('DELETE', '/session');
    await change(null);
    await client.invalidateQueries({ queryKey: SESSION_KEY });
    await navigate('/sign-in');
  };
  return (
    <div className="flex flex-wrap gap-x-4">
      <Action look="words" onClick={() => chooseTheme(theme === 'night' ? 'paper' : 'night')}>
        {theme === 'night' ? 'Paper' : 'Night'}
      </Action>
      <Action look="words" onClick={() => void signOut()}>
        Sign out
      </Action>
    </div>
  );
}

function Phone({
  installationId,
  handle,
  children,
}: {
  installationId: string;
  handle: PageHandle;
  children: ReactNode;
}) {
  const messages = useMessages();
  const who = useWho(installationId);
  const linkState = useLinkState(installationId);
  const today = useToday(installationId);
  const may = useMay(installationId);
  // Whoever waits for the muster desk sees no board.
  const screens = PHONE_SCREENS.filter((path) => path !== 'travellers' || may('step.claim'));
  return (
    <PhoneFrame
      title={handle.phone?.(messages) ?? ''}
      who={who}
      link={linkState}
      linkWords={{ live: messages.common.link.live(today?.now ?? ''), broken: messages.common.link.broken }}
      navLabel={messages.common.screensLabel}
      skipWords={messages.common.skip}
      ruler={handle.day ? <Ruler installationId={installationId} size="phone" /> : undefined}
      stop={<StopNow installationId={installationId} />}
      items={screens.map((path) => ({
        to: `/i/${installationId}/${path}`,
        label: messages.common.screens[path],
      }))}
    >
      {children}
    </PhoneFrame>
  );
}
