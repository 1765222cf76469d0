/** Signed out meanwhile, refused by the server, and signing out: nothing typed is lost, nothing of a person stays. */
import { expect, type Page, test } from '@playwright/test';
import { loadSurvey } from '@/lib/surveys/queries';
import { addParts, bakery } from '@/seeders/demo';
import { makeShop, type TestShop } from '../support/shop';
import { look } from './support/look';
import { OwnServer } from './support/own-server';
import { newArea, phone, ready, signInOn } from './support/phone';

let shop: TestShop;
let job = '';
let neverOpened = '';
let server: OwnServer;

test.describe.configure({ mode: 'serial' });
test.beforeAll(async () => {
  shop = await makeShop();
  const parts = await addParts(shop.actors.owner);
  job = await bakery(shop.actors.owner, parts);
  neverOpened = await bakery(shop.actors.owner, parts);
  server = await OwnServer.make();
  await server.start();
});
test.afterAll(async () => server.stop());

const survey = () => `/s/${shop.shopId}/jobs/${job}/survey`;
const names = async () =>
  (await loadSurvey(shop.shopId, job)).entities
    .filter(({ collection }) => collection === 'areas')
    .map(({ data }) => data['name']);
const saved = (page: Page) => expect(page.getByText('All saved.')).toBeVisible({ timeout: 20_000 });

test('signed out in the middle of it: asks to sign in again, and sends what was kept', async ({
  browser,
}) => {
  test.setTimeout(120_000);
  const context = await phone(browser, shop, 'estimator', server);
  const page = await context.newPage();
  await page.goto(survey());
  await saved(page);
  await ready(page);
  await context.clearCookies();
  await newArea(page, 'Roof space', '7');
  await expect(
    page.getByText('You are signed out: sign in again. Kept on this device, 1 change to send.'),
  ).toBeVisible();
  await look(page, 'survey-signed-out');
  await page.getByRole('link', { name: 'Sign in again' }).click();
  await expect(page.getByRole('heading', { name: 'Sign in' })).toBeVisible();
  expect(await names()).not.toContain('Roof space');
  await signInOn(context, shop, 'estimator', server);
  await page.goto(survey());
  await expect(page.getByRole('heading', { name: 'Roof space' })).toBeVisible();
  await saved(page);
  expect(await names()).toContain('Roof space');
  await context.close();
});

test('what the server refuses is named with its field and kept; mended it is sent, given up it is gone', async ({
  browser,
}) => {
  test.setTimeout(120_000);
  const context = await phone(browser, shop, 'estimator', server);
  const page = await context.newPage();
  await page.goto(survey());
  await saved(page);
  const tooLong = 'A very long name '.repeat(8);
  await newArea(page, tooLong, '7');
  const refusal = page.getByRole('alert').filter({ hasText: 'Not taken' });
  await expect(refusal).toContainText('name: At most 120 characters.');
  await expect(page.getByText('1 change waits for you, below.')).toBeVisible();
  await look(page, 'survey-refused');
  await page.reload();
  await expect(refusal).toContainText('name: At most 120 characters.');
  await page.getByRole('button', { name: /^Open A very long name/ }).click();
  await page.getByLabel('Name', { exact: true }).first().fill('Short');
  await saved(page);
  await expect(refusal).toBeHidden();
  expect(await names()).toContain('Short');

  await page.getByLabel('Name', { exact: true }).first().fill(tooLong);
  await expect(refusal).toBeVisible();
  await refusal.getByRole('button', { name: 'Drop my change' }).click();
  await saved(page);
  await expect(page.getByRole('heading', { name: 'Short' })).toBeVisible();
  expect(await names()).toContain('Short');
  await context.close();
});

test('nothing of a person stays after sign-out', async ({ browser }) => {
  test.setTimeout(120_000);
  const context = await phone(browser, shop, 'estimator', server);
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
  // The one page that is kept holds nothing of shop, person or job.
  const shell = await page.evaluate(async () => (await caches.match('/offline'))?.text());
  expect(shell).toContain('Working from this device');
  for (const secret of [shop.shopId, job, shop.actors.estimator.name, shop.actors.estimator.membershipId])
    expect(shell).not.toContain(secret);

  await server.stop();
  await page.goto(survey());
  await expect(page.getByText('Nobody has worked in this shop on this device')).toBeVisible();
  await expect(page.getByText('Back room')).toBeHidden();
  await context.close();
  await server.start();
});

test('unsent work is not thrown away by signing out, and another person does not see it', async ({
  browser,
}) => {
  test.setTimeout(120_000);
  const context = await phone(browser, shop, 'estimator', server);
  const page = await context.newPage();
  await page.goto(survey());
  await saved(page);
  await ready(page);
  await page.route('**/events', (route) => route.abort());
  await newArea(page, 'Vault', '3');
  await expect(page.getByText(/1 change to send/)).toBeVisible();
  await page.getByText('estimator', { exact: false }).first().click();
  await page.getByRole('button', { name: 'Sign out' }).click();
  await page.getByRole('button', { name: 'Sign out, keep it here' }).click();
  await expect(page).toHaveURL(/sign-in/);
  await page.unrouteAll();

  await signInOn(context, shop, 'owner', server);
  await page.goto(survey());
  await saved(page);
  await expect(page.getByRole('heading', { name: 'Back room' })).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Vault' })).toBeHidden();
  expect(await names()).not.toContain('Vault');

  await signInOn(context, shop, 'estimator', server);
  await page.goto(survey());
  await expect(page.getByRole('heading', { name: 'Vault' })).toBeVisible();
  await expect.poll(names, { timeout: 20_000 }).toContain('Vault');
  await context.close();
});

test('signing out with the server stopped: the device shows nothing, other tabs neither, and the session ends later', async ({
  browser,
}) => {
  test.setTimeout(120_000);
  const context = await phone(browser, shop, 'estimator', server);
  const [page, other] = [await context.newPage(), await context.newPage()];
  await page.goto(survey());
  await saved(page);
  await ready(page);
  await other.goto(survey());
  await saved(other);

  await server.stop();
  await page.getByText('estimator', { exact: false }).first().click();
  await page.getByRole('button', { name: 'Sign out' }).click();
  for (const tab of [page, other]) {
    await expect(tab.getByText('Nobody has worked in this shop on this device')).toBeVisible();
    await expect(tab.getByText('Back room')).toBeHidden();
  }
  await look(page, 'nobody-no-signal');

  await server.start();
  await page.goto(survey());
  await expect(page).toHaveURL(/sign-in/, { timeout: 20_000 });
  await page.goto(survey());
  await expect(page).toHaveURL(/sign-in/);
  await context.close();
});

test('a job that was never opened here says so with no signal; what is added is kept and sent', async ({
  browser,
}) => {
  test.setTimeout(120_000);
  const context = await phone(browser, shop, 'estimator', server);
  const page = await context.newPage();
  await page.goto(survey());
  await saved(page);
  await ready(page);
  await server.stop();
  await page.goto(`/s/${shop.shopId}/jobs/${neverOpened}/survey`);
  await expect(page.getByText('This job was never opened on this device with a signal.')).toBeVisible();
  await newArea(page, 'Annex', '4');
  await look(page, 'survey-never-opened');
  await server.start();
  // Nobody touches the phone: it goes on asking, and hears of the rest.
  await expect(page.getByRole('heading', { name: 'Back room' })).toBeVisible({ timeout: 60_000 });
  await expect(page.getByRole('heading', { name: 'Annex' })).toBeVisible();
  await saved(page);
  await context.close();
});
