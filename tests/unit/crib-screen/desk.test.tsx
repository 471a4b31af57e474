// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { CribDesk } from '../../../src/features/crib/crib-desk';
import { liveKey } from '../../../src/lib/live';
import { withRecords, type LiveState } from '../../../src/lib/live-state';
import { setServerTime } from '../../../src/lib/server-clock';
import { SESSION_KEY } from '../../../src/lib/session-key';
import {
  briefingRecord,
  checkoutRecord,
  installationRecord,
  liveOf,
  NOW,
  personRecord,
  signOffRecord,
  stationRecord,
  stopRecord,
  toolRecord,
} from '../board/fixtures';
import { errorsShown, fakeServer, refused } from '../planning/client';

beforeEach(() => setServerTime(NOW, 1));
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const LENT = { data: { checkoutId: 'c9', backBy: NOW + 3_600_000, limits: [] } };
const gun = (id: string, number: string) => toolRecord({ id, number });

const hall = (): LiveState =>
  liveOf({
    installation: [installationRecord({})],
    people: [
      personRecord({ id: 'kofi', number: 12 }),
      personRecord({ id: 'nils', name: 'Nils H', number: 13 }),
      personRecord({ id: 'gone', name: 'Edda S', number: 14, onSite: false }),
    ],
    stations: [stationRecord({ id: 'glue', name: 'glue' })],
    briefings: [briefingRecord({})],
    signOffs: [signOffRecord({ personId: 'kofi' })],
    tools: [
      gun('t1', 'G-01'),
      gun('t2', 'G-02'),
      gun('t3', 'G-03'),
      toolRecord({
        id: 'n1',
        number: 'N-01',
        name: 'dowel nippers',
        kind: 'nippers',
        hazard: null,
        traits: {},
      }),
    ],
    checkouts: [
      checkoutRecord({ id: 'c2', toolId: 't2', personId: 'nils', backBy: NOW - 17 * 60_000 }),
      checkoutRecord({ id: 'c3', toolId: 't3', personId: 'kofi', backBy: NOW + 60 * 60_000 }),
    ],
  });

function show(live = hall(), duties = ['crib keeper'], confirmed = true) {
  const client = new QueryClient({ defaultOptions: { queries: { staleTime: Infinity, retry: false } } });
  client.setQueryData(liveKey('i1'), live);
  client.setQueryData(SESSION_KEY, {
    csrfToken: 'x',
    now: NOW,
    clockRate: 1,
    demo: false,
    principal: {
      kind: 'person',
      personId: 'cleo',
      installations: [
        { installationId: 'i1', name: 'Hall', status: 'published', personId: 'cleo', duties, confirmed },
      ],
    },
  });
  render(
    <QueryClientProvider client={client}>
      <MemoryRouter>
        <CribDesk installationId="i1" />
      </MemoryRouter>
    </QueryClientProvider>,
  );
}

const personField = () => screen.getByLabelText<HTMLInputElement>('1 scan the person');
const toolField = () => screen.getByLabelText<HTMLInputElement>('2 scan the tool');

describe('a scan in the wrong field', () => {
  it('LendDesk > the tool scanned first > it moves to its field, then the person’s link lends it', async () => {
    const user = userEvent.setup();
    const sent = fakeServer(LENT);
    show();
    await user.keyboard('g01{Enter}');
    expect([personField().value, toolField().value]).toEqual(['', 'G-01']);
    expect(document.activeElement).toBe(personField());
    expect(sent).toEqual([]);
    await user.keyboard('https://hall.example/p/12{Enter}');
    await waitFor(() =>
      expect(sent).toMatchObject([
        {
          path: '/installations/i1/tools/t1/lend',
          body: { personId: 'kofi', stationId: null, minutes: 60 },
        },
      ]),
    );
  });

  it('LendDesk > the next person scanned where a tool is awaited > they are the person, the tool is awaited still', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show();
    await user.keyboard('13{Enter}12{Enter}');
    expect([personField().value, toolField().value]).toEqual(['12', '']);
    expect(screen.getByText('Kofi A', { selector: '.lend-name' })).toBeTruthy();
    expect(document.activeElement).toBe(toolField());
    expect(sent).toEqual([]);
  });

  it('LendDesk > refused, then the next scans typed on > the first scan writes over the refused tool', async () => {
    const user = userEvent.setup();
    const sent = fakeServer(LENT);
    show();
    await user.keyboard('13{Enter}G-01{Enter}');
    expect(screen.getByRole('alert').textContent).toContain('Nils H has no valid hot glue sign-off.');
    await user.keyboard('12{Enter}');
    expect(screen.queryByRole('alert')).toBeNull();
    expect(sent).toEqual([]);
    await user.keyboard('G-01{Enter}');
    await waitFor(() => expect(sent).toMatchObject([{ body: { personId: 'kofi' } }]));
  });

  it('LendDesk > another person typed after a refusal > the refused tool does not go out with them unasked', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show();
    await user.keyboard('13{Enter}G-01{Enter}');
    await user.clear(personField());
    await user.keyboard('12{Enter}');
    expect(toolField().value).toBe('');
    expect(document.activeElement).toBe(toolField());
    expect(sent).toEqual([]);
  });
});

