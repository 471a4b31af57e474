import type { QueryClient } from '@tanstack/react-query';
import type { SessionView } from '../../shared/contracts/live';
import { newId } from '../../shared/kernel/ids';
import { OFFLINE_CLAIM_MS } from '../../shared/travellers/limits';
import { ApiError, fetchSession, NetworkError, send } from './api';
import { SESSION_KEY } from './session-key';
import { createStore } from './store';

/** Commands on a step that may wait on the phone while the network is gone. */
export const QUEUED_COMMANDS = ['claim', 'give-back', 'start', 'finish'] as const;
export type QueuedCommand = (typeof QUEUED_COMMANDS)[number];

/** A change that waits on this phone. Nothing of it is anybody's until the server has said so. */
export interface QueuedWrite {
  /** The idempotency key, kept over every try. */
  key: string;
  personId: string;
  installationId: string;
  stepId: string;
  command: QueuedCommand;
  /** Phone's wall clock, ms; only differences of it are used. */
  at: number;
}

/** What became of a change that had waited. */
export interface QueueOutcome {
  write: QueuedWrite;
  result: 'done' | 'refused' | 'expired';
  error: ApiError | null;
}

const STORAGE = 'strutbee.queue';

/** Changes that wait, oldest first, shared by the tabs of this browser. */
export const queue = createStore<readonly QueuedWrite[]>(load());
/** Answers to changes that had waited, newest last, until somebody has read them. */
export const outcomes = createStore<readonly QueueOutcome[]>([]);

function load(): readonly QueuedWrite[] {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(STORAGE) ?? '[]');
    return Array.isArray(kept) ? (kept as QueuedWrite[]) : [];
  } catch {
    return [];
  }
}

function store(next: readonly QueuedWrite[]): void {
  queue.set(next);
  try {
    localStorage.setItem(STORAGE, JSON.stringify(next));
  } catch {
    // Without storage the queue lives as long as the page, which is all that is left to do.
  }
}

// Another tab of the same phone queued or sent something.
window.addEventListener('storage', (event) => {
  if (event.key === STORAGE) queue.set(load());
});

/** Take a waiting change back before it is sent. */
export const dropQueued = (key: string): void => store(load().filter((write) => write.key !== key));

/** Forget an answer somebody has read. */
export const readOutcome = (key: string): void =>
  outcomes.set((all) => all.filter((outcome) => outcome.write.key !== key));

const pathOf = (write: QueuedWrite) =>
  `/installations/${write.installationId}/steps/${write.stepId}/${write.command}`;

/**
 * Ask for a change of a step: sent at once where there is a network, else kept on the phone and sent in order later.
 * @returns `done`, or `queued` when it waits
 * @throws ApiError when the server refused it
 */
export async function commandStep(wish: Omit<QueuedWrite, 'key' | 'at'>): Promise<'done' | 'queued'> {
  const write: QueuedWrite = { ...wish, key: newId(), at: Date.now() };
  // Whatever waits goes first: a finish must not overtake its start.
  if (load().length > 0) {
    store([...load(), write]);
    return 'queued';
  }
  try {
    await send('POST', pathOf(write), {}, write.key);
    return 'done';
  } catch (error) {
    if (!(error instanceof NetworkError)) throw error;
    // The server may have had it and only the answer was lost: the key makes the next try harmless.
    store([...load(), write]);
    return 'queued';
  }
}

let replaying = false;

/**
 * Send what waits, in order, after renewing session and token. Only the person who queued it may send it; an old claim is
 * given up, because somebody else may stand at the bench.
 */
export async function replayQueue(client: QueryClient, installationId: string): Promise<void> {
  if (replaying || load().length === 0) return;
  replaying = true;
  try {
    const session = await fetchSession();
    client.setQueryData(SESSION_KEY, session);
    const personId = personIn(session, installationId);
    for (const write of load()) {
      if (write.installationId !== installationId || write.personId !== personId) continue;
      const result = await replayOne(write);
      if (!result) return;
      dropQueued(write.key);
      outcomes.set((all) => [...all, result]);
    }
  } catch (error) {
    if (!(error instanceof NetworkError) && !(error instanceof ApiError)) throw error;
  } finally {
    replaying = false;
  }
}

/** @returns what became of it, or null when the network is gone again and it keeps waiting */
async function replayOne(write: QueuedWrite): Promise<QueueOutcome | null> {
  const queuedMs = Math.max(0, Date.now() - write.at);
  if (write.command === 'claim' && queuedMs > OFFLINE_CLAIM_MS)
    return { write, result: 'expired', error: null };
  const takesAge = write.command === 'claim' || write.command === 'finish';
  try {
    await send('POST', pathOf(write), takesAge ? { queuedMs } : {}, write.key);
    return { write, result: 'done', error: null };
  } catch (error) {
    if (!(error instanceof ApiError) || error.status >= 500 || error.status === 429) return null;
    return { write, result: error.code === 'OFFLINE_CLAIM_EXPIRED' ? 'expired' : 'refused', error };
  }
}

function personIn(session: SessionView, installationId: string): string | null {
  const { principal } = session;
  if (!principal || principal.kind === 'display') return null;
  return principal.installations.find((place) => place.installationId === installationId)?.personId ?? null;
}
