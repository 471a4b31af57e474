// @vitest-environment jsdom
import { cleanup, fireEvent, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { BuildDayForm } from '../../../src/features/installations/build-day-form';
import { NewInstallationForm } from '../../../src/features/installations/new-installation-form';
import { errorsShown, fakeServer, refused, show } from './client';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const start = () => screen.getByRole('button', { name: 'Start it' });

async function fillIn(user: ReturnType<typeof userEvent.setup>) {
  await user.type(screen.getByLabelText('name of the installation'), 'Mill Loft Star');
  const zone = screen.getByLabelText('time zone');
  await user.clear(zone);
  await user.type(zone, 'Europe/Oslo');
  await user.type(screen.getByLabelText('the hall may hold'), '60');
}

describe('new installation', () => {
  it('NewInstallationForm > sent with three wrong fields > three errors beside them, focus on the first, nothing sent', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show(<NewInstallationForm onMade={vi.fn()} />);
    const zone = screen.getByLabelText('time zone');
    await user.clear(zone);
    await user.type(zone, 'Nowhere/Land');
    await user.click(start());
    expect(errorsShown()).toEqual([
      'Please fill this in.',
      'A time zone such as Europe/Lisbon.',
      'How many people the hall may hold, as posted at its door.',
    ]);
    expect(document.activeElement).toBe(screen.getByLabelText('name of the installation'));
    for (const label of ['name of the installation', 'time zone', 'the hall may hold'])
      expect(screen.getByLabelText(label).getAttribute('aria-invalid')).toBe('true');
    expect(sent).toEqual([]);
    expect((zone as HTMLInputElement).value).toBe('Nowhere/Land');
  });

  it('NewInstallationForm > a wrong field put right > its error goes, the others stay', async () => {
    const user = userEvent.setup();
    fakeServer();
    show(<NewInstallationForm onMade={vi.fn()} />);
    await user.click(start());
    await user.type(screen.getByLabelText('name of the installation'), 'Star');
    expect(errorsShown()).toEqual(['How many people the hall may hold, as posted at its door.']);
  });

  it('NewInstallationForm > sent three times at once > sent once, with a key, and goes on', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ data: { id: 'new-one' } });
    // Going on takes its time: the form is still there when the second press comes.
    const onMade = vi.fn(() => new Promise(() => undefined));
    show(<NewInstallationForm onMade={onMade} />);
    await fillIn(user);
    const form = start().closest('form')!;
    fireEvent.submit(form);
    fireEvent.submit(form);
    await user.click(start());
    await waitFor(() => expect(onMade).toHaveBeenCalledWith('new-one'));
    expect(sent).toHaveLength(1);
    expect(sent[0]).toMatchObject({
      method: 'POST',
      path: '/installations',
      body: { name: 'Mill Loft Star', venue: '', timeZone: 'Europe/Oslo', unit: 'mm', hallLimit: 60 },
    });
    expect(sent[0]?.key).toHaveLength(26);
  });

  it('NewInstallationForm > the network fails once > said so, nothing lost, and the same key is sent again', async () => {
    const user = userEvent.setup();
    const sent = fakeServer('no network', { data: { id: 'new-one' } });
    const onMade = vi.fn();
    show(<NewInstallationForm onMade={onMade} />);
    await fillIn(user);
    await user.click(start());
    expect(await screen.findByText('There is no network, or the server does not answer.')).toBeTruthy();
    expect(screen.getByLabelText<HTMLInputElement>('name of the installation').value).toBe('Mill Loft Star');
    await user.click(start());
    await waitFor(() => expect(onMade).toHaveBeenCalled());
    expect(sent[1]?.key).toBe(sent[0]?.key);
  });

  it('NewInstallationForm > the server refuses a field and something that is no field here > one beside it, one in a note', async () => {
    const user = userEvent.setup();
    fakeServer(
      refused('VALIDATION', '2 fields need another look.', [
        { path: 'venue', message: 'At most 120 characters, please.' },
        { path: 'extra', message: 'This field is not known here.' },
      ]),
    );
    show(<NewInstallationForm onMade={vi.fn()} />);
    await fillIn(user);
    await user.click(start());
    await waitFor(() => expect(errorsShown()).toEqual(['At most 120 characters, please.']));
    expect(screen.getByRole('alert').textContent).toContain('This field is not known here.');
    expect(document.activeElement).toBe(screen.getByLabelText(/^venue/));
  });
});

const DAY = {
  date: '',
  doors: '09:00',
  start: '08:30',
  clearUp: '17:30',
  end: '17:00',
  breaks: [
    { from: '12:30', to: '12:30', label: '' },
    { from: '06:00', to: '07:00', label: 'early' },
  ],
};

describe('build day', () => {
  it('BuildDayForm > date, order of times and breaks all wrong > each error at its own field at once', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show(
      <BuildDayForm
        initial={DAY}
        wish={{ method: 'POST', path: '/installations/x/build-days' }}
        words="Add this day"
        onDone={vi.fn()}
      />,
    );
    expect(screen.getByText(/ruler of the day is drawn here once/)).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Add this day' }));
    const told = [...document.querySelectorAll('[aria-invalid="true"]')].map((field) => [
      document.querySelector(`label[for="${field.id}"]`)?.textContent,
      document.getElementById(`${field.id}-error`)?.textContent,
    ]);
    expect(told).toEqual([
      ['date', 'A date such as 2027-06-14.'],
      ['start', 'The start comes after the doors open.'],
      ['end', 'The end comes after clear-up begins.'],
      ['to', 'A break ends after it begins.'],
      ['called', 'Please fill this in.'],
      ['break 2 from', 'A break lies between start and end.'],
    ]);
    expect(sent).toEqual([]);
    expect(screen.queryByRole('alert')).toBeNull();
    expect(document.activeElement).toBe(screen.getByLabelText('date'));
  });

  it('BuildDayForm > times in order > the day drawn as a ruler, breaks and all', () => {
    show(
      <BuildDayForm
        initial={{
          ...DAY,
          start: '09:30',
          end: '18:30',
          breaks: [{ from: '12:30', to: '13:15', label: 'lunch' }],
        }}
        wish={{ method: 'POST', path: '/x' }}
        words="Add this day"
        onDone={vi.fn()}
      />,
    );
    expect(screen.getByRole('img').getAttribute('aria-label')).toBe(
      'The day: doors 09:00, start 09:30, lunch 12:30 to 13:15, clear-up 17:30, end 18:30',
    );
  });
});
