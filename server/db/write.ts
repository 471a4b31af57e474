import { createHash } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { ErrorBody } from '../../shared/contracts/errors';
import type { LiveKind } from '../../shared/contracts/live';
import type { Clock } from '../../shared/kernel/clock';
import { newId } from '../../shared/kernel/ids';
import { AppError } from '../http/app-error';
import type { UnitOfWork } from './unit-of-work';

/** Who makes a change: the key under which its answers are kept, and what the day log says. */
export interface ChangeMaker {
  /** `person:ID`, `account:ID` or `server`. */
  actor: string;
  personId: string | null;
}

/** The server itself: jobs and seeds. */
export const SERVER_ACTOR: ChangeMaker = { actor: 'server', personId: null };

/** What the request asked to be kept under, so that a repetition has no second effect. */
export interface Idempotency {
  key: string;
  body: unknown;
}

export interface LogEntry {
  action: string;
  subject: Record<string, unknown>;
  flags?: string[];
  happenedAt?: number;
  forPersonId?: string | null;
}

/** What a use case writes through. */
export interface WriteScope {
  readonly manager: EntityManager;
  /** ms UTC, the same for the whole use case. */
  readonly now: number;
  readonly maker: ChangeMaker;
  /** The installation's new revision; raised once per use case, on first call. */
  revision(): Promise<number>;
  /** Note a live record as changed; its row must carry `revision()`. */
  changed(kind: LiveKind, id: string): void;
  /** Append to the day log. */
  log(entry: LogEntry): Promise<void>;
  /** Queue a letter; it is sent after the commit. */
  mail(letter: { to: string; subject: string; text: string }): Promise<void>;
  /** Run after the commit, never on a rollback. */
  afterCommit(action: () => void): void;
}

export interface WriteRequest {
  maker: ChangeMaker;
  installationId: string | null;
  idempotency?: Idempotency | undefined;
}

/** An answer as it is kept: the first one's, whatever happened since. */
export interface Kept {
  status: number;
  reply: unknown;
  replayed: boolean;
}

/** Changes of one committed use case, for the publisher. */
export interface Committed {
  installationId: string;
  revision: number;
  changed: Map<LiveKind, Set<string>>;
}

export interface WriterDeps {
  unitOfWork: UnitOfWork;
  clock: Clock;
  onCommit(committed: Committed): void;
  onMail(): void;
}

/** Statuses whose answer is no property of the request and may differ the next time. */
const NOT_KEPT = new Set([401, 403, 429]);

/** Use cases write through this and nothing else. */
export class Writer {
  constructor(private readonly deps: WriterDeps) {}

  /**
   * Run one use case in one unit of work: its rows, its day-log entry, the installation's revision and the kept answer
   * are committed together or not at all. Rule refusals are kept too, after the rollback of what they had written.
   * @returns the answer and whether it is a repeated one
   * @throws AppError for refusals of a request that carries no key
   */
  async run<T>(
    request: WriteRequest,
    work: (scope: WriteScope) => Promise<T>,
    status = 200,
  ): Promise<{ value: T; replayed: false } | { kept: Kept }> {
    const { unitOfWork, clock } = this.deps;
    const kept = request.idempotency;
    const bodyHash = kept
      ? createHash('sha256')
          .update(JSON.stringify(kept.body ?? null))
          .digest('base64')
      : '';
    const scopes: Scope[] = [];
    try {
      const outcome = await unitOfWork.run(async (manager) => {
        if (kept) {
          const first = await findKept(manager, request.maker.actor, kept.key);
          if (first) return { kept: answerAgain(first, bodyHash) };
        }
        const scope = new Scope(manager, clock.now(), request);
        scopes.push(scope);
        const value = await work(scope);
        if (kept)
          await keep(manager, request, kept.key, bodyHash, status, { data: value ?? null }, scope.now);
        return { value, replayed: false as const };
      });
      const scope = scopes[0];
      if (scope) this.committed(request, scope);
      return outcome;
    } catch (error) {
      if (
        kept &&
        error instanceof AppError &&
        error.status < 500 &&
        !NOT_KEPT.has(error.status) &&
        scopes.length > 0
      ) {
        const refusal = { error: { code: error.code, message: error.message, ...error.more } };
        await unitOfWork.run((manager) =>
          keep(manager, request, kept.key, bodyHash, error.status, refusal, clock.now()),
        );
      }
      throw error;
    }
  }

