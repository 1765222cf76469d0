/** The rows under a quote, as page, PDF and mail show them. */
import { customerMessage as message } from '@/lib/messages/quotes';
import { formatMoney } from '@/lib/units/money';
import type { QuoteContent, QuoteTotals } from './content';

export interface TotalRow {
  key: 'lines' | 'discount' | 'net' | 'tax' | 'total' | 'deposit';
  label: string;
  amount: string;
}

type Shown = Pick<QuoteContent, 'terms' | 'settings'>;

/** Amounts stand without a currency sign but for the total: they are read down a column. */
export function totalRows({ terms, settings }: Shown, totals: QuoteTotals): TotalRow[] {
  const plain = (minor: number) => formatMoney(minor, settings, { symbol: false });
  const rows: (TotalRow | false)[] = [
    totals.discountMinor > 0 && {
      key: 'lines',
      label: message('customer.total.lines'),
      amount: plain(totals.linesMinor),
    },
    totals.discountMinor > 0 && {
      key: 'discount',
      label: message('customer.total.discount', { pct: terms.discountPct }),
      amount: `− ${plain(totals.discountMinor)}`,
    },
    { key: 'net', label: message('customer.total.net'), amount: plain(totals.netMinor) },
    {
      key: 'tax',
      label: message('customer.total.tax', { tax: terms.taxName, pct: terms.taxRatePct }),
      amount: plain(totals.taxMinor),
    },
    {
      key: 'total',
      label: message('customer.total.total'),
      amount: formatMoney(totals.totalMinor, settings),
    },
    totals.depositMinor > 0 && {
      key: 'deposit',
      label: message('customer.total.deposit', { pct: terms.depositPct }),
      amount: plain(totals.depositMinor),
    },
  ];
  return rows.filter((row) => row !== false);
}
