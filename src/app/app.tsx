import { useEffect, useRef } from 'react';
import { createBrowserRouter, Outlet, RouterProvider, useLocation } from 'react-router-dom';
import type { RouteObject } from 'react-router-dom';
import { ErrorBoundary, RouteProblem } from './error-boundary';
import { NotFound } from './routes/not-found';

/** Takes a reader to the new page's head when the page changes, as loading it would. */
function Pages() {
  const { pathname } = useLocation();
  const shown = useRef(pathname);
  useEffect(() => {
    if (shown.current === pathname) return;
    shown.current = pathname;
    window.scrollTo(0, 0);
    const head = document.querySelector<HTMLElement>('h1[tabindex]') ?? document.getElementById('main');
    head?.focus({ preventScroll: true });
  }, [pathname]);
  return <Outlet />;
}

/** Every page is fetched when it is first opened; the kit only exists while developing. */
const pages: RouteObject[] = [
  { index: true, lazy: async () => ({ Component: (await import('./routes/front')).Front }) },
  ...(import.meta.env.DEV
    ? [{ path: 'kit/*', lazy: async () => ({ Component: (await import('./routes/kit')).Kit }) }]
    : []),
  { path: '*', Component: NotFound },
];

const router = createBrowserRouter([
  {
    Component: Pages,
    ErrorBoundary: RouteProblem,
    HydrateFallback: () => null,
    children: pages,
  },
]);

/** Strutbee in a browser. */
export function App() {
  return (
    <ErrorBoundary>
      <RouterProvider router={router} />
    </ErrorBoundary>
  );
}
