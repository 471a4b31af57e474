/** The one source of "now": milliseconds since the Unix epoch, UTC. */
export interface Clock {
  now(): number;
  /** How many of its seconds pass in a real one. */
  readonly rate: number;
}

/**
 * The machine's clock.
 * @param rate how many times as fast it runs, 1 or more
 * @param from ms UTC it shows at first; the machine's own time when left out
 */
export function systemClock(rate = 1, from?: number): Clock {
  if (rate === 1 && from === undefined) return { rate, now: () => Date.now() };
  const real = Date.now();
  const shown = from ?? real;
  return { rate, now: () => shown + Math.floor((Date.now() - real) * rate) };
}

/** A clock that only moves when told to, for tests. */
export function manualClock(startMs: number): Clock & { advance(ms: number): void; set(ms: number): void } {
  let at = startMs;
  return {
    rate: 1,
    now: () => at,
    advance: (ms) => {
      at += ms;
    },
    set: (ms) => {
      at = ms;
    },
  };
}
