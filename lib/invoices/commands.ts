/** Issuing and voiding invoices. A deposit is an invoice; numbers come from one counter row per shop. */
import { addDays, format } from 'date-fns';
import { type AnyActor, command, type CommandContext, systemActor } from '@/lib/access/command';
import { freezeDocument, recordDocumentEvent } from '@/lib/documents/commands';
import { refreshStage } from '@/lib/jobs/commands';
import { getJob, type JobWithSteps } from '@/lib/jobs/queries';
import { linkForContact } from '@/lib/links/commands';
import { message } from '@/lib/messages';
import { currentShopId, run, select } from '@/lib/platform/db';
import { nextNumber } from '@/lib/platform/db/counter';
import { AppError } from '@/lib/platform/http/errors';
import { enqueue } from '@/lib/platform/queue/outbox';
import type { Accepted } from '@/lib/quotes/schema/accepted';
import { contentOf } from '@/lib/quotes/queries';
import type { QuoteContent } from '@/lib/quotes/schema/content';
import { totalsOf } from '@/lib/quotes/schema/totals';
import { getShop, settingsOf } from '@/lib/shops/queries';
import { dayIn } from '@/lib/units';
import { invoicesOfJob, lockInvoice } from './queries';
import { type InvoiceContent, type IssueInput, type VoidInput } from './schema';

const DEPOSIT_DUE_DAYS = 7;

interface AcceptedQuote {
  documentId: string;
  choices: string[];
  at: Date;
}

async function acceptedQuote(jobId: string): Promise<AcceptedQuote> {
  const rows = await select<AcceptedQuote>(
    `select a.document_id as "documentId", a.choices, a.at from acceptances a
     join documents d on d.shop_id = a.shop_id and d.id = a.document_id where d.job_id = $1 limit 1`,
    [jobId],
  );
  if (!rows[0]) throw new AppError('conflict', 'No quote of this job has been accepted yet.');
  return rows[0];
}

const afterDays = (day: string, days: number) =>
  format(addDays(new Date(`${day}T12:00:00`), days), 'yyyy-MM-dd');

type Part = Pick<InvoiceContent, 'purpose' | 'rows' | 'taxMinor' | 'totalMinor'> & { dueInDays: number };

async function contentFor(
  job: JobWithSteps,
  number: string,
  accepted: AcceptedQuote,
  part: Part,
): Promise<InvoiceContent> {
  const shop = await getShop(currentShopId());
  const quote = await contentOf(accepted.documentId);
  // The currency is the accepted quote's, whatever the shop's settings say by now.
  const { currency } = quote.settings;
  const { locale, timeZone, paper } = settingsOf(shop);
  const issuedOn = dayIn(timeZone, new Date());
  const { dueInDays, ...figures } = part;
  return {
    schema: 'lampwright.invoice/1',
    number,
    title: job.title,
    issuedOn,
    dueOn: afterDays(issuedOn, dueInDays),
    shop: {
      name: shop.name,
      licenceNumber: shop.licenceNumber,
      email: shop.email,
      phone: shop.phone,
      address: shop.address,
    },
    customer: {
      name: quote.customer.name,
      contactName: quote.customer.contactName,
      address: quote.customer.address,
    },
    site: quote.site,
    quote: { number: quote.number, revision: quote.revision, acceptedOn: dayIn(timeZone, accepted.at) },
    settings: { currency, locale, timeZone, paper },
    taxName: quote.terms.taxName,
    ...figures,
  };
}

/**
 * Takes the number and freezes the invoice in one transaction: gapless. Its PDF holds the number, so it can only be
 * made afterwards; the worker makes it and records its hash as an event of the frozen row.
 */
async function freeze(
  job: JobWithSteps,
  email: string,
  createdBy: string | null,
  part: Part,
): Promise<{ id: string; number: string }> {
  const accepted = await acceptedQuote(job.id);
  const number = await nextNumber('invoice', 1000);
  const content = await contentFor(job, number, accepted, part);
  const { id } = await freezeDocument({
    jobId: job.id,
    kind: 'invoice',
    number,
    revision: 1,
    title: content.title,
    content,
    amountMinor: String(content.totalMinor),
    currency: content.settings.currency,
    dueOn: content.dueOn,
    createdBy,
  });
  // Accepted through the office by a customer without e-mail: the invoice stands all the same, and is handed over.
  const link = email ? await linkForContact(job.id, email) : null;
  if (link) await recordDocumentEvent(id, 'sent', { to: email, linkId: link.id }, createdBy);
  await enqueue('invoice.issued', { documentId: id, linkId: link?.id ?? '' });
  return { id, number };
}

function depositPart(quote: QuoteContent, depositMinor: number, dueInDays: number): Part {
  const text = message('invoice.row.deposit', {
    pct: quote.terms.depositPct,
    number: quote.number,
    revision: quote.revision,
  });
  const rows = [{ text, amountMinor: depositMinor }];
  return { purpose: 'deposit', dueInDays, taxMinor: 0, totalMinor: depositMinor, rows };
}

const issuedAudit = (
  audit: CommandContext['audit'],
  invoice: { id: string; number: string },
  purpose: InvoiceContent['purpose'],
) =>
  audit(
    'invoice.issued',
    { type: 'document', id: invoice.id },
    { after: { number: invoice.number, purpose } },
  );

