/** One job from survey to paid, as its people walk it. Mails are read from the catcher. */
import { expect, type Page, test } from '@playwright/test';
import { addParts } from '@/seeders/demo';
import { makeShop, PASSWORD, type TestShop } from '../support/shop';
import { quiet } from './support/console';
import { look } from './support/look';
import { linkIn, mailTo } from './support/mail';
import { signIn } from './support/signed-in';

const CUSTOMER_MAIL = 'ines@tarnlane.example.com';
const SIGN = 'Sign and accept';
const AGREE = 'Yes, I accept this.';
const NAME = 'Your name';
let shop: TestShop;

test.describe.configure({ mode: 'serial' });
test.beforeAll(async () => {
  shop = await makeShop();
  await addParts(shop.actors.owner);
});

async function signInByScreen(page: Page, email: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill('not the password');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByText('do not belong together')).toBeVisible();
  await expect(page.getByLabel('E-mail')).toHaveValue(email);
  await page.getByLabel('Password').fill(PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toContainText(/wait|Nothing/);
}

/** The README's pictures come from this very run: `UPDATE_PICTURES=1 npm test -- --only e2e path`. */
async function picture(page: Page, name: string): Promise<void> {
  if (process.env.UPDATE_PICTURES === '1') await page.screenshot({ path: `tests/e2e/pictures/${name}.png` });
}

async function saved(page: Page): Promise<void> {
  await expect(page.getByText('All saved.')).toBeVisible({ timeout: 15_000 });
}

