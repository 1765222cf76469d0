/** What a quote costs with the customer's choices: the engine's price-lines over amounts that are frozen. */
import { priceLines } from '@/lib/pricing/figure';
import { minorToDecimal } from '@/lib/units/money';
import type { ContentLine, QuoteContent, QuoteTotals } from './content';

type Priced = Pick<QuoteContent, 'lines' | 'options' | 'terms' | 'settings'>;

function engineLine(line: ContentLine, currency: string) {
  return {
    id: line.id,
    quantity: 1,
    unitCost: minorToDecimal(line.amountMinor, currency),
    markupPct: 0,
    taxIds: line.taxable ? ['tax'] : [],
  };
}

/**
 * Runs in the browser while the customer chooses, and on the server when they sign.
 * @param choices ids of the additions taken; ids of no addition are ignored here and refused where they arrive.
 */
export function totalsOf(content: Priced, choices: readonly string[]): QuoteTotals {
  const { currency, taxRounding } = content.settings;
  const taken = content.options.filter((option) => choices.includes(option.id));
  const lines = [...content.lines, ...taken];
  const priced = priceLines({
    currency,
    taxRounding,
    lines: lines.map((line) => engineLine(line, currency)),
    taxes: [{ id: 'tax', ratePct: Number(content.terms.taxRatePct) }],
    discountPct: Number(content.terms.discountPct),
    depositPct: Number(content.terms.depositPct),
  });
  return {
    linesMinor: lines.reduce((sum, line) => sum + line.amountMinor, 0),
    discountMinor: priced.discountMinor,
    netMinor: priced.netMinor,
    taxMinor: priced.taxMinor.reduce((sum, tax) => sum + tax.minor, 0),
    totalMinor: priced.grossMinor,
    depositMinor: priced.depositMinor,
  };
}
