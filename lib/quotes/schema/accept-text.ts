/**
 * The exact words a customer agrees to. The page fills the template as the reader chooses, the server fills it
 * again when they sign, and what was shown is kept with the acceptance.
 */
import { customerMessage as message } from '@/lib/messages/quotes';
import { formatMoney } from '@/lib/units/money';
import type { QuoteContent, QuoteTotals } from './content';

type Agreed = Pick<QuoteContent, 'number' | 'revision' | 'shop' | 'customer' | 'options' | 'settings'>;

/** What the acceptance says of the additions: each by its own words, in the quote's order. */
function additions(content: Agreed, choices: readonly string[]): string {
  if (content.options.length === 0) return '';
  const taken = content.options.filter((option) => choices.includes(option.id));
  return taken.length === 0
    ? message('customer.accept.no-additions')
    : message('customer.accept.additions', { list: taken.map((option) => option.text).join('; ') });
}

export function acceptText(
  content: Agreed,
  choices: readonly string[],
  totals: Pick<QuoteTotals, 'totalMinor' | 'depositMinor'>,
): string {
  const { settings } = content;
  const parts = [
    message('customer.accept.text', {
      shop: content.shop.name,
      number: content.number,
      revision: content.revision,
      total: formatMoney(totals.totalMinor, settings),
    }),
    additions(content, choices),
    totals.depositMinor > 0
      ? message('customer.accept.deposit', { deposit: formatMoney(totals.depositMinor, settings) })
      : '',
    message('customer.accept.read'),
  ];
  return parts.filter((part) => part !== '').join(' ');
}
