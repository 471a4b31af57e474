// @vitest-environment jsdom
import { act, cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { Action } from '../../../src/components/ui/action';
import { DayRuler } from '../../../src/components/ui/day-ruler';
import { Figures } from '../../../src/components/ui/figures';
import { Note } from '../../../src/components/ui/note';
import { Pending } from '../../../src/components/ui/pending';
import { SignalPanel } from '../../../src/components/ui/signal-panel';
import { ToolOutLine } from '../../../src/components/ui/tool-out-line';

afterEach(() => {
  vi.useRealTimers();
  cleanup();
});

const DAY = { doors: '09:00', start: '09:30', clearUp: '17:30', end: '18:30' };
const BREAKS = [{ from: '12:30', to: '13:15', label: 'lunch' }];
const writtenIn = (container: HTMLElement): string[] =>
  [...container.querySelectorAll('text')].map((text) => text.textContent);

describe('DayRuler', () => {
  it('DayRuler > a desk at 14:07 > words over and under it; now crowds out the hour it would cover', () => {
    const { container } = render(<DayRuler {...DAY} breaks={BREAKS} now="14:07" size="desk" />);
    const words = writtenIn(container);
    expect(words).toEqual(
      expect.arrayContaining(['doors', 'start', 'lunch', 'clear-up', 'end', 'now 14:07', '13:00']),
    );
    expect(words).not.toContain('14:00');
  });

  it('DayRuler > a phone > hours and now only, and all of it in its label', () => {
    const { container } = render(<DayRuler {...DAY} breaks={BREAKS} now="14:07" size="phone" />);
    expect(writtenIn(container)).not.toContain('lunch');
    expect(writtenIn(container)).toContain('14:07');
    expect(screen.getByRole('img').getAttribute('aria-label')).toBe(
      'The day: doors 09:00, start 09:30, lunch 12:30 to 13:15, clear-up 17:30, end 18:30, now 14:07',
    );
  });

  it.each([
    ['07:30', 5],
    ['23:10', 1195],
  ])('DayRuler > now is %s, outside the day > its line stands at the end of the rule', (now, x) => {
    const { container } = render(<DayRuler {...DAY} breaks={[]} now={now} size="desk" />);
    expect(container.querySelector('circle')?.getAttribute('cx')).toBe(String(x));
  });
});

describe('small things', () => {
  it('Figures > a time > read as one text, shown in cells', () => {
    const { container } = render(<Figures>14:07</Figures>);
    expect(screen.getByText('14:07')).toBeTruthy();
    expect(container.querySelectorAll('.figure')).toHaveLength(4);
  });

  it('Note > refused and done > the first interrupts, the second waits its turn', () => {
    render(
      <>
        <Note kind="refused" title="Not on circuit A." />
        <Note kind="done" title="Taken." />
      </>,
    );
    expect(screen.getByRole('alert').textContent).toContain('Not on circuit A.');
    expect(screen.getByRole('status').textContent).toContain('Taken.');
  });

  it('Pending > a quick reply > nothing shows in the first 300 ms, then a quiet line', () => {
    vi.useFakeTimers();
    render(<Pending />);
    act(() => {
      vi.advanceTimersByTime(299);
    });
    expect(screen.getByRole('status').textContent).toBe('');
    act(() => {
      vi.advanceTimersByTime(1);
    });
    expect(screen.getByRole('status').textContent).toBe('One moment');
  });

  it('Action > a reason against it > stays reachable, says why, and does nothing', () => {
    const pressed = vi.fn();
    render(
      <Action reason="Taking needs the network." onClick={pressed}>
        Take
      </Action>,
    );
    const button = screen.getByRole('button', { name: 'Take' });
    button.click();
    expect(pressed).not.toHaveBeenCalled();
    expect(button.getAttribute('aria-disabled')).toBe('true');
    expect(document.getElementById(button.getAttribute('aria-describedby') ?? '')?.textContent).toBe(
      'Taking needs the network.',
    );
  });

  it('ToolOutLine > past its back-by > says late', () => {
    render(<ToolOutLine opens="12:00" closes="18:00" out="12:20" backBy="13:50" now="14:07" />);
    expect(screen.getByRole('img').getAttribute('aria-label')).toContain('late');
  });

  it.each([
    ['DANGER', true],
    ['WARNING', true],
    ['CAUTION', true],
    ['NOTICE', false],
  ] as const)('SignalPanel > %s > safety alert symbol: %s (ANSI Z535.4)', (word, symbol) => {
    const { container } = render(<SignalPanel word={word}>Text</SignalPanel>);
    expect(container.querySelector('.signal-symbol') !== null).toBe(symbol);
    expect(screen.getByRole('group', { name: word })).toBeTruthy();
  });
});
