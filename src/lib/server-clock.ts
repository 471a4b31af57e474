import { useEffect, useState } from 'react';

/** What the server's clock showed, and the phone's running time at that moment; its wall clock may be wrong. */
let heard = { serverMs: Date.now(), localMs: performance.now(), rate: 1 };

/** Take the server's time from an answer or a beat. */
export function setServerTime(serverMs: number, rate: number): void {
  heard = { serverMs, localMs: performance.now(), rate };
}

/** A moment by the phone's wall clock as the server's time; only how long ago it was is used. */
export const serverTimeOf = (phoneMs: number): number => serverNow() - (Date.now() - phoneMs);

/** The server's time now, ms UTC. */
export const serverNow = (): number => heard.serverMs + (performance.now() - heard.localMs) * heard.rate;

/**
 * The server's time, renewed every so often.
 * @param everyMs of real time; clocks that count minutes need no more than a few renewals a minute
 */
export function useServerNow(everyMs = 10_000): number {
  const [now, setNow] = useState(serverNow);
  useEffect(() => {
    const timer = setInterval(() => setNow(serverNow()), everyMs / Math.min(heard.rate, 20));
    return () => clearInterval(timer);
  }, [everyMs]);
  return now;
}
