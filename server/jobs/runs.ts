import type { Logger } from 'pino';
import { newId } from '../../shared/kernel/ids';
import type { RunView } from '../../shared/contracts/runs';
import type { Clock } from '../../shared/kernel/clock';
import { AppError, notFound } from '../http/app-error';
import type { TaskInput, TaskKind, TaskOutput } from './task-list';
import type { Running, WorkerPool } from './worker-pool';

/** Runs that are over are forgotten after this, ms. */
const KEEP_MS = 600_000;

interface Run extends RunView {
  installationId: string;
  key: string;
  running: Running<unknown> | null;
  endedAt: number | null;
}

/** Long computations of the installations: one at a time of each kind, with progress, to be stopped by whoever may start it. */
export class Runs {
  private readonly runs = new Map<string, Run>();

  constructor(
    private readonly pool: WorkerPool,
    private readonly clock: Clock,
    private readonly log: Logger,
  ) {}

  /**
   * Start a computation and what follows from it.
   * @param key what it computes, such as `split`: of one key and installation only one runs
   * @param then writes the result; its return value becomes the run's `result`
   * @throws AppError RUN_ACTIVE when one of this key runs
   */
  start<K extends TaskKind>(
    installationId: string,
    key: string,
    kind: K,
    input: TaskInput<K>,
    then: (output: TaskOutput<K>) => Promise<unknown>,
  ): RunView {
    this.forget();
    const active = [...this.runs.values()].find(
      (run) => run.installationId === installationId && run.key === key && run.endedAt === null,
    );
    if (active) {
      throw new AppError('RUN_ACTIVE', 'This is being computed already. Wait for it, or stop it first.', {
        details: { runId: active.id },
      });
    }
    const run: Run = {
      id: newId(),
      installationId,
      key,
      status: 'running',
      share: 0,
      note: '',
      result: null,
      problem: null,
      running: null,
      endedAt: null,
    };
    this.runs.set(run.id, run);
    const running = this.pool.run(kind, input, ({ share, note }) => Object.assign(run, { share, note }));
    run.running = running;
    void running.result.then(then).then(
      (result) => this.end(run, { status: run.status === 'running' ? 'done' : 'stopped', share: 1, result }),
      (error: unknown) => {
        if (run.status === 'stopping') this.end(run, { status: 'stopped' });
        else {
          if (!(error instanceof AppError)) this.log.error({ err: error, run: key }, 'a computation failed');
          this.end(run, { status: 'failed', problem: problemOf(error) });
        }
      },
    );
    return viewOf(run);
  }

  /** How a run is doing. @throws AppError NOT_FOUND for one of another installation, or long over */
  find(installationId: string, id: string): RunView {
    return viewOf(this.of(installationId, id));
  }

  /** Ask a run to stop: it ends within a second, with what it has where that is worth something. */
  stop(installationId: string, id: string): RunView {
    const run = this.of(installationId, id);
    if (run.status === 'running') {
      run.status = 'stopping';
      run.running?.stop();
    }
    return viewOf(run);
  }

  private of(installationId: string, id: string): Run {
    const run = this.runs.get(id);
    if (run?.installationId !== installationId) throw notFound();
    return run;
  }

  private end(run: Run, change: Partial<RunView>): void {
    Object.assign(run, change);
    run.running = null;
    run.endedAt = this.clock.now();
  }

  private forget(): void {
    const before = this.clock.now() - KEEP_MS * this.clock.rate;
    for (const [id, run] of this.runs) if (run.endedAt !== null && run.endedAt < before) this.runs.delete(id);
  }
}

const viewOf = ({ id, status, share, note, result, problem }: Run): RunView => ({
  id,
  status,
  share,
  note,
  result,
  problem,
});

function problemOf(error: unknown): RunView['problem'] {
  if (error instanceof AppError) return { code: error.code, message: error.message };
  return {
    code: 'RUN_FAILED',
    message:
      'The computation broke off by a fault of the program. Try it again; if it happens again, tell whoever runs the server.',
  };
}
