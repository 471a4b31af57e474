// @vitest-environment jsdom
import { act, cleanup, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { CountersignDesk } from '../../../src/features/safety-desk/countersign-desk';
import { NOW, personRecord, pieceRecord, signOffRecord, stepRecord } from '../board/fixtures';
import { errorsShown, fakeServer, openDialogs, PEOPLE, show, waiting } from './desk';

beforeEach(openDialogs);
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const desk = <CountersignDesk installationId="i1" />;
const row = (name: string) => screen.getByRole('row', { name: new RegExp(`^${name}`) });

describe('waiting for a countersign', () => {
  it('WaitingList > a safety lead sees their own sign-off > no button, the other safety lead is named', () => {
    const sent = fakeServer();
    show(desk, { signOffs: [waiting({ id: 'so1', personId: 'lena' })] });
    expect(row('Lena W').textContent).toContain('Another safety lead does: Noor A.');
    expect(row('Lena W').textContent).toContain('adult, you');
    expect(within(row('Lena W')).queryByRole('button')).toBeNull();
    expect(sent).toEqual([]);
  });

  it('WaitingList > own sign-off, no other safety lead on site > the organiser is named', () => {
    fakeServer();
    const people = PEOPLE.map((person) => (person.id === 'noor' ? { ...person, onSite: false } : person));
    show(desk, { people, signOffs: [waiting({ personId: 'lena' })] });
    expect(row('Lena W').textContent).toContain('an organiser may: Ines C.');
  });

  it('WaitingList > an organiser looks at a volunteer > no button, safety leads are named', () => {
    fakeServer();
    show(desk, { signOffs: [waiting({})] }, 'ines');
    expect(row('Kofi A').textContent).toContain('Needs a safety lead: Lena W and Noor A.');
    expect(screen.queryByRole('button', { name: /^Countersign/ })).toBeNull();
  });

  it('WaitingList > an organiser, the only safety lead on site is the signer > may, and it is logged', () => {
    fakeServer();
    const people = PEOPLE.map((person) => (person.id === 'noor' ? { ...person, onSite: false } : person));
    show(desk, { people, signOffs: [waiting({ personId: 'lena' })] }, 'ines');
    expect(screen.getByRole('button', { name: 'Countersign Lena W as organiser' }).textContent).toContain(
      'logged',
    );
  });

  it('WaitingList > pressed twice before the answer > sent once; countersigned, the row stays until it is cleared', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    const { change } = show(desk, { signOffs: [waiting({ id: 'so1' })] });
    const button = screen.getByRole('button', { name: 'Countersign Kofi A' });
    act(() => {
      // Before the page could be drawn again.
      button.click();
      button.click();
    });
    await user.click(screen.getByRole('button', { name: 'Countersign Kofi A' }));
    await waitFor(() => expect(sent).toHaveLength(1));
    expect(sent[0]).toMatchObject({ method: 'POST', path: '/sign-offs/so1/countersign' });
    act(() => {
      change({ signOffs: [signOffRecord({ id: 'so1', revision: 2 })] });
    });
    const list = () => screen.queryByRole('table', { name: 'Signed, waiting for a countersign' });
    await waitFor(() => expect(list()?.textContent).toContain('countersigned'));
    await user.click(screen.getByRole('button', { name: 'Clear who is countersigned' }));
    expect(list()).toBeNull();
    expect(sent).toHaveLength(1);
  });

  it('WaitingList > signed, not confirmed at the desk > sent there first, no button', () => {
    fakeServer();
    const people = [...PEOPLE, personRecord({ id: 'una', name: 'Una M', confirmed: false, onSite: false })];
    show(desk, { people, signOffs: [waiting({ personId: 'una' })] });
    expect(row('Una M').textContent).toContain('First the muster desk confirms Una M');
    expect(within(row('Una M')).queryByRole('button')).toBeNull();
  });

  it('WaitingList > a minor beside an adult on site > band, adult, what is then allowed, questions right', async () => {
    fakeServer();
    show(desk, { signOffs: [waiting({ personId: 'yuki' })] });
    expect(row('Yuki T').textContent).toContain('with Kofi A, on site');
    expect(row('Yuki T').textContent).toContain('low-temperature gun only, beside Kofi A');
    await waitFor(() => expect(row('Yuki T').textContent).toContain('7 of 7'));
  });
});

