import { useEffect } from 'react';

/** Names the browser's tab after the page. */
export function usePageTitle(title: string): void {
  useEffect(() => {
    document.title = title === 'Strutbee' ? title : `${title} · Strutbee`;
  }, [title]);
}
