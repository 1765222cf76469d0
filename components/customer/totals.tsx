import { customerMessage as message } from '@/lib/messages/quotes';
import type { QuoteContent, QuoteTotals } from '@/lib/quotes/schema/content';
import { totalRows } from '@/lib/quotes/schema/present';
import { Band, PriceRow } from './section';

export function Totals({
  content,
  totals,
  live = false,
}: {
  content: Pick<QuoteContent, 'terms' | 'settings'>;
  totals: QuoteTotals;
  /** Follows the reader's choices: changes are read out. */
  live?: boolean;
}) {
  return (
    <Band title={message('customer.price')}>
      <div aria-live={live ? 'polite' : undefined}>
        {totalRows(content, totals).map((row) => (
          <PriceRow
            key={row.key}
            amount={row.amount}
            strong={row.key === 'total'}
            second={row.key === 'deposit'}
          >
            {row.label}
          </PriceRow>
        ))}
      </div>
    </Band>
  );
}
