import type { Server as HttpServer } from 'node:http';
import type { RequestHandler } from 'express';
import { Server, type Socket } from 'socket.io';
import { z } from 'zod';
import { may } from '../../shared/accounts';
import {
  AUDIENCES,
  type Audience,
  type Changed,
  type ClientEvents,
  type RangeMessage,
  type ServerEvents,
} from '../../shared/contracts/live';
import type { Clock } from '../../shared/kernel/clock';
import { principalKey, type Principal, type Principals } from '../http/principal';
import type { LiveReader } from './live-reader';
import type { Outlet } from './publisher';

/** How often the server says that it lives; a screen that misses a few says that it is stale. */
export const BEAT_MS = 4000;

interface SocketData {
  principal: Principal;
  watching: { installationId: string; audience: Audience; personId: string | null } | null;
}
type LiveSocket = Socket<ClientEvents, ServerEvents, Record<string, never>, SocketData>;

const watchSchema = z.object({
  installationId: z.string().max(40),
  since: z.number().int().min(0).nullable(),
});

const audienceRoom = (installationId: string, audience: Audience) => `${installationId}/${audience}`;
const personRoom = (personId: string) => `person/${personId}`;

export interface HubDeps {
  http: HttpServer;
  session: RequestHandler;
  principals: Principals;
  reader: LiveReader;
  clock: Clock;
}

/** The sockets: who listens to which installation, in which audience. */
export class Hub implements Outlet {
  private readonly io: Server<ClientEvents, ServerEvents, Record<string, never>, SocketData>;
  private readonly beat: NodeJS.Timeout;

  constructor(private readonly deps: HubDeps) {
    this.io = new Server(deps.http, { serveClient: false, maxHttpBufferSize: 10_000 });
    this.io.engine.use(deps.session);
    this.io.use((socket, next) => {
      const principal = this.principalOf(socket);
      if (!principal) {
        next(new Error('SIGN_IN_NEEDED'));
        return;
      }
      socket.data = { principal, watching: null };
      next();
    });
    this.io.on('connection', (socket) => {
      socket.on('watch', (input, reply) => this.watch(socket, input, reply));
    });
    this.beat = setInterval(() => this.sendBeats(), BEAT_MS);
    this.beat.unref();
  }

  listens(installationId: string, audience: Audience): boolean {
    return (this.io.sockets.adapter.rooms.get(audienceRoom(installationId, audience))?.size ?? 0) > 0;
  }

  range(installationId: string, audience: Audience, message: RangeMessage): void {
    this.io.to(audienceRoom(installationId, audience)).emit('range', message);
  }

  own(_installationId: string, personId: string, changed: Changed): void {
    this.io.to(personRoom(personId)).emit('own', changed);
  }

  /** Somebody's duties, confirmation or presence changed: put their sockets where they belong now. */
  replace(personIds: Iterable<string>): void {
    const wanted = new Set(personIds);
    if (wanted.size === 0) return;
    for (const socket of this.io.sockets.sockets.values()) {
      const { watching, principal } = socket.data;
      if (!watching?.personId || !wanted.has(watching.personId)) continue;
      const now = this.deps.principals.find(principalKey(principal));
      const actor = now && this.deps.principals.actorIn(now, watching.installationId);
      if (!now || !actor) {
        this.end(socket);
        continue;
      }
      if (actor.audience === watching.audience) continue;
      void socket.leave(audienceRoom(watching.installationId, watching.audience));
      watching.audience = actor.audience;
      void socket.join(audienceRoom(watching.installationId, actor.audience));
      socket.emit('reset', this.deps.reader.snapshot(watching.installationId, actor));
    }
  }

  /** Whoever has lost the session is cut off. */
  endAllOf(key: string): void {
    for (const socket of this.io.sockets.sockets.values()) {
      if (principalKey(socket.data.principal) === key) this.end(socket);
    }
  }

  /** One session signed out: its open pages hear no more. */
  endSession(sid: string): void {
    for (const socket of this.io.sockets.sockets.values()) {
      if ((socket.request as unknown as { sessionID?: string }).sessionID === sid) this.end(socket);
    }
  }

  /** Phones of people on site with a live link; one person with two tabs counts once. */
  phones(installationId: string): number {
    const people = new Set<string>();
    for (const socket of this.io.sockets.sockets.values()) {
      const { watching } = socket.data;
      if (watching?.installationId === installationId && watching.personId) people.add(watching.personId);
    }
    return people.size;
  }

  async close(): Promise<void> {
    clearInterval(this.beat);
    await this.io.close();
  }

  private principalOf(socket: LiveSocket): Principal | null {
    const request = socket.request as unknown as { session?: { passport?: { user?: string } } };
    const key = request.session?.passport?.user;
    return key ? this.deps.principals.find(key) : null;
  }

  private watch(socket: LiveSocket, input: unknown, reply: unknown): void {
    if (typeof reply !== 'function') return;
    const answer = reply as Parameters<ClientEvents['watch']>[1];
    const parsed = watchSchema.safeParse(input);
    if (!parsed.success) {
      answer({ ok: false, code: 'VALIDATION' });
      return;
    }
    const { installationId, since } = parsed.data;
    const principal = this.deps.principals.find(principalKey(socket.data.principal));
    const actor = principal && this.deps.principals.actorIn(principal, installationId);
    if (!actor || !may(actor.rights, 'live.read')) {
      answer({ ok: false, code: 'NOT_FOUND' });
      return;
    }
    const before = socket.data.watching;
    if (before) {
      void socket.leave(audienceRoom(before.installationId, before.audience));
      if (before.personId) void socket.leave(personRoom(before.personId));
    }
    socket.data.watching = { installationId, audience: actor.audience, personId: actor.personId };
    void socket.join(audienceRoom(installationId, actor.audience));
    if (actor.personId) void socket.join(personRoom(actor.personId));
    // Joined first: what commits from here on comes as a range, so nothing falls between the two.
    answer({ ok: true, catchUp: this.deps.reader.catchUp(installationId, since, actor) });
    socket.emit('beat', this.beatOf(installationId));
  }

  private end(socket: LiveSocket): void {
    socket.emit('ended');
    socket.disconnect(true);
  }

  private beatOf(installationId: string) {
    const { clock, reader } = this.deps;
    return {
      now: clock.now(),
      clockRate: clock.rate,
      revision: reader.revisionOf(installationId) ?? 0,
      phones: this.phones(installationId),
    };
  }

  private sendBeats(): void {
    const installations = new Set<string>();
    for (const socket of this.io.sockets.sockets.values()) {
      if (socket.data.watching) installations.add(socket.data.watching.installationId);
    }
    for (const id of installations) {
      const rooms = AUDIENCES.map((audience) => audienceRoom(id, audience));
      this.io.to(rooms).emit('beat', this.beatOf(id));
    }
  }
}
