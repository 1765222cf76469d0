/** The webhook's route with notices as they come: signed, repeated, out of order, tampered with, of somebody else. */
import { randomUUID } from 'node:crypto';
import Stripe from 'stripe';
import { afterAll, afterEach, beforeAll, expect, it, vi } from 'vitest';
import { POST } from '@/app/api/v1/stripe/webhook/route';
import { invoicesOfJob } from '@/lib/invoices/queries';
import { settleReturn, startCheckout } from '@/lib/payments/commands';
import { closeDatabase, select, withShop } from '@/lib/platform/db';
import { paymentService } from '@/lib/platform/stripe';
import { type AcceptedJob, acceptedJob } from '../support/accepted-job';
import { makeShop, type TestShop } from '../support/shop';

const EMAIL = 'customer@example.com';
const CARD = {
  method: 'card',
  number: '4242 4242 4242 4242',
  expiry: '04 / 39',
  cvc: '123',
  name: 'A. Marsh',
};

let shop: TestShop;
let job: AcceptedJob;
let invoiceId: string;
let session: { id: string; checkoutId: string };

const inShop = <T>(work: () => Promise<T>) => withShop(shop.shopId, work);
const count = async (sql: string, bind: unknown[] = []) => (await inShop(() => select(sql, bind))).length;
const payments = () => count('select id from payments where invoice_id = $1', [invoiceId]);
const notices = () => count('select id from payment_events');
const receipts = () => count(`select id from outbox where kind = 'payment.receipt'`);

beforeAll(async () => {
  shop = await makeShop();
  job = await acceptedJob(shop);
  const [deposit] = await inShop(() => invoicesOfJob(job.jobId));
  invoiceId = deposit!.id;
  const { url } = await startCheckout(shop.shopId, job.jobId, invoiceId, EMAIL);
  const rows = await inShop(() =>
    select<{ id: string; checkoutId: string }>(
      'select id, checkout_id as "checkoutId" from payment_sessions where invoice_id = $1',
      [invoiceId],
    ),
  );
  session = rows[0]!;
  const paid = await fetch(url, { method: 'POST', body: new URLSearchParams(CARD), redirect: 'manual' });
  expect(paid.headers.get('location')).toBe(`${process.env.APP_URL}/pay/${session.id}`);
});
afterEach(() => vi.restoreAllMocks());
afterAll(closeDatabase);

interface Notice {
  id: string;
  type?: string;
  account?: string;
  checkoutId?: string;
}

function bodyOf({ id, type = 'checkout.session.completed', account, checkoutId }: Notice): string {
  const object = {
    id: checkoutId ?? session.checkoutId,
    object: 'checkout.session',
    metadata: { paymentSessionId: session.id },
  };
  return JSON.stringify({ id, object: 'event', type, ...(account ? { account } : {}), data: { object } });
}

const signed = (payload: string, secret = process.env.STRIPE_WEBHOOK_SECRET ?? '') =>
  Stripe.webhooks.generateTestHeaderString({ payload, secret });

const deliver = async (body: string, signature = signed(body)): Promise<number> => {
  const headers = { 'stripe-signature': signature };
  const request = new Request('http://127.0.0.1/api/v1/stripe/webhook', { method: 'POST', body, headers });
  return (await POST(request)).status;
};

it('refuses what was changed on the way, signed with another secret, or not signed', async () => {
  const body = bodyOf({ id: 'evt_tampered' });
  expect(await deliver(body.replace('evt_tampered', 'evt_other'), signed(body))).toBe(400);
  expect(await deliver(body, signed(body, 'whsec_of_somebody_else'))).toBe(400);
  expect(await deliver(body, '')).toBe(400);
  expect([await payments(), await notices()]).toEqual([0, 0]);
});

it('asks for the notice again when the card service can not be asked', async () => {
  vi.spyOn(paymentService(), 'fetchCheckoutSession').mockRejectedValueOnce(new Error('away'));
  expect(await deliver(bodyOf({ id: 'evt_early' }))).toBe(500);
  expect([await payments(), await notices()]).toEqual([0, 0]);
});

it('takes no word of another account, nor of another session that bears our reference', async () => {
  const fetched = await paymentService().fetchCheckoutSession(session.checkoutId);
  expect(fetched.state).toBe('paid');
  const service = vi.spyOn(paymentService(), 'fetchCheckoutSession').mockResolvedValue(fetched);
  expect(await deliver(bodyOf({ id: 'evt_a', account: 'acct_other', checkoutId: 'cs_other' }))).toBe(500);
  service.mockResolvedValue({ ...fetched, id: 'cs_other' });
  expect(await deliver(bodyOf({ id: 'evt_b', checkoutId: 'cs_other' }))).toBe(500);
  expect([await payments(), await notices()]).toEqual([0, 0]);
});

it('records one payment and one receipt from twenty deliveries of four notices in any order', async () => {
  const types = ['completed', 'async_payment_succeeded', 'expired', 'completed'];
  const tag = randomUUID();
  const four = types.map((type, n) => bodyOf({ id: `evt_${tag}_${n}`, type: `checkout.session.${type}` }));
  // A fixed shuffle: 7 and 20 share no factor.
  const deliveries = Array.from({ length: 20 }, (_, n) => four[((n * 7) % 20) % 4]!);
  const statuses = await Promise.all(deliveries.map((body) => deliver(body)));
  expect(new Set(statuses)).toEqual(new Set([200]));
  expect([await payments(), await notices(), await receipts()]).toEqual([1, 4, 1]);
  const [deposit] = await inShop(() => invoicesOfJob(job.jobId));
  expect(deposit).toMatchObject({ receivedMinor: String(job.depositMinor) });
});

it('writes nothing more for a notice that it knows, nor for coming back once more', async () => {
  const before = await count('select id from audit_events');
  const known = await inShop(() =>
    select<{ id: string }>('select event_id as id from payment_events limit 1'),
  );
  expect(await deliver(bodyOf({ id: known[0]!.id }))).toBe(200);
  expect(await settleReturn(session.id)).toMatchObject({ state: 'paid', invoiceId });
  expect(await count('select id from audit_events')).toBe(before);
});

it('stays paid when an older answer of the service is written late', async () => {
  const fetched = await paymentService().fetchCheckoutSession(session.checkoutId);
  vi.spyOn(paymentService(), 'fetchCheckoutSession').mockResolvedValue({ ...fetched, state: 'expired' });
  expect(await deliver(bodyOf({ id: `evt_${randomUUID()}` }))).toBe(200);
  expect(await settleReturn(session.id)).toMatchObject({ state: 'paid' });
  expect(await payments()).toBe(1);
});
