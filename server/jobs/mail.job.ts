import type { Deps } from '../deps';
import { openOutbox, sendDueLetters, smtpPostman, type Outbox, type Postman } from '../modules/mail';

/** The mail queue at work. */
export interface MailJob {
  /** Send what is due. */
  run(): Promise<void>;
  close(): Promise<void>;
}

/**
 * Open the way letters take: the server's own outbox, the configured mail server, or none; then they wait in the queue
 * until the server starts with one.
 */
export async function openMail(deps: Deps): Promise<MailJob> {
  const { config, log } = deps;
  const outbox: Outbox | null = config.OUTBOX ? await openOutbox(deps) : null;
  const url = outbox?.url ?? config.SMTP_URL;
  const postman: Postman | null = url === undefined ? null : smtpPostman(url);
  if (!postman) log.warn('neither SMTP_URL nor OUTBOX is set: letters wait in the queue');
  return {
    run: async () => {
      if (postman) await sendDueLetters(deps, postman);
    },
    close: async () => {
      postman?.close();
      await outbox?.close();
    },
  };
}
