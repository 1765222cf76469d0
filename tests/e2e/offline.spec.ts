/** The survey with the server really stopped: reloaded, closed and opened again, sent once it is back; a second phone. */
import { type Browser, type BrowserContext, expect, type Page, test } from '@playwright/test';
import type { Role } from '@/lib/access/policy';
import { select, withShop } from '@/lib/platform/db';
import { loadSurvey } from '@/lib/surveys/queries';
import { addParts, bakery } from '@/seeders/demo';
import { releasedSheet } from '../support/released-sheet';
import { makeShop, type TestShop } from '../support/shop';
import { look } from './support/look';
import { OwnServer } from './support/own-server';
import { sessionCookie } from './support/signed-in';

let shop: TestShop;
let job = '';
let server: OwnServer;

test.describe.configure({ mode: 'serial' });
test.beforeAll(async () => {
  shop = await makeShop();
  job = await bakery(shop.actors.owner, await addParts(shop.actors.owner));
  server = await OwnServer.make();
  await server.start();
});
test.afterAll(async () => server.stop());

async function phone(browser: Browser, role: Role): Promise<BrowserContext> {
  const context = await browser.newContext({
    viewport: { width: 360, height: 780 },
    hasTouch: true,
    baseURL: server.url,
  });
  const value = await sessionCookie(shop.actors[role].personId);
  await context.addCookies([{ name: 'next-auth.session-token', value, url: server.url, httpOnly: true }]);
  return context;
}

const survey = () => `/s/${shop.shopId}/jobs/${job}/survey`;
const events = () =>
  withShop(shop.shopId, () =>
    select<{ kind: string }>('select kind from client_events where job_id = $1', [job]),
  );

/** The worker has kept what it needs and answers for this page. */
async function ready(page: Page): Promise<void> {
  await page.evaluate(async () => {
    await navigator.serviceWorker.ready;
    if (!navigator.serviceWorker.controller)
      await new Promise((resolve) =>
        navigator.serviceWorker.addEventListener('controllerchange', resolve, { once: true }),
      );
  });
}

async function newArea(page: Page, name: string, width: string): Promise<void> {
  await page.getByRole('button', { name: 'Add an area' }).click();
  await page.getByLabel('Name', { exact: true }).first().fill(name);
  await page.getByLabel('Width', { exact: true }).fill(width);
  await page.getByRole('button', { name: /^Fold up/ }).click();
}

test('a survey goes on with the server stopped, and is sent once', async ({ browser }) => {
  test.setTimeout(120_000);
  const context = await phone(browser, 'estimator');
  let page = await context.newPage();
  await page.goto(survey());
  await expect(page.getByRole('heading', { name: 'Back room' })).toBeVisible();
  await ready(page);
  const before = (await events()).length;

  await server.stop();
  await newArea(page, 'Cold store', '12');
  await expect(page.getByText(/^No signal\. Kept on this device/)).toBeVisible({ timeout: 15_000 });

  await page.reload();
  await expect(page.getByText('Working from this device')).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Cold store' })).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Back room' })).toBeVisible();
  await newArea(page, 'Loading bay', '20');
  await expect(page.getByText(/^No signal\. Kept on this device, 2 changes to send/)).toBeVisible();
  await look(page, 'survey-no-signal');

  // A photo that is taken now is kept whole, and shown.
  await page.getByRole('button', { name: 'Open Loading bay' }).click();
  await page.getByLabel('Add a photo').last().setInputFiles('tests/e2e/pictures/customer.png');
  await expect(page.getByRole('img', { name: 'Photo of Loading bay, not sent yet' })).toBeVisible();
  await expect(page.getByText(/1 photo to send\./)).toBeVisible();
  await page.getByRole('button', { name: /^Fold up/ }).click();

  // The tab is closed in the middle of a word, and the survey opened in another.
  await page.getByRole('button', { name: 'Open Loading bay' }).click();
  await page.getByLabel('Notes', { exact: true }).last().pressSequentially('Door is stuck, ask for the');
  await page.close();
  page = await context.newPage();
  await page.goto(survey());
  await page.getByRole('button', { name: 'Open Loading bay' }).click();
  await expect(page.getByLabel('Notes', { exact: true }).last()).toHaveValue('Door is stuck, ask for the');
  await page.getByRole('link', { name: 'To the circuits' }).click();
  await page.getByRole('link', { name: 'Open Counter cove, tape run' }).click();
  await expect(page.getByRole('img', { name: /^Driver of 24/ })).toBeVisible();

  await server.start();
  await page.goto(survey());
  await expect(page.getByText('All saved.')).toBeVisible({ timeout: 20_000 });
  const { entities } = await loadSurvey(shop.shopId, job);
  const areas = entities.filter(({ collection }) => collection === 'areas');
  expect(areas.map(({ data }) => data['name'])).toEqual(
    expect.arrayContaining(['Cold store', 'Loading bay']),
  );
  expect(areas.filter(({ data }) => data['name'] === 'Loading bay')).toMatchObject([
    { data: { notes: 'Door is stuck, ask for the' } },
  ]);
  // Each event was applied once: every one raised its area's version by one.
  const made = areas.filter(({ data }) => ['Cold store', 'Loading bay'].includes(String(data['name'])));
  expect((await events()).length - before).toBe(made.reduce((sum, { version }) => sum + version, 0));
  const photos = () =>
    withShop(shop.shopId, () =>
      select<{ subject: string }>('select subject_id as subject from photos where job_id = $1', [job]),
    );
  await expect.poll(async () => (await photos()).length, { timeout: 20_000 }).toBe(1);
  expect(await photos()).toEqual([{ subject: made.find(({ data }) => data['name'] === 'Loading bay')?.id }]);
  await expect(page.getByText(/photo to send/)).toBeHidden();
  await context.close();
});

