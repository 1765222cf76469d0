/** The page on which the customer types a test card. */
import type Stripe from 'stripe';
import { describe, expect, test } from 'vitest';
import { checkTyped, passesLuhn } from '../../../docker-free-scripts/stripe-fake/cards';
import { control, GOOD_CARD, open, sdk, sessionParams, startFake, submit } from './support/fake';

async function ready(change: Partial<Stripe.Checkout.SessionCreateParams> = {}) {
  const fake = await startFake();
  const stripe = sdk(fake.url);
  const session = await stripe.checkout.sessions.create(sessionParams(change));
  const fetch = () =>
    stripe.checkout.sessions.retrieve(session.id, { expand: ['payment_intent.latest_charge'] });
  const intent = async () => (await fetch()).payment_intent as Stripe.PaymentIntent;
  return { fake, stripe, id: session.id, url: session.url ?? '', fetch, intent };
}

const card = (number: string) => ({ ...GOOD_CARD, number });
const BACK = 'http://127.0.0.1:9/back?session=';

describe('paying by card', () => {
  test('a good card completes the session and returns with its id', async () => {
    const { id, url, fetch, intent } = await ready();
    const page = await submit(url, GOOD_CARD);
    expect(page).toMatchObject({ status: 303, location: `${BACK}${id}` });
    expect(await fetch()).toMatchObject({ status: 'complete', payment_status: 'paid', url: null });
    expect(await intent()).toMatchObject({
      status: 'succeeded',
      amount_received: 123_456,
      metadata: { payment: 'p-1' },
      latest_charge: { paid: true, billing_details: { name: 'Ada Holder' } },
    });
  });

  test.each([
    ['4000 0000 0000 0002', 'generic_decline', 'Your card was declined.'],
    ['4000 0000 0000 9995', 'insufficient_funds', 'Your card has insufficient funds.'],
  ])('%s is refused, and another card may follow', async (number, code, message) => {
    const { url, fetch, intent } = await ready();
    const page = await submit(url, card(number));
    expect(page.status).toBe(200);
    expect(page.html).toContain(message);
    expect(await fetch()).toMatchObject({ status: 'open', payment_status: 'unpaid' });
    const failed = await intent();
    expect(failed.status).toBe('requires_payment_method');
    expect(failed.last_payment_error).toMatchObject({
      type: 'card_error',
      code: 'card_declined',
      decline_code: code,
    });
    expect((await submit(url, GOOD_CARD)).status).toBe(303);
    expect((await intent()).id).toBe(failed.id);
    expect(await intent()).toMatchObject({ status: 'succeeded', last_payment_error: null });
  });

  test('a card that asks is paid after the answer', async () => {
    const { id, url, fetch, intent } = await ready();
    const asked = await submit(url, card('4000 0025 0000 3155'));
    expect(asked).toMatchObject({ status: 303, location: `/pay/${id}` });
    expect((await intent()).status).toBe('requires_action');
    expect((await open(url)).html).toContain('Card ending in 3155');
    const done = await submit(`${url}/confirm`, { answer: 'yes' });
    expect(done.location).toBe(`${BACK}${id}`);
    expect((await fetch()).payment_status).toBe('paid');
  });

  test('a card that asks and is not confirmed pays nothing', async () => {
    const { url, fetch, intent } = await ready();
    await submit(url, card('4000 0025 0000 3155'));
    const refused = await submit(`${url}/confirm`, { answer: 'no' });
    expect(refused.status).toBe(200);
    expect(refused.html).toContain('nothing was charged');
    expect(await fetch()).toMatchObject({ status: 'open', payment_status: 'unpaid' });
    expect((await intent()).last_payment_error?.code).toBe('payment_intent_authentication_failure');
  });

  test('confirming when nothing asks changes nothing', async () => {
    const { id, url, fetch } = await ready();
    expect(await submit(`${url}/confirm`, { answer: 'yes' })).toMatchObject({ location: `/pay/${id}` });
    expect((await fetch()).status).toBe('open');
  });

  test('clicks at once pay once', async () => {
    const { fake, id, url } = await ready();
    const pages = await Promise.all(Array.from({ length: 6 }, () => submit(url, GOOD_CARD)));
    expect(new Set(pages.map((page) => page.location))).toEqual(new Set([`${BACK}${id}`]));
    const { events } = await control<{ events: { type: string }[] }>(fake.url, 'events');
    expect(events.map(({ type }) => type)).toEqual([
      'payment_intent.succeeded',
      'checkout.session.completed',
    ]);
  });
});

