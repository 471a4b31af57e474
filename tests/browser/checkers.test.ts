import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { expectNoAxeViolations, expectNoSidewaysScroll, launch, openPage, tabTo } from './support/browser';

let browser: Browser;
beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

const page = async (html: string) => {
  const opened = await openPage(browser, 'small');
  await opened.page.setContent(`<html lang="en"><head><title>t</title></head><body>${html}</body></html>`);
  return opened.page;
};

describe('checkers', () => {
  it('expectNoAxeViolations > a field without a label > fails', async () => {
    const bad = await page('<main><h1>Bad</h1><input></main>');
    await expect(expectNoAxeViolations(bad, 'bad')).rejects.toThrow(/label/);
    await expectNoAxeViolations(await page('<main><h1>Good</h1><label>a <input></label></main>'), 'good');
  });

  it('expectNoSidewaysScroll > a wide box behind overflow-x hidden > fails all the same', async () => {
    const bad = await page('<style>html,body{overflow-x:hidden}</style><div style="width:900px">wide</div>');
    await expect(expectNoSidewaysScroll(bad, 'bad')).rejects.toThrow(/bad/);
    await expectNoSidewaysScroll(
      await page('<div style="overflow-x:auto"><div style="width:900px">wide</div></div>'),
      'good',
    );
  });

  it('tabTo > something that cannot have the focus > fails', async () => {
    const bad = await page('<button>One</button><span>Two</span>');
    await tabTo(bad, 'One');
    await expect(tabTo(bad, 'Two', 6)).rejects.toThrow(/never reached/);
  });
});
