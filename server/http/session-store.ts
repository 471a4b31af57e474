import { createHash } from 'node:crypto';
import type Database from 'better-sqlite3';
import session, { type SessionData } from 'express-session';
import type { Clock } from '../../shared/kernel/clock';
import type { UnitOfWork } from '../db/unit-of-work';

/** Writes a moved expiry only when it moved this far: express-session touches on every request. */
const TOUCH_STEP_MS = 600_000;
const DEFAULT_LIFE_MS = 24 * 3600_000;
/** An account that does nothing for three days signs in again (ASVS 5.0 7.3.1). */
const ACCOUNT_IDLE_MS = 3 * 24 * 3600_000;

interface Entry {
  data: string;
  principal: string | null;
  expiresAt: number;
  /** The expiry that stands in the table. */
  storedExpiry: number;
}

const idOf = (sid: string) => createHash('sha256').update(sid).digest('base64url');

interface Passported {
  passport?: { user?: string };
}

/** Sessions in the database, written through the one queue, read through a cache of this process. */
export class SessionStore extends session.Store {
  private readonly cache = new Map<string, Entry>();
  private readonly read;

  constructor(
    private readonly unitOfWork: UnitOfWork,
    db: Database.Database,
    private readonly clock: Clock,
  ) {
    super();
    this.read = db.prepare<[string], { principal: string | null; data: string; expires_at: number }>(
      'SELECT principal, data, expires_at FROM session WHERE id = ?',
    );
  }

  override get(sid: string, callback: (error: unknown, data?: SessionData | null) => void): void {
    const id = idOf(sid);
    let entry = this.cache.get(id);
    if (!entry) {
      const row = this.read.get(id);
      if (row) {
        entry = {
          data: row.data,
          principal: row.principal,
          expiresAt: row.expires_at,
          storedExpiry: row.expires_at,
        };
        this.cache.set(id, entry);
      }
    }
    if (!entry || entry.expiresAt <= this.clock.now()) {
      if (entry) this.destroy(sid);
      callback(null, null);
      return;
    }
    callback(null, JSON.parse(entry.data) as SessionData);
  }

  override set(sid: string, data: SessionData, callback?: (error?: unknown) => void): void {
    const id = idOf(sid);
    const principal = (data as SessionData & Passported).passport?.user ?? null;
    const expiresAt = this.expiryOf(data);
    const json = JSON.stringify(data);
    this.unitOfWork
      .run(async (manager) => {
        await manager.query(
          `INSERT INTO session (id, principal, data, expires_at) VALUES (?, ?, ?, ?)
           ON CONFLICT (id) DO UPDATE SET principal = excluded.principal, data = excluded.data, expires_at = excluded.expires_at`,
          [id, principal, json, expiresAt],
        );
      })
      .then(
        () => {
          this.cache.set(id, { data: json, principal, expiresAt, storedExpiry: expiresAt });
          callback?.();
        },
        (error: unknown) => callback?.(error),
      );
  }

  override touch(sid: string, data: SessionData, callback?: () => void): void {
    // The reply waits for this: answer at once, write rarely.
    callback?.();
    const id = idOf(sid);
    const entry = this.cache.get(id);
    if (!entry) return;
    entry.expiresAt = this.expiryOf(data);
    if (entry.expiresAt - entry.storedExpiry < TOUCH_STEP_MS) return;
    entry.storedExpiry = entry.expiresAt;
    void this.unitOfWork
      .run(async (manager) => {
        await manager.query('UPDATE session SET expires_at = ? WHERE id = ?', [entry.expiresAt, id]);
      })
      .catch(() => undefined);
  }

  override destroy(sid: string, callback?: (error?: unknown) => void): void {
    const id = idOf(sid);
    this.cache.delete(id);
    this.unitOfWork
      .run(async (manager) => {
        await manager.query('DELETE FROM session WHERE id = ?', [id]);
      })
      .then(
        () => callback?.(),
        (error: unknown) => callback?.(error),
      );
  }

  /** End every session of a principal, such as `account:ID`; `except` keeps the one that asked. */
  async endAllOf(principal: string, except?: string): Promise<void> {
    const kept = except === undefined ? '' : idOf(except);
    for (const [id, entry] of this.cache)
      if (entry.principal === principal && id !== kept) this.cache.delete(id);
    await this.unitOfWork.run(async (manager) => {
      await manager.query('DELETE FROM session WHERE principal = ? AND id <> ?', [principal, kept]);
    });
  }

  /** Remove what has expired; the server's own job calls it. */
  async sweep(): Promise<void> {
    const now = this.clock.now();
    for (const [id, entry] of this.cache) if (entry.expiresAt <= now) this.cache.delete(id);
    await this.unitOfWork.run(async (manager) => {
      await manager.query('DELETE FROM session WHERE expires_at <= ?', [now]);
    });
  }

  private expiryOf(data: SessionData): number {
    // Cookie ages are in the browser's seconds, so the expiry does not run with a fast demo clock.
    const { passport } = data as SessionData & Passported;
    const life = passport?.user?.startsWith('account:')
      ? ACCOUNT_IDLE_MS
      : (data.cookie.originalMaxAge ?? DEFAULT_LIFE_MS);
    return this.clock.now() + life * this.clock.rate;
  }
}
