import type { Task, TaskMessage, TaskProgress } from './tasks';
import { TASKS } from './task-list';

/** How often progress goes to the main thread, ms. */
const PROGRESS_MS = 100;

/** Entry of a worker thread: run one task and say how far it is. */
export default async function runTask({ kind, input, stop, port }: TaskMessage): Promise<unknown> {
  const task = (TASKS as Record<string, Task<unknown, unknown> | undefined>)[kind];
  if (!task) throw new Error(`There is no task ${kind}.`);
  const flag = new Int32Array(stop);
  let last = 0;
  try {
    return await task(input, {
      shouldStop: () => Atomics.load(flag, 0) === 1,
      progress: (share, note) => {
        const now = Date.now();
        if (now - last < PROGRESS_MS) return;
        last = now;
        port.postMessage({ share, note } satisfies TaskProgress);
      },
    });
  } finally {
    port.close();
  }
}
