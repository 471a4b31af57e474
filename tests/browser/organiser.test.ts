import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { PASSWORD, seedAccount } from '../support/fixtures-accounts';
import { startTestServer, type TestServer } from '../support/test-server';
import { expectNoAxeViolations, launch, openPage } from './support/browser';

let browser: Browser;
let server: TestServer;

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());
beforeEach(async () => {
  server = await startTestServer({ CLIENT_DIR: 'dist/client', OUTBOX: '1' });
});
afterEach(async () => {
  for (const context of browser.contexts()) await context.close();
  await server.close();
});

async function signIn(page: Page, email: string): Promise<void> {
  await page.goto(`${server.url}/sign-in`);
  await page.getByLabel('e-mail').fill(email);
  await page.getByLabel('password', { exact: true }).fill(PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { name: 'Installations' }).waitFor();
}
/** Follow a tick of the left rule. */
const go = (page: Page, screen: string) =>
  page.getByRole('navigation', { name: 'Screens' }).getByRole('link', { name: screen, exact: true }).click();

describe('organiser', () => {
  it('organiser > plans from nothing and publishes > what is missing is said until all is there, then volunteers can join', async () => {
    await seedAccount(server, 'ines@hall.example', 'organiser', 'Ines C');
    for (const name of ['Lena W', 'Noor A']) {
      await seedAccount(server, `${name.slice(0, 4).toLowerCase()}@hall.example`, 'member', name);
    }
    const { page, errors } = await openPage(browser, 'laptop');
    await signIn(page, 'ines@hall.example');
    await page.getByRole('link', { name: /new/i }).first().click();
    // Nothing filled in: every problem at its field.
    await page.getByRole('button', { name: 'Start it' }).click();
    await page.getByText('Please fill this in.').first().waitFor();
    await expectNoAxeViolations(page, 'a new installation with errors');
    await page.getByLabel('name of the installation').fill('Weir Hall Lanterns');
    await page.getByLabel('venue').fill('Weir Hall');
    await page.getByLabel('time zone').fill('Europe/Lisbon');
    await page.getByLabel('the hall may hold').fill('60');
    await page.getByRole('button', { name: 'Start it' }).click();
    await page.getByRole('heading', { name: 'Plan', exact: true }).waitFor();

    await page.getByRole('button', { name: 'Add a build day' }).click();
    await page.getByLabel('date').fill('2027-06-12');
    await page.getByLabel('doors open').fill('09:00');
    await page.getByLabel('end', { exact: true }).fill('08:00');
    await page.getByRole('button', { name: 'Add this day' }).click();
    await page.getByText('The end comes after clear-up begins.').waitFor();
    await page.getByLabel('end', { exact: true }).fill('18:30');
    await page.getByRole('button', { name: 'Add this day' }).click();
    await page.getByRole('heading', { name: 'Saturday 12 June 2027' }).waitFor();
    for (const [name, kind] of [
      ['bench', 'bench'],
      ['glue', 'glue'],
    ] as const) {
      await page.getByRole('button', { name: 'Add a station' }).click();
      const stations = page.getByRole('region', { name: 'Stations' });
      await stations.getByLabel('name').fill(name);
      await stations.getByLabel('kind').selectOption(kind);
      await stations.getByLabel('places').fill('6');
      await stations.getByRole('button', { name: 'Add it' }).click();
      await page.getByRole('button', { name: `Change ${name}` }).waitFor();
    }
    await expectNoAxeViolations(page, 'plan');

    await go(page, 'Drawing');
    await page.getByRole('link', { name: 'A new shape' }).first().click();
    await page.getByLabel('name of the frame').fill('Gem');
    await page.getByLabel('shape', { exact: true }).selectOption('icosahedron');
    await page.getByLabel('edge').fill('20 cm');
    await page.getByRole('button', { name: 'Add this frame' }).click();
    await page.getByText('12 joints, 30 struts').first().waitFor();
    await expectNoAxeViolations(page, 'drawing');

    await go(page, 'Templates');
    await page.getByRole('link', { name: 'New, with the usual steps' }).click();
    await page.getByRole('button', { name: 'Add this template' }).click();
    await page.getByText('Pieces made from it before keep the steps they have.').waitFor();
    await expectNoAxeViolations(page, 'templates');

    await go(page, 'Sub-assemblies');
    await page.getByLabel('letter of the code').fill('v');
    await page.getByLabel('how many').fill('3');
    await page.getByRole('button', { name: /^Make / }).click();
    await page.getByRole('rowheader', { name: 'V-03' }).waitFor();
    await expectNoAxeViolations(page, 'sub-assemblies');

    await go(page, 'Plan');
    // Said with the button, for those who do not see the list beside it.
    await page.getByText('Missing: ').first().waitFor({ state: 'attached' });
    expect(await page.getByText('1 thing of the list is missing.').count()).toBe(1);

    await go(page, 'People');
    for (const [email, firstName, initial] of [
      ['lena@hall.example', 'Lena', 'W'],
      ['noor@hall.example', 'Noor', 'A'],
    ] as const) {
      await page.getByLabel('e-mail they sign in with').fill(email);
      await page.getByLabel('first name').fill(firstName);
      await page.getByLabel('initial').fill(initial);
      const form = page.getByRole('region', { name: 'Add somebody with an account' });
      await form.getByText('briefs, countersigns, lifts a stop').click();
      await form.getByRole('button', { name: 'Add them' }).click();
      await page.getByText(`${firstName} ${initial}`).first().waitFor();
    }
    await expectNoAxeViolations(page, 'people');

    await go(page, 'Plan');
    await page.getByRole('button', { name: /^Publish/ }).click();
    await page.getByText('Published. People can join and work.').waitFor();
    expect(errors).toEqual([]);

    const code = await server.app.deps.data.writer.query<{ join_code: string }[]>(
      'SELECT join_code FROM installation',
    );
    const phone = await openPage(browser, 'phone');
    await phone.page.goto(`${server.url}/join/${code[0]?.join_code ?? ''}`);
    await phone.page.getByText('Weir Hall Lanterns, today').waitFor();
  });

  it('first start > the one-time link of the console > an administrator with a password, who invites a member by mail; the letter stands in the Outbox and its link works once', async () => {
    const { ensureFirstAdminLink } = await import('../../server/modules/accounts');
    const link = (await ensureFirstAdminLink(server.app.deps)) ?? '';
    const { page } = await openPage(browser, 'laptop');
    await page.goto(link.replace(/^https?:\/\/[^/]+/, server.url));
    await page.getByLabel('your name').fill('Ines C');
    await page.getByLabel('e-mail').fill('ines@hall.example');
    await page.getByLabel('new password', { exact: true }).fill('short');
    await page.getByRole('button', { name: 'Make my account' }).click();
    await page.getByText('At least 15 characters.').first().waitFor();
    await expectNoAxeViolations(page, 'the first link');
    await page.getByLabel('new password', { exact: true }).fill(PASSWORD);
    await page.getByRole('button', { name: 'Make my account' }).click();
    await page.getByRole('heading', { name: 'Installations' }).waitFor();
    await page.goto(`${server.url}/accounts`);
    await page.getByLabel('e-mail').fill('lena@hall.example');
    await page.getByLabel('name', { exact: true }).fill('Lena W');
    await page.getByRole('button', { name: 'Send the invitation' }).click();
    await page.getByText('lena@hall.example').first().waitFor();
    await page.goto(`${server.url}/outbox`);
    const invitation = page.getByRole('link', { name: /\/link#/ }).first();
    await expect
      .poll(
        async () => {
          await page.reload();
          return invitation.count();
        },
        { timeout: 10_000 },
      )
      .toBeGreaterThan(0);
    await expectNoAxeViolations(page, 'outbox');
    const address = (await invitation.getAttribute('href')) ?? '';
    const lena = await openPage(browser, 'phone');
    await lena.page.goto(address.replace(/^https?:\/\/[^/]+/, server.url));
    await lena.page.getByLabel('new password', { exact: true }).fill(PASSWORD);
    await lena.page.getByRole('button', { name: 'Come in' }).click();
    await lena.page.getByRole('heading', { name: 'Installations' }).waitFor();
    const again = await openPage(browser, 'phone');
    await again.page.goto(address.replace(/^https?:\/\/[^/]+/, server.url));
    await again.page
      .getByText(/used|spent|no longer|once/i)
      .first()
      .waitFor();
  });
});
