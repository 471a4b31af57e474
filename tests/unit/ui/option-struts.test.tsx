// @vitest-environment jsdom
import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { OptionStruts } from '../../../src/components/ui/choices';

/** jsdom has no CSS.escape, with which user-event finds the radio buttons of a group; names here need no escaping. */
beforeEach(() => {
  vi.stubGlobal('CSS', { escape: (text: string) => text });
});
afterEach(() => {
  vi.unstubAllGlobals();
  cleanup();
});

type Band = '18+' | '16-17' | '13-15';

function Age({ start, error }: { start: Band | null; error?: string }) {
  const [band, setBand] = useState<Band | null>(start);
  return (
    <>
      <button type="button">before</button>
      <OptionStruts<Band>
        legend="age"
        name="age"
        value={band}
        onChange={setBand}
        error={error}
        options={[
          { value: '18+', label: '18 and over' },
          { value: '16-17', label: '16 to 17' },
          { value: '13-15', label: '13 to 15' },
        ]}
      />
    </>
  );
}

describe('OptionStruts', () => {
  it('OptionStruts > tab into it, arrow down > the next option has focus and is chosen, the last chosen one is not', async () => {
    render(<Age start="18+" />);
    screen.getByText('before').focus();
    await userEvent.tab();
    expect(document.activeElement).toBe(screen.getByRole('radio', { name: '18 and over' }));
    await userEvent.keyboard('{ArrowDown}');
    const next = screen.getByRole<HTMLInputElement>('radio', { name: '16 to 17' });
    expect(document.activeElement).toBe(next);
    expect(next.checked).toBe(true);
    expect(screen.getByRole<HTMLInputElement>('radio', { name: '18 and over' }).checked).toBe(false);
  });

  it('OptionStruts > arrow up from the first > goes round to the last', async () => {
    render(<Age start="18+" />);
    screen.getByRole('radio', { name: '18 and over' }).focus();
    await userEvent.keyboard('{ArrowUp}');
    expect(screen.getByRole<HTMLInputElement>('radio', { name: '13 to 15' }).checked).toBe(true);
  });

  it('OptionStruts > a press on the words > chooses that option, and its mark is drawn thick', async () => {
    const { container } = render(<Age start={null} />);
    await userEvent.click(screen.getByText('13 to 15'));
    expect(screen.getByRole<HTMLInputElement>('radio', { name: '13 to 15' }).checked).toBe(true);
    const widths = [...container.querySelectorAll('.option-strut path')].map((p) =>
      p.getAttribute('stroke-width'),
    );
    expect(widths).toEqual(['1.5', '1.5', '4']);
  });

  it('OptionStruts > an error > describes the group, named by its question', () => {
    render(<Age start={null} error="Please choose your age." />);
    const group = screen.getByRole('group', { name: 'age' });
    const id = group.getAttribute('aria-describedby') ?? '';
    expect(document.getElementById(id)?.textContent).toBe('Please choose your age.');
  });
});
