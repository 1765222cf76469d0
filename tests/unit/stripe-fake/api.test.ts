/** The API of the card stand-in, asked by the real SDK. */
import Stripe from 'stripe';
import { describe, expect, test } from 'vitest';
import { ACCOUNT, control, GOOD_CARD, sdk, sessionParams, startFake, submit, thrown } from './support/fake';

const { errors } = Stripe;

async function ready() {
  const fake = await startFake();
  return { fake, stripe: sdk(fake.url) };
}

async function paid(options: Stripe.RequestOptions = {}) {
  const { fake, stripe } = await ready();
  const session = await stripe.checkout.sessions.create(sessionParams(), options);
  await submit(session.url ?? '', GOOD_CARD);
  const after = await stripe.checkout.sessions.retrieve(session.id, {}, options);
  return { fake, stripe, intent: after.payment_intent as string };
}

describe('sessions', () => {
  test('a new session is open, unpaid, and has an address to pay at', async () => {
    const { fake, stripe } = await ready();
    const session = await stripe.checkout.sessions.create(sessionParams());
    expect(session).toMatchObject({
      object: 'checkout.session',
      status: 'open',
      payment_status: 'unpaid',
      amount_total: 123_456,
      currency: 'usd',
      customer_email: 'bakery@example.com',
      metadata: { payment: 'p-1' },
      payment_intent: null,
      livemode: false,
    });
    expect(session.url).toBe(`${fake.url}/pay/${session.id}`);
    expect(session.lastResponse.requestId).toMatch(/^req_/);
    expect(session.lastResponse.headers['stripe-version']).toBe('2026-10-28.endive');
    const again = await stripe.checkout.sessions.retrieve(session.id);
    expect(again).toEqual(session);
  });

  test('quantities and lines add up', async () => {
    const { stripe } = await ready();
    const line = (quantity: number, unit_amount: number) => ({
      quantity,
      price_data: { currency: 'eur', unit_amount, product_data: { name: 'Part' } },
    });
    const lines = [line(3, 1_999), line(12, 5)];
    const session = await stripe.checkout.sessions.create(sessionParams({ line_items: lines }));
    expect(session.amount_total).toBe(3 * 1_999 + 12 * 5);
    expect(session.currency).toBe('eur');
  });

  test('expiring closes it once; a second time is refused', async () => {
    const { stripe } = await ready();
    const { id } = await stripe.checkout.sessions.create(sessionParams());
    const expired = await stripe.checkout.sessions.expire(id);
    expect(expired).toMatchObject({ status: 'expired', url: null, payment_status: 'unpaid' });
    const error = await thrown(stripe.checkout.sessions.expire(id));
    expect(error).toBeInstanceOf(errors.StripeInvalidRequestError);
    expect(error.message).toContain('status of `expired`');
  });

  test.each([
    ['a parameter that nobody knows', { colour: 'amber' }, 'colour', 'parameter_unknown'],
    [
      'the list of methods that this version dropped',
      { payment_method_types: ['card'] },
      'payment_method_types',
      'parameter_unknown',
    ],
    ['no return address', { success_url: '' }, 'success_url', 'parameter_missing'],
    ['a return address that is none', { success_url: 'back' }, 'success_url', 'url_invalid'],
    ['an e-mail that is none', { customer_email: 'bakery' }, 'customer_email', 'email_invalid'],
    [
      'an expiry too soon',
      { expires_at: Math.floor(Date.now() / 1_000) + 60 },
      'expires_at',
      'parameter_invalid',
    ],
    [
      'an expiry too far',
      { expires_at: Math.floor(Date.now() / 1_000) + 90_000 },
      'expires_at',
      'parameter_invalid',
    ],
    ['no lines', { line_items: [] }, 'line_items', 'parameter_missing'],
  ])('refuses %s', async (_what, change, param, code) => {
    const { stripe } = await ready();
    const params = sessionParams(change as Partial<Stripe.Checkout.SessionCreateParams>);
    const error = await thrown(stripe.checkout.sessions.create(params));
    expect(error).toBeInstanceOf(errors.StripeInvalidRequestError);
    expect(error).toMatchObject({ statusCode: 400, param, code, rawType: 'invalid_request_error' });
  });

  test.each([
    [0, 'amount_too_small'],
    [100_000_000, 'amount_too_large'],
    [12.5, 'parameter_invalid_integer'],
  ])('refuses the amount %s', async (unit_amount, code) => {
    const { stripe } = await ready();
    const price_data = { currency: 'usd', unit_amount, product_data: { name: 'Deposit' } };
    const params = sessionParams({ line_items: [{ quantity: 1, price_data }] });
    expect(await thrown(stripe.checkout.sessions.create(params))).toMatchObject({ code });
  });

  test('bank debit alone can not be had in euros', async () => {
    const { stripe } = await ready();
    const price_data = { currency: 'eur', unit_amount: 5_000, product_data: { name: 'Deposit' } };
    const params = sessionParams({
      line_items: [{ quantity: 1, price_data }],
      allowed_payment_method_types: ['us_bank_account'],
    });
    const error = await thrown(stripe.checkout.sessions.create(params));
    expect(error.param).toBe('allowed_payment_method_types');
  });
});

