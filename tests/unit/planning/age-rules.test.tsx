// @vitest-environment jsdom
import { cleanup, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { InstallationRecord } from '../../../shared/contracts/live';
import { AgeRulesSection } from '../../../src/features/installations/age-rules-section';
import { BasicsSection } from '../../../src/features/installations/basics-section';
import { usePlanForm } from '../../../src/features/installations/plan-form';
import { fakeServer, refused, show } from './client';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const RECORD: InstallationRecord = {
  id: 'x',
  revision: 5,
  name: 'Star',
  venue: '',
  timeZone: 'Europe/Oslo',
  unit: 'mm',
  hallLimit: 60,
  status: 'draft',
  settings: { maxInHand: 2, ageChanges: [{ key: 'ladder-height', value: '1200' }] },
};

function Plan() {
  const plan = usePlanForm(RECORD);
  return (
    <>
      <BasicsSection plan={plan} closed={false} />
      <AgeRulesSection plan={plan} unit="mm" closed={false} />
    </>
  );
}

const optionsOf = (label: string): string[] =>
  within(screen.getByLabelText(label))
    .getAllByRole('option')
    .map((option) => option.textContent);

describe('age rules', () => {
  it('AgeRulesSection > each rule > only its default and what is stricter can be chosen', () => {
    show(<Plan />);
    expect(optionsOf('who may: a hot-glue gun')).toEqual([
      '9 and over, default',
      '13 and over',
      '16 and over',
      '18 and over',
    ]);
    expect(optionsOf('who may: a powered saw')).toEqual(['18 and over, default']);
    expect(optionsOf('who may: a ladder above 1.8 m')[0]).toBe('under 18: 1\u2009800 mm, default');
    expect(optionsOf('who may: a ladder above 1.8 m').at(-1)).toBe('under 18: no ladder at all');
    expect(screen.getByLabelText<HTMLSelectElement>('who may: a ladder above 1.8 m').value).toBe('1200');
  });

  it('usePlanForm > a rule tightened and a default chosen again > only stricter rules are sent, with the revision', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ data: {} });
    show(<Plan />);
    await user.selectOptions(screen.getByLabelText('who may: a hot-glue gun'), '16-17');
    await user.selectOptions(screen.getByLabelText('who may: a ladder above 1.8 m'), '1800');
    expect(screen.getAllByText('Not kept yet.')).toHaveLength(2);
    await user.click(screen.getAllByRole('button', { name: 'Keep it' })[1]!);
    await waitFor(() => expect(sent).toHaveLength(1));
    expect(sent[0]).toMatchObject({
      method: 'PUT',
      path: '/installations/x',
      body: { ageChanges: [{ key: 'hot-glue', value: '16-17' }], revision: 5, maxInHand: 2 },
    });
  });

  it('usePlanForm > a stale page > what was typed stays, and goes only when the newer state is asked for', async () => {
    const user = userEvent.setup();
    fakeServer(refused('STALE_PAGE', 'Somebody changed this installation: hall limit.'));
    show(<Plan />);
    await user.type(screen.getByLabelText(/^venue/), 'Loft A');
    await user.click(screen.getAllByRole('button', { name: 'Keep it' })[0]!);
    expect((await screen.findByRole('alert')).textContent).toContain('hall limit');
    expect(screen.getByLabelText<HTMLInputElement>(/^venue/).value).toBe('Loft A');
    await user.click(screen.getByRole('button', { name: 'Load the newer state' }));
    expect(screen.getByLabelText<HTMLInputElement>(/^venue/).value).toBe('');
    expect(screen.queryByRole('alert')).toBeNull();
  });
});
