import http from 'node:http';
import { io, type Socket } from 'socket.io-client';

/** One phone of the benchmark: a kept-alive HTTP connection and a socket with a board behind it. */
export interface Phone {
  socket: Socket;
  headers: Record<string, string>;
}

/** What a server under test looks like to the benchmark. */
export interface Target {
  url: string;
  /** Path of a claim of a step. */
  claimPath(stepId: string): string;
  /** Ids of steps that a message shows as claimed. */
  claimedIn(event: string, message: unknown): string[];
  /** Headers of one phone. */
  headersOf(phone: number): Record<string, string>;
  /** Make the socket listen. */
  join(socket: Socket): Promise<void>;
}

export interface ClaimResult {
  stepId: string;
  status: number;
  sentAt: number;
  repliedAt: number;
}

const agent = new http.Agent({ keepAlive: true, maxSockets: 2000, maxFreeSockets: 2000 });

/** POST an empty body and wait for the whole answer. */
function post(url: string, headers: Record<string, string>): Promise<number> {
  return new Promise((resolve, reject) => {
    const request = http.request(
      url,
      {
        method: 'POST',
        agent,
        headers: { ...headers, 'content-type': 'application/json', 'content-length': '2' },
      },
      (response) => {
        response.resume();
        response.on('end', () => resolve(response.statusCode ?? 0));
        response.on('error', reject);
      },
    );
    request.on('error', reject);
    request.end('{}');
  });
}

/** All phones of one run, and what their boards have seen. */
export class Phones {
  readonly phones: Phone[] = [];
  private readonly seen = new Map<string, { count: number; lastAt: number; first: Set<number> }>();
  private waiting: { ids: Set<string>; resolve: () => void } | null = null;
  messages = 0;

  constructor(private readonly target: Target) {}

  async connect(people: number): Promise<void> {
    for (let index = 0; index < people; index += 1) {
      const headers = this.target.headersOf(index);
      const socket = io(this.target.url, {
        transports: ['websocket'],
        extraHeaders: headers,
        reconnection: false,
        forceNew: true,
      });
      socket.onAny((event: string, message: unknown) => this.note(index, event, message));
      this.phones.push({ socket, headers });
    }
    await Promise.all(
      this.phones.map(
        ({ socket }) =>
          new Promise<void>((resolve, reject) => {
            socket.on('connect', () => this.target.join(socket).then(resolve, reject));
            socket.on('connect_error', reject);
          }),
      ),
    );
  }

  /** Open the HTTP connections, so that no run pays for them. */
  async warm(path: string): Promise<void> {
    await Promise.all(
      this.phones.map(
        ({ headers }) =>
          new Promise<void>((resolve, reject) => {
            http
              .get(`${this.target.url}${path}`, { agent, headers }, (response) => {
                response.resume();
                response.on('end', resolve);
              })
              .on('error', reject);
          }),
      ),
    );
  }

  private note(phone: number, event: string, message: unknown): void {
    this.messages += 1;
    for (const stepId of this.target.claimedIn(event, message)) {
      const entry = this.seen.get(stepId) ?? { count: 0, lastAt: 0, first: new Set<number>() };
      if (!entry.first.has(phone)) {
        entry.first.add(phone);
        entry.count += 1;
        entry.lastAt = performance.now();
        this.seen.set(stepId, entry);
        if (entry.count === this.phones.length) this.settle(stepId);
      }
    }
  }

  private settle(stepId: string): void {
    if (!this.waiting) return;
    this.waiting.ids.delete(stepId);
    if (this.waiting.ids.size === 0) {
      this.waiting.resolve();
      this.waiting = null;
    }
  }

  async claim(phone: number, stepId: string, key: string): Promise<ClaimResult> {
    const { headers } = this.phones[phone] as Phone;
    const sentAt = performance.now();
    const status = await post(`${this.target.url}${this.target.claimPath(stepId)}`, {
      ...headers,
      'idempotency-key': key,
    });
    return { stepId, status, sentAt, repliedAt: performance.now() };
  }

  /** Wait until every board has seen every one of these steps claimed. */
  async allSeen(stepIds: readonly string[], timeoutMs = 60_000): Promise<void> {
    const missing = stepIds.filter((id) => (this.seen.get(id)?.count ?? 0) < this.phones.length);
    if (missing.length === 0) return;
    await Promise.race([
      new Promise<void>((resolve) => {
        this.waiting = { ids: new Set(missing), resolve };
      }),
      new Promise<void>((_resolve, reject) => {
        setTimeout(
          () => reject(new Error(`${missing.length} claims were not seen on every board`)),
          timeoutMs,
        ).unref();
      }),
    ]);
  }

  /** When the last board saw the step claimed; undefined when not all did. */
  seenAt(stepId: string): number | undefined {
    const entry = this.seen.get(stepId);
    return entry && entry.count === this.phones.length ? entry.lastAt : undefined;
  }

  close(): void {
    for (const { socket } of this.phones) socket.disconnect();
  }
}

/** 50th, 95th and 99th percentile, to a tenth of a millisecond. */
export function percentiles(values: readonly number[]): { p50: number; p95: number; p99: number } {
  const sorted = [...values].sort((a, b) => a - b);
  const at = (share: number) =>
    Math.round((sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? 0) * 10) / 10;
  return { p50: at(0.5), p95: at(0.95), p99: at(0.99) };
}
