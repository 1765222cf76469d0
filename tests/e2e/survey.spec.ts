/** The survey in depth, as an estimator walks it with a phone. */
import { expect, type Page, test } from '@playwright/test';
import { addParts, bakery } from '@/seeders/demo';
import { makeShop, type TestShop } from '../support/shop';
import { quiet } from './support/console';
import { look } from './support/look';
import { signIn } from './support/signed-in';

let shop: TestShop;
let job = '';

test.use({ viewport: { width: 360, height: 780 }, hasTouch: true });

test.beforeAll(async () => {
  shop = await makeShop();
  job = await bakery(shop.actors.owner, await addParts(shop.actors.owner));
});

const saved = (page: Page) => expect(page.getByText('All saved.')).toBeVisible({ timeout: 15_000 });

test('an area in depth', async ({ page, context }) => {
  quiet(page);
  await signIn(context, shop, 'estimator');
  await page.goto(`/s/${shop.shopId}/jobs/${job}/survey`);
  await page.getByRole('button', { name: 'Add an area' }).click();
  await page.getByLabel('Name', { exact: true }).first().fill('Store');
  // One length in two units is named; what was typed stays, and the rest goes on.
  await page.getByLabel('Length', { exact: true }).fill(`12' 20 cm`);
  await expect(page.getByText('Two units in one length')).toBeVisible();
  await expect(page.getByLabel('Length', { exact: true })).toHaveValue(`12' 20 cm`);
  await page.getByLabel('Length', { exact: true }).fill(`12' 8"`);
  await page.getByLabel('Width', { exact: true }).fill('9');

  await page.getByLabel('Hours a week').fill('50');
  await page.getByRole('button', { name: 'Day by day' }).click();
  await page.getByLabel('Sat', { exact: true }).fill('6');
  await page.getByLabel('Sun', { exact: true }).fill('25');
  await expect(page.getByText('At most 24.')).toBeVisible();
  await page.getByLabel('Sun', { exact: true }).fill('0');
  await page.getByLabel('Weeks a year').fill('50');
  await expect(page.getByText('2,800 h a year')).toBeVisible();

  // A type that was met in another area is one tap away, with its watts.
  await page.getByRole('button', { name: 'Add + 4-lamp F32T8 4ft electronic BF 0.88' }).click();
  await expect(page.getByLabel('Input watts each')).toHaveValue('112');
  await page.getByRole('button', { name: /^Count again/ }).click();
  for (let tap = 0; tap < 7; tap++) await page.getByRole('button', { name: 'One more', exact: true }).click();
  await page.getByRole('button', { name: 'That is all of them' }).click();
  await expect(page.getByLabel('Count', { exact: true })).toHaveValue('7');
  await expect(page.getByText('Counted 1, then 7.')).toBeVisible();
  await page.getByText('Where it hangs').click();
  await page.getByLabel('Mounted').selectOption({ label: 'Recessed' });
  await page.getByLabel('Lamps out').fill('2');

  await page.getByText('Heights and surfaces').click();
  await page.getByLabel('Luminaires above the floor').fill('9 ft');
  await page.getByLabel('Walls reflect').fill('50');
  await page.getByText('Ceiling, access, circuit, controls').click();
  await page.getByLabel('Plenum above').selectOption({ label: 'Yes' });
  await page.getByLabel('Reached by').selectOption({ label: 'Ladder' });

  // A kind that can't be opened here is refused by name, before anything is sent.
  await page
    .getByLabel('Add a photo')
    .last()
    .setInputFiles({ name: 'IMG_7.HEIC', mimeType: 'image/heic', buffer: Buffer.from('ftypheic') });
  await expect(page.getByText('“IMG_7.HEIC” is a HEIC picture.')).toBeVisible();

  await page.getByRole('button', { name: 'Add a reading' }).click();
  await page.getByLabel('Light', { exact: true }).fill('29');
  await page.getByLabel('Meter', { exact: true }).fill('Lux meter 7');
  await page.getByRole('button', { name: 'Add a reading' }).click();
  await expect(page.getByLabel('Meter', { exact: true }).last()).toHaveValue('Lux meter 7');
  // A stockroom of 12' 8" by 9' under two-by-two panels: the lumen method answers while one types.
  await page.locator('summary', { hasText: /^Light$/ }).click();
  await expect(page.getByText(/^Still needed: .*a luminaire with its lumens/)).toBeVisible();
  await page.getByLabel('Lit for').selectOption({ label: 'Dispatch, packing, handling' });
  await page.getByLabel('Lit with').selectOption({ label: 'Flat panel 2 x 2 ft, 24 W' });
  await expect(page.getByLabel('Target', { exact: true })).toHaveValue('28');
  await expect(page.getByText('Maintained light')).toBeVisible();
  await expect(page.getByText('Measured before: 29 fc, mean of 1 point.')).toBeVisible();
  await look(page, 'survey-area');

  await page.getByRole('button', { name: 'Add an account' }).click();
  await page.getByLabel('Utility', { exact: true }).fill('Tarn Power');
  await page.getByLabel('Energy, a kWh').fill('0.1425');
  await page.getByRole('button', { name: 'Add a bill' }).click();
  await page.getByLabel('Energy', { exact: true }).fill('5120');
  await saved(page);
  await look(page, 'survey-utility');

  await page.reload();
  await page.getByRole('button', { name: 'Open Store' }).click();
  await expect(page.getByLabel('Length', { exact: true })).toHaveValue(`12' 8"`);
  await expect(page.getByText('2,800 h a year')).toBeVisible();
  await page.getByText('Heights and surfaces').click();
  await expect(page.getByLabel('Walls reflect')).toHaveValue('50');
  await expect(page.getByLabel('Light', { exact: true }).first()).toHaveValue('29');
  await expect(page.getByLabel('Utility', { exact: true })).toHaveValue('Tarn Power');
});

test('a type that the shop keeps, an area again', async ({ page, context }) => {
  quiet(page);
  await signIn(context, shop, 'owner');
  await page.goto(`/s/${shop.shopId}/jobs/${job}/survey`);
  await page.getByRole('button', { name: 'Add an area' }).click();
  await page.getByLabel('Name', { exact: true }).first().fill('Yard');
  await page.getByLabel('Type to add').fill('Wall lantern, old');
  await page.getByRole('button', { name: 'Add this type' }).click();
  await page.getByLabel('Input watts each').fill('84');
  await page.getByRole('button', { name: /^Keep as a type of the shop/ }).click();
  await expect(page.getByRole('button', { name: /^Keep as a type of the shop/ })).toBeHidden();
  await page.getByRole('button', { name: 'Duplicate this area' }).click();
  await saved(page);
  await page.getByRole('button', { name: /^Fold up/ }).click();
  await expect(page.getByRole('heading', { name: 'Yard (again)' })).toBeVisible();
  await expect(page.getByText(/1 count is estimated/)).toBeVisible();
  await page.getByRole('button', { name: 'Open Yard (again)' }).click();
  await expect(page.getByLabel('Input watts each')).toHaveValue('84');
});