describe('lending', () => {
  it('LendDesk > to a station for half an hour > sent so, and the next one goes along with its person again', async () => {
    const user = userEvent.setup();
    const sent = fakeServer(LENT);
    show();
    await user.click(within(screen.getByRole('group', { name: 'Back by' })).getByText('30 min'));
    await user.selectOptions(screen.getByLabelText('where it goes'), 'glue');
    await user.click(personField());
    await user.keyboard('12{Enter}G-01{Enter}');
    await waitFor(() => expect(screen.getByText(/G-01 is out with Kofi A, back by 15:07/)).toBeTruthy());
    expect(sent).toMatchObject([{ body: { personId: 'kofi', stationId: 'glue', minutes: 30 } }]);
    expect(screen.getByLabelText<HTMLSelectElement>('where it goes').value).toBe('');
    expect(document.activeElement).toBe(personField());
  });

  it('LendDesk > out already, signed out for today, under a stop > each refused on the spot with its words', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show(withRecords(hall(), { stops: [stopRecord({ scope: 'hot-tools' })] }));
    const tell = async (person: string, tool: string) => {
      await user.clear(personField());
      await user.keyboard(`${person}{Enter}${tool}{Enter}`);
      return screen.getByRole('alert').textContent;
    };
    expect(await tell('12', 'G-02')).toContain('Nils H has had it since 13:37. It is 17 min over its 13:50.');
    expect(await tell('14', 'N-01')).toContain('Edda S is signed out for today.');
    expect(await tell('12', 'G-01')).toContain('A stop covers G-01 hot-glue gun.');
    expect(sent).toEqual([]);
  });

  it('LendDesk > no network > what was scanned stays, and sent again it carries the same key', async () => {
    const user = userEvent.setup();
    const sent = fakeServer('no network', LENT);
    show();
    await user.keyboard('12{Enter}N-01{Enter}');
    await screen.findByText('There is no network, or the server does not answer.');
    expect([personField().value, toolField().value]).toEqual(['12', 'N-01']);
    await user.click(screen.getByRole('button', { name: 'Out with Kofi A' }));
    await screen.findByText(/N-01 is out with Kofi A/);
    expect(sent).toHaveLength(2);
    expect(sent[1]?.key).toBe(sent[0]?.key);
  });

  it('CribDesk > a keeper whom the desk has not confirmed > told so in place of the lending', () => {
    fakeServer();
    show(hall(), ['crib keeper'], false);
    expect(screen.getByText('The muster desk has not confirmed you yet.')).toBeTruthy();
    expect(screen.queryByLabelText('1 scan the person')).toBeNull();
    expect(screen.getByRole('button', { name: 'Take back a tool' })).toBeTruthy();
  });
});

describe('taking back', () => {
  it('TakeBackPanel > during a stop, unsafe, with a reason > back and tagged, ready for the next scan', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ data: { checkoutId: 'c2' } });
    show(withRecords(hall(), { stops: [stopRecord({ scope: 'everything' })] }));
    await user.click(screen.getByRole('button', { name: 'Take back a tool' }));
    await user.keyboard('g2{Tab}tip bent{Tab} {Tab}Cable scorched.');
    await user.click(screen.getByRole('button', { name: 'Back' }));
    const note = (await screen.findByText('G-02 hot-glue gun is back from Nils H.')).closest('.note');
    expect(note?.textContent).toContain('It was 17 min over.');
    expect(note?.textContent).toContain('It is tagged out of use.');
    expect(sent).toMatchObject([
      {
        path: '/installations/i1/tools/t2/take-back',
        body: { condition: 'tip bent', tagReason: 'Cable scorched.' },
      },
    ]);
    const field = screen.getByLabelText<HTMLInputElement>('scan the tool that comes back');
    expect([field.value, document.activeElement]).toEqual(['', field]);
  });

  it('TakeBackPanel > tagged without a reason > the words beside the field, what was typed stays', async () => {
    const user = userEvent.setup();
    const words = 'Say what is wrong with it.';
    fakeServer(refused('VALIDATION', words, [{ path: 'tagReason', message: words }]));
    show();
    await user.click(screen.getByRole('button', { name: 'Take back a tool' }));
    await user.keyboard('G-02{Tab}tip bent{Tab} ');
    await user.click(screen.getByRole('button', { name: 'Back' }));
    await waitFor(() => expect(errorsShown()).toEqual([words]));
    expect(screen.getByLabelText<HTMLInputElement>('scan the tool that comes back').value).toBe('G-02');
    expect(screen.getByLabelText<HTMLInputElement>('condition, may stay empty').value).toBe('tip bent');
  });
});

describe('who has what', () => {
  it('CribDesk > one late, one in time > the sooner due first, the late one said with how much, for each person too', async () => {
    const user = userEvent.setup();
    fakeServer();
    show();
    const rows = within(screen.getByRole('table', { name: 'Tools that are out' })).getAllByRole('row');
    expect(rows.slice(1).map((row) => row.querySelector('th')?.textContent)).toEqual(['G-02', 'G-03']);
    expect(rows[1]?.textContent).toContain('17 min over');
    expect(screen.getByRole('img', { name: 'out since 13:37, should have been back by 13:50' })).toBeTruthy();
    const each = within(screen.getByRole('region', { name: 'What each has' }));
    expect(each.getByText('G-02 late')).toBeTruthy();
    await user.type(each.getByLabelText('name or number'), 'kof');
    expect(each.queryByText('G-02 late')).toBeNull();
    expect(each.getByText('Kofi A, 12')).toBeTruthy();
  });
});
