import type { Clock } from '../../shared/kernel/clock';
import { AppError } from './app-error';

interface Window {
  count: number;
  endsAt: number;
}

/** Above this many keys, those whose window is over are forgotten. */
const SWEEP_ABOVE = 10_000;

/**
 * Counts failures per key (an e-mail address, a code, a session), never per network address: a hall shares one. An
 * attempt counts when it begins and is taken back when it succeeds, so that many at once find no gap.
 */
export class FailureLimit {
  private readonly windows = new Map<string, Window>();

  /** @param options `max` failures in a window of `windowMs`, which begins with the first one */
  constructor(
    private readonly clock: Clock,
    private readonly options: { max: number; windowMs: number },
  ) {}

  /**
   * Begin an attempt.
   * @throws AppError TOO_MANY_FAILURES with how long to wait, and then nothing is counted
   */
  begin(keys: readonly string[]): void {
    const now = this.clock.now();
    if (this.windows.size > SWEEP_ABOVE) this.sweep(now);
    const wait = Math.max(...keys.map((key) => this.waitMs(key, now)));
    if (wait > 0) throw tooMany(wait);
    for (const key of keys) {
      const open = this.windows.get(key);
      if (open && open.endsAt > now) open.count += 1;
      else this.windows.set(key, { count: 1, endsAt: now + this.options.windowMs });
    }
  }

  /** The attempt was no failure after all. */
  succeed(keys: readonly string[]): void {
    for (const key of keys) {
      const open = this.windows.get(key);
      if (open && open.count > 0) open.count -= 1;
    }
  }

  private waitMs(key: string, now: number): number {
    const open = this.windows.get(key);
    return open && open.endsAt > now && open.count >= this.options.max ? open.endsAt - now : 0;
  }

  private sweep(now: number): void {
    for (const [key, open] of this.windows) if (open.endsAt <= now) this.windows.delete(key);
  }
}

function tooMany(waitMs: number): AppError {
  const minutes = Math.ceil(waitMs / 60_000);
  return new AppError(
    'TOO_MANY_FAILURES',
    `Too many tries went wrong. Wait ${minutes} ${minutes === 1 ? 'minute' : 'minutes'}, then try again; nothing is lost.`,
    { details: { retryAfterSeconds: Math.ceil(waitMs / 1000) } },
  );
}
