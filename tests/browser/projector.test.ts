import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { manualClock } from '../../shared/kernel/clock';
import { createApp, type App } from '../../server/app';
import { readConfig } from '../../server/config';
import { signedInClient } from '../support/fixtures';
import { TEST_NOW } from '../support/test-server';
import { expectNoAxeViolations, launch, openPage } from './support/browser';
import { openBrowserHall, type BrowserHall } from './support/hall';

let browser: Browser;
let hall: BrowserHall;
let wall: Page;
let errors: string[];
let displayId: string;

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());
beforeEach(async () => {
  hall = await openBrowserHall();
  await hall.piece('V-01', [{ plannedSeconds: 600 }, { name: 'clean', plannedSeconds: 600 }]);
  await hall.piece('L-01', [{ crewMax: 2, plannedSeconds: 1200 }]);
  const organiser = await signedInClient(hall.server, await hall.person({ duties: ['organiser'] }));
  const display = (await organiser.post<{ id: string; url: string }>(api('/displays'), { label: 'wall' }))
    .data;
  displayId = display.id;
  const opened = await openPage(browser, 'projector');
  wall = opened.page;
  errors = opened.errors;
  await wall.goto(display.url.replace(/^.*\/projector/, `${hall.url}/projector`));
  await wall.getByText('hands wanted').waitFor();
});
afterEach(async () => {
  for (const context of browser.contexts()) await context.close();
  await hall.close();
});

const api = (path: string) => `/installations/${hall.installationId}${path}`;

describe('projector', () => {
  it('projector > a step is finished in the hall > share done and hands wanted follow within a second, without a name that it may not show', async () => {
    await wall.getByText('0% done').waitFor();
    const wren = await signedInClient(
      hall.server,
      await hall.person({ firstName: 'Wren', initial: 'S', email: 'wren@example.org', ageBand: '18+' }),
    );
    const state = await wren.get<{
      records: { steps: { id: string; name: string; plannedSeconds: number; state: string }[] };
    }>(api('/live'));
    const step = state.data.records.steps.find(
      ({ plannedSeconds, state: now }) => plannedSeconds === 600 && now === 'ready',
    )!;
    await wren.post(api(`/steps/${step.id}/claim`));
    await wren.post(api(`/steps/${step.id}/start`));
    const asked = Date.now();
    await wren.post(api(`/steps/${step.id}/finish`));
    await wall.getByText('25% done').waitFor();
    expect(Date.now() - asked).toBeLessThan(1000);
    expect(await wall.content()).not.toMatch(/example\.org|18\+|18 and over/);
    await expectNoAxeViolations(wall, 'the projector');
    expect(errors).toEqual([]);
  });

  it('projector > looked at from ten metres > no text under 48 of 1080 lines, what people act on at 72 (look.md; ISO 9241-303: at least 16 minutes of arc)', async () => {
    const sizes = await wall.evaluate(() => {
      const found: { text: string; size: number }[] = [];
      const walker = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT);
      while (walker.nextNode()) {
        const text = walker.currentNode.textContent?.trim() ?? '';
        const parent = walker.currentNode.parentElement;
        if (text === '' || !parent || parent.closest('.sr-only, noscript, script, style')) continue;
        if (parent.getClientRects().length > 0)
          found.push({ text, size: parseFloat(getComputedStyle(parent).fontSize) });
      }
      return found;
    });
    expect(sizes.length).toBeGreaterThan(10);
    expect(sizes.filter(({ size }) => size < 48)).toEqual([]);
    expect(sizes.find(({ text }) => text === 'V-01')?.size).toBeGreaterThanOrEqual(48);
    // Cap height 0.7 em of Lexend; a picture 1.5 m high seen from 10 m.
    const smallest = Math.min(...sizes.map(({ size }) => size));
    const minutes = (Math.atan((((smallest * 0.7) / 1080) * 1.5) / 10) * 180 * 60) / Math.PI;
    expect(minutes).toBeGreaterThanOrEqual(16);
  });

  it('projector > a stop is raised and lifted > it covers the picture with what to do, then goes', async () => {
    const wren = await signedInClient(hall.server, await hall.person({ firstName: 'Wren', initial: 'S' }));
    const lead = await signedInClient(
      hall.server,
      await hall.person({ duties: ['safety lead', 'volunteer'] }),
    );
    await wren.post(api('/stops'), { scope: 'hot-tools', reason: 'Smoke at glue 2.' });
    await wall.getByText('Gun in its stand').waitFor({ timeout: 1000 });
    await expectNoAxeViolations(wall, 'the projector under a stop');
    const [stop] = await hall.server.app.deps.data.writer.query<{ id: string }[]>('SELECT id FROM stop');
    await lead.post(api(`/stops/${stop?.id ?? ''}/lift`), { note: 'a rag lay on the plate' });
    await wall.getByText('Gun in its stand').waitFor({ state: 'detached', timeout: 1000 });
  });

  it('projector > its session asks for every change there is > all refused, and the page has nothing to press', async () => {
    const display = await signedInClient(hall.server, `display:${displayId}`);
    const writes = hall.server.app.routes.filter(
      ({ method, path, action }) =>
        method !== 'get' && path.includes(':installationId') && action !== 'session.sign-out',
    );
    expect(writes.length).toBeGreaterThan(40);
    for (const { method, path } of writes) {
      const address = path.replace(':installationId', hall.installationId).replace(/:\w+/g, 'x');
      const reply = await display[method === 'get' ? 'post' : method](address);
      expect([method, path, reply.status]).toEqual([method, path, 403]);
    }
    expect(await wall.locator('button, input, a[href]').count()).toBe(0);
  });

  it('projector > the server goes and comes back > it says that its news is old, then recovers by itself', async () => {
    const { port } = new URL(hall.server.url);
    await hall.server.app.close();
    await wall.getByText(/no news/).waitFor({ timeout: 20_000 });
    await expectNoAxeViolations(wall, 'the projector without news');
    const config = readConfig({
      NODE_ENV: 'test',
      HOST: '127.0.0.1',
      PORT: port,
      DATABASE_FILE: hall.server.databaseFile,
      CLIENT_DIR: 'dist/client',
      LOG_LEVEL: 'silent',
    });
    const again: App = await createApp(config, manualClock(TEST_NOW + 60_000));
    await new Promise<void>((resolve) => again.http.listen(Number(port), '127.0.0.1', resolve));
    await wall.getByText(/no news/).waitFor({ state: 'detached', timeout: 20_000 });
    hall.server.app.close = () => again.close();
  });

  it('projector > its token is closed > the page says so instead of showing old news', async () => {
    const organiser = await signedInClient(hall.server, await hall.person({ duties: ['organiser'] }));
    await organiser.delete(api(`/displays/${displayId}`));
    await wall.getByText('This projector is closed.').waitFor();
  });
});
