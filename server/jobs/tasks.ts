import type { MessagePort } from 'node:worker_threads';

/** What a long computation is given beside its input. */
export interface TaskControl {
  /** Whether somebody asked it to stop; ask often, it costs nothing. */
  shouldStop(): boolean;
  /** How far it is, 0 to 1, with a word for the screen. */
  progress(share: number, note: string): void;
}

/** A computation that runs off the request's thread. */
export type Task<Input, Output> = (input: Input, control: TaskControl) => Promise<Output>;

/** What the pool sends to its worker. */
export interface TaskMessage {
  kind: string;
  input: unknown;
  /** One 32-bit integer: 1 asks the task to stop. */
  stop: SharedArrayBuffer;
  port: MessagePort;
}

export interface TaskProgress {
  share: number;
  note: string;
}
