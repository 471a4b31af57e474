// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { CribDesk } from '../../../src/features/crib/crib-desk';
import { liveKey } from '../../../src/lib/live';
import { SESSION_KEY } from '../../../src/lib/session-key';
import { setServerTime } from '../../../src/lib/server-clock';
import {
  briefingRecord,
  checkoutRecord,
  liveOf,
  NOW,
  personRecord,
  signOffRecord,
  toolRecord,
} from './fixtures';

const sent: { path: string; body: unknown }[] = [];
beforeEach(() => {
  sent.length = 0;
  setServerTime(NOW, 1);
  vi.stubGlobal('fetch', (path: string, init: { body?: string }) => {
    if (init.body) sent.push({ path, body: JSON.parse(init.body) as unknown });
    const data = path.endsWith('/session')
      ? { csrfToken: 'x', now: NOW, clockRate: 1, demo: false, principal: null }
      : { checkoutId: 'c9', backBy: NOW + 3_600_000, limits: [] };
    return Promise.resolve(new Response(JSON.stringify({ data }), { status: 200 }));
  });
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show() {
  const client = new QueryClient();
  client.setQueryData(SESSION_KEY, {
    csrfToken: 'x',
    now: NOW,
    clockRate: 1,
    demo: false,
    principal: {
      kind: 'person',
      personId: 'cleo',
      installations: [
        {
          installationId: 'i1',
          name: 'Hall',
          status: 'published',
          personId: 'cleo',
          duties: ['crib keeper'],
          confirmed: true,
        },
      ],
    },
  });
  client.setQueryData(
    liveKey('i1'),
    liveOf({
      people: [
        personRecord({ id: 'kofi', number: 12 }),
        personRecord({ id: 'nils', name: 'Nils H', number: 13 }),
      ],
      briefings: [briefingRecord({})],
      signOffs: [signOffRecord({ personId: 'kofi' })],
      tools: [toolRecord({ id: 't1', number: 'G-01' }), toolRecord({ id: 't2', number: 'G-02' })],
      checkouts: [checkoutRecord({ toolId: 't2', personId: 'nils' })],
    }),
  );
  render(
    <QueryClientProvider client={client}>
      <CribDesk installationId="i1" />
    </QueryClientProvider>,
  );
}

describe('LendDesk', () => {
  it('LendDesk > a scanner types the person and the tool > lent for an hour, and the focus waits for the next person', async () => {
    const user = userEvent.setup();
    show();
    // Nothing is clicked: the first field waits with the focus, as a scanner needs it.
    await user.keyboard('12{Enter}');
    expect(screen.getByText('Kofi A', { selector: '.lend-name' })).toBeTruthy();
    await user.keyboard('g1{Enter}');
    await waitFor(() => expect(screen.getByText(/G-01 is out with Kofi A/)).toBeTruthy());
    expect(sent).toEqual([
      {
        path: '/api/installations/i1/tools/t1/lend',
        body: { personId: 'kofi', stationId: null, minutes: 60 },
      },
    ]);
    expect(document.activeElement).toBe(screen.getByLabelText('1 scan the person'));
  });

  it('LendDesk > a person without the sign-off > refused on the spot, nothing is sent', async () => {
    const user = userEvent.setup();
    show();
    await user.keyboard('13{Enter}G-01{Enter}');
    expect(screen.getByRole('alert').textContent).toContain('Nils H has no valid hot glue sign-off.');
    expect(sent).toEqual([]);
  });

  it('LendDesk > a tool that is out, scanned first > taken back in one scan', async () => {
    const user = userEvent.setup();
    show();
    await user.keyboard('G-02{Enter}');
    await waitFor(() => expect(screen.getByText('G-02 hot-glue gun is back from Nils H.')).toBeTruthy());
    expect(sent).toEqual([
      { path: '/api/installations/i1/tools/t2/take-back', body: { condition: '', tagReason: null } },
    ]);
  });

  it('LendDesk > numbers that nobody and nothing has > said beside the field, what was typed stays', async () => {
    const user = userEvent.setup();
    show();
    await user.keyboard('99{Enter}');
    const person = screen.getByLabelText<HTMLInputElement>('1 scan the person');
    expect(person.getAttribute('aria-invalid')).toBe('true');
    expect(person.value).toBe('99');
    await user.clear(person);
    await user.keyboard('12{Enter}X-50{Enter}');
    expect(screen.getByText(/No tool has the number X-50/)).toBeTruthy();
    expect(sent).toEqual([]);
  });
});
