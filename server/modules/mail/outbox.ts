import type Database from 'better-sqlite3';
import { simpleParser, type AddressObject } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import type { OutboxLetter } from '../../../shared/contracts/accounts';
import { newId } from '../../../shared/kernel/ids';
import type { Deps } from '../../deps';
import { prepared } from '../../realtime/live-source';

const LETTER_LIMIT = 1_000_000;

export interface Outbox {
  /** Address for the mail queue, such as `smtp://127.0.0.1:40123`. */
  url: string;
  close(): Promise<void>;
}

/** A mail server of our own on the loopback interface, which keeps every letter for the Outbox screen and passes none on. */
export async function openOutbox(deps: Deps): Promise<Outbox> {
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: LETTER_LIMIT,
    logger: false,
    onData: (stream, _session, done) => {
      simpleParser(stream)
        .then((letter) =>
          keepLetter(deps, {
            id: newId(),
            from: letter.from?.text ?? '',
            to: addresses(letter.to),
            subject: letter.subject ?? '',
            text: letter.text ?? '',
            receivedAt: deps.clock.now(),
          }),
        )
        .then(
          () => done(),
          (error: unknown) => done(error instanceof Error ? error : new Error('the letter was not kept')),
        );
    },
  });
  server.on('error', (error: Error) => deps.log.error({ err: error }, 'the outbox had a fault'));
  const port = await new Promise<number>((resolve, reject) => {
    server.once('error', reject);
    const listener = server.listen(0, '127.0.0.1', () => {
      const address = listener.address();
      if (address === null || typeof address === 'string') reject(new Error('The outbox has no port.'));
      else resolve(address.port);
    });
  });
  return {
    url: `smtp://127.0.0.1:${port}`,
    close: () => new Promise<void>((resolve) => server.close(() => resolve())),
  };
}

const addresses = (to: AddressObject | AddressObject[] | undefined): string =>
  (Array.isArray(to) ? to : to ? [to] : []).map((one) => one.text).join(', ');

const keepLetter = (deps: Deps, letter: OutboxLetter) =>
  deps.unitOfWork.run((manager) =>
    manager.query(
      'INSERT INTO outbox_letter (id, sender, recipient, subject, text, received_at) VALUES (?, ?, ?, ?, ?, ?)',
      [letter.id, letter.from, letter.to, letter.subject, letter.text, letter.receivedAt],
    ),
  );

/** Letters the outbox took in, newest first. */
export const readOutbox = (db: Database.Database): OutboxLetter[] =>
  prepared<OutboxLetter>(
    db,
    `SELECT id, sender AS "from", recipient AS "to", subject, text, received_at AS receivedAt
     FROM outbox_letter ORDER BY received_at DESC, rowid DESC LIMIT 200`,
  ).all();
