import { useEffect } from 'react';
import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import type { CatchUp, Snapshot } from '../../shared/contracts/live';
import { get } from '../lib/api';
import { link, liveKey } from '../lib/live';
import { fromSnapshot, withRange, withRecords, type LiveState } from '../lib/live-state';
import { serverNow, setServerTime } from '../lib/server-clock';
import { SESSION_KEY } from '../lib/session-key';
import { openSocket, type LiveSocket } from '../lib/socket';
import { replayQueue } from '../lib/write-queue';

/** Without a beat for this long the link counts as broken, even if the socket has not noticed yet. */
const SILENCE_MS = 10_000;

class LiveConnection {
  private readonly socket: LiveSocket = openSocket();
  private readonly watchdog: ReturnType<typeof setInterval>;
  private lastBeat = performance.now();
  private catchingUp = false;

  constructor(
    private readonly client: QueryClient,
    private readonly installationId: string,
  ) {
    link.set({ state: 'connecting', heardAt: null, phones: 0 });
    const { socket } = this;
    socket.on('connect', () => this.watch());
    socket.on('disconnect', (reason) => {
      this.broken();
      // After the server closed it, the client does not try again by itself.
      if (reason === 'io server disconnect') void this.client.invalidateQueries({ queryKey: SESSION_KEY });
    });
    socket.on('connect_error', () => this.broken());
    socket.on('range', (message) => {
      const state = this.state();
      const next = state ? withRange(state, message) : 'gap';
      if (next === 'gap') void this.catchUp();
      else this.put(next);
    });
    socket.on('own', (changed) => {
      const state = this.state();
      if (state) this.put(withRecords(state, changed));
    });
    socket.on('reset', (snapshot) => {
      this.reset(snapshot);
      // Duties or confirmation changed: screens ask the session what they may.
      void this.client.invalidateQueries({ queryKey: SESSION_KEY });
    });
    socket.on('beat', (beat) => {
      this.lastBeat = performance.now();
      setServerTime(beat.now, beat.clockRate);
      link.set({ state: 'live', heardAt: beat.now, phones: beat.phones });
      const state = this.state();
      if (state && beat.revision > state.cursor) void this.catchUp();
    });
    socket.on('ended', () => void this.client.invalidateQueries({ queryKey: SESSION_KEY }));
    this.watchdog = setInterval(() => {
      if (performance.now() - this.lastBeat <= SILENCE_MS || link.get().state !== 'live') return;
      this.broken();
      // A half-open connection would take minutes to fail by itself.
      socket.disconnect().connect();
    }, 2000);
    window.addEventListener('online', this.knock);
    document.addEventListener('visibilitychange', this.knock);
    socket.connect();
  }

  close(): void {
    clearInterval(this.watchdog);
    window.removeEventListener('online', this.knock);
    document.removeEventListener('visibilitychange', this.knock);
    this.socket.removeAllListeners();
    this.socket.disconnect();
  }

  /** The phone woke up or found a network: do not wait for the next try. */
  private readonly knock = () => {
    if (document.visibilityState === 'visible' && !this.socket.connected) this.socket.disconnect().connect();
  };

  private state = () => this.client.getQueryData<LiveState>(liveKey(this.installationId));
  private put = (state: LiveState) => this.client.setQueryData(liveKey(this.installationId), state);

  private broken(): void {
    link.set((now) => ({ ...now, state: 'broken' }));
  }

  private watch(): void {
    const since = this.state()?.cursor ?? null;
    this.socket
      .timeout(8000)
      .emit('watch', { installationId: this.installationId, since }, (failed: Error | null, answer) => {
        if (failed) {
          this.socket.disconnect().connect();
          return;
        }
        if (!answer.ok) {
          void this.client.invalidateQueries({ queryKey: SESSION_KEY });
          return;
        }
        this.take(answer.catchUp);
        this.lastBeat = performance.now();
        link.set((now) => ({ ...now, state: 'live', heardAt: serverNow() }));
        void replayQueue(this.client, this.installationId);
      });
  }

  /** Fetch what is missing; one fetch at a time, the next beat asks again if that was not enough. */
  private async catchUp(): Promise<void> {
    if (this.catchingUp) return;
    this.catchingUp = true;
    try {
      const since = this.state()?.cursor;
      const path = `/installations/${this.installationId}`;
      if (since === undefined) this.reset(await get<Snapshot>(`${path}/live`));
      else this.take(await get<CatchUp>(`${path}/changes?since=${since}`));
    } catch {
      this.broken();
    } finally {
      this.catchingUp = false;
    }
  }

  private take(catchUp: CatchUp): void {
    if (catchUp.reset) {
      this.reset(catchUp.snapshot);
      return;
    }
    setServerTime(catchUp.now, catchUp.clockRate);
    const state = this.state();
    if (!state) return;
    const next = withRange(state, catchUp);
    if (next !== 'gap') this.put(next);
  }

  private reset(snapshot: Snapshot): void {
    setServerTime(snapshot.now, snapshot.clockRate);
    this.put(fromSnapshot(snapshot));
  }
}

/** Keep the live state of an installation in the query cache for as long as the component is there. */
export function useRealtime(installationId: string): void {
  const client = useQueryClient();
  useEffect(() => {
    const connection = new LiveConnection(client, installationId);
    return () => connection.close();
  }, [client, installationId]);
}