describe('who asks', () => {
  test('another key is an authentication error', async () => {
    const { fake } = await ready();
    const error = await thrown(sdk(fake.url, 'sk_test_another').checkout.sessions.create(sessionParams()));
    expect(error).toBeInstanceOf(errors.StripeAuthenticationError);
    expect(error.message).not.toContain('sk_test_another');
  });

  test('a session of one account is not found from another, nor from the platform', async () => {
    const { stripe } = await ready();
    const own = { stripeAccount: ACCOUNT };
    const { id } = await stripe.checkout.sessions.create(sessionParams(), own);
    expect((await stripe.checkout.sessions.retrieve(id, {}, own)).id).toBe(id);
    for (const other of [{}, { stripeAccount: 'acct_other0001' }]) {
      const error = await thrown(stripe.checkout.sessions.retrieve(id, {}, other));
      expect(error).toMatchObject({ statusCode: 404, code: 'resource_missing' });
    }
  });

  test('what is no account is a permission error', async () => {
    const { stripe } = await ready();
    const error = await thrown(stripe.checkout.sessions.create(sessionParams(), { stripeAccount: 'shop' }));
    expect(error).toBeInstanceOf(errors.StripePermissionError);
  });

  test('the account answers for itself', async () => {
    const { stripe } = await ready();
    const account = await stripe.accounts.retrieve(ACCOUNT);
    expect(account).toMatchObject({ id: ACCOUNT, object: 'account', charges_enabled: true });
  });
});

describe('idempotency keys', () => {
  const key = { idempotencyKey: 'pay-1' };

  test('same key, same body: the same session, marked as a replay', async () => {
    const { stripe } = await ready();
    const first = await stripe.checkout.sessions.create(sessionParams(), key);
    const second = await stripe.checkout.sessions.create(sessionParams(), key);
    expect(second).toEqual(first);
    expect(first.lastResponse.headers['idempotent-replayed']).toBeUndefined();
    expect(second.lastResponse.headers['idempotent-replayed']).toBe('true');
  });

  test('same key, another body: refused', async () => {
    const { stripe } = await ready();
    await stripe.checkout.sessions.create(sessionParams(), key);
    const changed = sessionParams({ customer_email: 'dentist@example.com' });
    const error = await thrown(stripe.checkout.sessions.create(changed, key));
    expect(error).toBeInstanceOf(errors.StripeIdempotencyError);
    expect(error.statusCode).toBe(400);
  });

  test('the key of one account is free in another', async () => {
    const { stripe } = await ready();
    const first = await stripe.checkout.sessions.create(sessionParams(), key);
    const other = { ...key, stripeAccount: ACCOUNT };
    expect((await stripe.checkout.sessions.create(sessionParams(), other)).id).not.toBe(first.id);
  });

  test('a refused request does not use its key up', async () => {
    const { stripe } = await ready();
    await thrown(stripe.checkout.sessions.create(sessionParams({ success_url: 'back' }), key));
    expect((await stripe.checkout.sessions.create(sessionParams(), key)).status).toBe('open');
  });
});

