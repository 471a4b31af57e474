import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { OutboxLetter } from '../../shared/contracts/accounts';
import { sendDueLetters, type Postman } from '../../server/modules/mail';
import { accountClient, letters, rows } from '../support/fixtures-accounts';
import { startTestServer, type TestServer } from '../support/test-server';

const MINUTE_MS = 60_000;

let server: TestServer;
afterEach(() => server.close());

interface MailState {
  status: string;
  attempts: number;
  next_try_at: number;
  sent_at: number | null;
}
const state = async () => {
  const [row] = await rows<MailState>(server, 'SELECT status, attempts, next_try_at, sent_at FROM mail');
  return row;
};
const write = (subject: string) =>
  server.app.deps.writer.runPlain(
    { maker: { actor: 'server', personId: null }, installationId: null },
    (scope) =>
      scope.mail({
        to: 'cy@hall.example',
        subject,
        text: 'Grüße,\n\nbis bald: http://hall.example/link#abc_-9',
      }),
  );

describe('mail queue', () => {
  it('sendDueLetters > the mail server is away > tried again after 1, 5, 30, 30 minutes, given up after five tries', async () => {
    server = await startTestServer();
    await write('Hello');
    const send = vi.fn(() => Promise.reject(new Error('away')));
    const postman: Postman = { send, close: () => undefined };
    const waits: number[] = [];
    for (let attempt = 1; attempt <= 5; attempt += 1) {
      expect(await sendDueLetters(server.app.deps, postman)).toBe(0);
      expect(send).toHaveBeenCalledTimes(attempt);
      const now = await state();
      expect(now).toMatchObject({
        attempts: attempt,
        status: attempt < 5 ? 'queued' : 'failed',
        sent_at: null,
      });
      waits.push(((now?.next_try_at ?? 0) - server.clock.now()) / MINUTE_MS);
      // Not a moment earlier.
      server.clock.set((now?.next_try_at ?? 0) - 1);
      await sendDueLetters(server.app.deps, postman);
      expect(send).toHaveBeenCalledTimes(attempt);
      server.clock.advance(1);
    }
    expect(waits.slice(0, 4)).toEqual([1, 5, 30, 30]);
    server.clock.advance(24 * 60 * MINUTE_MS);
    await sendDueLetters(server.app.deps, postman);
    expect(send).toHaveBeenCalledTimes(5);
  });

  it('sendDueLetters > the mail server comes back > sent once, then never again', async () => {
    server = await startTestServer();
    await write('Hello');
    const sent: string[] = [];
    let away = true;
    const postman: Postman = {
      send: ({ subject }) => {
        if (away) return Promise.reject(new Error('away'));
        sent.push(subject);
        return Promise.resolve();
      },
      close: () => undefined,
    };
    await sendDueLetters(server.app.deps, postman);
    away = false;
    server.clock.advance(MINUTE_MS);
    expect(await sendDueLetters(server.app.deps, postman)).toBe(1);
    expect(await sendDueLetters(server.app.deps, postman)).toBe(0);
    expect(sent).toEqual(['Hello']);
    expect(await state()).toMatchObject({ status: 'sent', attempts: 2, sent_at: server.clock.now() });
  });

  it('mail > its use case is rolled back > no letter', async () => {
    server = await startTestServer();
    const broken = server.app.deps.writer.runPlain(
      { maker: { actor: 'server', personId: null }, installationId: null },
      async (scope) => {
        await scope.mail({ to: 'cy@hall.example', subject: 'Hello', text: '' });
        throw new Error('on purpose');
      },
    );
    await expect(broken).rejects.toThrow('on purpose');
    expect(await rows(server, 'SELECT 1 FROM mail')).toEqual([]);
  });

  it('mail > over a real SMTP server, read back by mailparser > sender, recipient, subject, every letter and the link whole, plain text only', async () => {
    const received: ParsedMail[] = [];
    const smtp = new SMTPServer({
      disabledCommands: ['AUTH', 'STARTTLS'],
      onData: (stream, _session, done) => {
        void simpleParser(stream).then((mail) => {
          received.push(mail);
          done();
        });
      },
    });
    const port = await new Promise<number>((resolve) => {
      const listener = smtp.listen(0, '127.0.0.1', () =>
        resolve((listener.address() as { port: number }).port),
      );
    });
    server = await startTestServer({
      SMTP_URL: `smtp://127.0.0.1:${port}`,
      MAIL_FROM: 'Strutbee <build@hall.example>',
    });
    await write('Fünf Stäbe — five struts');
    await vi.waitFor(() => expect(received).toHaveLength(1), { timeout: 5000 });
    const [mail] = received;
    expect(mail).toMatchObject({ subject: 'Fünf Stäbe — five struts', html: false });
    expect(mail?.from?.value).toEqual([{ name: 'Strutbee', address: 'build@hall.example' }]);
    expect(mail?.text?.trim()).toBe('Grüße,\n\nbis bald: http://hall.example/link#abc_-9');
    expect(JSON.stringify(mail?.to)).toContain('cy@hall.example');
    await vi.waitFor(async () => expect(await state()).toMatchObject({ status: 'sent', attempts: 1 }));
    await new Promise<void>((resolve) => smtp.close(() => resolve()));
  });
});

describe('outbox', () => {
  it('outbox > OUTBOX is on > the server takes its own letters in and shows them to an administrator, newest first', async () => {
    server = await startTestServer({ OUTBOX: '1' });
    const { client } = await accountClient(server, 'root@hall.example', 'admin');
    await write('First');
    await letters(server, 1);
    await write('Second');
    await letters(server, 2);
    const reply = await client.get<OutboxLetter[]>('/outbox');
    expect(reply.data.map((letter) => [letter.subject, letter.to])).toEqual([
      ['Second', 'cy@hall.example'],
      ['First', 'cy@hall.example'],
    ]);
    expect(reply.data[0]?.text).toContain('http://hall.example/link#abc_-9');
    const member = await accountClient(server, 'member@hall.example');
    expect((await member.client.get('/outbox')).status).toBe(403);
  });

  it('outbox > OUTBOX is off > no such address, even for an administrator; letters wait in the queue', async () => {
    server = await startTestServer();
    const { client } = await accountClient(server, 'root@hall.example', 'admin');
    await write('Hello');
    expect((await client.get('/outbox')).status).toBe(404);
    expect(await state()).toMatchObject({ status: 'queued', attempts: 0 });
  });
});
