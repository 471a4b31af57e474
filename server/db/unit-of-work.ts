import { AsyncLocalStorage } from 'node:async_hooks';
import { setImmediate as nextLoop } from 'node:timers/promises';
import type { DataSource, EntityManager } from 'typeorm';

/** Most units that share one commit; the first of them waits for the last, so not too many. */
const MOST_AT_ONCE = 16;

interface Unit {
  /** Run the work between two savepoints; never rejects. */
  run(manager: EntityManager): Promise<void>;
  /** The commit is on the disk: tell whoever asked what the work gave or threw. */
  settle(): void;
  fail(error: unknown): void;
}

/**
 * The only way to write: a first-in-first-out queue, one unit at a time. A data source of better-sqlite3 has one
 * connection, so two transactions that overlap would share it and corrupt each other. Work inside may await nothing
 * but the database.
 *
 * Units that wait at the same moment share one commit (group commit): each runs between savepoints of its own, one after
 * the other, and is undone alone when it throws; nobody is answered before the commit that holds all of them is on the
 * disk. In a burst, forced writes to the disk are what costs most.
 */
export class UnitOfWork {
  private readonly waiting: Unit[] = [];
  private turn: Promise<void> | null = null;
  private readonly inside = new AsyncLocalStorage<true>();

  constructor(private readonly writer: DataSource) {}

  /**
   * Run work in a unit of its own, after all that was asked for before it.
   * @throws what the work throws, after it was undone; an error at once when called from inside another unit of work
   */
  run<T>(work: (manager: EntityManager) => Promise<T>): Promise<T> {
    if (this.inside.getStore()) {
      return Promise.reject(new Error('A unit of work is already running here: it cannot be nested.'));
    }
    return new Promise<T>((resolve, reject) => {
      this.waiting.push(unitOf(work, resolve, reject));
      this.turn ??= this.takeTurns();
    });
  }

  /** Wait until everything asked for so far is done. */
  async idle(): Promise<void> {
    await this.turn;
  }

  private async takeTurns(): Promise<void> {
    while (this.waiting.length > 0) {
      // A turn runs through without going back to the event loop, so nobody could join it: hear first what has arrived.
      await nextLoop();
      const units = this.waiting.splice(0, MOST_AT_ONCE);
      try {
        await this.inside.run(true, () =>
          this.writer.transaction(async (manager) => {
            for (const unit of units) await unit.run(manager);
          }),
        );
        for (const unit of units) unit.settle();
      } catch (error) {
        // The commit itself failed: nothing of this turn is written.
        for (const unit of units) unit.fail(error);
      }
    }
    this.turn = null;
  }
}

function unitOf<T>(
  work: (manager: EntityManager) => Promise<T>,
  resolve: (value: T) => void,
  reject: (error: unknown) => void,
): Unit {
  let settle: () => void = () => undefined;
  return {
    run: async (manager) => {
      await manager.query('SAVEPOINT unit');
      try {
        const value = await work(manager);
        settle = () => resolve(value);
      } catch (error) {
        await manager.query('ROLLBACK TO unit');
        settle = () => reject(error);
      }
      await manager.query('RELEASE unit');
    },
    settle: () => settle(),
    fail: reject,
  };
}
