import { io, type Socket } from 'socket.io-client';
import type { CatchUp, ClientEvents, RangeMessage, ServerEvents } from '../../shared/contracts/live';
import { fromSnapshot, withRange, withRecords, type LiveState } from '../../src/lib/live-state';
import type { TestClient } from './test-server';

/** A board as a browser keeps it: the client's own reducer behind a real socket. */
export class Board {
  state: LiveState | null = null;
  readonly ranges: RangeMessage[] = [];
  gaps = 0;
  ended = false;
  resets = 0;
  private readonly waiting: { until: (board: Board) => boolean; resolve: () => void }[] = [];

  private constructor(
    readonly socket: Socket<ServerEvents, ClientEvents>,
    private readonly installationId: string,
  ) {
    socket.on('range', (message) => {
      this.ranges.push(message);
      const next = this.state ? withRange(this.state, message) : 'gap';
      if (next === 'gap') this.gaps += 1;
      else this.state = next;
      this.settle();
    });
    socket.on('own', (changed) => {
      if (this.state) this.state = withRecords(this.state, changed);
      this.settle();
    });
    socket.on('reset', (snapshot) => {
      this.state = fromSnapshot(snapshot);
      this.resets += 1;
      this.settle();
    });
    socket.on('ended', () => {
      this.ended = true;
      this.settle();
    });
    socket.on('disconnect', () => this.settle());
  }

  /** Connect with a client's session and watch an installation. */
  static async open(client: Pick<TestClient, 'url' | 'cookie'>, installationId: string): Promise<Board> {
    const socket: Socket<ServerEvents, ClientEvents> = io(client.url, {
      transports: ['websocket'],
      extraHeaders: { cookie: client.cookie() },
      forceNew: true,
      reconnection: false,
    });
    const board = new Board(socket, installationId);
    await new Promise<void>((resolve, reject) => {
      socket.once('connect', () => resolve());
      socket.once('connect_error', reject);
    });
    await board.watch();
    return board;
  }

  /** Ask for what is missing; also after a reconnect. */
  watch(): Promise<CatchUp> {
    const wish = { installationId: this.installationId, since: this.state?.cursor ?? null };
    return new Promise((resolve, reject) => {
      // Taken inside the callback: a range may stand in the same packet, right behind the answer.
      this.socket.emit('watch', wish, (answer) => {
        if (!answer.ok) {
          reject(new Error(`may not watch: ${answer.code}`));
          return;
        }
        this.take(answer.catchUp);
        resolve(answer.catchUp);
      });
    });
  }

  take(catchUp: CatchUp): void {
    if (catchUp.reset) this.state = fromSnapshot(catchUp.snapshot);
    else if (this.state) {
      const next = withRange(this.state, catchUp);
      if (next === 'gap') this.gaps += 1;
      else this.state = next;
    }
    this.settle();
  }

  /** Lose the network, without a word to the server. */
  drop(): void {
    this.socket.disconnect();
  }

  async reconnect(): Promise<CatchUp> {
    this.socket.connect();
    await new Promise<void>((resolve) => this.socket.once('connect', () => resolve()));
    return this.watch();
  }

  /** Wait until the board looks as expected; every message is a chance. */
  async until(expected: (board: Board) => boolean, timeoutMs = 5000): Promise<void> {
    if (expected(this)) return;
    await new Promise<void>((resolve, reject) => {
      const timer = setTimeout(() => reject(new Error('the board never looked as expected')), timeoutMs);
      this.waiting.push({
        until: expected,
        resolve: () => {
          clearTimeout(timer);
          resolve();
        },
      });
    });
  }

  step(stepId: string) {
    return this.state?.records.steps.get(stepId);
  }

  private settle(): void {
    for (const entry of [...this.waiting]) {
      if (!entry.until(this)) continue;
      this.waiting.splice(this.waiting.indexOf(entry), 1);
      entry.resolve();
    }
  }
}
