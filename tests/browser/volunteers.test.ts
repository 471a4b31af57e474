import { gzipSync } from 'node:zlib';
import type { Browser } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { HOT_GLUE_BODY } from '../../shared/safety';
import { signedInClient } from '../support/fixtures';
import { expectNoAxeViolations, expectNoSidewaysScroll, launch, openPage, tabTo } from './support/browser';
import { openBrowserHall, type BrowserHall } from './support/hall';

/** A name that is not localhost: browsers then give the page no secure context over plain http. */
const HOST = 'hall.test';

let browser: Browser;
let hall: BrowserHall;

beforeAll(async () => {
  browser = await launch([`--host-resolver-rules=MAP ${HOST} 127.0.0.1`]);
});
afterAll(() => browser.close());
beforeEach(async () => {
  hall = await openBrowserHall(HOST);
});
afterEach(async () => {
  for (const context of browser.contexts()) await context.close();
  await hall.close();
});

const api = (path: string) => `/installations/${hall.installationId}${path}`;

describe('two phones over plain http on a name that is not localhost', () => {
  it('join > read, answer, sign > countersigned > both want the same step > one has it, the other is told who was first', async () => {
    const { stepIds } = await hall.piece('V-01', [
      { hazards: ['hot-glue'], name: 'tack', operation: 'tack' },
    ]);
    await hall.piece('V-02', [{ name: 'lay out' }]);
    const deskClient = await signedInClient(
      hall.server,
      await hall.person({ firstName: 'Marta', initial: 'L', duties: ['muster desk', 'volunteer'] }),
    );
    const leadClient = await signedInClient(
      hall.server,
      await hall.person({ firstName: 'Noor', initial: 'A', duties: ['safety lead', 'volunteer'] }),
    );
    const other = await hall.pageOf(
      browser,
      await hall.briefed({ firstName: 'Kofi', initial: 'A' }),
      'bench',
    );

    const { page, errors } = await openPage(browser, 'phone');
    await page.goto(`${hall.url}/join/${hall.joinCode}`);
    expect(await page.evaluate(() => window.isSecureContext)).toBe(false);
    await page.getByText('Lantern canopy, today').waitFor();
    // Every field problem at once, beside its field.
    await page.getByRole('button', { name: 'Come in' }).click();
    await page.getByText('Please fill this in.').first().waitFor();
    await page.getByText('Please choose your age.').waitFor();
    await expectNoAxeViolations(page, 'the door with errors');
    await page.getByLabel('first name').fill('Yuki');
    await page.getByLabel('initial').fill('t');
    await page.getByText('18 and over').click();
    await page.getByRole('button', { name: 'Come in' }).click();
    await page.getByText('Go to the muster desk.').waitFor();
    await page.getByText('Say your name, Yuki T.').waitFor();
    await expectNoAxeViolations(page, 'joined, not confirmed');

    // Briefings can be read and answered before the desk has confirmed.
    await page.getByRole('link', { name: /Read a briefing/ }).click();
    await page.getByRole('heading', { name: 'Question sheet' }).waitFor();
    for (const { text, options, right } of HOT_GLUE_BODY.questions) {
      const wanted = options.find((option) => option.id === right)?.text ?? '';
      await page.getByRole('group', { name: text }).getByText(wanted, { exact: true }).click();
    }
    await page.getByRole('button', { name: 'Hand in' }).click();
    await page.getByRole('button', { name: 'Type your full name instead' }).click();
    await page.getByLabel('your full name').fill('Yuki Tanabe');
    await expectNoAxeViolations(page, 'about to sign');
    await page.getByRole('button', { name: /^Sign/ }).click();
    await page.getByText('Signed. Now find a safety lead.').waitFor();

    // The desk confirms, a lead countersigns; the phone sees both without a reload.
    const snapshot = await deskClient.get<{ records: { people: { id: string; name: string }[] } }>(
      api('/live'),
    );
    const yuki = snapshot.data.records.people.find(({ name }) => name === 'Yuki T')?.id ?? '';
    expect((await deskClient.post(api(`/people/${yuki}/confirm`), { ageBand: '18+' })).status).toBe(200);
    await page.getByRole('link', { name: 'My bench' }).click();
    await page.getByText('Ask a safety lead to countersign it.').waitFor();
    const signOffs = await leadClient.get<{ records: { signOffs: { id: string; personId: string }[] } }>(
      api('/live'),
    );
    const signOff = signOffs.data.records.signOffs.find(({ personId }) => personId === yuki)?.id ?? '';
    expect((await leadClient.post(api(`/sign-offs/${signOff}/countersign`))).status).toBe(200);
    await page.getByRole('button', { name: 'Take V-01 tack' }).waitFor();
    await expectNoAxeViolations(page, 'My bench');

    // Both want the same place.
    await other.page.getByRole('button', { name: 'Take V-01 tack' }).waitFor();
    // The second phone's page has not heard of the first claim yet when its thumb comes down.
    await page.context().setOffline(false);
    const [first] = await Promise.all([
      other.page.getByRole('button', { name: 'Take V-01 tack' }).click(),
      page.getByRole('button', { name: 'Take V-01 tack' }).click(),
    ]);
    expect(first).toBeUndefined();
    const winner = page.getByText('V-01 tack is yours.').or(page.getByText('was first.'));
    await winner.waitFor();
    const said = `${await page.locator('main').innerText()}\n---\n${await other.page.locator('main').innerText()}`;
    expect(said.match(/V-01 tack is yours\./g)).toHaveLength(1);
    expect(said.match(/(Kofi A|Yuki T) was first\./g)).toHaveLength(1);
    const holders = await hall.server.app.deps.data.writer.query<unknown[]>(
      'SELECT 1 FROM claim WHERE step_id = ? AND ended_at IS NULL',
      [stepIds[0]],
    );
    expect(holders).toHaveLength(1);
    expect([...errors, ...other.errors]).toEqual([]);
  });

  it('My bench > take, start, finish > a checker sends it back with a reason > the reason stands on the bench, it is done again and passes', async () => {
    const { stepIds } = await hall.piece('V-01', [{ needsCheck: 1 }, { name: 'clean' }]);
    const checkerClient = await signedInClient(
      hall.server,
      await hall.person({ duties: ['checker', 'volunteer'] }),
    );
    const { page, errors } = await hall.pageOf(
      browser,
      await hall.person({ firstName: 'Wren', initial: 'S' }),
      'bench',
    );
    await page.getByRole('button', { name: 'Take V-01 lay out' }).click();
    await page.getByRole('button', { name: 'Start' }).click();
    await page.getByRole('button', { name: /Finished/ }).click();
    await page.getByText('Done. V-01 waits for a second person to check it.').waitFor();
    const [step = ''] = stepIds;
    await checkerClient.post(api(`/steps/${step}/rework`), { reason: 'joint 6 is open', targetId: step });
    await page.getByText('To do again: joint 6 is open').waitFor();
    await page.getByRole('button', { name: 'Take V-01 lay out' }).click();
    await page.getByRole('button', { name: 'Start' }).click();
    await page.getByRole('button', { name: /Finished/ }).click();
    await page.getByText('waits for a second person').waitFor();
    await checkerClient.post(api(`/steps/${step}/pass`));
    await page.getByRole('button', { name: 'Take V-01 clean' }).waitFor();
    await expectNoSidewaysScroll(page, 'My bench');
    expect(errors).toEqual([]);
  });

  it('My bench > the network goes, a step is finished, the network comes back > it waited as not yet done, then is sent once', async () => {
    const { stepIds } = await hall.piece('V-01', [{ needsCheck: 1 }]);
    const { page } = await hall.pageOf(
      browser,
      await hall.person({ firstName: 'Wren', initial: 'S' }),
      'bench',
    );
    await page.getByRole('button', { name: 'Take V-01 lay out' }).click();
    await page.getByRole('button', { name: 'Start' }).click();
    await page.getByRole('button', { name: /Finished/ }).waitFor();
    await page.context().setOffline(true);
    await page.getByRole('button', { name: /Finished/ }).click();
    await page.getByRole('heading', { name: 'Waits on this phone' }).waitFor();
    await page.getByText('not yours yet').waitFor();
    await page.context().setOffline(false);
    await page
      .getByRole('heading', { name: 'Waits on this phone' })
      .waitFor({ state: 'detached', timeout: 30_000 });
    const entries = await hall.server.app.deps.data.writer.query<{ action: string }[]>(
      `SELECT action FROM day_log WHERE json_extract(subject, '$.stepId') = ? ORDER BY seq`,
      [stepIds[0]],
    );
    expect(entries.map(({ action }) => action)).toEqual(['step.claimed', 'step.started', 'step.finished']);
  });

  it('keyboard only > join, take a step, give it back > everything is reached by Tab and Enter', async () => {
    await hall.piece('V-01', [{}]);
    const { page } = await hall.pageOf(
      browser,
      await hall.person({ firstName: 'Wren', initial: 'S' }),
      'bench',
    );
    await page.getByRole('button', { name: 'Take V-01 lay out' }).waitFor();
    await tabTo(page, 'Take V-01 lay out');
    await page.keyboard.press('Enter');
    await page.getByText('V-01 lay out is yours.').waitFor();
    await tabTo(page, 'Give back');
    await page.keyboard.press('Enter');
    await page.getByText('V-01 lay out is free again.').waitFor();
  });

  it('first load of My bench > until it is usable > at most 180 kB of compressed JavaScript', async () => {
    await hall.piece('V-01', [{}]);
    const personId = await hall.person();
    const { context, page } = await openPage(browser, 'phone');
    const client = await signedInClient(hall.server, personId);
    const [name = '', value = ''] = client.cookie().split('=');
    await context.addCookies([{ name, value, domain: HOST, path: '/' }]);
    const scripts: Promise<number>[] = [];
    page.on('response', (response) => {
      if (response.request().resourceType() === 'script')
        scripts.push(response.body().then((body) => gzipSync(body).length));
    });
    await page.goto(`${hall.url}/i/${hall.installationId}/bench`);
    await page.getByRole('button', { name: 'Take V-01 lay out' }).waitFor();
    const bytes = (await Promise.all(scripts)).reduce((sum, size) => sum + size, 0);
    expect(bytes).toBeGreaterThan(50_000);
    expect(bytes).toBeLessThanOrEqual(180_000);
  });
});

