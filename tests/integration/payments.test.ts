/** Deposit, card and hand payments, with the card stand-in and object store of the test run. */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { issueFinalInvoice, voidInvoice } from '@/lib/invoices/commands';
import { getInvoice, invoicesOfJob } from '@/lib/invoices/queries';
import { balanceOf } from '@/lib/invoices/schema';
import { getJob } from '@/lib/jobs/queries';
import { handleNotice, recordPayment, settle, settleReturn, startCheckout } from '@/lib/payments/commands';
import { closeDatabase, run, select, withShop } from '@/lib/platform/db';
import { type Checkout, paymentService, type PaymentNotice } from '@/lib/platform/stripe';
import { type AcceptedJob, acceptedJob } from '../support/accepted-job';
import { seeded, testSeed } from '../support/random';
import { makeShop, type TestShop } from '../support/shop';

let shop: TestShop;
let job: AcceptedJob;
beforeAll(async () => {
  shop = await makeShop();
  job = await acceptedJob(shop);
});
afterAll(closeDatabase);

const inShop = <T>(work: () => Promise<T>) => withShop(shop.shopId, work);
const invoices = (jobId = job.jobId) => inShop(() => invoicesOfJob(jobId));
const EMAIL = 'customer@example.com';

async function sessionOf(invoiceId: string) {
  const rows = await inShop(() =>
    select<{ id: string; checkout_id: string; amount_minor: string }>(
      'select id, checkout_id, amount_minor from payment_sessions where invoice_id = $1 order by created_at desc',
      [invoiceId],
    ),
  );
  return rows[0]!;
}

/** The service's object as paid, as it would be fetched. */
const paid = (
  session: { id: string; checkout_id: string; amount_minor: string },
  more: Partial<Checkout> = {},
): Checkout => ({
  id: session.checkout_id,
  state: 'paid',
  url: null,
  amountMinor: Number(session.amount_minor),
  currency: 'USD',
  paymentIntentId: `pi_${session.id}`,
  metadata: { paymentSessionId: session.id },
  expiresAt: new Date(),
  ...more,
});

describe('the deposit', () => {
  it('is an invoice, issued by the acceptance itself', async () => {
    const [deposit] = await invoices();
    expect(deposit).toMatchObject({
      purpose: 'deposit',
      number: '1001',
      amountMinor: String(job.depositMinor),
      voided: false,
    });
    expect((await inShop(() => getJob(job.jobId))).facts).toMatchObject({
      depositInvoiced: true,
      depositPaid: false,
    });
  });

  it('goes to the card page once, however often one presses', async () => {
    const [deposit] = await invoices();
    const press = () => startCheckout(shop.shopId, job.jobId, deposit!.id, EMAIL);
    const pages = [...(await Promise.all([press(), press(), press()])), await press()];
    expect(new Set(pages.map((page) => page.url)).size).toBe(1);
    const sessions = await inShop(() =>
      select('select id from payment_sessions where invoice_id = $1', [deposit!.id]),
    );
    expect(sessions).toHaveLength(1);
    const checkout = await paymentService().fetchCheckoutSession((await sessionOf(deposit!.id)).checkout_id);
    expect(checkout).toMatchObject({ state: 'open', amountMinor: job.depositMinor, currency: 'USD' });
    expect(await settleReturn((await sessionOf(deposit!.id)).id)).toMatchObject({ state: 'open' });
  });

  it('refuses another amount, currency or reference than its own', async () => {
    const [deposit] = await invoices();
    const session = await sessionOf(deposit!.id);
    const wrong = [{ amountMinor: 1 }, { currency: 'EUR' }, { metadata: { paymentSessionId: randomUUID() } }];
    for (const change of wrong)
      await expect(settle(shop.shopId, session.id, paid(session, change))).rejects.toMatchObject({
        code: 'conflict',
      });
    expect((await invoices())[0]?.receivedMinor).toBe('0');
  });

  it('is recorded once, whatever the order and number of notices', async () => {
    const [deposit] = await invoices();
    const session = await sessionOf(deposit!.id);
    const notice = (n: number): PaymentNotice => ({
      eventId: `evt_${session.id}_${n}`,
      type: 'checkout.session.completed',
      account: '',
      objectId: session.checkout_id,
      checkoutId: session.checkout_id,
      paymentIntentId: null,
      metadata: { paymentSessionId: session.id },
    });
    const seed = testSeed();
    console.log(`order of the notices: TEST_SEED=${seed}`);
    const deliveries = seeded(seed).shuffled(Array.from({ length: 20 }, (_, index) => notice(index % 4)));
    await Promise.all(deliveries.map((one) => settle(shop.shopId, session.id, paid(session), one)));
    // A late notice of an earlier state changes nothing.
    await settle(shop.shopId, session.id, paid(session, { state: 'open' }), notice(99));
    const [after] = await invoices();
    expect(after?.receivedMinor).toBe(String(job.depositMinor));
    const receipts = await inShop(() => select(`select id from outbox where kind = 'payment.receipt'`));
    expect(receipts).toHaveLength(1);
    expect((await inShop(() => getJob(job.jobId))).facts.depositPaid).toBe(true);
  });

  it('lets notices of strangers pass without a trace', async () => {
    const notice: PaymentNotice = {
      eventId: 'evt_x',
      type: 'checkout.session.completed',
      account: '',
      objectId: 'cs_unknown',
      checkoutId: 'cs_unknown',
      paymentIntentId: null,
      metadata: { paymentSessionId: randomUUID() },
    };
    await handleNotice(notice);
    expect(await inShop(() => select(`select id from payment_events where event_id = 'evt_x'`))).toEqual([]);
  });

  it('can not be paid twice', async () => {
    const [deposit] = await invoices();
    await expect(startCheckout(shop.shopId, job.jobId, deposit!.id, EMAIL)).rejects.toMatchObject({
      code: 'conflict',
    });
  });
});