/** Hook of an acceptance, in its transaction: the deposit is asked for at once, where the job's rule asks for one. */
export async function issueDepositInvoice(accepted: Accepted): Promise<void> {
  const job = await getJob(accepted.jobId);
  if (accepted.depositMinor <= 0 || job.depositRule !== 'percent') return;
  const quote = await contentOf(accepted.documentId);
  const email = await quotedTo(accepted.documentId, quote.customer.email);
  await command(systemActor(currentShopId(), 'acceptance'), async ({ audit }) => {
    const part = depositPart(quote, accepted.depositMinor, DEPOSIT_DUE_DAYS);
    await issuedAudit(audit, await freeze(job, email, null, part), 'deposit');
  });
}

/** The job under its lock, with its invoices that are not void: two presses in two tabs follow one another here. */
async function lockedJob(jobId: string) {
  await run('select id from jobs where id = $1 for update', [jobId]);
  const job = await getJob(jobId);
  return { job, invoices: (await invoicesOfJob(job.id)).filter((invoice) => !invoice.voided) };
}

/** The deposit once more, after its invoice was voided: a void takes back the paper, not what was agreed. */
export async function issueDepositAgain(
  actor: AnyActor,
  input: IssueInput,
): Promise<{ id: string; number: string }> {
  return command(actor, async ({ audit }) => {
    const { job, invoices } = await lockedJob(input.jobId);
    if (invoices.length > 0)
      throw new AppError(
        'conflict',
        'An invoice of this job is out already. Void it before you send another.',
      );
    const accepted = await acceptedQuote(job.id);
    const quote = await contentOf(accepted.documentId);
    const { depositMinor } = totalsOf(quote, accepted.choices);
    if (depositMinor <= 0 || job.depositRule !== 'percent')
      throw new AppError('conflict', 'No deposit was agreed for this job.');
    const part = depositPart(quote, depositMinor, input.dueInDays);
    const invoice = await freeze(job, input.email, actor.membershipId, part);
    await issuedAudit(audit, invoice, 'deposit');
    await refreshStage(job.id);
    return invoice;
  });
}

/** To whom the revision went: the deposit follows the quote. */
async function quotedTo(documentId: string, fallback: string): Promise<string> {
  const rows = await select<{ to: string | null }>(
    `select detail ->> 'to' as to from document_events where document_id = $1 and kind in ('sent', 'resent') order by at desc limit 1`,
    [documentId],
  );
  return rows[0]?.to ?? fallback;
}

/** The rest of the accepted total, once the work is signed off. */
export async function issueFinalInvoice(
  actor: AnyActor,
  input: IssueInput,
): Promise<{ id: string; number: string }> {
  return command(actor, async ({ audit }) => {
    const { job, invoices } = await lockedJob(input.jobId);
    if (invoices.some((invoice) => invoice.purpose === 'final'))
      throw new AppError('conflict', 'The final invoice is out already. Void it before you send another.');
    const accepted = await acceptedQuote(job.id);
    const quote = await contentOf(accepted.documentId);
    const totals = totalsOf(quote, accepted.choices);
    const earlier = invoices.map((invoice) => ({
      text: message('invoice.row.earlier', { number: invoice.number }),
      amountMinor: -Number(invoice.amountMinor),
    }));
    const totalMinor = totals.totalMinor + earlier.reduce((sum, row) => sum + row.amountMinor, 0);
    // A deposit of the whole leaves nothing to pay; the final invoice that says so still closes the account.
    if (totalMinor < 0)
      throw new AppError('conflict', 'More than the accepted total has been invoiced already.');
    const work = {
      text: message('invoice.row.work', { number: quote.number, revision: quote.revision }),
      amountMinor: totals.netMinor,
    };
    const tax = { text: quote.terms.taxName, amountMinor: totals.taxMinor };
    const invoice = await freeze(job, input.email, actor.membershipId, {
      purpose: 'final',
      dueInDays: input.dueInDays,
      taxMinor: totals.taxMinor,
      totalMinor,
      rows: [work, ...(totals.taxMinor > 0 ? [tax] : []), ...earlier],
    });
    await issuedAudit(audit, invoice, 'final');
    await refreshStage(job.id);
    return invoice;
  });
}

/** A void keeps its number: the sequence has no gap, and the row says what happened. */
export async function voidInvoice(actor: AnyActor, input: VoidInput): Promise<{ id: string }> {
  return command(actor, async ({ audit }) => {
    const invoice = await lockInvoice(input.invoiceId);
    if (invoice.voided) throw new AppError('conflict', 'This invoice is void already.');
    if (BigInt(invoice.receivedMinor) !== 0n)
      throw new AppError('conflict', 'Something was paid on this invoice: it can not be voided.');
    const onItsWay = await select(
      `select 1 from payment_sessions where invoice_id = $1 and state = 'pending'`,
      [invoice.id],
    );
    if (onItsWay.length > 0)
      throw new AppError('conflict', 'A payment for this invoice is on its way: it can not be voided.');
    await enqueue('payment.close-pages', { invoiceId: invoice.id });
    await recordDocumentEvent(invoice.id, 'voided', { reason: input.reason }, actor.membershipId);
    await audit(
      'invoice.voided',
      { type: 'document', id: invoice.id },
      { after: { number: invoice.number, reason: input.reason } },
    );
    await refreshStage(invoice.jobId);
    return { id: invoice.id };
  });
}