  /** A use case of the server itself or of a seed: no key, the value comes back as it is. */
  async runPlain<T>(
    request: Omit<WriteRequest, 'idempotency'>,
    work: (scope: WriteScope) => Promise<T>,
  ): Promise<T> {
    const outcome = await this.run(request, work);
    if ('kept' in outcome) throw new Error('A use case without a key cannot have a kept answer.');
    return outcome.value;
  }

  private committed(request: WriteRequest, scope: Scope): void {
    if (request.installationId && scope.raised !== null) {
      this.deps.onCommit({
        installationId: request.installationId,
        revision: scope.raised,
        changed: scope.changes,
      });
    }
    if (scope.mailed) this.deps.onMail();
    for (const action of scope.after) action();
  }
}

class Scope implements WriteScope {
  readonly maker: ChangeMaker;
  raised: number | null = null;
  mailed = false;
  readonly changes = new Map<LiveKind, Set<string>>();
  readonly after: (() => void)[] = [];

  constructor(
    readonly manager: EntityManager,
    readonly now: number,
    private readonly request: WriteRequest,
  ) {
    this.maker = request.maker;
  }

  async revision(): Promise<number> {
    if (this.raised !== null) return this.raised;
    const { installationId } = this.request;
    if (!installationId) throw new Error('This use case belongs to no installation: it has no revision.');
    const rows = await this.manager.query<{ revision: number }[]>(
      'UPDATE installation SET revision = revision + 1 WHERE id = ? RETURNING revision',
      [installationId],
    );
    const row = rows[0];
    if (!row) throw new AppError('NOT_FOUND', 'There is nothing at this address, or not for you.');
    this.raised = row.revision;
    return row.revision;
  }

  changed(kind: LiveKind, id: string): void {
    const ids = this.changes.get(kind) ?? new Set<string>();
    ids.add(id);
    this.changes.set(kind, ids);
  }

  async log(entry: LogEntry): Promise<void> {
    const { installationId } = this.request;
    await this.manager.query(
      `INSERT INTO day_log (installation_id, revision, happened_at, recorded_at, actor, for_person_id, action, subject, flags)
       VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?)`,
      [
        installationId,
        installationId ? await this.revision() : 0,
        entry.happenedAt ?? this.now,
        this.now,
        this.maker.actor,
        entry.forPersonId ?? null,
        entry.action,
        JSON.stringify(entry.subject),
        JSON.stringify(entry.flags ?? []),
      ],
    );
  }

  async mail(letter: { to: string; subject: string; text: string }): Promise<void> {
    this.mailed = true;
    await this.manager.query(
      `INSERT INTO mail (id, recipient, subject, text, status, attempts, created_at, next_try_at)
       VALUES (?, ?, ?, ?, 'queued', 0, ?, ?)`,
      [newId(), letter.to, letter.subject, letter.text, this.now, this.now],
    );
  }

  afterCommit(action: () => void): void {
    this.after.push(action);
  }
}

interface KeptRow {
  body_hash: string;
  status: number;
  reply: string;
}

async function findKept(manager: EntityManager, actor: string, key: string): Promise<KeptRow | undefined> {
  const rows = await manager.query<KeptRow[]>(
    'SELECT body_hash, status, reply FROM idempotency WHERE actor = ? AND key = ?',
    [actor, key],
  );
  return rows[0];
}

function answerAgain(first: KeptRow, bodyHash: string): Kept {
  if (first.body_hash !== bodyHash) {
    throw new AppError(
      'IDEMPOTENCY_KEY_REUSED',
      'This request repeats the key of a different one. Load the page again.',
    );
  }
  return {
    status: first.status,
    reply: JSON.parse(first.reply) as { data: unknown } | Omit<ErrorBody, 'requestId'>,
    replayed: true,
  };
}

async function keep(
  manager: EntityManager,
  request: WriteRequest,
  key: string,
  bodyHash: string,
  status: number,
  reply: unknown,
  at: number,
): Promise<void> {
  await manager.query(
    `INSERT OR IGNORE INTO idempotency (actor, key, installation_id, body_hash, status, reply, at) VALUES (?, ?, ?, ?, ?, ?, ?)`,
    [request.maker.actor, key, request.installationId, bodyHash, status, JSON.stringify(reply), at],
  );
}
