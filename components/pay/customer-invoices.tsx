import { Band, PriceRow } from '@/components/customer/section';
import { message } from '@/lib/messages';
import { formatMoney } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

interface Invoice {
  id: string;
  number: string;
  purpose: 'deposit' | 'final';
  amountMinor: string;
  paid: boolean;
}

/** What is asked for, above everything else, once a quote has been accepted. */
export function CustomerInvoices({
  base,
  invoices,
  settings,
}: {
  base: string;
  invoices: Invoice[];
  settings: Pick<ShopSettings, 'currency' | 'locale'>;
}) {
  if (invoices.length === 0) return null;
  return (
    <Band title={message('invoice.heading')}>
      {invoices.map((invoice) => (
        <PriceRow key={invoice.id} amount={formatMoney(invoice.amountMinor, settings)}>
          <a
            href={`${base}/invoices/${invoice.id}`}
            className="inline-flex min-h-touch items-center font-bold underline"
          >
            {message(invoice.purpose === 'deposit' ? 'invoice.deposit' : 'invoice.final', {
              number: invoice.number,
            })}
          </a>
          {invoice.paid ? ' ✓' : ''}
        </PriceRow>
      ))}
    </Band>
  );
}
