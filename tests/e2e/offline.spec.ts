/** The survey with the server really stopped: reloaded, closed and opened again, sent once it is back; a second phone. */
import { expect, type Page, test } from '@playwright/test';
import { select, withShop } from '@/lib/platform/db';
import { loadSurvey } from '@/lib/surveys/queries';
import { addParts, bakery } from '@/seeders/demo';
import { releasedSheet } from '../support/released-sheet';
import { makeShop, type TestShop } from '../support/shop';
import { look } from './support/look';
import { OwnServer } from './support/own-server';
import { lookAgain, newArea, phone, ready } from './support/phone';

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

const survey = () => `/s/${shop.shopId}/jobs/${job}/survey`;
const events = () =>
  withShop(shop.shopId, () =>
    select<{ entity: string }>(
      'select entity_id as entity from client_events where job_id = $1 order by received_at',
      [job],
    ),
  );

test('a survey goes on with the server stopped, and is sent once', async ({ browser }) => {
  test.setTimeout(120_000);
  const context = await phone(browser, shop, 'estimator', server);
  let page = await context.newPage();
  await page.goto(survey());
  await expect(page.getByRole('heading', { name: 'Back room' })).toBeVisible();
  await ready(page);
  const before = (await events()).length;

  await server.stop();
  await newArea(page, 'Cold store', '12');
  await expect(page.getByText(/^No signal\. Kept on this device/)).toBeVisible({ timeout: 15_000 });
  await expect(page.getByText(/^The oldest unsent change is from .* Last synchronised /)).toBeVisible();

  await page.reload();
  await expect(page.getByText('Working from this device')).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Cold store' })).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Back room' })).toBeVisible();
  await newArea(page, 'Loading bay', '20');
  await expect(page.getByText(/^No signal\. Kept on this device, 2 changes to send/)).toBeVisible();
  await look(page, 'survey-no-signal');

  // Counts and a cove, and a photo that is kept whole, and shown.
  await page.getByRole('button', { name: 'Open Loading bay' }).click();
  await page.getByRole('button', { name: /^Add \+ 4-lamp F32T8/ }).click();
  await page.getByRole('button', { name: /^Count again/ }).click();
  for (let tap = 0; tap < 5; tap++) await page.getByRole('button', { name: 'One more', exact: true }).click();
  await page.getByRole('button', { name: 'That is all of them' }).click();
  await page.getByRole('button', { name: 'Add a cove' }).click();
  await page.getByLabel('Tape length', { exact: true }).last().fill('12');
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
  const bay = areas.find(({ data }) => data['name'] === 'Loading bay')?.id;
  const inBay = entities.filter(({ data }) => data['areaId'] === bay);
  expect(inBay.filter(({ collection }) => collection === 'luminaires')).toMatchObject([
    { data: { quantity: 5, countConfidence: 'counted' } },
  ]);
  expect(inBay.filter(({ collection }) => collection === 'coves')).toHaveLength(1);
  // Each event was applied once: every one raised its entry's version by one, and all were typed with no server.
  const made = entities.filter(
    ({ id, data }) => id === bay || data['areaId'] === bay || data['name'] === 'Cold store',
  );
  expect((await events()).length - before).toBe(made.reduce((sum, { version }) => sum + version, 0));
  // In the order in which they were begun: what lies in an area comes after it.
  const begun = [...new Set((await events()).slice(before).map(({ entity }) => entity))];
  const collectionOf = (id: string) => made.find((one) => one.id === id)?.collection;
  expect(begun.map(collectionOf)).toEqual(['areas', 'areas', 'luminaires', 'coves']);
  const photos = () =>
    withShop(shop.shopId, () =>
      select<{ subject: string }>('select subject_id as subject from photos where job_id = $1', [job]),
    );
  await expect.poll(async () => (await photos()).length, { timeout: 20_000 }).toBe(1);
  expect(await photos()).toEqual([{ subject: bay }]);
  await expect(page.getByText(/photo to send/)).toBeHidden();
  await context.close();
});

test('two people on one survey: both see all, and choose where both changed one', async ({ browser }) => {
  test.setTimeout(120_000);
  const [a, b] = [
    await phone(browser, shop, 'estimator', server),
    await phone(browser, shop, 'owner', server),
  ];
  const [mine, theirs] = [await a.newPage(), await b.newPage()];
  await mine.goto(survey());
  await theirs.goto(survey());
  await expect(theirs.getByRole('heading', { name: 'Loading bay' })).toBeVisible();
  await ready(mine);

  // What one adds the other sees without opening the page again.
  await newArea(theirs, 'Boiler room', '8');
  await expect(theirs.getByText('All saved.')).toBeVisible({ timeout: 15_000 });
  await lookAgain(mine);
  await expect(mine.getByRole('heading', { name: 'Boiler room' })).toBeVisible();

  // A screen that asks again is not sent the same survey twice.
  const address = `/api/v1/shops/${shop.shopId}/jobs/${job}/survey`;
  const tag = (await a.request.get(address)).headers()['etag'] ?? '';
  const again = () => a.request.get(address, { headers: { 'if-none-match': tag } });
  expect((await again()).status()).toBe(304);

  const change = async (page: Page, area: string, use: string, width?: string) => {
    await page.getByRole('button', { name: `Open ${area}` }).click();
    if (use) await page.getByLabel('Used for').fill(use);
    if (width) await page.getByLabel('Width', { exact: true }).fill(width);
    await page.getByRole('button', { name: /^Fold up/ }).click();
  };
  await a.setOffline(true);
  await change(mine, 'Loading bay', 'Unloading');
  await change(mine, 'Cold store', 'Fish');
  await change(mine, 'Boiler room', 'Heating');
  await change(theirs, 'Loading bay', 'Parking', '30');
  await change(theirs, 'Cold store', 'Meat');
  await change(theirs, 'Boiler room', '', '9');
  await expect(theirs.getByText('All saved.')).toBeVisible({ timeout: 15_000 });

  await a.setOffline(false);
  expect((await again()).status()).toBe(200);
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
  // What only one of the two changed stands, whatever was chosen; where they changed different fields nothing was asked.
  const width = (name: string) =>
    Number(entities.find(({ data }) => data['name'] === name)?.data['widthMetres']);
  expect(width('Loading bay')).toBeCloseTo(30 * 0.3048, 6);
  expect([use('Boiler room'), width('Boiler room').toFixed(4)]).toEqual(['Heating', (9 * 0.3048).toFixed(4)]);
  // And the other phone has the same.
  await lookAgain(theirs);
  await theirs.getByRole('button', { name: 'Open Loading bay' }).click();
  await expect(theirs.getByLabel('Used for')).toHaveValue('Unloading');
  await a.close();
  await b.close();
});

test('a wiring sheet opens with the server stopped, and is worked on', async ({ browser }) => {
  test.setTimeout(120_000);
  const { sheetId } = await releasedSheet(shop, job);
  const context = await phone(browser, shop, 'owner', server);
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
