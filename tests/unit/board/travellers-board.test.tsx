// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, describe, expect, it } from 'vitest';
import type { SessionView } from '../../../shared/contracts/live';
import { STEP_STATES } from '../../../shared/travellers/step';
import { TravellersBoard } from '../../../src/features/travellers/travellers-board';
import { framesKey } from '../../../src/lib/frames';
import { liveKey } from '../../../src/lib/live';
import { withRecords, type LiveState } from '../../../src/lib/live-state';
import { SESSION_KEY } from '../../../src/lib/session-key';
import { liveOf, NOW, personRecord, pieceRecord, stationRecord, stepRecord } from './fixtures';

// jsdom lays nothing out and so has nothing to scroll.
Element.prototype.scrollIntoView = () => undefined;
afterEach(cleanup);

const STEPS = ['cut', 'lay out', 'tack', 'raise', 'glue out', 'clean', 'coat', 'hang'];
const session: SessionView = {
  csrfToken: 'x',
  now: NOW,
  clockRate: 1,
  demo: false,
  principal: {
    kind: 'person',
    personId: 'kofi',
    installations: [
      {
        installationId: 'i1',
        name: 'Hall',
        status: 'published',
        personId: 'kofi',
        duties: ['volunteer', 'checker'],
        confirmed: true,
      },
    ],
  },
};

/** A hall of so many travellers of eight steps, in all states. */
function hall(count: number): LiveState {
  const codes = Array.from({ length: count }, (_, i) => `V-${String(i + 1).padStart(3, '0')}`);
  return liveOf({
    people: [personRecord({ id: 'kofi' }), personRecord({ id: 'wren', name: 'Wren S', number: 13 })],
    stations: [stationRecord({ id: 'bench', name: 'bench' }), stationRecord({ id: 'glue', name: 'glue' })],
    subAssemblies: codes.map((code, i) => pieceRecord({ id: code, code, name: `Bay ${i + 1}` })),
    steps: codes.flatMap((code, i) =>
      STEPS.map((name, k) => {
        const at = i % (STEPS.length + 1);
        const current = STEP_STATES[1 + (i % 6)] ?? 'ready';
        const state = k < at ? 'passed' : k > at || current === 'held' ? 'waiting' : current;
        return stepRecord({
          id: `${code}-${k}`,
          subAssemblyId: code,
          position: k + 1,
          name,
          operation: name,
          stationId: k > 1 && k < 5 ? 'glue' : 'bench',
          state,
          crew: state === 'in hand' ? [{ personId: 'wren', claimedAt: NOW }] : [],
        });
      }),
    ),
  });
}

function show(live: LiveState, path = '/') {
  const client = new QueryClient();
  client.setQueryData(liveKey('i1'), live);
  client.setQueryData(SESSION_KEY, session);
  client.setQueryData([...framesKey('i1'), 1], new Map());
  const view = render(
    <QueryClientProvider client={client}>
      <MemoryRouter initialEntries={[path]}>
        <TravellersBoard installationId="i1" />
      </MemoryRouter>
    </QueryClientProvider>,
  );
  return { ...view, client };
}

describe('TravellersBoard', () => {
  it('TravellersBoard > a choice of state and its undoing > rows in the order of codes, counted words', () => {
    show(hall(18));
    const codes = () =>
      screen
        .getAllByRole('rowheader')
        .map((cell) => cell.textContent)
        .filter(Boolean);
    expect(codes()).toHaveLength(18);
    const counters = within(screen.getByRole('group', { name: 'Show only' }));
    const counter = counters.getByRole('button', { name: /to check/ });
    const counted = Number(counter.textContent.split(' ')[0]);
    fireEvent.click(counter);
    expect(codes()).toHaveLength(counted);
    expect(codes()).toEqual([...codes()].sort());
    expect(counter.getAttribute('aria-pressed')).toBe('true');
    fireEvent.click(counter);
    expect(codes()).toHaveLength(18);
  });

  it('TravellersBoard > a traveller open in the address > its steps and what this person may do; Escape closes it', () => {
    show(hall(3), '/?open=V-001');
    const panel = screen.getByRole('complementary');
    expect(within(panel).getByRole('heading', { level: 2 }).textContent).toBe('V-001 Bay 1');
    expect(within(panel).getByRole('button', { name: 'Take a place: V-001 cut' })).toBeTruthy();
    fireEvent.keyDown(panel, { key: 'Escape' });
    expect(screen.queryByRole('complementary')).toBeNull();
  });

  it('TravellersBoard > one step of 300 travellers changes > its row says so, and no other row is touched', async () => {
    const live = hall(300);
    const { client } = show(live);
    const touched = new Set<string>();
    const observer = new MutationObserver((changes) => {
      for (const { target } of changes) {
        const element = target instanceof Element ? target : target.parentElement;
        const row = element?.closest('.board-row');
        if (row) touched.add(row.id);
      }
    });
    observer.observe(document.body, {
      subtree: true,
      childList: true,
      attributes: true,
      characterData: true,
    });
    const step = live.records.steps.get('V-001-0');
    if (!step) throw new Error('no step');
    const crew = [{ personId: 'wren', claimedAt: NOW }];
    await act(async () => {
      client.setQueryData(
        liveKey('i1'),
        withRecords(live, { steps: [{ ...step, revision: 2, state: 'in hand', crew }] }),
      );
      await Promise.resolve();
    });
    expect(await screen.findByText('Wren S took it just now')).toBeTruthy();
    observer.disconnect();
    expect([...touched]).toEqual(['traveller-V-001']);
  });

  it('TravellersBoard > 300 travellers of 8 steps > drawn in at most 40 times what a plain list of as many lines takes', () => {
    const live = hall(300);
    const lines = [...live.records.subAssemblies.values()];
    const plain = () =>
      render(
        <ul>
          {lines.map((piece) => (
            <li key={piece.id}>
              <a href="#x">{piece.code}</a> <span>{piece.name}</span> <span>ready</span>
            </li>
          ))}
        </ul>,
      );
    const best = (draw: () => unknown) => {
      const times = Array.from({ length: 4 }, () => {
        const start = performance.now();
        draw();
        const took = performance.now() - start;
        cleanup();
        return took;
      });
      // The first run pays for the compiler, not for the drawing.
      return Math.min(...times.slice(1));
    };
    const floor = best(plain);
    const board = best(() => show(live));
    expect(board / floor).toBeLessThan(40);
  }, 60_000);
});
