import { AxeBuilder } from '@axe-core/playwright';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { expect, inject } from 'vitest';

/** Sizes at which every screen has to work. */
export const SIZES = {
  phone: { width: 390, height: 844 },
  small: { width: 320, height: 640 },
  laptop: { width: 1440, height: 900 },
  projector: { width: 1920, height: 1080 },
} as const;
export type Size = keyof typeof SIZES;

const FLAGS = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/**
 * Start the browser that comes with the packages.
 * @param flags more flags, such as `--host-resolver-rules=MAP hall.test 127.0.0.1`
 */
export function launch(flags: readonly string[] = []): Promise<Browser> {
  return chromium.launch({ executablePath: inject('chromiumPath'), args: [...FLAGS, ...flags] });
}

/** A page in a context of its own; what the page itself gets wrong is collected in `errors`. */
export async function openPage(
  browser: Browser,
  size: Size,
): Promise<{ context: BrowserContext; page: Page; errors: string[] }> {
  const context = await browser.newContext({ viewport: SIZES[size], reducedMotion: 'reduce' });
  context.setDefaultTimeout(10_000);
  const page = await context.newPage();
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(error.message));
  page.on('console', (message) => {
    // A refusal of the server is part of many journeys, and the browser writes it down by itself.
    const known = /Failed to load resource|net::ERR_|WebSocket/.test(message.text());
    if (message.type() === 'error' && !known) errors.push(message.text());
  });
  return { context, page, errors };
}

const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** WCAG 2.2 level A and AA as far as axe can see them. */
export async function expectNoAxeViolations(page: Page, what: string): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(WCAG).analyze();
  const found = violations.map(
    ({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 160)).join(' | ')}`,
  );
  expect(found, what).toEqual([]);
}

/**
 * No sideways scrolling (WCAG 2.2, 1.4.10): measured by where things stand, so that `overflow-x: hidden` on the page hides
 * nothing from it. What scrolls by itself in a box of its own, such as a wide table, may.
 */
export async function expectNoSidewaysScroll(page: Page, what: string): Promise<void> {
  // Drawings are drawn anew for a width a moment after it has changed.
  await expect.poll(() => tooWide(page), { message: what, timeout: 3000, interval: 50 }).toEqual([]);
}

function tooWide(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const room = document.documentElement.clientWidth;
    const scrollsItself = (element: Element): boolean => {
      for (
        let parent = element.parentElement;
        parent && parent !== document.body;
        parent = parent.parentElement
      ) {
        const { overflowX } = getComputedStyle(parent);
        if (overflowX === 'auto' || overflowX === 'scroll') return true;
      }
      return false;
    };
    return [...document.body.querySelectorAll('*')]
      .filter((element) => {
        const box = element.getBoundingClientRect();
        if (box.width === 0 || box.height === 0 || box.right <= room + 1) return false;
        // Words for screen readers are clipped to a pixel and stand nowhere.
        return !element.closest('.sr-only') && !scrollsItself(element);
      })
      .map((element) => {
        const { right } = element.getBoundingClientRect();
        return `${element.tagName.toLowerCase()}.${element.getAttribute('class') ?? ''} ends at ${Math.round(right)}`;
      })
      .slice(0, 5);
  });
}

/** Press Tab until the thing with this accessible name has the focus. */
export async function tabTo(page: Page, name: string | RegExp, most = 80): Promise<void> {
  const matches = (given: string) => (typeof name === 'string' ? given.includes(name) : name.test(given));
  for (let presses = 0; presses < most; presses += 1) {
    await page.keyboard.press('Tab');
    const given = await page.evaluate(() => {
      const element = document.activeElement;
      if (!element || element === document.body) return '';
      const labels =
        element instanceof HTMLInputElement ||
        element instanceof HTMLSelectElement ||
        element instanceof HTMLTextAreaElement
          ? [...(element.labels ?? [])].map((label) => label.textContent)
          : [];
      return [element.getAttribute('aria-label'), ...labels, element.textContent].filter(Boolean).join(' ');
    });
    if (matches(given)) return;
  }
  throw new Error(`Tab never reached ${String(name)}`);
}
