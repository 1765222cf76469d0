/** What a job saves, as the estimator works it out and the customer will be shown it. */
import { expect, test } from '@playwright/test';
import { addParts, bakery } from '@/seeders/demo';
import { releasedSheet } from '../support/released-sheet';
import { makeShop } from '../support/shop';
import { quiet } from './support/console';
import { look } from './support/look';
import { signIn } from './support/signed-in';

test('a saving is figured again when an assumption changes', async ({ page, context }) => {
  quiet(page);
  const shop = await makeShop();
  const job = await bakery(shop.actors.owner, await addParts(shop.actors.owner));
  await releasedSheet(shop, job);
  await signIn(context, shop, 'estimator');
  await page.goto(`/s/${shop.shopId}/jobs/${job}/savings`);
  await expect(page.getByText('rate not known')).toBeVisible();
  await page.getByLabel('Energy, a kWh', { exact: true }).fill('cheap');
  await page.getByRole('button', { name: 'Save and figure again' }).click();
  await expect(page.getByText('A number from 0 to 100.')).toBeVisible();
  await expect(page.getByLabel('Energy, a kWh', { exact: true })).toHaveValue('cheap');
  await page.getByLabel('Energy, a kWh', { exact: true }).fill('0.1425');
  await page.getByLabel('Source of: Energy, a kWh').fill('bill of October');
  await page.getByRole('button', { name: 'Save and figure again' }).click();
  await expect(page.getByText('Paid back after')).toBeVisible();
  await expect(
    page.getByRole('img', { name: /^Energy by area\. Back room: 5,466 kWh a year before/ }),
  ).toBeVisible();
  await expect(page.getByRole('img', { name: /^Money over 10 years/ })).toBeVisible();
  await look(page, 'savings');
});
