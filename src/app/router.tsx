import type { SessionView } from '../../shared/contracts/live';
import {
  createBrowserRouter,
  Navigate,
  useLocation,
  type LazyRouteFunction,
  type RouteObject,
} from 'react-router-dom';
import { Pending } from '../components/ui/pending';
import { useSession } from '../lib/session';
import { RouteError } from './error-boundary';
import { InstallationLayout, type PageHandle } from './installation-layout';
import { PageChange } from './page-change';
import { Component as NotFound } from './routes/not-found';

type Lazy = LazyRouteFunction<RouteObject>;

const page = (path: string, lazy: Lazy, handle: PageHandle = {}): RouteObject => ({ path, lazy, handle });

/** Where somebody belongs who opens the bare address. */
function Home() {
  const session = useSession();
  const { key } = useLocation();
  if (session.isPending) return <Pending />;
  // A second way to this address, while the first still loads, has to lead on again.
  return <Navigate key={key} to={homeOf(session.data)} replace />;
}

function homeOf(session: SessionView | undefined): string {
  const principal = session?.principal;
  if (!principal) return '/sign-in';
  if (principal.kind === 'display') return '/projector';
  if (principal.kind === 'account') return '/installations';
  const [place] = principal.installations;
  return place ? `/i/${place.installationId}/bench` : '/join';
}

export const router = createBrowserRouter([
  {
    Component: PageChange,
    ErrorBoundary: RouteError,
    HydrateFallback: () => null,
    children: [
      { path: '/', element: <Home /> },
      page('/sign-in', () => import('./routes/sign-in')),
      page('/link', () => import('./routes/link')),
      page('/reset', () => import('./routes/reset')),
      page('/join', () => import('./routes/join')),
      page('/join/:code', () => import('./routes/join')),
      page('/projector', () => import('./routes/projector')),
      page('/account', () => import('./routes/account')),
      page('/accounts', () => import('./routes/accounts')),
      page('/outbox', () => import('./routes/outbox')),
      page('/installations', () => import('./routes/installations')),
      page('/installations/new', () => import('./routes/installation-new')),
      {
        path: '/i/:installationId',
        element: <InstallationLayout />,
        children: [
          { index: true, element: <Navigate to="bench" replace /> },
          page('plan', () => import('./routes/plan')),
          page('people', () => import('./routes/people')),
          page('drawing', () => import('./routes/drawing')),
          page('sub-assemblies', () => import('./routes/sub-assemblies')),
          page('sub-assemblies/:subAssemblyId/sheet', () => import('./routes/piece-sheet')),
          page('templates', () => import('./routes/templates')),
          page('travellers', () => import('./routes/travellers'), { day: true }),
          page('bench', () => import('./routes/bench'), {
            day: true,
            phone: (messages) => messages.bench.title,
          }),
          page('briefings', () => import('./routes/briefings'), {
            phone: (messages) => messages.briefing.list,
          }),
          page('briefings/:key', () => import('./routes/briefing'), {
            phone: (messages) => messages.briefing.title,
          }),
          page('crib', () => import('./routes/crib'), { day: true }),
          page('countersign', () => import('./routes/briefings-desk'), { day: true }),
          page('muster', () => import('./routes/muster'), { day: true }),
          page('register', () => import('./routes/register')),
          page('day-log', () => import('./routes/day-log')),
        ],
      },
      // The gallery of components, for whoever works on them.
      ...(import.meta.env.DEV ? [page('/kit', () => import('./routes/kit'))] : []),
      { path: '*', Component: NotFound },
    ],
  },
]);
