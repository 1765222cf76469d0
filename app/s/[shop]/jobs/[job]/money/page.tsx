import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { JobLine } from '@/components/job-line/job-line';
import { jobLineSteps } from '@/components/jobs/steps';
import { InvoiceCard } from '@/components/money/invoice-card';
import { IssueInvoiceForm } from '@/components/money/issue-invoice-form';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { isId, pageActor } from '@/lib/access/actor';
import { may } from '@/lib/access/policy';
import { moneyOfJob } from '@/lib/invoices/queries';
import { toAppError } from '@/lib/platform/http/errors';

export const metadata: Metadata = { title: 'Money' };

export default async function MoneyPage({ params }: { params: Promise<{ shop: string; job: string }> }) {
  const { shop, job: jobId } = await params;
  const actor = await pageActor(shop, 'price:see');
  if (!isId(jobId)) notFound();
  const money = await moneyOfJob(shop, jobId).catch((error: unknown) => {
    if (toAppError(error).code === 'not-found') notFound();
    throw error;
  });
  const { job, settings, invoices, payments, events, today } = money;
  const canIssue = may(actor, 'invoice:edit') && job.facts.accepted && !job.facts.finalInvoiced;
  const { depositAsked, depositInvoiced, finalInvoiced } = job.facts;
  const owesDeposit = depositAsked && !depositInvoiced && !finalInvoiced && job.depositRule === 'percent';
  return (
    <PageBody
      title={job.title}
      sub={`${job.customerName}, job ${job.number}, money`}
      actions={
        <ButtonLink look="secondary" href={`/s/${shop}/jobs/${jobId}`}>
          The job
        </ButtonLink>
      }
    >
      <Sheet>
        <JobLine steps={jobLineSteps(job.steps)} size="large" />
      </Sheet>
      {invoices.length === 0 ? (
        <Sheet title="Invoices">
          <EmptyState>
            {job.facts.accepted
              ? 'No invoice yet.'
              : 'No invoice yet. The deposit is asked for when the customer accepts the quote.'}
          </EmptyState>
        </Sheet>
      ) : (
        invoices.map((invoice) => (
          <InvoiceCard
            key={invoice.id}
            shopId={shop}
            invoice={invoice}
            payments={payments.filter((payment) => payment.invoiceId === invoice.id)}
            events={events.get(invoice.id) ?? []}
            settings={settings}
            today={today}
            may={{ record: may(actor, 'payment:record'), void: may(actor, 'payment:refund') }}
          />
        ))
      )}
      {may(actor, 'invoice:edit') && owesDeposit ? (
        <Sheet title="Deposit invoice">
          <IssueInvoiceForm kind="deposit" shopId={shop} jobId={jobId} email={job.customerEmail} />
        </Sheet>
      ) : null}
      {canIssue ? (
        <Sheet title="Final invoice">
          {job.facts.sheetsSignedOff ? null : (
            <p className="mb-4">The wiring sheet is not signed off yet. You can still invoice now.</p>
          )}
          <IssueInvoiceForm kind="final" shopId={shop} jobId={jobId} email={job.customerEmail} />
        </Sheet>
      ) : null}
    </PageBody>
  );
}
