import { existsSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { MessageChannel } from 'node:worker_threads';
import { Piscina } from 'piscina';
import type { TaskInput, TaskKind, TaskOutput } from './task-list';
import type { TaskProgress } from './tasks';

/** How long a task may take to notice that it should stop before its thread is ended, ms. */
const GRACE_MS = 700;
/** A thread that has nothing to do is ended after this, ms. */
const IDLE_MS = 60_000;
/** One thread computes at a time: the machine of a hall has two cores, and the other one answers the phones. */
const THREADS = 1;

/** Beside the source under a loader and in tests, beside the bundle in a build. */
function workerFile(): string {
  const here = path.dirname(fileURLToPath(import.meta.url));
  const file = ['worker.ts', 'worker.js', '../worker.js']
    .map((name) => path.join(here, name))
    .find((candidate) => existsSync(candidate));
  if (!file) throw new Error('The worker of the long computations is not in the build.');
  return file;
}

/** A computation that was asked for. */
export interface Running<Output> {
  result: Promise<Output>;
  /** Ask it to stop with what it has; a task that does not listen is ended and its result rejects. */
  stop(): void;
}

/** Threads for what takes longer than a request may: splits, cut plans, drawings on paper. */
export class WorkerPool {
  private pool: Piscina | null = null;

  /**
   * Run a task in a thread of its own, after those asked for before it.
   * @param onProgress told about ten times a second
   */
  run<K extends TaskKind>(
    kind: K,
    input: TaskInput<K>,
    onProgress: (progress: TaskProgress) => void = () => undefined,
  ): Running<TaskOutput<K>> {
    this.pool ??= open();
    const stop = new SharedArrayBuffer(4);
    const flag = new Int32Array(stop);
    const { port1, port2 } = new MessageChannel();
    port1.on('message', onProgress);
    port1.unref();
    const abort = new AbortController();
    let grace: NodeJS.Timeout | null = null;
    const result = (
      this.pool.run(
        { kind, input, stop, port: port2 },
        { transferList: [port2], signal: abort.signal },
      ) as Promise<TaskOutput<K>>
    ).finally(() => {
      if (grace) clearTimeout(grace);
      port1.close();
    });
    return {
      result,
      stop: () => {
        Atomics.store(flag, 0, 1);
        grace ??= setTimeout(() => abort.abort(), GRACE_MS);
      },
    };
  }

  /** End all threads; what runs is rejected. */
  async close(): Promise<void> {
    await this.pool?.destroy();
    this.pool = null;
  }
}

function open(): Piscina {
  const filename = workerFile();
  return new Piscina({
    filename,
    minThreads: 0,
    maxThreads: THREADS,
    idleTimeout: IDLE_MS,
    execArgv: filename.endsWith('.ts') ? ['--import', 'tsx'] : [],
  });
}