describe('what is typed wrongly', () => {
  test('stays, but for the number and the code', async () => {
    const { url, fetch } = await ready();
    const page = await submit(url, {
      number: '4242 4242 4242 4241',
      expiry: '13 / 39',
      cvc: '987',
      name: 'Ada "X" <b>',
    });
    expect(page.status).toBe(200);
    expect(page.html).toContain('a digit is wrong or missing');
    expect(page.html).toContain('The month of the expiry is from 01 to 12.');
    expect(page.html).toContain('value="13 / 39"');
    expect(page.html).toContain('value="Ada &quot;X&quot; &lt;b&gt;"');
    expect(page.html).toContain('The number ending in 4241 was not kept');
    expect(page.html.replace(/\s/g, '')).not.toContain('4242424242424241');
    expect(page.html).not.toContain('987');
    expect(await fetch()).toMatchObject({ status: 'open', payment_intent: null });
  });

  test('nothing at all names every field', async () => {
    const { url } = await ready();
    const page = await submit(url, {});
    for (const field of ['number', 'expiry', 'cvc', 'name'])
      expect(page.html).toContain(`id="${field}-wrong"`);
  });

  test('a valid number that is no test number is never taken', async () => {
    const { url, fetch } = await ready();
    // Made up; it passes the check digit.
    const page = await submit(url, card('9000 0000 0000 1231'));
    expect(page).toMatchObject({ status: 200 });
    expect(page.html).toContain('Only the test numbers below work here.');
    expect((await fetch()).payment_intent).toBeNull();
  });

  test.each([
    ['11 / 26', 'This card has expired.'],
    ['12 / 26', undefined],
    ['1226', undefined],
    ['12-2026', undefined],
    ['soon', 'Type the expiry as month and year, like 04 / 31.'],
  ])('expiry %s in December 2026: %s', (expiry, problem) => {
    const typed = { ...GOOD_CARD, method: 'card' as const, expiry, routing: '', account: '' };
    expect(checkTyped(typed, new Date('2026-12-01T00:00:00Z')).expiry).toBe(problem);
  });

  test('the check digit finds every single wrong digit', () => {
    const good = '4000002500003155';
    expect(passesLuhn(good)).toBe(true);
    for (let at = 0; at < good.length; at += 1)
      for (let digit = 0; digit < 10; digit += 1) {
        const changed = `${good.slice(0, at)}${digit}${good.slice(at + 1)}`;
        expect(passesLuhn(changed)).toBe(changed === good);
      }
  });
});

describe('pages that can not pay', () => {
  test('after it was paid', async () => {
    const { id, url } = await ready();
    await submit(url, GOOD_CARD);
    const page = await open(url);
    expect(page.html).toContain('This was paid already');
    expect(page.html).toContain(`${BACK}${id}`);
  });

  test('after it expired', async () => {
    const { fake, id, url, fetch } = await ready();
    await submit(url, card('4000000000000002'));
    await control(fake.url, 'expire', { sessionId: id });
    for (const page of [await open(url), await submit(url, GOOD_CARD)]) {
      expect(page.status).toBe(200);
      expect(page.html).toContain('Nothing was charged.');
      expect(page.html).toContain('http://127.0.0.1:9/cancelled');
    }
    expect(await fetch()).toMatchObject({
      status: 'expired',
      payment_status: 'unpaid',
      payment_intent: { status: 'canceled' },
    });
  });

  test('an address that nobody gave out', async () => {
    const fake = await startFake();
    expect(await open(`${fake.url}/pay/cs_test_nothing`)).toMatchObject({ status: 404 });
  });
});

test('the page says what it is, what is paid, and the way back', async () => {
  const name = 'Deposit <script>alert(1)</script>';
  const price_data = { currency: 'usd', unit_amount: 123_456, product_data: { name } };
  const { url } = await ready({ line_items: [{ quantity: 1, price_data }] });
  const { html } = await open(url);
  expect(html).toContain('Test card page (stand-in)');
  expect(html).toContain('$1,234.56');
  expect(html).toContain('href="http://127.0.0.1:9/cancelled"');
  expect(html).not.toContain('<script');
});

describe('bank debit', () => {
  const bank = { method: 'bank', routing: '110000000', account: '000123456789', name: 'Ada Holder' };
  const both = {
    allowed_payment_method_types: ['card', 'us_bank_account'] as ('card' | 'us_bank_account')[],
  };

  test('is on its way first, and settled on demand', async () => {
    const { fake, id, url, fetch } = await ready(both);
    expect((await submit(url, bank)).location).toBe(`${BACK}${id}`);
    expect(await fetch()).toMatchObject({
      status: 'complete',
      payment_status: 'unpaid',
      payment_intent: { status: 'processing', amount_received: 0 },
    });
    await control(fake.url, 'settle', { sessionId: id, outcome: 'succeeded' });
    expect(await fetch()).toMatchObject({
      payment_status: 'paid',
      payment_intent: { status: 'succeeded', latest_charge: { paid: true } },
    });
    const { error } = await control<{ error: string }>(fake.url, 'settle', {
      sessionId: id,
      outcome: 'failed',
    });
    expect(error).toContain('No bank debit');
  });

  test('that comes back leaves it unpaid', async () => {
    const { fake, id, url, fetch } = await ready(both);
    await submit(url, bank);
    await control(fake.url, 'settle', { sessionId: id, outcome: 'failed' });
    expect(await fetch()).toMatchObject({
      payment_status: 'unpaid',
      payment_intent: { status: 'requires_payment_method', latest_charge: { status: 'failed' } },
    });
  });

  test('is not offered where the shop takes cards only', async () => {
    const { url, fetch } = await ready();
    expect((await open(url)).html).not.toContain('Routing number');
    expect((await submit(url, bank)).status).toBe(200);
    expect((await fetch()).status).toBe('open');
  });
});
