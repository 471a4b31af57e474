import { useEffect, useRef } from 'react';
import { Outlet, useLocation } from 'react-router-dom';

/** Takes a reader to the new page's head when the page changes, as loading it would. Stands round all pages. */
export function PageChange() {
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
