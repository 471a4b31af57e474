// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, cleanup, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { PersonRecord } from '../../../shared/contracts/live';
import { MusterDesk } from '../../../src/features/muster/muster-desk';
import { joinCodeKey } from '../../../src/lib/join-code';
import { liveKey } from '../../../src/lib/live';
import { withRecords, type LiveState } from '../../../src/lib/live-state';
import { setServerTime } from '../../../src/lib/server-clock';
import { SESSION_KEY } from '../../../src/lib/session-key';
import {
  checkoutRecord,
  installationRecord,
  liveOf,
  NOW,
  personRecord,
  pieceRecord,
  stepRecord,
  toolRecord,
} from '../board/fixtures';
import { errorsShown, fakeServer, refused } from '../planning/client';

beforeEach(() => {
  setServerTime(NOW, 1);
  // jsdom has no modal dialogs.
  HTMLDialogElement.prototype.showModal = function open() {
    this.open = true;
  };
  HTMLDialogElement.prototype.close = function close() {
    this.open = false;
  };
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

type Details = NonNullable<PersonRecord['details']>;

function arrival(id: string, name: string, number: number, details: Partial<Details>): PersonRecord {
  const base = personRecord({});
  return personRecord({
    id,
    name,
    number,
    confirmed: false,
    onSite: false,
    details: { ...(base.details as Details), confirmedAt: null, ...details },
  });
}

const sana = arrival('sana', 'Sana R', 41, {
  ageBand: '16-17',
  adultName: 'Kofi A',
  joinedAt: NOW - 240_000,
});
const piet = arrival('piet', 'Piet O', 42, { ageBand: '13-15', joinedAt: NOW - 60_000 });

function hall(change: { hallLimit?: number } = {}): LiveState {
  return liveOf({
    installation: [installationRecord({ hallLimit: change.hallLimit ?? 80 })],
    people: [
      personRecord({ id: 'kofi', number: 12 }),
      personRecord({ id: 'lena', name: 'Lena W', number: 2, duties: ['safety lead', 'first-aider'] }),
      sana,
      piet,
    ],
    subAssemblies: [pieceRecord({ id: 'v1', code: 'V-01' })],
    steps: [
      stepRecord({
        id: 's1',
        name: 'tack',
        state: 'in hand',
        crew: [{ personId: 'kofi', claimedAt: NOW - 60_000 }],
      }),
    ],
    tools: [toolRecord({ id: 't1', number: 'G-01' })],
    checkouts: [checkoutRecord({ toolId: 't1', personId: 'kofi' })],
  });
}

function show(live = hall()) {
  const client = new QueryClient({
    defaultOptions: { queries: { retry: false, staleTime: Infinity }, mutations: { retry: false } },
  });
  client.setQueryData(liveKey('i1'), live);
  client.setQueryData(joinCodeKey('i1'), {
    joinCode: 'K7M4QX',
    joinUrl: 'https://hall.example/join/K7M4QX',
    renewedAt: NOW,
  });
  client.setQueryData(SESSION_KEY, {
    csrfToken: 'x',
    now: NOW,
    clockRate: 1,
    demo: false,
    principal: {
      kind: 'person',
      personId: 'marta',
      installations: [
        {
          installationId: 'i1',
          name: 'Hall',
          status: 'published',
          personId: 'marta',
          duties: ['muster desk'],
          confirmed: true,
        },
      ],
    },
  });
  render(
    <QueryClientProvider client={client}>
      <MemoryRouter>
        <MusterDesk installationId="i1" />
      </MemoryRouter>
    </QueryClientProvider>,
  );
  return client;
}

const row = (name: string) => within(screen.getByRole('listitem', { name }));
const band = (name: string, words: string) =>
  row(name).getByRole('button', { name: `${words}: confirm ${name}` });

describe('confirming at the desk', () => {
  it('MusterDesk > the claimed band pressed three times > the main one, confirmed once with the adult named', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show();
    expect(band('Sana R', '16-17').dataset.look).toBe('main');
    expect(band('Sana R', '18 and over').dataset.look).toBe('plain');
    // Two presses before anything is drawn anew, and one after it was accepted, before the live state says so.
    act(() => {
      band('Sana R', '16-17').click();
      band('Sana R', '16-17').click();
    });
    await waitFor(() => expect(sent).toHaveLength(1));
    await waitFor(() => expect(band('Sana R', '16-17').getAttribute('aria-busy')).toBe('true'));
    await user.click(band('Sana R', '16-17'));
    await waitFor(() =>
      expect(sent).toMatchObject([
        {
          method: 'POST',
          path: '/installations/i1/people/sana/confirm',
          body: { ageBand: '16-17', adultName: 'Kofi A' },
        },
      ]),
    );
  });

  it('MusterDesk > another band than the claimed one pressed > that band is confirmed, an adult needs no adult', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show();
    await user.click(band('Sana R', '18 and over'));
    await waitFor(() => expect(sent.map(({ body }) => body)).toEqual([{ ageBand: '18+' }]));
  });

  it('MusterDesk > a minor who named no adult > the words stand beside the field, filled in it is confirmed', async () => {
    const user = userEvent.setup();
    const words = 'Which adult is here with them?';
    const sent = fakeServer(
      refused('ADULT_MISSING', 'Piet O is under 18 and named no adult.', [
        { path: 'adultName', message: words },
      ]),
    );
    show();
    await user.click(band('Piet O', '13-15'));
    await waitFor(() => expect(errorsShown()).toEqual([words]));
    const field = row('Piet O').getByLabelText('the adult with them, first name and initial');
    expect(field.getAttribute('aria-invalid')).toBe('true');
    expect(document.activeElement).toBe(field);
    await user.type(field, 'Lena W');
    await user.click(band('Piet O', '13-15'));
    await waitFor(() => expect(sent[1]?.body).toEqual({ ageBand: '13-15', adultName: 'Lena W' }));
    await waitFor(() => expect(errorsShown()).toEqual([]));
  });

  it('MusterDesk > an adult named who is not on site > said at once, with what to do', async () => {
    const user = userEvent.setup();
    fakeServer();
    show();
    const field = row('Piet O').getByLabelText('the adult with them, first name and initial');
    await user.type(field, 'Zoe N');
    expect(row('Piet O').getByText(/Nobody on site has this name. Confirm Zoe N first/)).toBeTruthy();
    await user.clear(field);
    await user.type(field, 'kofi a');
    expect(row('Piet O').queryByText(/Nobody on site/)).toBeNull();
  });

  it('MusterDesk > the hall filled up meanwhile > the server’s words with its numbers, the person still waits', async () => {
    const user = userEvent.setup();
    const words =
      'The hall is full: 80 of 80 people are in. Sign somebody out who has left, then confirm Sana R.';
    fakeServer(refused('HALL_FULL', words));
    show();
    await user.click(band('Sana R', '16-17'));
    await waitFor(() => expect(row('Sana R').getByRole('alert').textContent).toBe(words));
    expect(band('Sana R', '16-17')).toBeTruthy();
  });

  it('MusterDesk > the hall is at its limit > says so with the numbers, no band can be pressed', () => {
    fakeServer();
    show(hall({ hallLimit: 2 }));
    expect(screen.getByRole('alert').textContent).toContain('The hall is full: 2 of 2 people are in.');
    expect(band('Sana R', '16-17')).toHaveProperty('disabled', true);
  });

  it('MusterDesk > somebody confirmed > the row stays where it is, so that the next is not pressed by mistake', async () => {
    fakeServer();
    const client = show();
    const here = { ...sana, revision: 2, confirmed: true, onSite: true };
    act(() => {
      client.setQueryData<LiveState>(liveKey('i1'), (live) => live && withRecords(live, { people: [here] }));
    });
    await waitFor(() => expect(row('Sana R').queryByRole('button')).toBeNull());
    const names = screen
      .getAllByRole('listitem')
      .map((item) => item.getAttribute('aria-label'))
      .filter((name) => name === 'Sana R' || name === 'Piet O');
    expect(names).toEqual(['Sana R', 'Piet O']);
  });
});

