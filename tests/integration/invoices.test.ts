/** Invoices under concurrency, with open card pages, and as papers: number, text, PDF. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { command } from '@/lib/access/command';
import { freezeDocument } from '@/lib/documents/commands';
import { canonicalOf, eventsOf, pdfOf } from '@/lib/documents/queries';
import { issueDepositAgain, issueFinalInvoice, voidInvoice } from '@/lib/invoices/commands';
import { invoiceHandlers } from '@/lib/invoices/jobs';
import { getInvoice, invoicesOfJob } from '@/lib/invoices/queries';
import { balanceOf, type InvoiceContent } from '@/lib/invoices/schema';
import { setDepositRule } from '@/lib/jobs/commands';
import { getJob } from '@/lib/jobs/queries';
import { depositDone } from '@/lib/jobs/stage';
import { recordPayment, settle, startCheckout } from '@/lib/payments/commands';
import { paymentHandlers } from '@/lib/payments/jobs';
import { closeDatabase, run, select, withShop } from '@/lib/platform/db';
import { nextNumber } from '@/lib/platform/db/counter';
import { sha256 } from '@/lib/platform/http/hash';
import { getFile } from '@/lib/platform/storage';
import { paymentService } from '@/lib/platform/stripe';
import type { OutboxItem } from '@/lib/platform/queue/worker';
import { acceptedJob } from '../support/accepted-job';
import { arrived } from '../support/caught-mail';
import { makeShop, type TestShop } from '../support/shop';

const EMAIL = 'customer@example.com';
const handlers = new Map([...invoiceHandlers, ...paymentHandlers]);

let shop: TestShop;
beforeAll(async () => {
  shop = await makeShop();
});
afterAll(closeDatabase);

const inShop = <T>(work: () => Promise<T>, of = shop) => withShop(of.shopId, work);
const final = (jobId: string) =>
  issueFinalInvoice(shop.actors.office, { jobId, email: EMAIL, dueInDays: 14 });
const again = (jobId: string) => issueDepositAgain(shop.actors.office, { jobId, email: EMAIL, dueInDays: 7 });
const depositOf = async (jobId: string) => (await inShop(() => invoicesOfJob(jobId)))[0]!;
const done = (results: PromiseSettledResult<unknown>[]) =>
  results.filter((result) => result.status === 'fulfilled').length;

/** Does the worker's work for what was enqueued about one id. */
async function work(kind: string, id: string): Promise<void> {
  const items = await inShop(() =>
    select<Omit<OutboxItem, 'shopId'>>(
      `select id, kind, payload from outbox where kind = $1 and $2 in (payload ->> 'invoiceId', payload ->> 'documentId')`,
      [kind, id],
    ),
  );
  expect(items.length).toBeGreaterThan(0);
  for (const item of items) await handlers.get(kind)!({ ...item, shopId: shop.shopId });
}

const byHand = async (invoiceId: string, amount: string) =>
  recordPayment(shop.actors.office, {
    invoiceId,
    method: 'transfer',
    amount,
    receivedOn: '2026-01-15',
    reference: '',
  });

async function openPage(jobId: string, invoiceId: string): Promise<string> {
  await startCheckout(shop.shopId, jobId, invoiceId, EMAIL);
  const rows = await inShop(() =>
    select<{ id: string }>('select checkout_id as id from payment_sessions where invoice_id = $1', [
      invoiceId,
    ]),
  );
  return rows[0]!.id;
}

const stateOf = async (checkoutId: string) => (await paymentService().fetchCheckoutSession(checkoutId)).state;

describe('the sequence', () => {
  it('has no gap when fifty are issued at once and some of them fail after taking their number', async () => {
    const other = await makeShop();
    const { jobId } = await acceptedJob(other);
    const issueOne = (fails: boolean) =>
      command(other.actors.owner, async ({ audit }) => {
        const number = await nextNumber('invoice', 1000);
        const content = { purpose: 'final', number };
        const plain = { jobId, kind: 'invoice', revision: 1, title: '', createdBy: null } as const;
        const { id } = await freezeDocument({ ...plain, number, content, amountMinor: '1', currency: 'USD' });
        await audit('invoice.issued', { type: 'document', id });
        if (fails) throw new Error('fails after the number was taken');
      });
    const results = await Promise.allSettled(
      Array.from({ length: 60 }, (_, index) => issueOne(index % 6 === 5)),
    );
    expect(done(results)).toBe(50);
    const rows = await inShop(
      () => select<{ number: string }>(`select number from documents where kind = 'invoice'`),
      other,
    );
    const numbers = rows.map((row) => Number(row.number)).sort((a, b) => a - b);
    // The deposit of the one job has 1001.
    expect(numbers).toEqual(Array.from({ length: 51 }, (_, index) => 1001 + index));
  });

  it('holds one final invoice when it is sent from two tabs at once', async () => {
    const { jobId } = await acceptedJob(shop);
    expect(done(await Promise.allSettled([final(jobId), final(jobId), final(jobId)]))).toBe(1);
    const finals = (await inShop(() => invoicesOfJob(jobId))).filter((one) => one.purpose === 'final');
    expect(finals).toHaveLength(1);
  });
});

