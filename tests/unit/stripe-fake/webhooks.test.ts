/** Notices of the card stand-in: signed, repeated, out of order, late. */
import Stripe from 'stripe';
import { describe, expect, test, vi } from 'vitest';
import {
  ACCOUNT,
  control,
  GOOD_CARD,
  sdk,
  sessionParams,
  startFake,
  startReceiver,
  submit,
  WEBHOOK_SECRET,
} from './support/fake';

async function ready(options: Stripe.RequestOptions = {}) {
  const receiver = await startReceiver();
  const fake = await startFake({ webhookUrl: receiver.url });
  const stripe = sdk(fake.url);
  const session = await stripe.checkout.sessions.create(sessionParams(), options);
  return { receiver, fake, stripe, id: session.id, url: session.url ?? '' };
}

const PAID = ['payment_intent.succeeded', 'checkout.session.completed'];

interface Listed {
  events: { id: string; type: string; waiting: boolean; attempts: { status: number }[] }[];
}

test('a payment sends both notices, signed so that the SDK accepts them', async () => {
  const { receiver, stripe, id, url } = await ready();
  await submit(url, GOOD_CARD);
  const received = await receiver.until(2);
  expect(receiver.types()).toEqual(PAID);
  for (const { body, headers } of received) {
    const signature = String(headers['stripe-signature']);
    expect(signature).toMatch(/^t=\d+,v1=[0-9a-f]{64}$/);
    const event = stripe.webhooks.constructEvent(body, signature, WEBHOOK_SECRET);
    expect(event.api_version).toBe('2026-10-28.endive');
  }
  expect(received[1]?.event.data.object).toMatchObject({ id, status: 'complete', payment_status: 'paid' });
});

test('a changed body, another secret, an old or missing signature are refused', async () => {
  const { receiver, stripe, url } = await ready();
  await submit(url, GOOD_CARD);
  const [first] = await receiver.until(1);
  const body = first?.body ?? '';
  const signature = String(first?.headers['stripe-signature']);
  const verify = (text: string, header: string, secret = WEBHOOK_SECRET) =>
    stripe.webhooks.constructEvent(text, header, secret);
  const { StripeSignatureVerificationError } = Stripe.errors;
  expect(verify(body, signature).type).toBe('payment_intent.succeeded');
  expect(() => verify(body.replace('123456', '123457'), signature)).toThrow(StripeSignatureVerificationError);
  expect(() => verify(body, signature, 'whsec_another')).toThrow(StripeSignatureVerificationError);
  expect(() => verify(body, '')).toThrow(StripeSignatureVerificationError);
  const old = { payload: body, secret: WEBHOOK_SECRET, timestamp: Math.floor(Date.now() / 1_000) - 301 };
  expect(() => verify(body, stripe.webhooks.generateTestHeaderString(old))).toThrow(/tolerance/);
});

test('notices of a connected account name it, and are fetched by it alone', async () => {
  const { receiver, stripe, url } = await ready({ stripeAccount: ACCOUNT });
  await submit(url, GOOD_CARD);
  const [first] = await receiver.until(2);
  const event = first?.event as Stripe.Event;
  expect(event.account).toBe(ACCOUNT);
  expect((await stripe.events.retrieve(event.id, {}, { stripeAccount: ACCOUNT })).data).toEqual(event.data);
  await expect(stripe.events.retrieve(event.id)).rejects.toThrow('No such event');
});

