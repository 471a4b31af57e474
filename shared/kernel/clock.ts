/** The one source of "now": milliseconds since the Unix epoch, UTC. */
export interface Clock {
  now(): number;
  /** How many of its seconds pass in a real one. */
  readonly rate: number;
}

/** The machine's clock, run `rate` times as fast from the moment it is made. */
export function systemClock(rate = 1): Clock {
  const start = Date.now();
  return { rate, now: () => (rate === 1 ? Date.now() : start + Math.floor((Date.now() - start) * rate)) };
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
