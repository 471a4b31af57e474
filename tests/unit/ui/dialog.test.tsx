// @vitest-environment jsdom
import { act, cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { Action } from '../../../src/components/ui/action';
import { Dialog } from '../../../src/components/ui/dialog';

/** jsdom knows the element and not its methods; these do what the page relies on: open, and move the focus inside. */
beforeEach(() => {
  HTMLDialogElement.prototype.showModal = function (this: HTMLDialogElement) {
    this.open = true;
    this.querySelector<HTMLElement>('input, button')?.focus();
  };
  HTMLDialogElement.prototype.close = function (this: HTMLDialogElement) {
    this.open = false;
  };
});
afterEach(cleanup);

function Page() {
  const [open, setOpen] = useState(false);
  const shut = () => {
    setOpen(false);
  };
  return (
    <>
      <Action
        onClick={() => {
          setOpen(true);
        }}
      >
        Hold it
      </Action>
      <Dialog open={open} onClose={shut} title="Why?" actions={<Action onClick={shut}>Leave it</Action>}>
        <p>Say it in a few words.</p>
      </Dialog>
    </>
  );
}

describe('Dialog', () => {
  it('Dialog > opened and closed by its action > focus goes in and comes back to what opened it', async () => {
    render(<Page />);
    const opener = screen.getByRole('button', { name: 'Hold it' });
    await userEvent.click(opener);
    expect(screen.getByRole('dialog', { name: 'Why?' })).toBeTruthy();
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Leave it' }));
    await userEvent.click(screen.getByRole('button', { name: 'Leave it' }));
    expect(screen.queryByRole('dialog')).toBeNull();
    expect(document.activeElement).toBe(opener);
  });

  it('Dialog > Escape, which the browser tells as cancel > closed through onClose, focus back', async () => {
    render(<Page />);
    const opener = screen.getByRole('button', { name: 'Hold it' });
    await userEvent.click(opener);
    const cancel = new Event('cancel', { cancelable: true });
    act(() => {
      screen.getByRole('dialog').dispatchEvent(cancel);
    });
    expect(cancel.defaultPrevented).toBe(true);
    expect(screen.queryByRole('dialog')).toBeNull();
    expect(document.activeElement).toBe(opener);
  });
});
