/** Invoices with what was received for them. All must run inside `withShop`, but for those that say so. */
import { canonicalOf, eventsOf } from '@/lib/documents/queries';
import { getJob } from '@/lib/jobs/queries';
import { type LinkRow, linksOfJob } from '@/lib/links/queries';
import { run, select, withShop } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import { getShop, settingsOf } from '@/lib/shops/queries';
import { dayIn } from '@/lib/units';
import { balanceOf, type InvoiceContent, type InvoiceRow } from './schema';

const INVOICES = `
  select d.id, d.job_id as "jobId", d.number, d.title, d.canonical::jsonb ->> 'purpose' as purpose,
    d.amount_minor::text as "amountMinor", d.currency, d.due_on::text as "dueOn", d.sha256, d.created_at as "createdAt",
    coalesce((select sum(p.amount_minor) from payments p where p.shop_id = d.shop_id and p.invoice_id = d.id), 0)::text as "receivedMinor",
    exists (select 1 from document_events e where e.shop_id = d.shop_id and e.document_id = d.id and e.kind = 'voided') as voided,
    exists (select 1 from document_events e where e.shop_id = d.shop_id and e.document_id = d.id and e.kind = 'pdf') as "hasPdf"
  from documents d where d.kind = 'invoice'`;

export async function invoicesOfJob(jobId: string): Promise<InvoiceRow[]> {
  return select<InvoiceRow>(`${INVOICES} and d.job_id = $1 order by d.created_at, d.number`, [jobId]);
}

/** @throws {AppError} `not-found` */
export async function getInvoice(id: string): Promise<InvoiceRow> {
  const rows = await select<InvoiceRow>(`${INVOICES} and d.id = $1`, [id]);
  if (!rows[0]) throw notFound('This invoice');
  return rows[0];
}

/**
 * The invoice under its job's lock, for whatever asks what is open and then acts on it: paying, voiding, recording.
 * @throws {AppError} `not-found`
 */
export async function lockInvoice(id: string): Promise<InvoiceRow> {
  await run('select id from jobs where id = (select job_id from documents where id = $1) for update', [id]);
  return getInvoice(id);
}

/** The link that the invoice was mailed to, or another live one of its job. */
export async function linkOfInvoice(invoice: Pick<InvoiceRow, 'id' | 'jobId'>): Promise<LinkRow | null> {
  const sent = (await eventsOf([invoice.id])).get(invoice.id)?.find((event) => event.kind === 'sent');
  const live = (await linksOfJob(invoice.jobId)).filter((link) => link.revokedAt === null);
  return live.find((link) => link.id === sent?.detail['linkId']) ?? live[0] ?? null;
}

export async function invoiceContent(id: string): Promise<InvoiceContent> {
  await getInvoice(id);
  return JSON.parse(await canonicalOf(id)) as InvoiceContent;
}

export interface PaymentRow {
  id: string;
  invoiceId: string;
  method: string;
  amountMinor: string;
  currency: string;
  receivedOn: string;
  reference: string;
}

export async function paymentsOfJob(jobId: string): Promise<PaymentRow[]> {
  return select<PaymentRow>(
    `select p.id, p.invoice_id as "invoiceId", p.method, p.amount_minor::text as "amountMinor", p.currency,
       p.received_on::text as "receivedOn", p.reference
     from payments p join documents d on d.shop_id = p.shop_id and d.id = p.invoice_id
     where d.job_id = $1 order by p.at`,
    [jobId],
  );
}

/** The money page of a job: opens the shop itself. */
export async function moneyOfJob(shopId: string, jobId: string) {
  return withShop(shopId, async () => {
    const job = await getJob(jobId);
    const settings = settingsOf(await getShop(shopId));
    const invoices = await invoicesOfJob(jobId);
    const payments = await paymentsOfJob(jobId);
    const events = await eventsOf(invoices.map((invoice) => invoice.id));
    return { job, settings, invoices, payments, events, today: dayIn(settings.timeZone, new Date()) };
  });
}

/** An invoice for the customer of its job; null for one of another job. */
export async function customerInvoice(shopId: string, jobId: string, id: string) {
  return withShop(shopId, async () => {
    const invoice = (await invoicesOfJob(jobId)).find((one) => one.id === id);
    if (!invoice) return null;
    const balance = balanceOf(invoice);
    const shop = await getShop(shopId);
    return {
      invoice,
      content: await invoiceContent(id),
      balanceMinor: String(balance),
      overCeiling: balance > BigInt(shop.cardCeilingMinor),
    };
  });
}

/** What the customer owes and paid, for "where your job stands". */
export async function customerInvoices(shopId: string, jobId: string) {
  return withShop(shopId, async () =>
    (await invoicesOfJob(jobId))
      .filter((invoice) => !invoice.voided)
      .map((invoice) => ({
        id: invoice.id,
        number: invoice.number,
        purpose: invoice.purpose,
        amountMinor: invoice.amountMinor,
        paid: balanceOf(invoice) <= 0n,
      })),
  );
}

/** For the page that one comes back to from the card service: no amount, no name of the customer. */
export async function returnView(shopId: string, invoiceId: string) {
  return withShop(shopId, async () => {
    const invoice = await getInvoice(invoiceId);
    const link = await linkOfInvoice(invoice);
    return { number: invoice.number, shopName: (await getShop(shopId)).name, linkId: link?.id ?? null };
  });
}
