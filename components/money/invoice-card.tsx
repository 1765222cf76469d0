import { KeyFigure, Notice, Sheet } from '@/components/ui/sheet';
import { balanceOf, type InvoiceRow, invoiceState } from '@/lib/invoices/schema';
import { formatDate, formatMoney } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import type { EventRow } from '@/lib/documents/schema';
import { InvoiceEvents } from './invoice-events';
import { RecordPayment } from './record-payment';
import { VoidInvoice } from './void-invoice';

interface Payment {
  id: string;
  method: string;
  amountMinor: string;
  receivedOn: string;
  reference: string;
}

const METHODS: Record<string, string> = {
  card: 'Card',
  'bank-debit': 'Bank debit',
  cheque: 'Cheque',
  cash: 'Cash',
  transfer: 'Transfer',
};

export function InvoiceCard({
  shopId,
  invoice,
  payments,
  events,
  settings,
  today,
  may,
}: {
  shopId: string;
  invoice: InvoiceRow;
  payments: Payment[];
  events: EventRow[];
  settings: ShopSettings;
  today: string;
  may: { record: boolean; void: boolean };
}) {
  const state = invoiceState(invoice, today);
  const balance = balanceOf(invoice);
  const money = (minor: string | bigint) => formatMoney(minor, settings, { symbol: false });
  return (
    <Sheet
      title={`${invoice.purpose === 'deposit' ? 'Deposit' : 'Final'} invoice ${invoice.number}`}
      aside={
        <strong className={state === 'overdue' ? 'text-danger' : undefined}>
          {state === 'paid' ? '✓ paid' : state}
        </strong>
      }
    >
      <p className="text-ink-2">
        Of {formatDate(invoice.createdAt, settings)}, due {formatDate(invoice.dueOn, settings)}.{' '}
        {invoice.hasPdf ? (
          <a
            href={`/api/v1/shops/${shopId}/documents/${invoice.id}/pdf`}
            className="inline-flex min-h-touch items-center underline"
          >
            PDF
          </a>
        ) : (
          'The PDF is being made.'
        )}
      </p>
      <dl className="mt-2 max-w-md">
        <KeyFigure label="Asked" value={money(invoice.amountMinor)} unit={invoice.currency} />
        {payments.map((payment) => (
          <KeyFigure
            key={payment.id}
            label={`${METHODS[payment.method] ?? payment.method}, ${formatDate(payment.receivedOn, settings)}${payment.reference ? `, ${payment.reference}` : ''}`}
            value={money(payment.amountMinor)}
          />
        ))}
        <KeyFigure
          label="Still open"
          value={money(balance)}
          unit={invoice.currency}
          tone={state === 'overdue' ? 'danger' : undefined}
        />
      </dl>
      <InvoiceEvents events={events} settings={settings} />
      {invoice.voided && payments.length > 0 ? (
        <Notice
          kind="danger"
          word="Void, and paid"
          title="Money came for this invoice after it was voided."
          role="status"
        >
          Give it back at your card service, or agree with the customer what it pays for.
        </Notice>
      ) : null}
      {invoice.voided ? null : (
        <div className="mt-4 flex flex-col gap-3">
          {may.record && balance > 0n ? (
            <RecordPayment
              shopId={shopId}
              invoiceId={invoice.id}
              number={invoice.number}
              today={today}
              open={money(balance)}
            />
          ) : null}
          {may.void && payments.length === 0 ? (
            <VoidInvoice shopId={shopId} invoiceId={invoice.id} number={invoice.number} />
          ) : null}
        </div>
      )}
    </Sheet>
  );
}
