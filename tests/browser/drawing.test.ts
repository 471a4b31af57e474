import { readFile } from 'node:fs/promises';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { formatObj } from '../../shared/frames';
import { defaultTemplateSteps } from '../../shared/travellers/default-template';
import { flatLattice } from '../support/structures';
import { expectNoAxeViolations, expectNoSidewaysScroll, launch } from './support/browser';
import { openBrowserHall, type BrowserHall } from './support/hall';
import { signedInClient } from '../support/fixtures';

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

const go = (page: Page, screen: string) =>
  page.getByRole('navigation', { name: 'Screens' }).getByRole('link', { name: screen, exact: true }).click();
const choose = (page: Page, row: string, choice: string) =>
  page.getByRole('group', { name: row }).getByRole('button', { name: choice, exact: true }).click();

/** Somebody who plans, and a template that travellers can be made from. */
async function organiser(): Promise<string> {
  const id = await hall.person({ firstName: 'Ines', initial: 'C', duties: ['organiser', 'volunteer'] });
  const client = await signedInClient(hall.server, id);
  await client.post(`/installations/${hall.installationId}/templates`, {
    name: 'Usual steps',
    steps: defaultTemplateSteps([{ id: hall.glueId, kind: 'glue' }]),
  });
  return id;
}

describe('drawing and split', () => {
  it('organiser > a canopy of 616 struts from a file and 30 lanterns > placed, split, one strut moved by hand, a sheet to print, travellers and field joints made', async () => {
    const { page, errors } = await hall.pageOf(browser, await organiser(), 'drawing', 'laptop');
    await page.getByRole('link', { name: 'From a file' }).first().click();
    await page.getByLabel('name of the frame').fill('Canopy');
    await page.locator('input[type=file]').setInputFiles({
      name: 'canopy.obj',
      mimeType: 'text/plain',
      buffer: Buffer.from(formatObj(flatLattice(14, 14, true))),
    });
    await page.getByRole('button', { name: 'Add this frame' }).click();
    await page.getByText('225 joints, 616 struts').first().waitFor();

    await choose(page, 'what is shown', 'The whole drawing');
    await page.getByText('Nothing stands here yet.').waitFor();
    const place = async (frame: string) => {
      await page.getByRole('button', { name: 'Place a frame' }).click();
      await page.getByLabel('frame', { exact: true }).selectOption({ label: frame });
    };
    await place('Canopy');
    await page.getByLabel('position, z').fill('a lot');
    await page.getByRole('button', { name: 'Place it' }).click();
    await page.getByText('This is no length.').waitFor();
    await page.getByLabel('position, z').fill('3 m');
    await page.getByRole('button', { name: 'Place it' }).click();
    await page
      .getByRole('img', { name: /616 struts and 225 joints/ })
      .or(page.getByLabel(/616 struts and 225 joints/))
      .waitFor();
    await place('Octahedron');
    await page.getByLabel('set out').selectOption('grid');
    for (const [label, value] of [
      ['how many along, x', '6'],
      ['how many along, y', '5'],
      ['from one to the next, x', '1200'],
      ['from one to the next, y', '1400'],
    ] as const)
      await page.getByLabel(label).fill(value);
    await page.getByRole('button', { name: 'Place it' }).click();
    // 30 lanterns of 12 struts.
    await page.getByLabel(/976 struts/).waitFor();
    await page.getByRole('button', { name: 'Undo' }).click();
    await page.getByLabel(/616 struts and 225 joints/).waitFor();
    await page.getByRole('button', { name: 'Redo' }).click();
    await page.getByLabel(/976 struts/).waitFor();
    await expectNoAxeViolations(page, 'the whole drawing');

    await go(page, 'Sub-assemblies');
    await choose(page, 'what is shown', 'Split the drawing');
    await page.getByLabel('struts in a piece, at most').fill('');
    await page.getByLabel('mass that two may carry, kg').fill('-3');
    await page
      .getByRole('region', { name: 'What a piece may be' })
      .getByRole('button', { name: 'Split the drawing' })
      .click();
    await page.getByLabel('mass that two may carry, kg').and(page.locator('[aria-invalid=true]')).waitFor();
    await page.getByLabel('mass that two may carry, kg').fill('20');
    await page.getByLabel('struts in a piece, at most').fill('60');
    await page
      .getByRole('region', { name: 'What a piece may be' })
      .getByRole('button', { name: 'Split the drawing' })
      .click();
    const proposal = page.getByRole('region', { name: 'The proposal' });
    await proposal.waitFor({ timeout: 60_000 });
    // The canopy needs at least eleven pieces of 60 struts; each lantern stays one.
    const pieces = await proposal.getByRole('row').count();
    expect(pieces - 1).toBeGreaterThanOrEqual(41);
    await proposal.getByText('29 more like it').first().waitFor();
    await expectNoAxeViolations(page, 'a split');

    // By keyboard: step onto a strut, choose it, give it a piece of its own.
    const space = page.getByLabel(/The drawing in \d+ pieces/);
    await space.focus();
    for (const key of ['ArrowLeft', '+', 'n', 'Enter']) await page.keyboard.press(key);
    await page.getByText('1 strut chosen').waitFor();
    await page.getByRole('button', { name: 'Move them' }).click();
    await Promise.race([
      page.getByText('strut chosen').waitFor({ state: 'detached' }),
      page.getByText(/falls into \d parts/).waitFor(),
    ]);

    await page.getByLabel('name of the pieces').fill('Bay');
    await page.getByLabel('letter of the code').fill('v');
    await page.getByRole('button', { name: /^Make \d+ travellers$/ }).click();
    await page.getByText('The travellers are made.').waitFor({ timeout: 30_000 });
    await choose(page, 'what is shown', 'Pieces');
    await page.getByRole('link', { name: 'V-01, its sheet' }).waitFor();
    await page
      .getByText(/^joins V-\d+ and V-\d+$/)
      .first()
      .waitFor();
    await page.getByRole('link', { name: 'V-01, its sheet' }).click();
    await page.getByRole('button', { name: 'Print this sheet' }).waitFor();
    await page.getByText(/^Move 1\./).waitFor();
    await expectNoAxeViolations(page, 'the sheet of a piece');
    await page.emulateMedia({ media: 'print' });
    const pdf = await page.pdf({ format: 'A4' });
    expect(pdf.length).toBeGreaterThan(5000);
    expect(await page.getByRole('navigation', { name: 'Screens' }).isVisible()).toBe(false);
    expect(errors).toEqual([]);
  });

  it('drawing, split and sheet > at 320 px > nothing sticks out sideways', async () => {
    const { page } = await hall.pageOf(browser, await organiser(), 'drawing?show=placed', 'small');
    await page.getByRole('button', { name: 'Place a frame' }).click();
    await page.getByRole('button', { name: 'Place it' }).click();
    await page.getByLabel(/12 struts and 6 joints/).waitFor();
    await expectNoSidewaysScroll(page, 'the whole drawing');
    await page.goto(`${hall.url}/i/${hall.installationId}/sub-assemblies?show=split`);
    await page
      .getByRole('region', { name: 'What a piece may be' })
      .getByRole('button', { name: 'Split the drawing' })
      .click();
    await page.getByRole('region', { name: 'The proposal' }).waitFor({ timeout: 30_000 });
    await expectNoSidewaysScroll(page, 'the split');
  });

  it('frame > a dome by its measures, then joint by joint > undone and done again, a strut that lies on another refused, kept, saved as CSV and read again', async () => {
    const { page, errors } = await hall.pageOf(browser, await organiser(), 'drawing', 'laptop');
    await page.getByRole('link', { name: 'A new shape' }).first().click();
    await page.getByLabel('name of the frame').fill('Dome');
    await page.getByLabel('shape', { exact: true }).selectOption('geodesic');
    await page.getByLabel('frequency, parts of each edge').fill('9');
    await page.getByRole('button', { name: 'Add this frame' }).click();
    await page.getByLabel('frequency, parts of each edge').and(page.locator('[aria-invalid=true]')).waitFor();
    await page.getByLabel('frequency, parts of each edge').fill('2');
    await page.getByLabel('part', { exact: true }).selectOption('sphere');
    await page.getByRole('button', { name: 'Add this frame' }).click();
    // Class I, frequency 2: 10 f^2 + 2 joints and 30 f^2 struts.
    await page.getByText('42 joints, 120 struts').first().waitFor();
    await page.getByRole('button', { name: 'By numbers' }).click();
    await page.getByRole('button', { name: 'Take out strut 1', exact: true }).click();
    await page.getByText('119 struts').first().waitFor();
    await page.getByRole('button', { name: 'Undo' }).click();
    await page.getByText('120 struts').first().waitFor();
    await page.getByRole('button', { name: 'Redo' }).click();
    await page.getByLabel('new strut, from joint').fill('1');
    await page.getByLabel('new strut, to joint').fill('99');
    await page.getByRole('button', { name: 'Add this strut' }).click();
    await page.getByText('There is no joint 99').waitFor();
    await page.getByLabel('joint 1, x').fill('wide');
    await page.getByLabel('joint 1, x').blur();
    await page.getByText(/"wide" is no length/).waitFor();
    await expectNoAxeViolations(page, 'a frame by numbers');
    await page.getByRole('button', { name: 'Keep it' }).click();
    await page.getByText('Typed joint by joint').waitFor();
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('button', { name: 'CSV' }).click(),
    ]);
    const file = await download.path();
    await page.getByRole('link', { name: 'From a file' }).first().click();
    await page.locator('input[type=file]').setInputFiles({
      name: 'dome.csv',
      mimeType: 'text/csv',
      buffer: await readFile(file),
    });
    await page.getByLabel('name of the frame').fill('Dome again');
    await page.getByRole('button', { name: 'Add this frame' }).click();
    await page.getByRole('heading', { name: 'Dome again' }).waitFor();
    await page.getByText('42 joints, 119 struts').first().waitFor();
    expect(errors).toEqual([]);
  });
});