describe('stop', () => {
  it('stop > raised by a volunteer on a phone > on every screen within a second, seen is counted, a safety lead lifts it with a note', async () => {
    const wren = await hall.pageOf(browser, await hall.person({ firstName: 'Wren', initial: 'S' }), 'bench');
    const kofi = await hall.pageOf(browser, await hall.person({ firstName: 'Kofi', initial: 'A' }), 'bench');
    const lead = await hall.pageOf(
      browser,
      await hall.person({ firstName: 'Noor', initial: 'A', duties: ['safety lead', 'volunteer'] }),
      'travellers',
      'laptop',
    );
    await lead.page.getByRole('heading', { name: 'Travellers' }).waitFor();
    await kofi.page.getByRole('heading', { name: 'In hand' }).waitFor();
    await wren.page.getByRole('button', { name: 'Stop', exact: true }).click();
    await wren.page.getByRole('dialog').getByText('hot tools').click();
    await wren.page.getByLabel('What is wrong?').fill('Smoke at glue 2.');
    await expectNoAxeViolations(wren.page, 'raising a stop');
    const pressed = Date.now();
    await wren.page.getByRole('button', { name: 'Stop it now' }).click();
    await Promise.all(
      [kofi, lead, wren].map(({ page }) =>
        page.getByText('Smoke at glue 2. Wren S stopped hot tools.').waitFor(),
      ),
    );
    expect(Date.now() - pressed).toBeLessThan(1000);
    await kofi.page.getByText('Gun in its stand').waitFor();
    await expectNoAxeViolations(kofi.page, 'a phone under a stop');
    await expectNoSidewaysScroll(kofi.page, 'a phone under a stop');
    await kofi.page.getByRole('button', { name: 'I have seen it' }).click();
    await lead.page.getByText('2 of 4 have seen it.').waitFor();
    await lead.page.getByRole('button', { name: 'Lift the stop' }).click();
    await lead.page.getByLabel('what was done about it').fill('a rag lay on the plate; gone');
    await lead.page.getByRole('button', { name: 'Lift the stop' }).last().click();
    await Promise.all(
      [kofi, lead, wren].map(({ page }) => page.getByText('Smoke at glue 2.').waitFor({ state: 'detached' })),
    );
  });
});
