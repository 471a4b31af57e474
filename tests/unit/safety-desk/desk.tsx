import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { MemoryRouter } from 'react-router-dom';
import { vi } from 'vitest';
import type { Duty } from '../../../shared/accounts';
import type { LiveCollections, LiveKind, PersonRecord, SignOffRecord } from '../../../shared/contracts/live';
import { HOT_GLUE_BODY, type BriefingBody } from '../../../shared/safety';
import { questionSheet } from '../../../shared/safety/briefing';
import { liveKey } from '../../../src/lib/live';
import { setServerTime } from '../../../src/lib/server-clock';
import { SESSION_KEY } from '../../../src/lib/session-key';
import { briefingRecord, liveOf, NOW, personRecord, signOffRecord } from '../board/fixtures';

/** A change that reached the server of the test. */
export interface Sent {
  method: string;
  path: string;
  body: unknown;
}

/** What the server answers, by method and the end of the path; an answer that is missing never comes. */
export type Answers = Record<string, unknown>;

const one = { sources: ['house-rule'] };
const LISTS = {
  panels: HOT_GLUE_BODY.panels.slice(0, 2).map((panel) => ({ ...panel, ...one })),
  rules: HOT_GLUE_BODY.rules.slice(2, 5).map((rule) => ({ ...rule, ...one })),
  firstAid: HOT_GLUE_BODY.firstAid.slice(0, 1).map((line) => ({ ...line, ...one })),
  notes: HOT_GLUE_BODY.notes.slice(0, 1).map((note) => ({ ...note, ...one })),
};
/** The shipped text, shortened: finding roles in a page as long as the whole takes seconds. */
export const BODY: BriefingBody = {
  ...LISTS,
  questions: HOT_GLUE_BODY.questions.slice(0, 1),
  closing: HOT_GLUE_BODY.closing,
  sources: HOT_GLUE_BODY.sources.filter(({ id }) => id === 'house-rule'),
};

const TEXT = {
  'GET /briefings/hot-glue?version=1': {
    body: { ...HOT_GLUE_BODY, questions: questionSheet(HOT_GLUE_BODY) },
  },
  'GET /briefings/hot-glue/versions': { version: 1, effectiveFrom: NOW - 86_400_000, body: BODY },
  'GET /briefings/hot-glue/proposals': [],
};

/** jsdom knows the dialog and not its methods. */
export function openDialogs(): void {
  HTMLDialogElement.prototype.showModal = function (this: HTMLDialogElement) {
    this.open = true;
  };
  HTMLDialogElement.prototype.close = function (this: HTMLDialogElement) {
    this.open = false;
  };
}

/** A server that answers by path and keeps what was sent to it. */
export function fakeServer(answers: Answers = {}): Sent[] {
  const sent: Sent[] = [];
  const known: Answers = { ...TEXT, ...answers };
  vi.stubGlobal('fetch', (url: string, init: { method: string; body?: string }) => {
    const reply = (data: unknown) => Promise.resolve(new Response(JSON.stringify({ data }), { status: 200 }));
    if (url === '/api/session') return reply(SESSION('lena'));
    const path = url.replace('/api/installations/i1', '');
    if (init.method !== 'GET')
      sent.push({
        method: init.method,
        path,
        body: init.body ? (JSON.parse(init.body) as unknown) : undefined,
      });
    if (path.endsWith('/signature')) return reply({ kind: 'typed', value: 'Full Name' });
    const key = `${init.method} ${path}`;
    return key in known ? reply(known[key]) : new Promise<Response>(() => undefined);
  });
  return sent;
}

const DUTIES: Record<string, Duty[]> = {
  lena: ['safety lead', 'volunteer'],
  noor: ['safety lead', 'volunteer'],
  ines: ['organiser', 'volunteer'],
};

const SESSION = (personId: string) => ({
  csrfToken: 'x',
  now: NOW,
  clockRate: 1,
  demo: false,
  principal: {
    kind: 'person',
    personId,
    installations: [
      {
        installationId: 'i1',
        name: 'Hall',
        status: 'published',
        personId,
        duties: DUTIES[personId] ?? ['volunteer'],
        confirmed: true,
      },
    ],
  },
});

/** Lena and Noor are safety leads, Ines organises, Kofi and Yuki build. */
export const PEOPLE: PersonRecord[] = [
  personRecord({ id: 'lena', name: 'Lena W', number: 1, duties: DUTIES.lena! }),
  personRecord({ id: 'noor', name: 'Noor A', number: 2, duties: DUTIES.noor! }),
  personRecord({ id: 'ines', name: 'Ines C', number: 3, duties: DUTIES.ines! }),
  personRecord({ id: 'kofi', name: 'Kofi A', number: 12 }),
  personRecord({
    id: 'yuki',
    name: 'Yuki T',
    number: 13,
    details: { ...personRecord({}).details!, ageBand: '13-15', adultName: 'Kofi A' },
  }),
];

/** Signed and not countersigned. */
export const waiting = (change: Partial<SignOffRecord>): SignOffRecord =>
  signOffRecord({
    countersignedBy: null,
    countersignedAt: null,
    countersignedAs: null,
    expiresAt: null,
    ...change,
  });

/** Shows something of an installation to one of its people. */
export function show(children: ReactNode, records: { [K in LiveKind]?: LiveCollections[K][] }, who = 'lena') {
  setServerTime(NOW, 1);
  const client = new QueryClient({ defaultOptions: { queries: { retry: false } } });
  client.setQueryData(SESSION_KEY, SESSION(who));
  const set = (next: { [K in LiveKind]?: LiveCollections[K][] }) =>
    client.setQueryData(liveKey('i1'), liveOf({ people: PEOPLE, briefings: [briefingRecord({})], ...next }));
  set(records);
  render(
    <QueryClientProvider client={client}>
      <MemoryRouter>{children}</MemoryRouter>
    </QueryClientProvider>,
  );
  return { change: set };
}

/** Words of the errors on the page, in order. */
export const errorsShown = (): string[] =>
  [...document.querySelectorAll('.field-error')].map((element) => element.textContent);