async function payByTestCard(page: Page): Promise<void> {
  await page.getByRole('button', { name: /^Pay by card/ }).click();
  await page.locator('#number').fill('4242 4242 4242 4242');
  await page.locator('#expiry').fill('12/34');
  await page.locator('#cvc').fill('123');
  await page.locator('#name').fill('Ines Varga');
  await page.getByRole('button', { name: /^Pay / }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Paid. Thank you.');
}

test('one job from site survey to paid final invoice', async ({ page, browser }) => {
  test.setTimeout(180_000);
  // A wrong password is answered with 401, a photo that is none with 422.
  quiet(page, [/401/, /422.*photos/]);
  await signInByScreen(page, shop.email('owner'));
  const base = `/s/${shop.shopId}`;

  await test.step('customer, site and job', async () => {
    await page.goto(`${base}/customers/new`);
    await page.getByRole('button', { name: 'Save' }).click();
    await expect(page.getByText('Give the customer a name.')).toBeVisible();
    await page.getByLabel('Name', { exact: true }).fill('Tarn Lane Bakery');
    await page.getByLabel('Contact').fill('Ines Varga');
    await page.getByLabel('E-mail').fill(CUSTOMER_MAIL);
    await page.getByLabel('Address').fill('14 Tarn Lane');
    await page.getByRole('button', { name: 'Save' }).click();
    await page.getByRole('link', { name: 'Tarn Lane Bakery' }).click();
    await page.getByRole('link', { name: 'New job for them' }).click();
    await page.getByLabel('What the job is').fill('New lighting for the counter and back room');
    await page.getByRole('button', { name: 'Open the job' }).click();
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(
      'New lighting for the counter and back room',
    );
  });
  const job = page.url();

  await test.step('survey of two areas, with counts, a cove and a change', async () => {
    await page.goto(`${job}/survey`);
    await page.getByRole('button', { name: 'Add an area' }).click();
    await page.getByLabel('Name', { exact: true }).first().fill('Back room');
    await page.getByLabel('Length', { exact: true }).fill(`30' 6"`);
    await page.getByLabel('Width', { exact: true }).fill('24');
    await page.getByLabel('Height', { exact: true }).fill('9 ft 10 in');
    await page.getByLabel('Hours a week').fill('78');
    await page.getByLabel('Type to add').fill('4-lamp F32T8 4ft electronic BF 0.88');
    await page.getByRole('button', { name: 'Add this type' }).click();
    await page.getByLabel('Count', { exact: true }).fill('12');
    await expect(page.getByLabel('Input watts each')).toHaveValue('112');
    await page.getByRole('button', { name: /^Fold up/ }).click();
    await page.getByRole('button', { name: 'Add an area' }).click();
    await page.getByLabel('Name', { exact: true }).first().fill('Counter');
    await page.getByLabel('Length', { exact: true }).fill('26');
    await page.getByLabel('Width', { exact: true }).fill('14');
    await page.getByLabel('Hours a week').fill('66');
    await page.getByRole('button', { name: 'Add a cove' }).click();
    await page.getByLabel('Tape length', { exact: true }).fill('15 ft 9 in');
    await page.getByLabel('To the driver', { exact: true }).fill('8');
    await page.getByRole('button', { name: 'Add a change' }).click();
    await page.getByLabel('New', { exact: true }).selectOption({ label: 'Flat panel 2 x 2 ft, 24 W' });
    await page.getByLabel('New count', { exact: true }).fill('2');
    await expect(page.getByRole('group', { name: /^Checked:/ })).toBeVisible();
    // A photo by its content, not by its name: what is none is refused in words, and a real one is kept.
    await page
      .getByLabel('Add a photo')
      .setInputFiles({ name: 'cove.jpg', mimeType: 'image/jpeg', buffer: Buffer.from('not a picture') });
    await expect(page.getByText('Not kept')).toBeVisible();
    await page.getByLabel('Add a photo').setInputFiles('tests/e2e/pictures/customer.png');
    await expect(page.getByText('✓ Photo kept.')).toBeVisible();
    await expect(page.getByRole('img', { name: 'Photo 1 of Counter' })).toBeVisible();
    await saved(page);
    await page.reload();
    await expect(page.getByRole('heading', { name: 'Back room' })).toBeVisible();
    await expect(page.getByText('12 luminaires, 1,344 W')).toBeVisible();
    await look(page, 'survey');
  });

  await test.step('a branch circuit, a tape run and bench work', async () => {
    const start = async (area: string, kind: string) => {
      await page.goto(`${job}/circuits`);
      await page.getByLabel('Area').selectOption({ label: area });
      await page.getByLabel('Kind').selectOption({ label: kind });
      await page.getByRole('button', { name: 'Start it' }).click();
      await expect(page.getByRole('heading', { name: 'Circuit desk' })).toBeVisible();
    };
    await start('Back room', 'Branch circuit');
    await page.getByLabel('Luminaire', { exact: true }).selectOption({ label: 'Flat panel 2 x 4 ft, 35 W' });
    await page.getByLabel('How many').fill('12');
    await page
      .getByLabel('Cable', { exact: true })
      .selectOption({ label: 'Cable 12 AWG, 2 core with ground' });
    await expect(page.getByRole('img', { name: /From the panel/ })).toBeVisible();
    await saved(page);

    await start('Counter', 'Tape run');
    await page.getByLabel('Tape', { exact: true }).selectOption({ label: 'Tape 24 V, 14.4 W/m, 2700 K' });
    await page.getByLabel('Driver', { exact: true }).selectOption({ label: 'Driver 24 V, 96 W, Class 2' });
    await page.getByLabel('Cable', { exact: true }).selectOption({ label: 'Cable 16 AWG, 2 core' });
    // A limit that the run misses: a stop, with what to do about it one press away.
    await page.getByLabel('Limit of drop').fill('2');
    await expect(page.getByText('Far end too low')).toBeVisible();
    await page.getByRole('button', { name: 'Feed both ends' }).first().click();
    await expect(page.getByText('Far end too low')).toBeHidden();
    await picture(page, 'circuit-desk');
    await page.getByText('How it was figured').click();
    await saved(page);
    await look(page, 'circuit-desk');

    await start('Counter', 'LED array with resistors (bench work)');
    await page.getByLabel('LED', { exact: true }).selectOption({ label: 'LED warm white, 20 mA' });
    await page
      .getByLabel('Resistor', { exact: true })
      .selectOption({ label: 'Metal film resistor, 0.5 W, E24' });
    await expect(page.getByRole('img', { name: /strings in parallel/ })).toBeVisible();
    await saved(page);
    await page.goto(`${job}/survey`);
    await page.getByRole('button', { name: 'Survey is finished' }).click();
    await expect(page.getByText('✓ Survey finished.')).toBeVisible();
  });

  await test.step('a quote from circuits and a typed line, sent', async () => {
    await page.goto(`${job}/quote`);
    await page.getByRole('button', { name: 'Start the draft' }).click();
    await expect(page.getByText(/12 × Flat panel/).first()).toBeVisible();
    await page.getByText('Type a line').click();
    await page
      .getByLabel('What the customer reads')
      .last()
      .fill('Old tubes and ballasts taken away, certificate included');
    await page.getByLabel('Parts, each').last().fill('96');
    await page.getByRole('button', { name: 'Add the line' }).click();
    await expect(page.getByText('Old tubes and ballasts taken away').first()).toBeVisible();
    await look(page, 'quote-editor');
    await page.getByRole('link', { name: /^Preview/ }).click();
    await expect(page.getByText('What we will do')).toBeVisible();
    await look(page, 'quote-preview');
    await page.goBack();
    await page.getByRole('button', { name: 'Send revision 1' }).click();
    await expect(page.getByText('Revision 1 is on its way.')).toBeVisible();
    await look(page, 'quote-sent');
  });

  const phone = await browser.newContext({ viewport: { width: 390, height: 780 } });
  const customer = await phone.newPage();
  quiet(customer);

  await test.step('the customer opens the mail’s link, reads and signs', async () => {
    const mail = await mailTo(CUSTOMER_MAIL, /^Your quote/);
    expect(mail.attachments?.map((one) => one.contentType)).toEqual(['application/pdf']);
    await customer.goto(linkIn(mail));
    await expect(customer).toHaveURL(/\/l\/[0-9a-f-]{36}$/);
    await expect(customer.getByRole('heading', { level: 1 })).toHaveText(
      'New lighting for the counter and back room',
    );
    await picture(customer, 'customer');
    await look(customer, 'customer-quote');
    await customer.getByRole('button', { name: SIGN }).click();
    await expect(customer.getByText('both your tick and your name are needed')).toBeVisible();
    await customer.getByLabel(AGREE).check();
    await customer.getByLabel(NAME).fill('Ines Varga');
    await customer.getByRole('button', { name: SIGN }).click();
    await expect(customer.getByText(/accepted/i).first()).toBeVisible();
    await look(customer, 'customer-accepted');
    await mailTo(CUSTOMER_MAIL, /^Accepted/);
    await mailTo(`office-${shop.email('owner').slice(6)}`, /^Accepted/);
  });

  await test.step('the deposit, by card', async () => {
    const mail = await mailTo(CUSTOMER_MAIL, /^Invoice 1001/);
    expect(mail.attachments?.map((one) => one.contentType)).toEqual(['application/pdf']);
    await customer.goto(linkIn(mail));
    await customer.getByRole('link', { name: /Deposit invoice 1001/ }).click();
    await expect(customer.getByRole('button', { name: /^Pay by card/ })).toBeVisible();
    await look(customer, 'customer-invoice');
    await payByTestCard(customer);
    await look(customer, 'customer-paid');
    await mailTo(CUSTOMER_MAIL, /^Received: .* for invoice 1001/);
    await page.goto(`${job}/money`);
    await expect(page.getByText('✓ paid')).toBeVisible();
    await look(page, 'money');
  });

  const crewPhone = await browser.newContext({
    viewport: { width: 360, height: 780 },
    colorScheme: 'dark',
    hasTouch: true,
  });
  const crew = await crewPhone.newPage();
  quiet(crew);

  await test.step('a visit with crew, and the wiring sheet released', async () => {
    await page.goto(`${job}/install`);
    await page.getByLabel('Starts').fill('2030-03-04T08:00');
    await page.getByLabel('Ends').fill('2030-03-04T16:00');
    await page.getByRole('checkbox', { name: /^crew/ }).check();
    await page.getByRole('button', { name: 'Plan the visit' }).click();
    await expect(page.getByText(/Mar 4, 2030/).first()).toBeVisible();
    await page.getByRole('button', { name: 'Release the wiring sheet' }).click();
    await expect(page.getByText(/copy 1|Copy 1|revision 1|Revision 1/).first()).toBeVisible();
    await look(page, 'install');
  });

  await test.step('the crew works by the sheet on a phone', async () => {
    await signIn(crewPhone, shop, 'crew');
    await crew.goto(`${base}/visits`);
    await expect(crew.getByRole('link', { name: /sheet/i }).first()).toBeVisible();
    await look(crew, 'visits');
    await crew.getByRole('link', { name: /sheet/i }).first().click();
    await expect(crew).toHaveURL(/\/sheets\//);
    expect(await crew.content()).not.toMatch(/2,772|831\.67|1,932/);
    await crew.getByRole('button', { name: 'I have read them and work by them' }).click();
    await crew.getByLabel('What is locked and tagged').fill('Panel B, breaker 14, locked and tagged');
    await crew.getByRole('button', { name: 'Dead, proved' }).click();
    await expect(crew.getByText(/DEAD, PROVED/i).first()).toBeVisible();
    const steps = crew.getByRole('checkbox');
    await expect(steps.first()).toBeEnabled();
    for (let index = 0; index < (await steps.count()); index++) await steps.nth(index).click();
    const unmeasured = crew.getByRole('button', { name: 'Not measured' });
    for (let index = 0; index < (await unmeasured.count()); index++) await unmeasured.nth(index).click();
    // A second reading takes the place of the first; the band says what it thinks of it at once.
    const meter = crew.getByLabel('What the meter says').first();
    await meter.fill('12');
    await meter.press('Enter');
    await expect(crew.getByText(/out of band/i).first()).toBeVisible();
    await look(crew, 'wiring-sheet');
    await picture(crew, 'wiring-sheet');
    await crew.getByRole('button', { name: 'Sign off' }).click();
    await expect(crew.getByText(/signed off/i).first()).toBeVisible();
    await expect(crew.getByText(/all sent/i)).toBeVisible({ timeout: 15_000 });
    await look(crew, 'wiring-sheet-signed');
  });

  await test.step('the final invoice, mailed and paid, and the job closed', async () => {
    await page.goto(`${job}/money`);
    await page.getByRole('button', { name: 'Send the final invoice' }).click();
    await expect(page.getByText('Final invoice 1002')).toBeVisible();
    await look(page, 'money-final');
    const mail = await mailTo(CUSTOMER_MAIL, /^Invoice 1002/);
    await customer.goto(linkIn(mail));
    await customer.getByRole('link', { name: /Final invoice 1002/ }).click();
    await payByTestCard(customer);
    await mailTo(CUSTOMER_MAIL, /^Received: .* for invoice 1002/);
    await page.goto(job);
    await page.getByRole('button', { name: 'Close this job' }).click();
    await expect(page.getByText('This job is closed.')).toBeVisible();
    await look(page, 'job-closed');
  });
});

test('a forgotten password is set anew by mail', async ({ page }) => {
  quiet(page);
  await page.goto('/forgotten');
  await page.getByLabel('E-mail').fill(shop.email('estimator'));
  await page.getByRole('button', { name: 'Send me an address' }).click();
  await expect(page.getByText('Look into your mail.')).toBeVisible();
  const mail = await mailTo(shop.email('estimator'), /^A new password/);
  await page.goto(linkIn(mail));
  await page.getByLabel('New password').fill('a fresh lamp');
  await page.getByLabel('The same again').fill('another lamp');
  await page.getByRole('button', { name: 'Set it' }).click();
  await expect(page.getByText('The two do not match.')).toBeVisible();
  await page.getByLabel('The same again').fill('a fresh lamp');
  await page.getByRole('button', { name: 'Set it' }).click();
  await expect(page.getByText('Your new password is set.')).toBeVisible();
  await page.goto(linkIn(mail));
  await page.getByLabel('New password').fill('a third lamp');
  await page.getByLabel('The same again').fill('a third lamp');
  await page.getByRole('button', { name: 'Set it' }).click();
  await expect(page.getByText(/has been used/)).toBeVisible();
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(shop.email('estimator'));
  await page.getByLabel('Password').fill('a fresh lamp');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toContainText(/wait|Nothing/);
});
