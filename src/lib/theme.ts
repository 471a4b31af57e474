import { useSyncExternalStore } from 'react';

export type Theme = 'paper' | 'night';
/** `device` follows the device's own setting; nobody gets it who did not choose it. */
export type ThemeChoice = Theme | 'device';

/** public/theme.js reads the same key before the first paint. */
const KEY = 'strutbee-theme';
const DARK = '(prefers-color-scheme: dark)';

const listeners = new Set<() => void>();
let chosen: ThemeChoice | null = null;

function stored(): ThemeChoice {
  try {
    const value = localStorage.getItem(KEY);
    return value === 'night' || value === 'device' ? value : 'paper';
  } catch {
    return 'paper';
  }
}

const deviceIsDark = (): boolean => typeof matchMedia === 'function' && matchMedia(DARK).matches;

/** The person's choice; paper when they made none. */
export function themeChoice(): ThemeChoice {
  chosen ??= stored();
  return chosen;
}

/** The theme that a choice means on this device now. */
export const themeOf = (choice: ThemeChoice): Theme =>
  choice === 'device' ? (deviceIsDark() ? 'night' : 'paper') : choice;

function apply(): void {
  const theme = themeOf(themeChoice());
  document.documentElement.dataset.theme = theme;
  const ground = getComputedStyle(document.documentElement).getPropertyValue('--ground').trim();
  if (ground) document.querySelector('meta[name="theme-color"]')?.setAttribute('content', ground);
  for (const listener of listeners) listener();
}

/** Keeps a choice on this device and shows it at once. */
export function chooseTheme(choice: ThemeChoice): void {
  chosen = choice;
  try {
    localStorage.setItem(KEY, choice);
  } catch {
    // Storage is closed to us: the choice lasts as long as the page.
  }
  apply();
}

/** Shows the stored choice and follows the device and other tabs from then on. Call once, before the first render. */
export function startTheme(): void {
  chosen = stored();
  apply();
  if (typeof matchMedia === 'function') matchMedia(DARK).addEventListener('change', apply);
  window.addEventListener('storage', (event) => {
    if (event.key !== KEY) return;
    chosen = stored();
    apply();
  });
}

function listen(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** The choice, and the way to change it. */
export function useThemeChoice(): [ThemeChoice, (choice: ThemeChoice) => void] {
  return [useSyncExternalStore(listen, themeChoice), chooseTheme];
}