describe('what is open', () => {
  it('is received once, when the same payment is recorded in two tabs at once', async () => {
    const { jobId, depositMinor } = await acceptedJob(shop);
    const { id } = await depositOf(jobId);
    const amount = (depositMinor / 100).toFixed(2);
    expect(done(await Promise.allSettled([byHand(id, amount), byHand(id, amount)]))).toBe(1);
    expect(balanceOf(await inShop(() => getInvoice(id)))).toBe(0n);
  });

  it('can not be paid on a card page that was opened before the invoice was voided', async () => {
    const { jobId } = await acceptedJob(shop);
    const { id } = await depositOf(jobId);
    const page = await openPage(jobId, id);
    await voidInvoice(shop.actors.owner, { invoiceId: id, reason: 'Wrong customer' });
    await work('payment.close-pages', id);
    expect(await stateOf(page)).toBe('expired');
    await expect(startCheckout(shop.shopId, jobId, id, EMAIL)).rejects.toMatchObject({ code: 'conflict' });
    await expect(byHand(id, '1.00')).rejects.toMatchObject({ code: 'conflict' });
  });

  it('stays owed when its invoice is voided, until it is sent and paid anew or the rule is changed', async () => {
    const { jobId, depositMinor } = await acceptedJob(shop);
    const { id } = await depositOf(jobId);
    const stage = async () => {
      const { facts, steps } = await inShop(() => getJob(jobId));
      return { done: depositDone(facts), waits: steps.find(({ state }) => state === 'open')?.waitsFor };
    };
    await expect(again(jobId)).rejects.toMatchObject({ code: 'conflict' });
    await voidInvoice(shop.actors.owner, { invoiceId: id, reason: 'Wrong address' });
    expect(await stage()).toEqual({ done: false, waits: 'deposit-not-invoiced' });
    // Two presses in two tabs make one.
    expect(done(await Promise.allSettled([again(jobId), again(jobId)]))).toBe(1);
    const live = (await inShop(() => invoicesOfJob(jobId))).filter((invoice) => !invoice.voided);
    expect(live).toMatchObject([{ purpose: 'deposit', amountMinor: String(depositMinor) }]);
    expect(await stage()).toEqual({ done: false, waits: 'deposit-open' });
    await byHand(live[0]!.id, (depositMinor / 100).toFixed(2));
    expect((await stage()).done).toBe(true);

    const other = await acceptedJob(shop);
    await voidInvoice(shop.actors.owner, {
      invoiceId: (await depositOf(other.jobId)).id,
      reason: 'On terms now',
    });
    await setDepositRule(shop.actors.owner, { jobId: other.jobId, rule: 'terms' });
    expect(depositDone((await inShop(() => getJob(other.jobId))).facts)).toBe(true);
    await expect(again(other.jobId)).rejects.toMatchObject({ code: 'conflict' });
  });

  it('is recorded and told to the office when a card page settles after the void', async () => {
    const { jobId, depositMinor } = await acceptedJob(shop);
    const { id } = await depositOf(jobId);
    const page = await openPage(jobId, id);
    await voidInvoice(shop.actors.owner, { invoiceId: id, reason: 'Wrong customer' });
    // The card was charged in that very moment: the page that is to be closed says paid.
    const rows = await inShop(() =>
      select<{ id: string; amount: string }>(
        'select id, amount_minor::text as amount from payment_sessions where checkout_id = $1',
        [page],
      ),
    );
    const state = await settle(shop.shopId, rows[0]!.id, {
      id: page,
      state: 'paid',
      url: null,
      amountMinor: Number(rows[0]!.amount),
      currency: 'USD',
      paymentIntentId: `pi_${page}`,
      metadata: { paymentSessionId: rows[0]!.id },
      expiresAt: new Date(),
    });
    expect(state).toBe('paid');
    const invoice = await inShop(() => getInvoice(id));
    expect(invoice).toMatchObject({ voided: true, receivedMinor: String(depositMinor) });
    expect(balanceOf(invoice)).toBe(0n);
    const told = await inShop(() =>
      select<Omit<OutboxItem, 'shopId'>>(
        `select o.id, o.kind, o.payload from outbox o join payments p on p.id::text = o.payload ->> 'paymentId'
         where o.kind = 'payment.on-void' and p.invoice_id = $1`,
        [id],
      ),
    );
    expect(told).toHaveLength(1);
    await handlers.get('payment.on-void')!({ ...told[0]!, shopId: shop.shopId });
    const mail = await arrived(told[0]!.id);
    expect(mail.subject).toMatch(/which is void$/);
    expect(mail.to[0]?.address).toMatch(/^office-/);
    expect(mail.text).toContain('Give it back at your card service');
  });

  it('closes the card page of the whole when a part comes by hand; the next page asks for the rest', async () => {
    const { jobId, depositMinor } = await acceptedJob(shop);
    const { id } = await depositOf(jobId);
    const page = await openPage(jobId, id);
    await byHand(id, '10.00');
    await work('payment.close-pages', id);
    expect(await stateOf(page)).toBe('expired');
    await startCheckout(shop.shopId, jobId, id, EMAIL);
    const sessions = await inShop(() =>
      select<{ state: string; amount: string }>(
        'select state, amount_minor::text as amount from payment_sessions where invoice_id = $1 order by created_at',
        [id],
      ),
    );
    expect(sessions).toEqual([
      { state: 'expired', amount: String(depositMinor) },
      { state: 'open', amount: String(depositMinor - 1000) },
    ]);
  });

  it('above the ceiling of the shop is not taken by card', async () => {
    const { jobId } = await acceptedJob(shop);
    const { id } = await depositOf(jobId);
    await inShop(() =>
      run('update shops set card_ceiling_minor = 1 where id = $1 returning id', [shop.shopId]),
    );
    await expect(startCheckout(shop.shopId, jobId, id, EMAIL)).rejects.toThrow(/above what .* takes by card/);
    await inShop(() =>
      run('update shops set card_ceiling_minor = 99999999 where id = $1 returning id', [shop.shopId]),
    );
  });

  it('is nothing to another shop', async () => {
    const stranger = await makeShop();
    const { id } = await depositOf((await acceptedJob(shop)).jobId);
    await expect(
      voidInvoice(stranger.actors.owner, { invoiceId: id, reason: 'Not ours' }),
    ).rejects.toMatchObject({ code: 'not-found' });
    await expect(inShop(() => getInvoice(id), stranger)).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('the paper', () => {
  it('is made once after the number is known, and its hash is recorded on the frozen row', async () => {
    const { jobId } = await acceptedJob(shop);
    const { id, number, sha256: hash } = await depositOf(jobId);
    await work('invoice.issued', id);
    await work('invoice.issued', id);
    const events = (await inShop(() => eventsOf([id]))).get(id)!;
    expect(events.map((event) => event.kind)).toEqual(['sent', 'pdf']);
    const pdf = await inShop(() => pdfOf(id));
    const bytes = Buffer.from(await getFile(shop.shopId, pdf.sha256));
    expect(bytes.subarray(0, 5).toString()).toBe('%PDF-');
    expect(sha256(bytes)).toBe(pdf.sha256);
    const text = await inShop(() => canonicalOf(id));
    expect(sha256(text)).toBe(hash);
    expect(JSON.parse(text)).toMatchObject({ number, purpose: 'deposit' } satisfies Partial<InvoiceContent>);
  });

  it('of a final invoice after a deposit of the whole asks for nothing, and the job can be closed', async () => {
    await inShop(() => run('update shops set deposit_pct = 100 where id = $1 returning id', [shop.shopId]));
    const { jobId, totalMinor, depositMinor } = await acceptedJob(shop);
    expect(depositMinor).toBe(totalMinor);
    await byHand((await depositOf(jobId)).id, (totalMinor / 100).toFixed(2));
    const { id } = await final(jobId);
    expect(await inShop(() => getInvoice(id))).toMatchObject({ amountMinor: '0', purpose: 'final' });
    await work('invoice.issued', id);
    expect((await inShop(() => getJob(jobId))).facts).toMatchObject({ finalInvoiced: true, finalPaid: true });
  });
});
