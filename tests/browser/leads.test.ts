import type { Browser } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { Tool } from '../../server/modules/crib/crib.entity';
import { newId } from '../../shared/kernel/ids';
import { inScope } from '../support/fixtures';
import { signs, type Hall as SafetyHall } from '../support/fixtures-safety';
import { signedInClient } from '../support/fixtures';
import { expectNoAxeViolations, launch } from './support/browser';
import { openBrowserHall, type BrowserHall } from './support/hall';

let browser: Browser;
let hall: BrowserHall;

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());
beforeEach(async () => {
  hall = await openBrowserHall();
});
afterEach(async () => {
  for (const context of browser.contexts()) await context.close();
  await hall.close();
});

async function gun(number: string): Promise<void> {
  await inScope(hall.server.app, hall.installationId, async (scope) => {
    const id = newId();
    await scope.manager.insert(Tool, {
      id,
      installationId: hall.installationId,
      number,
      name: 'hot-glue gun',
      kind: 'hot-glue gun',
      hazard: 'hot-glue',
      traits: { temperature: 'high', watts: 100 },
      condition: 'good',
      tag: null,
      revision: await scope.revision(),
      removedAt: null,
    });
    scope.changed('tools', id);
  });
}
const numberOf = async (personId: string) =>
  (
    await hall.server.app.deps.data.writer.query<{ number: number }[]>(
      'SELECT number FROM person WHERE id = ?',
      [personId],
    )
  )[0]?.number ?? 0;

describe('crib', () => {
  it('crib > by scanner, an unbriefed person asks for a gun > refused with the reason, it stays; a briefed one gets it; it comes back in one scan', async () => {
    await gun('G-01');
    const unbriefed = await numberOf(await hall.person({ firstName: 'Tam', initial: 'W' }));
    const briefed = await numberOf(await hall.briefed({ firstName: 'Kofi', initial: 'A' }));
    const keeper = await hall.pageOf(
      browser,
      await hall.person({ firstName: 'Cleo', initial: 'F', duties: ['crib keeper', 'volunteer'] }),
      'crib',
      'laptop',
    );
    const { page } = keeper;
    await page.getByLabel('1 scan the person').waitFor();
    // A scanner types and presses Enter; the focus moves on by itself.
    await page.keyboard.type(`${unbriefed}`);
    await page.keyboard.press('Enter');
    await page.keyboard.type('g01');
    await page.keyboard.press('Enter');
    await page
      .getByRole('alert')
      .filter({ hasText: /hot.glue/i })
      .waitFor();
    await expectNoAxeViolations(page, 'a refusal at the crib');
    expect(await hall.server.app.deps.data.writer.query('SELECT 1 FROM checkout')).toEqual([]);
    await page.reload();
    await page.getByLabel('1 scan the person').waitFor();
    await page.keyboard.type(`${briefed}`);
    await page.keyboard.press('Enter');
    await page.keyboard.type('G-01');
    await page.keyboard.press('Enter');
    const out = page
      .getByRole('table', { name: 'Tools that are out' })
      .getByRole('row', { name: /G-01.*Kofi A/ });
    await out.waitFor();
    expect(
      await hall.server.app.deps.data.writer.query('SELECT 1 FROM checkout WHERE back_at IS NULL'),
    ).toHaveLength(1);
    await page.getByRole('button', { name: 'Take back a tool' }).click();
    await page.keyboard.type('G-01');
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: /back/i }).last().click();
    await out.waitFor({ state: 'detached' });
    expect(keeper.errors).toEqual([]);
  });
});

describe('check', () => {
  it('check > a bench lead sends a step back with a reason on the board > the volunteer sees it on the bench, does it again, the lead passes it', async () => {
    await hall.piece('V-01', [{ name: 'glue out', needsCheck: 1 }, { name: 'clean' }]);
    const wren = await hall.pageOf(browser, await hall.person({ firstName: 'Wren', initial: 'S' }), 'bench');
    const lead = await hall.pageOf(
      browser,
      await hall.person({ firstName: 'Goran', initial: 'M', duties: ['bench lead', 'volunteer'] }),
      'travellers?open=V-01',
      'laptop',
    );
    const work = async () => {
      await wren.page.getByRole('button', { name: 'Take V-01 glue out' }).click();
      await wren.page.getByRole('button', { name: 'Start' }).click();
      await wren.page.getByRole('button', { name: /Finished/ }).click();
    };
    await work();
    await lead.page.getByRole('button', { name: 'Back for rework: V-01 glue out' }).click();
    await lead.page.getByLabel(/reason|why|wrong/i).fill('joint 6 is open');
    await expectNoAxeViolations(lead.page, 'sending a step back');
    await lead.page
      .getByRole('button', { name: /back for rework|send/i })
      .last()
      .click();
    await wren.page.getByText('To do again: joint 6 is open').waitFor();
    await work();
    await lead.page.getByRole('button', { name: 'Passed: V-01 glue out' }).click();
    await wren.page.getByRole('button', { name: 'Take V-01 clean' }).waitFor();
    expect([...wren.errors, ...lead.errors]).toEqual([]);
  });
});

describe('muster desk and countersigning', () => {
  it('desk and lead > one confirms, the other countersigns, each on their own screen > the phone opens up without a reload', async () => {
    await hall.piece('V-01', [{ name: 'tack', hazards: ['hot-glue'] }]);
    const yukiId = await hall.person({ firstName: 'Yuki', initial: 'T', confirmed: false });
    await signs(
      {
        server: hall.server,
        base: `/installations/${hall.installationId}`,
        installationId: hall.installationId,
      } as SafetyHall,
      await signedInClient(hall.server, yukiId),
    );
    const yuki = await hall.pageOf(browser, yukiId, 'bench');
    await yuki.page.getByText('Go to the muster desk.').waitFor();
    const desk = await hall.pageOf(
      browser,
      await hall.person({ firstName: 'Marta', initial: 'L', duties: ['muster desk', 'volunteer'] }),
      'muster',
    );
    await desk.page.getByRole('button', { name: '18 and over: confirm Yuki T' }).click();
    await yuki.page.getByText('Ask a safety lead to countersign it.').waitFor();
    const lead = await hall.pageOf(
      browser,
      await hall.person({ firstName: 'Noor', initial: 'A', duties: ['safety lead', 'volunteer'] }),
      'countersign',
      'laptop',
    );
    await lead.page.getByRole('button', { name: /Countersign.*Yuki T|Yuki T.*countersign/i }).click();
    await yuki.page.getByRole('button', { name: 'Take V-01 tack' }).waitFor();
    expect([...yuki.errors, ...desk.errors, ...lead.errors]).toEqual([]);
  });
});
