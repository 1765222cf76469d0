/** What the stand-in answers has the shape that the SDK's own types promise. */
import { Ajv, type ValidateFunction } from 'ajv';
import type Stripe from 'stripe';
import { beforeAll, describe, expect, test } from 'vitest';
import { control, GOOD_CARD, sdk, sessionParams, startFake, startReceiver, submit } from './support/fake';
import { type Schema, schemasOf } from './support/schema';

const FILES = {
  Session: 'Checkout/Sessions',
  PaymentIntent: 'PaymentIntents',
  Charge: 'Charges',
  Refund: 'Refunds',
  Account: 'Accounts',
  EventBase: 'Events',
};

let schemas: Record<string, Schema>;
let checks: Record<string, ValidateFunction>;

beforeAll(() => {
  schemas = schemasOf(FILES);
  const ajv = new Ajv({ allErrors: true, strict: false });
  checks = Object.fromEntries(Object.entries(schemas).map(([name, schema]) => [name, ajv.compile(schema)]));
}, 60_000);

/** What is wrong with the object, in ajv's words. */
function wrong(name: keyof typeof FILES, object: object): string[] {
  const check = checks[name] as ValidateFunction;
  // The SDK adds `lastResponse`, which is not enumerable, so that a copy is what came over the wire.
  return check(JSON.parse(JSON.stringify(object)))
    ? []
    : (check.errors ?? []).map((error) => `${error.instancePath} ${error.message}`);
}

describe('the schemas themselves', () => {
  test('hold what the declarations say', () => {
    const session = schemas.Session as { required: string[]; properties: Record<string, Schema> };
    expect(session.required.length).toBeGreaterThan(50);
    expect(session.required).toContain('payment_status');
    expect(session.required).not.toContain('line_items');
    expect(session.properties.amount_total).toEqual({ anyOf: [{ type: 'null' }, { type: 'number' }] });
  });

  test('refuse an object with a property missing, of another type, or unknown', async () => {
    const fake = await startFake();
    const session = await sdk(fake.url).checkout.sessions.create(sessionParams());
    expect(wrong('Session', session)).toEqual([]);
    const { created: _created, ...without } = session;
    expect(wrong('Session', without).join()).toContain("required property 'created'");
    expect(wrong('Session', { ...session, amount_total: '12' }).join()).toContain('/amount_total');
    expect(wrong('Session', { ...session, colour: 'amber' }).join()).toContain('additional properties');
    expect(wrong('Session', { ...session, total_details: {} }).join()).toContain('/total_details');
  });
});

test('every object of a payment, from open to refunded', async () => {
  const receiver = await startReceiver();
  const fake = await startFake({ webhookUrl: receiver.url });
  const stripe = sdk(fake.url);
  const session = await stripe.checkout.sessions.create(sessionParams());
  expect(wrong('Session', session)).toEqual([]);
  await submit(session.url ?? '', { ...GOOD_CARD, number: '4000000000000002' });
  await submit(session.url ?? '', { ...GOOD_CARD, number: '4000002500003155' });
  const { payment_intent: id } = await stripe.checkout.sessions.retrieve(session.id);
  expect(wrong('PaymentIntent', await stripe.paymentIntents.retrieve(id as string))).toEqual([]);
  await submit(`${session.url}/confirm`, { answer: 'yes' });
  const paid = await stripe.checkout.sessions.retrieve(session.id);
  expect(wrong('Session', paid)).toEqual([]);
  const refund = await stripe.refunds.create({ payment_intent: id as string, amount: 100 });
  expect(wrong('Refund', refund)).toEqual([]);
  const intent = await stripe.paymentIntents.retrieve(id as string, { expand: ['latest_charge'] });
  expect(wrong('Charge', intent.latest_charge as Stripe.Charge)).toEqual([]);
  expect(wrong('Account', await stripe.accounts.retrieve('acct_fernhollow01'))).toEqual([]);
  const notices = await receiver.until(4);
  for (const { event } of notices) {
    const { data, ...outer } = event;
    // `data.object` is any of hundreds of objects; those that we send are checked above.
    expect(wrong('EventBase', { ...outer, data: {} }).filter((line) => !line.startsWith('/data'))).toEqual(
      [],
    );
    expect(data.object).toHaveProperty('id');
  }
});

test('a bank debit on its way, and an expired session', async () => {
  const fake = await startFake();
  const stripe = sdk(fake.url);
  const params = sessionParams({ allowed_payment_method_types: ['us_bank_account'] });
  const debit = await stripe.checkout.sessions.create(params);
  await submit(debit.url ?? '', { routing: '110000000', account: '000123456789', name: 'Ada Holder' });
  const done = await stripe.checkout.sessions.retrieve(debit.id);
  expect(wrong('Session', done)).toEqual([]);
  expect(wrong('PaymentIntent', await stripe.paymentIntents.retrieve(done.payment_intent as string))).toEqual(
    [],
  );
  await control(fake.url, 'settle', { sessionId: debit.id, outcome: 'failed' });
  expect(wrong('PaymentIntent', await stripe.paymentIntents.retrieve(done.payment_intent as string))).toEqual(
    [],
  );
  const other = await stripe.checkout.sessions.create(sessionParams());
  expect(wrong('Session', await stripe.checkout.sessions.expire(other.id))).toEqual([]);
});
