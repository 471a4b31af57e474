// @vitest-environment jsdom
import { cleanup, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { RegisterView } from '../../../shared/contracts/safety';
import { RegisterPage } from '../../../src/features/safety-desk/register-page';
import { NOW } from '../board/fixtures';
import { fakeServer, show } from './desk';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const row = (seq: number, personal: Record<string, string> | null) => ({
  seq,
  at: NOW + seq * 1000,
  kind: seq === 1 ? 'signed' : 'countersigned',
  ids: {
    personId: 'kofi',
    briefingKey: 'hot-glue',
    version: 1,
    ...(seq === 1 ? {} : { by: 'lena', as: 'safety lead' }),
  },
  hash: String(seq).repeat(64),
  personal,
});
const register = (change: Partial<RegisterView> = {}): RegisterView => ({
  rows: [row(1, { name: 'Kofi A', ageBand: '18+', briefing: 'Hot glue' }), row(2, null)],
  count: 2,
  headHash: '2'.repeat(64),
  verified: { ok: true },
  ...change,
});

describe('RegisterPage', () => {
  it('RegisterPage > two rows, one of an erased person > newest first, the name gone, all hold, head and command', async () => {
    fakeServer({ 'GET /register': register() });
    show(<RegisterPage installationId="i1" />, {}, 'ines');
    expect(await screen.findByText('All 2 rows hold.')).toBeTruthy();
    const rows = screen
      .getAllByRole('row')
      .slice(1)
      .map((line) => line.textContent);
    expect(rows[0]).toContain('countersigned');
    expect(rows[0]).toContain('erased');
    expect(rows[0]).toContain('by Lena W as safety lead');
    expect(rows[1]).toContain('Kofi A');
    expect(rows[1]).toContain('111111111111');
    expect(rows[1]).not.toContain('1111111111111');
    expect(screen.getByText('2'.repeat(64))).toBeTruthy();
    expect(screen.getByText(/verify:register/).textContent).toBe(
      `npm run verify:register -- --installation i1 --count 2 --head ${'2'.repeat(64)}`,
    );
    expect(screen.getByRole('link', { name: 'An extract to print' }).getAttribute('href')).toBe(
      '/api/installations/i1/register/extract',
    );
  });

  it('RegisterPage > a row was altered > said aloud with its number, what it means and what to do', async () => {
    fakeServer({ 'GET /register': register({ verified: { ok: false, seq: 1, why: 'altered row' } }) });
    show(<RegisterPage installationId="i1" />, {});
    const alert = await screen.findByRole('alert');
    expect(alert.textContent).toContain('Row 1 does not hold: its contents are not what was written.');
    expect(screen.queryByText(/rows hold/)).toBeNull();
  });

  it('RegisterPage > a volunteer opens the address > nothing is asked of the server, told whose it is', () => {
    fakeServer({ 'GET /register': register() });
    show(<RegisterPage installationId="i1" />, {}, 'kofi');
    expect(screen.getByText('The register is for organisers and safety leads.')).toBeTruthy();
    expect(screen.queryByRole('table')).toBeNull();
  });
});