describe('outages', () => {
  test('out of order answers 500 as an API error', async () => {
    const { fake, stripe } = await ready();
    await control(fake.url, 'down', { on: true });
    const error = await thrown(stripe.checkout.sessions.create(sessionParams()));
    expect(error).toBeInstanceOf(errors.StripeAPIError);
    await control(fake.url, 'down', { on: false });
    expect((await stripe.checkout.sessions.create(sessionParams())).status).toBe('open');
  });

  test('the SDK tries again by itself', async () => {
    const { fake } = await ready();
    const patient = sdk(fake.url, undefined, { maxNetworkRetries: 2 });
    await control(fake.url, 'down', { on: true, times: 1 });
    expect((await patient.checkout.sessions.create(sessionParams())).status).toBe('open');
  });

  test('an answer lost on the way does not make a second session', async () => {
    const { fake } = await ready();
    const patient = sdk(fake.url, undefined, { maxNetworkRetries: 2 });
    await control(fake.url, 'down', { on: true, times: 1, afterWork: true });
    const options = { idempotencyKey: 'pay-lost' };
    const session = await patient.checkout.sessions.create(sessionParams(), options);
    expect(session.lastResponse.headers['idempotent-replayed']).toBe('true');
  });
});

describe('refunds', () => {
  test('in two parts, then no more', async () => {
    const { stripe, intent } = await paid();
    const part = await stripe.refunds.create({ payment_intent: intent, amount: 23_456 });
    expect(part).toMatchObject({ amount: 23_456, status: 'succeeded', payment_intent: intent });
    expect(await stripe.refunds.retrieve(part.id)).toEqual(part);
    const tooMuch = await thrown(stripe.refunds.create({ payment_intent: intent, amount: 100_001 }));
    expect(tooMuch).toMatchObject({ param: 'amount', statusCode: 400 });
    const rest = await stripe.refunds.create({ payment_intent: intent });
    expect(rest.amount).toBe(100_000);
    const none = await thrown(stripe.refunds.create({ payment_intent: intent }));
    expect(none.code).toBe('charge_already_refunded');
    const after = await stripe.paymentIntents.retrieve(intent, { expand: ['latest_charge'] });
    expect(after.latest_charge).toMatchObject({ amount_refunded: 123_456, refunded: true });
  });

  test('nothing to refund before it was paid', async () => {
    const { stripe } = await ready();
    const error = await thrown(stripe.refunds.create({ payment_intent: 'pi_unknown' }));
    expect(error).toMatchObject({ code: 'resource_missing', param: 'payment_intent' });
  });
});

test('expanding gives the object, and refuses what does not expand', async () => {
  const { stripe, intent } = await paid({ stripeAccount: ACCOUNT });
  const own = { stripeAccount: ACCOUNT };
  const found = await stripe.paymentIntents.retrieve(intent, { expand: ['latest_charge'] }, own);
  expect(found.latest_charge).toMatchObject({ object: 'charge', status: 'succeeded', paid: true });
  const error = await thrown(stripe.paymentIntents.retrieve(intent, { expand: ['weather'] }, own));
  expect(error.message).toBe('This property cannot be expanded (weather).');
});

test('a path that is not in use says so', async () => {
  const { stripe } = await ready();
  expect(await thrown(stripe.customers.create({}))).toMatchObject({ statusCode: 404 });
});
