import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { manualClock } from '../../shared/kernel/clock';
import { createApp, type App } from '../../server/app';
import { DEMO_NOW, DEMO_PASSWORD } from '../../server/db/seeds/demo-scenario';
import { makeDemo, type SeededDemo } from '../support/demo';
import { expectNoAxeViolations, expectNoSidewaysScroll, launch, SIZES } from './support/browser';

let browser: Browser;
let demo: SeededDemo;
let app: App;
let url: string;

beforeAll(async () => {
  [browser, demo] = await Promise.all([launch(), makeDemo()]);
  app = await createApp(demo.config, manualClock(DEMO_NOW));
  await new Promise<void>((resolve) => app.http.listen(0, '127.0.0.1', resolve));
  url = app.deps.publicUrl();
});
afterAll(async () => {
  await browser.close();
  await app.close();
  demo.remove();
});

/** As wide as a laptop and so tall that nothing lies half under a bar at the foot, which axe would take for a small target. */
const TALL = { width: SIZES.laptop.width, height: 6000 };

/** Somebody of the demo, signed in, in a theme. */
async function signedIn(
  email: string,
  theme: 'paper' | 'night',
): Promise<{ context: BrowserContext; page: Page; errors: string[] }> {
  const context = await browser.newContext({ viewport: TALL, reducedMotion: 'reduce' });
  context.setDefaultTimeout(10_000);
  const page = await context.newPage();
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(error.message));
  page.on('console', (message) => {
    if (message.type() === 'error') errors.push(message.text());
  });
  await page.addInitScript((value) => localStorage.setItem('strutbee-theme', value), theme);
  await page.goto(`${url}/sign-in`);
  await page.getByLabel('e-mail').fill(email);
  await page.getByLabel('password', { exact: true }).fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { name: 'Installations' }).waitFor();
  return { context, page, errors };
}

const SCREENS: { who: string; path: string; heading: string; ready: string }[] = [
  { who: 'ines', path: 'plan', heading: 'Plan', ready: 'Build days' },
  { who: 'ines', path: 'people', heading: 'People', ready: 'Wren S' },
  { who: 'ines', path: 'drawing', heading: 'Drawing', ready: '13 joints, 28 struts' },
  { who: 'ines', path: 'drawing?show=placed', heading: 'Drawing', ready: 'Wood and tolerances' },
  { who: 'ines', path: 'sub-assemblies?show=split', heading: 'Sub-assemblies', ready: 'What a piece may be' },
  { who: 'ines', path: 'templates', heading: 'Templates', ready: 'glue out' },
  { who: 'ines', path: 'sub-assemblies', heading: 'Sub-assemblies', ready: 'V-14' },
  { who: 'ines', path: 'day-log', heading: 'Day log', ready: 'Goran M' },
  { who: 'ines', path: 'register', heading: 'Register', ready: 'Kofi A' },
  { who: 'lena', path: 'travellers', heading: 'Travellers', ready: 'V-14' },
  { who: 'noor', path: 'bench', heading: 'My bench', ready: 'You can take next' },
  { who: 'noor', path: 'briefings', heading: 'Briefings', ready: 'Hot glue' },
  { who: 'noor', path: 'briefings/hot-glue', heading: 'Briefing', ready: 'If somebody is hurt' },
  { who: 'lena', path: 'countersign', heading: 'Countersign', ready: 'Yara Q' },
  { who: 'cleo', path: 'crib', heading: 'Crib', ready: 'G-01' },
  { who: 'marta', path: 'muster', heading: 'Muster', ready: 'Fenn W' },
];

describe.each(['paper', 'night'] as const)('every screen on %s', (theme) => {
  it.each(SCREENS)(
    '$path > with the demo in it > nothing that axe finds (WCAG 2.2 AA), no sideways scroll at 320 px, no error of the page',
    async ({ who, path, heading, ready }) => {
      const { context, page, errors } = await signedIn(`${who}@pumphall.example`, theme);
      await page.goto(`${url}/i/${demo.hall.installationId}/${path}`);
      await page.getByRole('heading', { level: 1, name: heading }).waitFor();
      await page.getByText(ready).first().waitFor({ state: 'attached' });
      expect(await page.locator('html').getAttribute('data-theme')).toBe(theme);
      expect(await page.locator('h1').count()).toBe(1);
      await expectNoAxeViolations(page, `${path}, ${theme}, laptop`);
      await page.setViewportSize(SIZES.phone);
      await expectNoSidewaysScroll(page, `${path}, ${theme}, phone`);
      await page.setViewportSize(SIZES.small);
      await expectNoSidewaysScroll(page, `${path}, ${theme}, 320 px`);
      if (theme === 'paper') await expectNoAxeViolations(page, `${path}, ${theme}, 320 px`);
      await context.close();
      expect(errors).toEqual([]);
    },
  );
});

describe('screens outside an installation', () => {
  it.each([
    ['sign-in', 'Strutbee'],
    ['join', 'Join'],
    ['reset', ''],
    ['nowhere', ''],
  ])('/%s > signed out > nothing that axe finds, no sideways scroll at 320 px', async (path, heading) => {
    const context = await browser.newContext({ viewport: SIZES.phone, reducedMotion: 'reduce' });
    const page = await context.newPage();
    await page.goto(`${url}/${path}`);
    await page.getByRole('heading', { level: 1, name: heading === '' ? /./ : heading }).waitFor();
    await expectNoAxeViolations(page, path);
    await page.setViewportSize(SIZES.small);
    await expectNoSidewaysScroll(page, path);
    await context.close();
  });

  it.each(['installations', 'installations/new', 'accounts', 'account', 'outbox'])(
    '/%s > an administrator > nothing that axe finds, no sideways scroll at 320 px',
    async (path) => {
      const { context, page, errors } = await signedIn('ines@pumphall.example', 'paper');
      await page.goto(`${url}/${path}`);
      await page.getByRole('heading', { level: 1 }).waitFor();
      await expectNoAxeViolations(page, path);
      await page.setViewportSize(SIZES.small);
      await expectNoSidewaysScroll(page, path);
      await context.close();
      expect(errors).toEqual([]);
    },
  );
});
