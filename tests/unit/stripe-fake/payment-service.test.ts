/** lib/platform/stripe against the stand-in: our own terms, and errors that may be shown. */
import type { AsyncLocalStorage } from 'node:async_hooks';
import Stripe from 'stripe';
import { describe, expect, test } from 'vitest';
import { AppError } from '@/lib/platform/http/errors';
import { createPaymentService, type NewCheckout, PaymentServiceError } from '@/lib/platform/stripe';
import {
  ACCOUNT,
  control,
  GOOD_CARD,
  SECRET_KEY,
  startFake,
  startReceiver,
  submit,
  WEBHOOK_SECRET,
} from './support/fake';

// What is refused here on purpose need not be read in the run's output.
process.env.LOG_LEVEL = 'silent';

const HOUR_MS = 3_600_000;

const checkout = (change: Partial<NewCheckout> = {}): NewCheckout => ({
  account: ACCOUNT,
  amountMinor: 123_456n,
  currency: 'USD',
  description: 'Deposit, invoice 1042',
  customerEmail: 'bakery@example.com',
  successUrl: 'http://127.0.0.1:9/pay/p-1',
  cancelUrl: 'http://127.0.0.1:9/l/1',
  metadata: { payment: 'p-1' },
  idempotencyKey: 'p-1',
  expiresAt: new Date(Date.now() + HOUR_MS),
  ...change,
});

async function ready() {
  const receiver = await startReceiver();
  const fake = await startFake({ webhookUrl: receiver.url });
  const config = { secretKey: SECRET_KEY, webhookSecret: WEBHOOK_SECRET, apiBase: fake.url };
  return { receiver, fake, config, service: createPaymentService(config) };
}

/** What was thrown, as whoever asked gets it. */
async function refused(work: Promise<unknown>): Promise<PaymentServiceError> {
  const error: unknown = await work.then(
    () => new Error('nothing was thrown'),
    (reason: unknown) => reason,
  );
  if (!(error instanceof PaymentServiceError)) throw error;
  expect(error).toBeInstanceOf(AppError);
  expect(error.message).not.toMatch(/sk_test|at .*\.js|stand-in|req_/);
  return error;
}

describe('a checkout', () => {
  test('from open to paid, in our own terms', async () => {
    const { service } = await ready();
    const expiresAt = new Date(Math.floor(Date.now() / 1_000) * 1_000 + HOUR_MS);
    const made = await service.createCheckoutSession(checkout({ expiresAt }));
    expect(made).toMatchObject({
      state: 'open',
      amountMinor: 123_456,
      currency: 'USD',
      paymentIntentId: null,
      metadata: { payment: 'p-1' },
      expiresAt,
    });
    await submit(made.url ?? '', GOOD_CARD);
    const paid = await service.fetchCheckoutSession(made.id, ACCOUNT);
    expect(paid).toMatchObject({ state: 'paid', url: null });
    expect(paid.paymentIntentId).toMatch(/^pi_/);
  });

  test.each([
    ['succeeded', 'paid'],
    ['failed', 'failed'],
  ])('a bank debit is pending, then %s', async (outcome, state) => {
    const { service, fake } = await ready();
    const made = await service.createCheckoutSession(checkout({ methods: ['bank-debit'] }));
    await submit(made.url ?? '', { routing: '110000000', account: '000123456789', name: 'Ada Holder' });
    expect((await service.fetchCheckoutSession(made.id, ACCOUNT)).state).toBe('pending');
    await control(fake.url, 'settle', { sessionId: made.id, outcome });
    expect((await service.fetchCheckoutSession(made.id, ACCOUNT)).state).toBe(state);
  });

  test('asked for twice with one key is one', async () => {
    const { service } = await ready();
    const input = checkout();
    const both = await Promise.all([
      service.createCheckoutSession(input),
      service.createCheckoutSession(input),
    ]);
    expect(both[0].id).toBe(both[1].id);
  });

  test('expired is expired; one that was paid meanwhile stays paid', async () => {
    const { service } = await ready();
    const first = await service.createCheckoutSession(checkout());
    expect((await service.expireCheckoutSession(first.id, ACCOUNT)).state).toBe('expired');
    expect((await service.expireCheckoutSession(first.id, ACCOUNT)).state).toBe('expired');
    const second = await service.createCheckoutSession(checkout({ idempotencyKey: 'p-2' }));
    await submit(second.url ?? '', GOOD_CARD);
    expect((await service.expireCheckoutSession(second.id, ACCOUNT)).state).toBe('paid');
  });

  test("without an account it is the platform's own", async () => {
    const { service } = await ready();
    const made = await service.createCheckoutSession(checkout({ account: null }));
    expect((await service.fetchCheckoutSession(made.id)).id).toBe(made.id);
    expect((await refused(service.fetchCheckoutSession(made.id, ACCOUNT))).kind).toBe('invalid');
  });

  test.each([0, -5, 12.5, Number.NaN, 2 ** 60])('an amount of %s is never sent', async (amountMinor) => {
    const { service } = await ready();
    await expect(service.createCheckoutSession(checkout({ amountMinor }))).rejects.toThrow(RangeError);
  });
});

test('it is never asked inside a transaction', async () => {
  const { service } = await ready();
  const key = Symbol.for('lampwright.db');
  const { scope } =
    (globalThis as unknown as Record<symbol, { scope: AsyncLocalStorage<object> }>)[key] ?? {};
  const asking = scope?.run({}, () => service.fetchCheckoutSession('cs_test_1'));
  await expect(asking).rejects.toThrow('never called inside a transaction');
});

