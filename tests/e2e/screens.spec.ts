/** Every signed-in screen of the demo job, both themes, both sizes: axe finds nothing, nothing runs past the edge, no console error. */
import { expect, test } from '@playwright/test';
import { loadOpenJobs } from '@/lib/jobs/queries';
import { addParts, bakery, chandlery } from '@/seeders/demo';
import { makeShop, type TestShop } from '../support/shop';
import { quiet } from './support/console';
import { look } from './support/look';
import { signIn } from './support/signed-in';

let shop: TestShop;
let job = '';
let bench = '';

test.beforeAll(async () => {
  shop = await makeShop();
  const part = await addParts(shop.actors.owner);
  job = await bakery(shop.actors.owner, part);
  bench = await chandlery(shop.actors.owner, part);
  expect((await loadOpenJobs(shop.shopId)).map((one) => one.id)).toEqual([job, bench]);
});

const SCREENS: [string, () => string, string][] = [
  ['next up', () => '', 'wait for you'],
  ['jobs', () => '/jobs', 'Jobs'],
  ['new job', () => '/jobs/new', 'New job'],
  ['job', () => `/jobs/${job}`, 'New lighting'],
  ['survey', () => `/jobs/${job}/survey`, 'Back room'],
  ['circuits', () => `/jobs/${job}/circuits`, 'Back room lights'],
  ['bench work', () => `/jobs/${bench}/circuits`, 'Cabin array'],
  ['savings', () => `/jobs/${job}/savings`, 'Energy before'],
  ['quote', () => `/jobs/${job}/quote`, 'New lighting'],
  ['money', () => `/jobs/${job}/money`, 'New lighting'],
  ['install', () => `/jobs/${job}/install`, 'New lighting'],
  ['visits', () => '/visits', 'Visits'],
  ['customers', () => '/customers', 'Customers'],
  ['new customer', () => '/customers/new', 'New customer'],
  ['people', () => '/people', 'People'],
  ['parts', () => '/parts', 'Parts and prices'],
  ['shop', () => '/settings', 'Shop'],
];

for (const theme of ['light', 'dark'] as const) {
  test.describe(`${theme} @phone`, () => {
    test.use({ colorScheme: theme });
    for (const [name, path, text] of SCREENS) {
      test(`${name}`, async ({ page, context }) => {
        quiet(page);
        await signIn(context, shop, 'owner');
        await page.goto(`/s/${shop.shopId}${path()}`);
        await expect(page.getByText(text).first()).toBeVisible();
        await look(page, `${theme}-${name.replaceAll(' ', '-')}`);
      });
    }

    test('circuit desk', async ({ page, context }) => {
      quiet(page);
      await signIn(context, shop, 'owner');
      await page.goto(`/s/${shop.shopId}/jobs/${job}/circuits`);
      await page.getByRole('link', { name: 'Open Counter cove, tape run' }).click();
      await expect(page.getByRole('img', { name: /^Driver of 24/ })).toBeVisible();
      await page.getByText('How it was figured').click();
      await look(page, `${theme}-circuit-desk`);
    });
  });
}

test('signed-out screens @phone', async ({ page }) => {
  // A closed link is answered with 404 and a page that says what to do.
  quiet(page, [/404.*\/l\/closed/]);
  for (const path of ['/sign-in', '/forgotten', '/new-password/made-up-token', '/l/closed']) {
    await page.goto(path);
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
    await look(page, `signed-out${path.replaceAll('/', '-')}`);
  }
});
