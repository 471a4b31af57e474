// @vitest-environment jsdom
import { cleanup, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { BriefingBody } from '../../../shared/safety';
import { CountersignDesk } from '../../../src/features/safety-desk/countersign-desk';
import { instantOf, localOf, marksOf } from '../../../src/features/safety-desk/version-draft';
import { NOW, signOffRecord } from '../board/fixtures';
import { BODY, errorsShown, fakeServer, openDialogs, show } from './desk';

beforeEach(openDialogs);
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const desk = <CountersignDesk installationId="i1" />;
const entry = (name: string) => within(screen.getByRole('listitem', { name }));

async function write(kind: 'change' | 'correction') {
  await userEvent.click(await screen.findByRole('button', { name: `Propose a ${kind} of Hot glue` }));
  await screen.findByLabelText('what changed');
}

describe('VersionEditor', () => {
  it('VersionEditor > wrong in many places > every problem beside its field, focus on the first, nothing sent', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show(desk, {});
    await write('correction');
    await user.clear(entry('panel 1').getByLabelText('how to avoid it'));
    await user.clear(entry('rule 2').getByLabelText('rule'));
    await user.selectOptions(entry('panel 2').getByLabelText(/^signal word/), 'no injury');
    await user.click(screen.getByRole('button', { name: 'Add a question' }));
    await user.click(screen.getByRole('button', { name: 'Propose the correction' }));
    expect(errorsShown()).toEqual([
      'Say in a few lines what changed; people read this first.',
      'Say how the hazard is avoided.',
      'This panel speaks of injury: it needs CAUTION, WARNING or DANGER.',
      'Write something here.',
      'Write something here.',
      'Write something here.',
      'Write something here.',
      'Mark which answer is right.',
      'Write something here.',
    ]);
    expect(entry('panel 1').getByText('Say how the hazard is avoided.')).toBeTruthy();
    expect(entry('rule 2').getByText('Write something here.')).toBeTruthy();
    expect(document.activeElement).toBe(screen.getByLabelText('what changed'));
    expect(sent).toEqual([]);
  });

  it('VersionEditor > problems while the text is only read > the fields come back with the words beside them', async () => {
    const user = userEvent.setup();
    fakeServer();
    show(desk, {});
    await write('change');
    await user.click(screen.getByRole('button', { name: 'Read it as the room will' }));
    expect(screen.queryByLabelText('what changed')).toBeNull();
    await user.click(screen.getByRole('button', { name: 'Publish the change' }));
    expect(errorsShown()).toEqual(['Say in a few lines what changed; people read this first.']);
  });

  it('VersionEditor > a change at once > whole text with its right answers, based on the newest, in force this minute', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({
      'POST /briefings/hot-glue/versions': { version: 2, status: 'published', workInHand: [] },
    });
    show(desk, { signOffs: [signOffRecord({})] });
    await write('change');
    expect(screen.getByText(/It ends 1 sign-off/)).toBeTruthy();
    await user.click(screen.getByLabelText('what changed'));
    await user.paste('Clip the cable first.');
    await user.click(screen.getByRole('button', { name: 'Down: rule 1' }));
    await user.click(screen.getByRole('button', { name: 'Publish the change' }));
    expect(await screen.findByText('Version 2 is published.')).toBeTruthy();
    const body = sent[0]!.body as { body: BriefingBody; effectiveFrom: number };
    expect(body).toMatchObject({ kind: 'change', basedOn: 1, whatChanged: 'Clip the cable first.' });
    expect(NOW - body.effectiveFrom).toBeLessThan(60_000);
    const [first, second, ...others] = BODY.rules;
    expect(body.body).toEqual({ ...BODY, rules: [second, first, ...others] });
  });

  it('VersionEditor > a time left empty > asked for beside it; a time in the hall > sent as an instant', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show(desk, {});
    await write('change');
    await user.click(screen.getByLabelText('what changed'));
    await user.paste('Clip the cable first.');
    await user.click(screen.getByLabelText('from a time'));
    await user.clear(screen.getByLabelText('from'));
    await user.click(screen.getByRole('button', { name: 'Publish the change' }));
    expect(errorsShown()).toEqual(['Say from when the change counts.']);
    expect(document.activeElement).toBe(screen.getByLabelText('from'));
    await user.type(screen.getByLabelText('from'), '2025-06-14T15:30');
    await user.click(screen.getByRole('button', { name: 'Publish the change' }));
    await waitFor(() => expect(sent).toHaveLength(1));
    // The live state of this test names no installation, so its zone is UTC.
    expect((sent[0]!.body as { effectiveFrom: number }).effectiveFrom).toBe(Date.UTC(2025, 5, 14, 15, 30));
  });
});

