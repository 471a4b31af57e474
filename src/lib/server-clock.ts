import { useEffect, useState } from 'react';

/** What the server's clock showed, and the phone's running time at that moment; its wall clock may be wrong. */
let heard = { serverMs: Date.now(), localMs: performance.now(), rate: 1 };

const followers = new Set<() => void>();

/** Further apart than this the two clocks have to be set anew; less is the way of the answer through the network. */
const JUMP_MS = 1500;

/** Take the server's time from an answer or a beat. */
export function setServerTime(serverMs: number, rate: number): void {
  const jumped = Math.abs(serverMs - serverNow()) > JUMP_MS * rate || rate !== heard.rate;
  heard = { serverMs, localMs: performance.now(), rate };
  if (jumped) for (const follow of followers) follow();
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
    const renew = () => setNow(serverNow());
    const timer = setInterval(renew, everyMs / Math.min(heard.rate, 20));
    followers.add(renew);
    return () => {
      clearInterval(timer);
      followers.delete(renew);
    };
  }, [everyMs]);
  return now;
}
