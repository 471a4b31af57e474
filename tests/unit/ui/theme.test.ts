// @vitest-environment jsdom
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { runInThisContext } from 'node:vm';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { chooseTheme, startTheme, themeChoice } from '../../../src/lib/theme';

/** What index.html runs before the first paint. */
const early = readFileSync(resolve('public/theme.js'), 'utf8');
const runEarly = (): void => {
  runInThisContext(early);
};

const deviceIs = (dark: boolean): void => {
  vi.stubGlobal('matchMedia', (query: string) => ({
    matches: dark && query.includes('dark'),
    addEventListener: () => undefined,
  }));
};
const shown = (): string | undefined => document.documentElement.dataset.theme;

beforeEach(() => {
  localStorage.clear();
  delete document.documentElement.dataset.theme;
});
afterEach(() => {
  vi.unstubAllGlobals();
});

describe('theme', () => {
  it.each([
    [null, false, 'paper'],
    [null, true, 'paper'],
    ['paper', true, 'paper'],
    ['night', false, 'night'],
    ['device', true, 'night'],
    ['device', false, 'paper'],
    ['plaid', true, 'paper'],
  ])(
    'startTheme > stored %s, dark device %s > %s, before the first paint as after it',
    (stored, dark, expected) => {
      if (stored !== null) localStorage.setItem('strutbee-theme', stored);
      deviceIs(dark);
      runEarly();
      expect(shown()).toBe(expected);
      startTheme();
      expect(shown()).toBe(expected);
    },
  );

  it('chooseTheme > night > shown at once and kept for the next visit', () => {
    deviceIs(false);
    startTheme();
    chooseTheme('night');
    expect(shown()).toBe('night');
    expect(themeChoice()).toBe('night');
    runEarly();
    expect(shown()).toBe('night');
  });

  it('theme > storage closed to the page > paper, and a choice lasts as long as the page', () => {
    deviceIs(false);
    vi.stubGlobal('localStorage', {
      getItem: () => {
        throw new Error('closed');
      },
      setItem: () => {
        throw new Error('closed');
      },
    });
    runEarly();
    startTheme();
    expect(shown()).toBe('paper');
    chooseTheme('night');
    expect(shown()).toBe('night');
  });
});