describe('refunds', () => {
  test('a part, once per key', async () => {
    const { service } = await ready();
    const made = await service.createCheckoutSession(checkout());
    await submit(made.url ?? '', GOOD_CARD);
    const { paymentIntentId } = await service.fetchCheckoutSession(made.id, ACCOUNT);
    const input = {
      account: ACCOUNT,
      paymentIntentId: paymentIntentId ?? '',
      amountMinor: 23_456,
      idempotencyKey: 'refund-1',
    };
    const refund = await service.createRefund(input);
    expect(refund).toMatchObject({ state: 'done', amountMinor: 23_456, currency: 'USD', paymentIntentId });
    expect(await service.createRefund(input)).toEqual(refund);
    expect(await service.fetchRefund(refund.id, ACCOUNT)).toEqual(refund);
    await service.createRefund({ ...input, amountMinor: 100_000, idempotencyKey: 'refund-2' });
    const over = await refused(service.createRefund({ ...input, idempotencyKey: 'refund-3' }));
    expect(over).toMatchObject({ kind: 'invalid', message: 'This payment was refunded already.' });
  });
});

describe('what goes wrong', () => {
  test('out of order is unavailable', async () => {
    const { service, fake } = await ready();
    await control(fake.url, 'down', { on: true });
    const error = await refused(service.createCheckoutSession(checkout()));
    expect(error).toMatchObject({ kind: 'unavailable', code: 'unavailable', status: 503 });
  });

  test('a short outage is not noticed, nor an answer that was lost', async () => {
    const { service, fake } = await ready();
    await control(fake.url, 'down', { on: true, times: 1 });
    const made = await service.createCheckoutSession(checkout());
    await control(fake.url, 'down', { on: true, times: 1, afterWork: true });
    expect((await service.createCheckoutSession(checkout({ expiresAt: made.expiresAt }))).id).toBe(made.id);
  });

  test('nobody there is unavailable', async () => {
    const service = createPaymentService({
      secretKey: SECRET_KEY,
      webhookSecret: WEBHOOK_SECRET,
      apiBase: 'http://127.0.0.1:1',
    });
    expect((await refused(service.fetchCheckoutSession('cs_test_1'))).kind).toBe('unavailable');
  });

  test('a wrong key, an account that is none, a reused key, an amount too small', async () => {
    const { service, config } = await ready();
    const stranger = createPaymentService({ ...config, secretKey: 'sk_test_stranger' });
    const key = await refused(stranger.createCheckoutSession(checkout()));
    expect(key).toMatchObject({ kind: 'invalid', status: 422 });
    expect(key.message).toContain('card settings');
    const account = await refused(service.createCheckoutSession(checkout({ account: 'nobody' })));
    expect(account.message).toContain('card settings');
    await service.createCheckoutSession(checkout());
    const reused = await refused(service.createCheckoutSession(checkout({ amountMinor: 99_999 })));
    expect(reused.message).toContain('already begun with other figures');
    const small = await refused(
      service.createCheckoutSession(checkout({ amountMinor: 7, idempotencyKey: 'small' })),
    );
    expect(small.message).toBe('The amount is smaller than what can be paid by card.');
  });
});

describe('notices', () => {
  test('say which payment to fetch again', async () => {
    const { service, receiver } = await ready();
    const made = await service.createCheckoutSession(checkout());
    await submit(made.url ?? '', GOOD_CARD);
    const received = await receiver.until(2);
    const notices = received.map(({ body, headers }) =>
      service.verifyWebhook(body, String(headers['stripe-signature'])),
    );
    const { paymentIntentId } = await service.fetchCheckoutSession(made.id, ACCOUNT);
    const common = { account: ACCOUNT, paymentIntentId, metadata: { payment: 'p-1' } };
    expect(notices[0]).toMatchObject({ ...common, type: 'payment_intent.succeeded', checkoutId: null });
    expect(notices[1]).toMatchObject({
      ...common,
      type: 'checkout.session.completed',
      checkoutId: made.id,
      objectId: made.id,
    });
  });

  test('a refund names its payment', async () => {
    const { service, receiver } = await ready();
    const made = await service.createCheckoutSession(checkout());
    await submit(made.url ?? '', GOOD_CARD);
    const { paymentIntentId } = await service.fetchCheckoutSession(made.id, ACCOUNT);
    const refund = { account: ACCOUNT, paymentIntentId: paymentIntentId ?? '', idempotencyKey: 'refund' };
    await service.createRefund(refund);
    const received = await receiver.until(3);
    const last = received.find(({ event }) => event.type === 'charge.refunded');
    const signature = String(last?.headers['stripe-signature']);
    const notice = service.verifyWebhook(Buffer.from(last?.body ?? ''), signature);
    expect(notice).toMatchObject({ paymentIntentId, metadata: { payment: 'p-1' } });
  });

  test.each([
    ['none', null],
    ['rubbish', 't=1,v1=00'],
    ['empty', ''],
  ])('a signature that is %s is refused', async (_what, signature) => {
    const { service } = await ready();
    expect(() => service.verifyWebhook('{}', signature)).toThrow(PaymentServiceError);
  });

  test('one byte changed is refused', async () => {
    const { service } = await ready();
    const payload = JSON.stringify({ id: 'evt_1', type: 'x', data: { object: { id: 'cs_1' } } });
    const signature = new Stripe(SECRET_KEY).webhooks.generateTestHeaderString({
      payload,
      secret: WEBHOOK_SECRET,
    });
    expect(service.verifyWebhook(payload, signature).eventId).toBe('evt_1');
    expect(() => service.verifyWebhook(payload.replace('cs_1', 'cs_2'), signature)).toThrow(
      PaymentServiceError,
    );
  });
});
