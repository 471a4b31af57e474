import { AUDIENCES, type Changed, type LiveKind, type RangeMessage } from '../../shared/contracts/live';
import type { Audience } from '../../shared/contracts/live';
import type { Committed } from '../db/write';
import type { LiveReader } from './live-reader';

/** How long changes are collected before one message goes to each audience. */
export const WINDOW_MS = 25;

/** Where messages go: the socket hub, or a list in a test. */
export interface Outlet {
  /** Whether anybody of the audience listens. */
  listens(installationId: string, audience: Audience): boolean;
  range(installationId: string, audience: Audience, message: RangeMessage): void;
  own(installationId: string, personId: string, changed: Changed): void;
}

interface Pending {
  from: number;
  to: number;
  ids: Map<LiveKind, Set<string>>;
}

/**
 * Collects committed changes over a short window and sends one range message per window and audience. An audience that
 * sees none of the changes still gets the range, so that nobody sees a gap that is not one.
 */
export class Publisher {
  private readonly pending = new Map<string, Pending>();
  private timer: NodeJS.Timeout | null = null;

  constructor(
    private readonly reader: LiveReader,
    private readonly outlet: Outlet,
    private readonly windowMs = WINDOW_MS,
  ) {}

  /** Take the changes of one committed use case; call it after the commit and only then. */
  add(committed: Committed): void {
    const { installationId, revision, changed } = committed;
    const waiting = this.pending.get(installationId);
    if (waiting) {
      waiting.to = Math.max(waiting.to, revision);
      for (const [kind, ids] of changed) {
        const known = waiting.ids.get(kind);
        if (known) for (const id of ids) known.add(id);
        else waiting.ids.set(kind, new Set(ids));
      }
    } else {
      this.pending.set(installationId, { from: revision - 1, to: revision, ids: new Map(changed) });
    }
    this.timer ??= setTimeout(() => this.flush(), this.windowMs);
  }

  /** Send what waits now. */
  flush(): void {
    if (this.timer) clearTimeout(this.timer);
    this.timer = null;
    const all = [...this.pending];
    this.pending.clear();
    for (const [installationId, { from, to, ids }] of all) {
      const whole = this.reader.changedRecords(installationId, ids);
      for (const audience of AUDIENCES) {
        if (!this.outlet.listens(installationId, audience)) continue;
        const changed = this.reader.seenBy(whole, { audience, personId: null });
        this.outlet.range(installationId, audience, { from, to, changed });
      }
      for (const [personId, changed] of this.reader.ownRecords(whole))
        this.outlet.own(installationId, personId, changed);
    }
  }

  close(): void {
    if (this.timer) clearTimeout(this.timer);
    this.timer = null;
    this.pending.clear();
  }
}
