import { useEffect, useState } from 'react';
import type { ReactNode } from 'react';

const QUIET_MS = 300;

/** Something is on its way: nothing for 300 ms, then a quiet line, so that quick replies do not flicker. */
export function Pending({ children = 'One moment' }: { children?: ReactNode }) {
  const [late, setLate] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => {
      setLate(true);
    }, QUIET_MS);
    return () => {
      clearTimeout(timer);
    };
  }, []);
  return (
    <p className="pending" role="status">
      {late ? children : null}
    </p>
  );
}