test('two people on one survey: both see all, and choose where both changed one', async ({ browser }) => {
  test.setTimeout(120_000);
  const [a, b] = [await phone(browser, 'estimator'), await phone(browser, 'owner')];
  const [mine, theirs] = [await a.newPage(), await b.newPage()];
  await mine.goto(survey());
  await theirs.goto(survey());
  await expect(theirs.getByRole('heading', { name: 'Loading bay' })).toBeVisible();
  await ready(mine);

  const change = async (page: Page, area: string, use: string) => {
    await page.getByRole('button', { name: `Open ${area}` }).click();
    await page.getByLabel('Used for').fill(use);
    await page.getByRole('button', { name: /^Fold up/ }).click();
  };
  await a.setOffline(true);
  await change(mine, 'Loading bay', 'Unloading');
  await change(mine, 'Cold store', 'Fish');
  await change(theirs, 'Loading bay', 'Parking');
  await change(theirs, 'Cold store', 'Meat');
  await expect(theirs.getByText('All saved.')).toBeVisible({ timeout: 15_000 });

  await a.setOffline(false);
  const clash = (name: string) =>
    mine.getByRole('status').filter({ hasText: `Somebody else changed ${name} too.` });
  await expect(clash('Loading bay')).toBeVisible({ timeout: 20_000 });
  await expect(clash('Loading bay')).toContainText('Unloading');
  await expect(clash('Loading bay')).toContainText('Parking');
  await expect(mine.getByText('2 changes wait for you, below.')).toBeVisible();
  await look(mine, 'survey-both-changed');
  await clash('Loading bay').getByRole('button', { name: /mine/i }).click();
  await clash('Cold store')
    .getByRole('button', { name: /theirs/i })
    .click();
  await expect(mine.getByText('All saved.')).toBeVisible({ timeout: 15_000 });

  const { entities } = await loadSurvey(shop.shopId, job);
  const use = (name: string) => entities.find(({ data }) => data['name'] === name)?.data['use'];
  expect([use('Loading bay'), use('Cold store')]).toEqual(['Unloading', 'Meat']);
  await a.close();
  await b.close();
});

test('a wiring sheet opens with the server stopped, and is worked on', async ({ browser }) => {
  test.setTimeout(120_000);
  const { sheetId } = await releasedSheet(shop, job);
  const context = await phone(browser, 'owner');
  let page = await context.newPage();
  const address = `/s/${shop.shopId}/sheets/${sheetId}`;
  await page.goto(address);
  await expect(page.getByRole('button', { name: 'I have read them and work by them' })).toBeVisible();
  await ready(page);
  await page.close();

  await server.stop();
  page = await context.newPage();
  await page.goto(address);
  await page.getByRole('button', { name: 'I have read them and work by them' }).click();
  await page.getByLabel('What is locked and tagged').fill('Panel B, breaker 14');
  await page.getByRole('button', { name: 'Dead, proved' }).click();
  await page.getByRole('checkbox').first().click();
  await page.reload();
  await expect(page.getByText(/DEAD, PROVED/i).first()).toBeVisible();
  await expect(page.getByRole('checkbox').first()).toBeChecked();
  await look(page, 'wiring-sheet-no-signal');

  await server.start();
  const sent = () =>
    withShop(shop.shopId, () =>
      select<{ kind: string }>('select kind from sheet_events where sheet_id = $1 order by at', [sheetId]),
    );
  await page.goto(address);
  await expect.poll(async () => (await sent()).length, { timeout: 20_000 }).toBe(3);
  await context.close();
});

test('nothing of a person stays after sign-out', async ({ browser }) => {
  test.setTimeout(120_000);
  const context = await phone(browser, 'estimator');
  const page = await context.newPage();
  await page.goto(survey());
  await expect(page.getByRole('heading', { name: 'Back room' })).toBeVisible();
  await ready(page);
  await page.getByText('estimator', { exact: false }).first().click();
  await page.getByRole('button', { name: 'Sign out' }).click();
  await expect(page).toHaveURL(/sign-in/);
  const kept = await page.evaluate(async () => ({
    stores: (await indexedDB.databases())
      .map(({ name }) => name)
      .filter((name) => name?.startsWith('lampwright-')),
    persons: Object.keys(localStorage).filter((key) => key.startsWith('lampwright-')),
    pages: (await Promise.all((await caches.keys()).map(async (name) => (await caches.open(name)).keys())))
      .flat()
      .map(({ url }) => new URL(url).pathname)
      .filter((path) => !path.startsWith('/_next/static/')),
  }));
  expect(kept).toEqual({ stores: [], persons: [], pages: ['/offline'] });

  await server.stop();
  await page.goto(survey());
  await expect(page.getByText('Nobody has worked in this shop on this device')).toBeVisible();
  await expect(page.getByText('Back room')).toBeHidden();
  await context.close();
  await server.start();
});
