// @vitest-environment jsdom
import { cleanup, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { TemplateStep } from '../../../shared/contracts/travellers';
import { buildShape } from '../../../shared/frames';
import { draftTemplate } from '../../../src/features/planning/template-draft';
import { TemplateEditor } from '../../../src/features/planning/template-editor';
import { errorsShown, fakeServer, refused, show } from './client';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const step = (name: string, more: Partial<TemplateStep> = {}): TemplateStep => ({
  operation: 'other',
  name,
  stationId: 'bench',
  hazards: [],
  toolKinds: [],
  crewMin: 1,
  crewMax: 2,
  minutes: { fixed: 4, perCut: 0.5, perJoint: 0 },
  clocks: null,
  needsCheck: false,
  ...more,
});

const CUBE = {
  id: 'cube',
  name: 'Cube',
  revision: 1,
  source: { kind: 'shape', shape: { kind: 'cube', edgeMm: 400 } },
  geometry: buildShape({ kind: 'cube', edgeMm: 400 }),
  subAssemblies: 0,
} as const;

function showEditor(steps: TemplateStep[]) {
  const onDone = vi.fn();
  const onReload = vi.fn();
  show(
    <TemplateEditor
      initial={draftTemplate({ id: 't', name: 'Usual', revision: 7, steps })}
      wish={{ method: 'PUT', path: '/installations/x/templates/t' }}
      words="Keep it"
      stations={[
        { id: 'bench', name: 'bench' },
        { id: 'paint', name: 'paint bay' },
      ]}
      toolKinds={[]}
      frames={[CUBE]}
      onDone={onDone}
      onCancel={vi.fn()}
      onReload={onReload}
    />,
  );
  return { onDone, onReload };
}

const order = () => screen.getAllByRole('listitem').map((item) => item.getAttribute('aria-label'));
const keep = () => screen.getByRole('button', { name: 'Keep it' });

describe('order of steps', () => {
  it('TemplateEditor > moved down and up by the keyboard > order follows, focus stays on the step, said aloud', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ data: { id: 't', revision: 8 } });
    const { onDone } = showEditor([step('cut'), step('lay out'), step('tack')]);
    screen.getByRole('button', { name: 'Down: cut' }).focus();
    await user.keyboard('{Enter}');
    expect(order()).toEqual(['Step 1, lay out', 'Step 2, cut', 'Step 3, tack']);
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Down: cut' }));
    expect(screen.getByText('cut is now step 2 of 3.')).toBeTruthy();
    await user.keyboard('{Enter}');
    // At the end there is no further down: the button up has the focus.
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Up: cut' }));
    expect(screen.getByRole('button', { name: 'Down: cut' }).hasAttribute('disabled')).toBe(true);
    await user.keyboard(' ');
    expect(order()).toEqual(['Step 1, lay out', 'Step 2, cut', 'Step 3, tack']);
    await user.click(keep());
    await waitFor(() => expect(onDone).toHaveBeenCalled());
    const body = sent[0]?.body as { steps: TemplateStep[]; revision: number };
    expect(body.steps.map(({ name }) => name)).toEqual(['lay out', 'cut', 'tack']);
    expect(body.revision).toBe(7);
  });

  it('TemplateEditor > kept twice > the second carries the revision the first came back with', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ data: { id: 't', revision: 8 } }, { data: { id: 't', revision: 9 } });
    showEditor([step('cut'), step('tack')]);
    await user.click(keep());
    expect(await screen.findByText('Kept.')).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Down: cut' }));
    expect(screen.queryByText('Kept.')).toBeNull();
    await user.click(keep());
    await waitFor(() => expect(sent).toHaveLength(2));
    expect(sent.map(({ body }) => (body as { revision: number }).revision)).toEqual([7, 8]);
  });
});

describe('fields of steps', () => {
  it('TemplateEditor > wrong in closed steps > they open, each error beside its field, focus on the first', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    showEditor([
      step('cut'),
      step('coat', { clocks: { touchDry: 2100 }, stationId: 'gone' }),
      step('', { crewMin: 3 }),
    ]);
    await user.click(keep());
    expect(errorsShown()).toEqual([
      'Please choose a station.',
      'Please fill this in.',
      'The most crew is at least the least crew.',
    ]);
    const coat = screen.getByRole('listitem', { name: 'Step 2, coat' });
    expect(document.activeElement).toBe(within(coat).getByLabelText('station'));
    expect(
      within(screen.getByRole('listitem', { name: 'Step 1, cut' })).queryByLabelText('station'),
    ).toBeNull();
    expect(sent).toEqual([]);
    // Put right, the words go; the step stays open under the fingers.
    await user.selectOptions(within(coat).getByLabelText('station'), 'paint');
    expect(errorsShown()).toEqual(['Please fill this in.', 'The most crew is at least the least crew.']);
    expect(within(coat).getByLabelText<HTMLInputElement>('touch-dry after').value).toBe('35');
  });

  it('TemplateEditor > clocks in minutes, tools by commas, hazards by boxes > sent in seconds, lists and names', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ data: { id: 't', revision: 8 } });
    showEditor([step('coat')]);
    await user.click(screen.getByRole('button', { name: 'Change coat' }));
    await user.click(screen.getByLabelText('It dries afterwards'));
    await user.type(screen.getByLabelText('touch-dry after'), '35');
    await user.type(screen.getByLabelText('hang from'), '60');
    await user.type(screen.getByLabelText(/^tools/), 'brush, step ladder,');
    await user.click(screen.getByLabelText('solvent spray'));
    await user.click(keep());
    await waitFor(() => expect(sent).toHaveLength(1));
    expect((sent[0]?.body as { steps: unknown[] }).steps[0]).toMatchObject({
      clocks: { touchDry: 2100, hangFrom: 3600 },
      toolKinds: ['brush', 'step ladder'],
      hazards: ['solvent-spray'],
    });
  });

  it('TemplateEditor > minutes per cut for a cube of 12 struts > 4 and 12 times 0.5 make 10, and follow what is typed', async () => {
    const user = userEvent.setup();
    showEditor([step('cut')]);
    expect(screen.getByRole('listitem').textContent).toContain('10 min');
    await user.click(screen.getByRole('button', { name: 'Change cut' }));
    const perCut = screen.getByLabelText('and per cut');
    await user.clear(perCut);
    await user.type(perCut, '1,5');
    expect(screen.getByRole('listitem').textContent).toContain('22 min');
  });

  it('TemplateEditor > somebody else changed it > said so, what was typed stays until the newer state is loaded', async () => {
    const user = userEvent.setup();
    fakeServer(refused('STALE_PAGE', 'Somebody changed the template Usual meanwhile.'));
    const { onReload } = showEditor([step('cut')]);
    await user.type(screen.getByLabelText('name of the template'), ' two');
    await user.click(keep());
    expect((await screen.findByRole('alert')).textContent).toContain('Somebody changed the template');
    expect(screen.getByLabelText<HTMLInputElement>('name of the template').value).toBe('Usual two');
    await user.click(screen.getByRole('button', { name: 'Load the newer state' }));
    expect(onReload).toHaveBeenCalledOnce();
  });
});
