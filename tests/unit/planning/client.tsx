import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { MemoryRouter } from 'react-router-dom';
import { vi } from 'vitest';
import type { ErrorBody } from '../../../shared/contracts/errors';

/** A change that reached the server of the test. */
export interface Sent {
  method: string;
  path: string;
  key: string;
  body: unknown;
}

type Answer = { data: unknown } | ErrorBody | 'no network';

/** A server that answers every change in turn with what it was given, and keeps what was sent. */
export function fakeServer(...answers: Answer[]): Sent[] {
  const sent: Sent[] = [];
  const reply = (status: number, body: object) =>
    Promise.resolve(new Response(JSON.stringify(body), { status }));
  vi.stubGlobal(
    'fetch',
    (url: string, init: { method: string; headers: Record<string, string>; body?: string }) => {
      if (url === '/api/session') return reply(200, { data: { csrfToken: 'token' } });
      sent.push({
        method: init.method,
        path: url.replace('/api', ''),
        key: init.headers['idempotency-key'] ?? '',
        body: init.body === undefined ? undefined : (JSON.parse(init.body) as unknown),
      });
      const answer = answers.shift() ?? { data: {} };
      if (answer === 'no network') return Promise.reject(new TypeError('failed to fetch'));
      return reply('error' in answer ? 400 : 200, answer);
    },
  );
  return sent;
}

/** A refusal as the server words it. */
export const refused = (
  code: ErrorBody['error']['code'],
  message: string,
  fields: { path: string; message: string }[] = [],
): ErrorBody => ({
  error: { code, message, requestId: 'r', fields: fields.map((field) => ({ ...field, code: 'custom' })) },
});

/** Shows something in the frame every page has. */
export function show(children: ReactNode) {
  const client = new QueryClient({
    defaultOptions: { queries: { retry: false }, mutations: { retry: false } },
  });
  return render(
    <QueryClientProvider client={client}>
      <MemoryRouter>{children}</MemoryRouter>
    </QueryClientProvider>,
  );
}

/** Words of the errors on the page, in order. */
export const errorsShown = (): string[] =>
  [...document.querySelectorAll('.field-error')].map((element) => element.textContent);
