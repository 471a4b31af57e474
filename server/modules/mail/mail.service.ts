import { createTransport } from 'nodemailer';
import type { Deps } from '../../deps';

const MINUTE_MS = 60_000;
/** How long to wait after the first, second and every further try that failed. */
const BACKOFF_MS = [MINUTE_MS, 5 * MINUTE_MS, 30 * MINUTE_MS] as const;
const LAST_BACKOFF_MS = BACKOFF_MS[2];
const MAX_ATTEMPTS = 5;
const BATCH = 50;

/** Where letters go: a transport of nodemailer, or a list in a test. */
export interface Postman {
  send(letter: { id: string; from: string; to: string; subject: string; text: string }): Promise<void>;
  close(): void;
}

/** Letters over SMTP. */
export function smtpPostman(url: string): Postman {
  const transport = createTransport(url);
  return {
    send: async ({ id, ...letter }) => {
      // The letter's own id, so that a letter sent twice after a crash is the same letter to the reader's program.
      await transport.sendMail({ ...letter, messageId: `<${id}@strutbee.invalid>` });
    },
    close: () => transport.close(),
  };
}

interface QueuedRow {
  id: string;
  recipient: string;
  subject: string;
  text: string;
  attempts: number;
}

/**
 * Send every queued letter that is due, one after the other. One that cannot be sent is tried again after 1, 5 and then
 * every 30 minutes, and given up after five tries.
 * @returns how many were sent
 */
export async function sendDueLetters(deps: Deps, postman: Postman): Promise<number> {
  let sent = 0;
  for (;;) {
    const due: QueuedRow[] = await deps.data.reader.query(
      `SELECT id, recipient, subject, text, attempts FROM mail
       WHERE status = 'queued' AND next_try_at <= ? ORDER BY created_at, id LIMIT ${BATCH}`,
      [deps.clock.now()],
    );
    if (due.length === 0) return sent;
    for (const row of due) if (await sendOne(deps, postman, row)) sent += 1;
  }
}

async function sendOne(deps: Deps, postman: Postman, row: QueuedRow): Promise<boolean> {
  const { id, recipient: to, subject, text } = row;
  const attempts = row.attempts + 1;
  try {
    await postman.send({ id, from: deps.config.MAIL_FROM, to, subject, text });
  } catch (error) {
    const failed = attempts >= MAX_ATTEMPTS;
    const wait = BACKOFF_MS[attempts - 1] ?? LAST_BACKOFF_MS;
    deps.log.warn(
      { err: error, letter: id, attempts },
      failed ? 'a letter was given up' : 'a letter was not sent',
    );
    await update(deps, id, failed ? 'failed' : 'queued', attempts, deps.clock.now() + wait, null);
    return false;
  }
  await update(deps, id, 'sent', attempts, deps.clock.now(), deps.clock.now());
  return true;
}

const update = (
  deps: Deps,
  id: string,
  status: 'queued' | 'sent' | 'failed',
  attempts: number,
  nextTryAt: number,
  sentAt: number | null,
) =>
  deps.unitOfWork.run((manager) =>
    manager.query('UPDATE mail SET status = ?, attempts = ?, next_try_at = ?, sent_at = ? WHERE id = ?', [
      status,
      attempts,
      nextTryAt,
      sentAt,
      id,
    ]),
  );