describe('talk', () => {
  it('TalksList > a question missed twice > named; one press notes the talk, once', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    const missed = { wrongIds: ['glue-on-finger'] };
    show(desk, {
      signOffs: [
        waiting({
          id: 'so1',
          attempts: [
            { at: NOW - 900_000, ...missed },
            { at: NOW - 600_000, ...missed },
          ],
          passedAt: null,
          signedAt: null,
        }),
      ],
    });
    const line = screen.getByRole('listitem', { name: 'Kofi A' });
    await waitFor(() =>
      expect(line.textContent).toContain('Hot glue is on your finger. What do you do first?'),
    );
    await user.dblClick(within(line).getByRole('button'));
    await waitFor(() => expect(sent.map(({ path }) => path)).toEqual(['/sign-offs/so1/talk']));
  });
});

describe('revoke', () => {
  it('SignedOffList > revoked without a reason > nothing sent; with one > sent, work in hand is listed', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({
      'POST /sign-offs/so1/revoke': {
        signOffId: 'so1',
        workInHand: [{ stepId: 'step', personId: 'kofi', hazards: ['hot-glue'] }],
      },
    });
    show(desk, {
      signOffs: [signOffRecord({ id: 'so1' })],
      subAssemblies: [pieceRecord({})],
      steps: [stepRecord({ name: 'raise', hazards: ['hot-glue'] })],
    });
    await user.click(screen.getByRole('button', { name: 'Revoke the sign-off of Kofi A' }));
    await user.click(screen.getByRole('button', { name: 'Revoke it' }));
    expect(errorsShown()).toEqual(['Say in a few words why.']);
    expect(document.activeElement).toBe(screen.getByLabelText('why'));
    expect(sent).toEqual([]);
    await user.type(screen.getByLabelText('why'), 'gun left on its side twice');
    await user.click(screen.getByRole('button', { name: 'Revoke it' }));
    expect(await screen.findByText(/1 place in hand without a sign-off: V-01 raise \(Kofi A\)/)).toBeTruthy();
    expect(sent).toEqual([
      { method: 'POST', path: '/sign-offs/so1/revoke', body: { reason: 'gun left on its side twice' } },
    ]);
  });

  it('SignedOffList > an organiser looks > nothing to revoke, nothing to write', () => {
    fakeServer();
    show(desk, { signOffs: [signOffRecord({})] }, 'ines');
    expect(row('Kofi A').textContent).toContain('Hot glue 1');
    expect(screen.queryByRole('button', { name: /^(Revoke|Propose)/ })).toBeNull();
  });
});

describe('still working', () => {
  it('StillWorking > a change came while a step is in hand > crew, step and version named; held with a reason', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ 'POST /steps/step/hold': {} });
    const versions = [
      { version: 1, kind: 'first' as const, effectiveFrom: NOW - 86_400_000, whatChanged: null },
      { version: 2, kind: 'change' as const, effectiveFrom: NOW - 1000, whatChanged: 'Clips are new.' },
    ];
    show(desk, {
      briefings: [
        {
          id: 'b1',
          revision: 2,
          key: 'hot-glue',
          title: 'Hot glue',
          hazards: ['hot-glue'],
          validityDays: 365,
          versions,
        },
      ],
      signOffs: [signOffRecord({})],
      subAssemblies: [pieceRecord({ code: 'V-11' })],
      steps: [
        stepRecord({
          name: 'raise',
          state: 'in hand',
          hazards: ['hot-glue'],
          crew: [{ personId: 'kofi', claimedAt: NOW - 900_000 }],
        }),
      ],
    });
    const section = screen.getByRole('region', { name: 'Still working under an old version' });
    expect(section.textContent).toContain('In hand when version 2 came.');
    expect(section.textContent).toContain('Kofi A has not read version 2 yet.');
    expect(within(section).getByRole('link', { name: 'Show V-11 on the board' }).getAttribute('href')).toBe(
      '/i/i1/travellers?piece=V-11&open=V-11',
    );
    await user.click(within(section).getByRole('button', { name: 'Hold V-11 raise' }));
    await user.type(screen.getByLabelText('why it is held'), 'no clips at this bench');
    await user.click(screen.getByRole('button', { name: 'Hold it' }));
    await waitFor(() =>
      expect(sent).toEqual([
        { method: 'POST', path: '/steps/step/hold', body: { reason: 'no clips at this bench' } },
      ]),
    );
  });
});