describe('what else is told', () => {
  test('a refusal, with the reason', async () => {
    const { receiver, url } = await ready();
    await submit(url, { ...GOOD_CARD, number: '4000000000000002' });
    const [notice] = await receiver.until(1);
    expect(receiver.types()).toEqual(['payment_intent.payment_failed']);
    expect(notice?.event.data.object).toMatchObject({
      last_payment_error: { decline_code: 'generic_decline' },
    });
  });

  test('an expired session, asked for by the request that did it', async () => {
    const { receiver, stripe, id } = await ready();
    await stripe.checkout.sessions.expire(id);
    const [notice] = await receiver.until(1);
    expect(notice?.event.type).toBe('checkout.session.expired');
    expect(notice?.event.request?.id).toMatch(/^req_/);
  });

  test('a refund, with what is refunded so far', async () => {
    const { receiver, stripe, id, url } = await ready();
    await submit(url, GOOD_CARD);
    const { payment_intent } = await stripe.checkout.sessions.retrieve(id);
    await stripe.refunds.create({ payment_intent: payment_intent as string, amount: 1_000 });
    const notices = await receiver.until(3);
    // No order is promised between one action and the next.
    const refunded = notices.find(({ event }) => event.type === 'charge.refunded');
    expect(refunded?.event.data.object).toMatchObject({
      amount_refunded: 1_000,
      refunded: false,
      payment_intent,
    });
  });

  test.each([
    ['succeeded', ['payment_intent.succeeded', 'checkout.session.async_payment_succeeded']],
    ['failed', ['payment_intent.payment_failed', 'checkout.session.async_payment_failed']],
  ])('a bank debit that %s, long after the session', async (outcome, types) => {
    const receiver = await startReceiver();
    const fake = await startFake({ webhookUrl: receiver.url });
    const params = sessionParams({ allowed_payment_method_types: ['us_bank_account'] });
    const session = await sdk(fake.url).checkout.sessions.create(params);
    const bank = { routing: '110000000', account: '000123456789', name: 'Ada Holder' };
    await submit(session.url ?? '', bank);
    const [done] = await receiver.until(1);
    expect(done?.event.data.object).toMatchObject({ status: 'complete', payment_status: 'unpaid' });
    await control(fake.url, 'settle', { sessionId: session.id, outcome });
    await receiver.until(3);
    expect(receiver.types().slice(1)).toEqual(types);
  });
});

describe('delivery on demand', () => {
  test('repeated, each with the same event id', async () => {
    const { receiver, fake, url } = await ready();
    await control(fake.url, 'webhooks', { repeat: 3 });
    await submit(url, GOOD_CARD);
    const received = await receiver.until(6);
    expect(receiver.types()).toEqual([...PAID, ...PAID, ...PAID]);
    expect(new Set(received.map(({ event }) => event.id)).size).toBe(2);
  });

  test('turned round', async () => {
    const { receiver, fake, url } = await ready();
    await control(fake.url, 'webhooks', { shuffle: true });
    await submit(url, GOOD_CARD);
    await receiver.until(2);
    expect(receiver.types()).toEqual(PAID.toReversed());
  });

  test('held back until released, over several actions', async () => {
    const { receiver, fake, stripe, url } = await ready();
    await control(fake.url, 'webhooks', { hold: true, shuffle: true });
    const other = await stripe.checkout.sessions.create(sessionParams());
    await stripe.checkout.sessions.expire(other.id);
    await submit(url, GOOD_CARD);
    const { events } = await control<Listed>(fake.url, 'events');
    expect(events.every(({ waiting, attempts }) => waiting && attempts.length === 0)).toBe(true);
    expect(receiver.received).toHaveLength(0);
    expect(await control(fake.url, 'release', {})).toEqual({ released: 3 });
    await receiver.until(3);
    expect(receiver.types()).toEqual([...PAID.toReversed(), 'checkout.session.expired']);
  });

  test('delayed', async () => {
    const { receiver, fake, url } = await ready();
    await control(fake.url, 'webhooks', { delayMs: 150 });
    const before = Date.now();
    await submit(url, GOOD_CARD);
    await receiver.until(2);
    expect(Date.now() - before).toBeGreaterThanOrEqual(145);
  });

  test('what is not accepted comes again until it is, freshly signed', async () => {
    const { receiver, fake, stripe, id } = await ready();
    receiver.status = 500;
    await stripe.checkout.sessions.expire(id);
    await receiver.until(3);
    receiver.status = 204;
    await vi.waitFor(async () => {
      const { events } = await control<Listed>(fake.url, 'events');
      expect(events[0]?.waiting).toBe(false);
      expect(events[0]?.attempts.at(-1)?.status).toBe(204);
    });
    const ids = receiver.received.map(({ event }) => event.id);
    expect(new Set(ids).size).toBe(1);
  });

  test('a redirect is no acceptance', async () => {
    const { receiver, stripe, id } = await ready();
    receiver.status = 302;
    await stripe.checkout.sessions.expire(id);
    expect((await receiver.until(2)).length).toBeGreaterThanOrEqual(2);
    receiver.status = 200;
  });

  test('sent again by id', async () => {
    const { receiver, fake, stripe, id } = await ready();
    await stripe.checkout.sessions.expire(id);
    const [first] = await receiver.until(1);
    expect(await control(fake.url, 'resend', { eventId: first?.event.id })).toEqual({ status: 200 });
    expect(receiver.received[1]?.body).toBe(first?.body);
  });

  test('a form of a page in the browser can not turn the knobs', async () => {
    const { fake } = await ready();
    const answer = await fetch(`${fake.url}/_control/down`, { method: 'POST', body: '{"on":true}' });
    expect(answer.status).toBe(415);
  });
});