describe('signing out', () => {
  it('MusterDesk > signing out somebody with work, a tool and a minor > each named before; given back and still out told after', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({
      data: {
        personId: 'kofi',
        givenBack: ['s1'],
        toolsOut: [{ id: 't1', number: 'G-01', name: 'hot-glue gun' }],
      },
    });
    const live = hall();
    show(withRecords(live, { people: [{ ...sana, revision: 2, confirmed: true, onSite: true }] }));
    await user.click(screen.getByRole('button', { name: 'Sign out Kofi A' }));
    const dialog = screen.getByRole('dialog');
    for (const words of ['V-01 tack', 'They still have G-01', 'Sana R is here with them'])
      expect(dialog.textContent).toContain(words);
    expect(sent).toEqual([]);
    await user.click(within(dialog).getByRole('button', { name: 'Sign out' }));
    const note = await screen.findByText('Kofi A is signed out.');
    expect(note.closest('.note')?.textContent).toContain('1 step given back.');
    expect(note.closest('.note')?.textContent).toContain('Still out with them: G-01 hot-glue gun.');
    expect(sent).toMatchObject([{ method: 'POST', path: '/installations/i1/people/kofi/sign-out' }]);
  });
});

describe('for who comes late', () => {
  it('MusterDesk > somebody at the desk without the poster > the code to say, the link to open, heads against the limit', () => {
    fakeServer();
    show();
    expect(screen.getByText('K 7 M 4 Q X')).toBeTruthy();
    const link = screen.getByRole('link', { name: 'hall.example/join/K7M4QX' });
    expect(link.getAttribute('href')).toBe('https://hall.example/join/K7M4QX');
    expect(screen.getByRole('img', { name: '2 of 80 people are in' })).toBeTruthy();
  });

  it('MusterDesk > a number typed into the search > that person alone, and how many that is of all', async () => {
    const user = userEvent.setup();
    fakeServer();
    show();
    await user.type(screen.getByRole('searchbox', { name: 'name or number' }), '12');
    expect(screen.getByRole('button', { name: 'Sign out Kofi A' })).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Sign out Lena W' })).toBeNull();
    expect(screen.getByText('1 of 2 people')).toBeTruthy();
  });
});
