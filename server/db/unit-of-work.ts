import { AsyncLocalStorage } from 'node:async_hooks';
import type { DataSource, EntityManager } from 'typeorm';

/**
 * The only way to write: a first-in-first-out queue, one transaction at a time. A data source of better-sqlite3 has one
 * connection, so two transactions that overlap would share it and corrupt each other. Work inside may await nothing
 * but the database.
 */
export class UnitOfWork {
  private tail: Promise<unknown> = Promise.resolve();
  private readonly inside = new AsyncLocalStorage<true>();
  private waiting = 0;

  constructor(private readonly writer: DataSource) {}

  /** How many units wait or run, for the shutdown and the benchmarks. */
  get depth(): number {
    return this.waiting;
  }

  /**
   * Run work in a transaction of its own, after all that was asked for before it.
   * @throws what the work throws, after the rollback; an error at once when called from inside another unit of work
   */
  run<T>(work: (manager: EntityManager) => Promise<T>): Promise<T> {
    if (this.inside.getStore()) {
      return Promise.reject(new Error('A unit of work is already running here: it cannot be nested.'));
    }
    this.waiting += 1;
    const result = this.tail.then(() => this.inside.run(true, () => this.writer.transaction(work)));
    this.tail = result.then(
      () => undefined,
      () => undefined,
    );
    return result.finally(() => {
      this.waiting -= 1;
    });
  }

  /** Wait until everything asked for so far is done. */
  async idle(): Promise<void> {
    await this.tail;
  }
}
