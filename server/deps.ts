import type { Logger } from 'pino';
import type { Clock } from '../shared/kernel/clock';
import type { Config } from './config';
import type { DataSources } from './db/data-sources';
import type { SessionStore } from './http/session-store';
import type { UnitOfWork } from './db/unit-of-work';
import type { Writer } from './db/write';
import type { Principals } from './http/principal';
import type { Runs } from './jobs/runs';
import type { WorkerPool } from './jobs/worker-pool';
import type { LiveReader } from './realtime/live-reader';

/** What every module is built from. */
export interface Deps {
  config: Config;
  clock: Clock;
  log: Logger;
  data: DataSources;
  unitOfWork: UnitOfWork;
  writer: Writer;
  principals: Principals;
  sessions: SessionStore;
  reader: LiveReader;
  /** Long computations, off the request's thread. */
  pool: WorkerPool;
  runs: Runs;
  /** End every session of `account:ID`, `person:ID` or `display:ID` and cut its sockets off; `exceptSid` stays. */
  endSessions(key: string, exceptSid?: string): Promise<void>;
  /** Cut off the open pages of one session, by its id. */
  endSockets(sid: string): void;
  /** Move the sockets of these people to the audience they belong to now. */
  replaceSockets(personIds: Iterable<string>): void;
  /** Phones of people with a live link to an installation. */
  phones(installationId: string): number;
  /** The configured address, or the one the server listens on; without a slash at its end. */
  publicUrl(): string;
  /** Start the mail job now instead of at its next turn. */
  wakeMail(): void;
}