describe('the final invoice', () => {
  it('asks for the accepted total less the deposit', async () => {
    const made = await issueFinalInvoice(shop.actors.office, {
      jobId: job.jobId,
      email: EMAIL,
      dueInDays: 14,
    });
    const invoice = await inShop(() => getInvoice(made.id));
    expect(Number(invoice.amountMinor)).toBe(job.totalMinor - job.depositMinor);
    await expect(
      issueFinalInvoice(shop.actors.office, { jobId: job.jobId, email: EMAIL, dueInDays: 14 }),
    ).rejects.toMatchObject({ code: 'conflict' });
  });

  it('is void with its number kept, and issued anew with the next', async () => {
    const [, final] = await invoices();
    await voidInvoice(shop.actors.owner, { invoiceId: final!.id, reason: 'Wrong address' });
    const again = await issueFinalInvoice(shop.actors.owner, {
      jobId: job.jobId,
      email: EMAIL,
      dueInDays: 7,
    });
    expect((await invoices()).map((one) => [one.number, one.voided])).toEqual([
      ['1001', false],
      ['1002', true],
      ['1003', false],
    ]);
    expect(again.number).toBe('1003');
  });

  it('takes payments by hand up to what is open', async () => {
    const final = (await invoices())[2]!;
    const pay = (amount: string) =>
      recordPayment(shop.actors.office, {
        invoiceId: final.id,
        method: 'cheque',
        amount,
        receivedOn: '2026-01-15',
        reference: '17',
      });
    await expect(pay('999,999,999.00')).rejects.toMatchObject({ issues: [{ path: 'amount' }] });
    await expect(pay('1.234')).rejects.toMatchObject({ issues: [{ path: 'amount' }] });
    await pay('10.00');
    const open = balanceOf(await inShop(() => getInvoice(final.id)));
    await pay(`${open / 100n}.${String(open % 100n).padStart(2, '0')}`);
    expect(balanceOf(await inShop(() => getInvoice(final.id)))).toBe(0n);
    expect((await inShop(() => getJob(job.jobId))).facts.finalPaid).toBe(true);
  });

  it('and every row of it stays as it was issued', async () => {
    for (const sql of [
      'update documents set amount_minor = 1 returning id',
      'delete from payments returning id',
      'truncate documents cascade',
    ])
      await expect(inShop(() => run(sql))).rejects.toThrow(/permission denied|append-only/);
  });
});

describe('invoice numbers', () => {
  it('have no gap and no double when several are issued at once', async () => {
    const other = await makeShop();
    const jobs: AcceptedJob[] = [];
    for (let i = 0; i < 5; i++) jobs.push(await acceptedJob(other));
    await Promise.all(
      jobs.map((one) =>
        issueFinalInvoice(other.actors.owner, { jobId: one.jobId, email: EMAIL, dueInDays: 7 }),
      ),
    );
    const rows = await withShop(other.shopId, () =>
      select<{ number: string }>(`select number from documents where kind = 'invoice' order by number`),
    );
    expect(rows.map((row) => Number(row.number))).toEqual(
      Array.from({ length: 10 }, (_, index) => 1001 + index),
    );
  });
});