describe('Proposals', () => {
  const rules = BODY.rules.map((rule) => (rule.id === 'stand' ? { ...rule, text: 'In its stand.' } : rule));
  const proposal = (proposedBy: string) => ({
    briefingId: 'b1',
    version: 2,
    proposedBy,
    at: 1234,
    whatChanged: 'A slip of the pen.',
    body: { ...BODY, rules },
  });

  it('Proposals > one of one’s own > read, not seconded, and why', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ 'GET /briefings/hot-glue/proposals': [proposal('lena')] });
    show(desk, {});
    await user.click(await screen.findByRole('button', { name: 'Read correction 2' }));
    await screen.findByText('In its stand.');
    await user.click(screen.getByRole('button', { name: 'I have read it: it stands' }));
    expect(screen.getByText('Your own words: another safety lead reads and seconds them.')).toBeTruthy();
    expect(sent).toEqual([]);
  });

  it('Proposals > somebody else’s > what changed is marked; seconded once, naming the text that was read', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ 'GET /briefings/hot-glue/proposals': [proposal('noor')] });
    show(desk, {});
    await user.click(await screen.findByRole('button', { name: 'Read correction 2' }));
    expect((await screen.findByText('In its stand.')).textContent).toContain('changed');
    expect(screen.getByText('1 entry new or changed, 0 taken out.')).toBeTruthy();
    await user.dblClick(screen.getByRole('button', { name: 'I have read it: it stands' }));
    await waitFor(() => expect(sent).toHaveLength(1));
    expect(sent[0]).toMatchObject({
      path: '/briefings/hot-glue/proposals/2/second',
      body: { proposedAt: 1234 },
    });
  });

  it('Proposals > one waits > no second correction beside it', async () => {
    fakeServer({ 'GET /briefings/hot-glue/proposals': [proposal('noor')] });
    show(desk, {});
    expect(await screen.findByText('A correction waits: second or withdraw it first.')).toBeTruthy();
  });
});

describe('marksOf', () => {
  it('marksOf > right answer moved, a note gone, a rule new > question changed, rule new, one gone', () => {
    const [question, ...others] = BODY.questions;
    const after: BriefingBody = {
      ...BODY,
      questions: [{ ...question!, right: 'pull' }, ...others],
      notes: BODY.notes.slice(1),
      rules: [...BODY.rules, { id: 'clip', text: 'Clip it.', sources: [] }],
    };
    const { marks, gone } = marksOf(BODY, after);
    expect([...marks]).toEqual([
      ['rules.clip', 'new'],
      [`questions.${question!.id}`, 'changed'],
    ]);
    expect(gone).toBe(1);
  });
});

describe('instantOf', () => {
  it('instantOf > local time in summer and winter, and back > the instant of the zone, not of the computer', () => {
    expect(instantOf('2027-06-12T14:07', 'Europe/Lisbon')).toBe(Date.UTC(2027, 5, 12, 13, 7));
    expect(instantOf('2027-01-12T14:07', 'Europe/Lisbon')).toBe(Date.UTC(2027, 0, 12, 14, 7));
    expect(localOf(Date.UTC(2027, 5, 12, 13, 7), 'Europe/Lisbon')).toBe('2027-06-12T14:07');
    expect(instantOf('soon', 'Europe/Lisbon')).toBeNull();
  });
});
