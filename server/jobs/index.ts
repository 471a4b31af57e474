import type { Deps } from '../deps';
import { endDueDrying } from '../modules/travellers';
import { openMail } from './mail.job';

/** The server's own work beside requests. */
export interface Jobs {
  /** Send queued letters now. */
  wakeMail: () => void;
  stop(): Promise<void>;
}

/** A job that runs again and again, never twice at once. */
interface Recurring {
  name: string;
  everyMs: number;
  run(): Promise<void>;
}

const SWEEP_MS = 600_000;
/** Letters are sent when they are written; this turn is for those that have to be tried again. */
const MAIL_MS = 15_000;
/** Drying clocks run in minutes; a step that is late by a few seconds is nobody's loss. */
const DRYING_MS = 3000;

/** Start the server's jobs: sweep old sessions, end drying clocks, send letters. */
export async function startJobs(deps: Deps): Promise<Jobs> {
  const mail = await openMail(deps);
  const sendLetters: Recurring = { name: 'send letters', everyMs: MAIL_MS, run: () => mail.run() };
  const recurring: Recurring[] = [
    { name: 'sweep sessions', everyMs: SWEEP_MS, run: () => deps.sessions.sweep() },
    sendLetters,
    {
      name: 'end drying clocks',
      everyMs: DRYING_MS,
      run: async () => {
        await endDueDrying(deps);
      },
    },
  ];
  const turns = new Turns(deps);
  const timers = recurring.map((job) => {
    const timer = setInterval(() => turns.take(job), job.everyMs);
    timer.unref();
    return timer;
  });
  turns.take(sendLetters);
  return {
    wakeMail: () => turns.take(sendLetters),
    stop: async () => {
      for (const timer of timers) clearInterval(timer);
      await turns.end();
      await mail.close();
    },
  };
}

/** Runs jobs one turn at a time each; a job that is asked for while it runs gets one more turn. */
class Turns {
  private readonly running = new Map<Recurring, Promise<void>>();
  private readonly again = new Set<Recurring>();
  private ended = false;

  constructor(private readonly deps: Deps) {}

  take(job: Recurring): void {
    if (this.ended) return;
    if (this.running.has(job)) {
      this.again.add(job);
      return;
    }
    const turn = job
      .run()
      .catch((error: unknown) => this.deps.log.error({ err: error, job: job.name }, 'a job failed'))
      .finally(() => {
        this.running.delete(job);
        if (this.again.delete(job)) this.take(job);
      });
    this.running.set(job, turn);
  }

  async end(): Promise<void> {
    this.ended = true;
    await Promise.all(this.running.values());
  }
}
