/** A draft's figures by the engine's price-lines: pure. */
import { EngineError } from '@/lib/engine/contract';
import { invalid } from '@/lib/platform/http/errors';
import { priceLines } from '@/lib/pricing/figure';
import type { ShopSettings } from '@/lib/units/settings';
import type { QuoteTotals } from './schema/content';
import type { DraftLine, DraftTerms } from './schema/lines';

export interface DraftFigures {
  /** By line: direct cost, and what the customer is asked for it before the discount on the whole. */
  lines: Map<string, { costMinor: number; amountMinor: number }>;
  /** With the additions as the draft has them chosen. */
  totals: QuoteTotals;
  costMinor: number;
  marginPct: number | null;
}

type Money = Pick<ShopSettings, 'currency' | 'taxRounding'>;
type Rates = Pick<DraftTerms, 'depositPct' | 'discountPct' | 'overheadPct' | 'contingencyPct' | 'taxRatePct'>;

function engineLine(line: DraftLine) {
  return {
    id: line.id,
    quantity: line.quantity,
    unitCost: line.unitCost,
    unitLabourHours: line.unitLabourHours,
    labourRate: line.labourRate,
    markupPct: Number(line.markupPct),
    taxIds: line.taxable ? ['tax'] : [],
    optional: line.optional,
    chosen: line.optional ? line.chosen : true,
  };
}

/** Whole amounts of all lines, chosen or not, with nothing off: what stands beside each line. */
function amountsOf(terms: Rates, lines: readonly DraftLine[], money: Money) {
  const all = priceLines({
    currency: money.currency,
    taxRounding: money.taxRounding,
    lines: lines.map((line) => ({ ...engineLine(line), optional: false, chosen: true })),
    taxes: [{ id: 'tax', ratePct: Number(terms.taxRatePct) }],
    overheadPct: Number(terms.overheadPct),
    contingencyPct: Number(terms.contingencyPct),
  });
  return new Map(
    all.lines.map((line) => [line.id, { costMinor: line.costMinor, amountMinor: line.netMinor }]),
  );
}

function figuresOf(terms: Rates, lines: readonly DraftLine[], money: Money): DraftFigures {
  const priced = priceLines({
    currency: money.currency,
    taxRounding: money.taxRounding,
    lines: lines.map(engineLine),
    taxes: [{ id: 'tax', ratePct: Number(terms.taxRatePct) }],
    discountPct: Number(terms.discountPct),
    depositPct: Number(terms.depositPct),
    overheadPct: Number(terms.overheadPct),
    contingencyPct: Number(terms.contingencyPct),
  });
  const counted = lines.filter((line) => !line.optional || line.chosen);
  const costOf = new Map(priced.lines.map((line) => [line.id, line.costMinor]));
  return {
    lines: amountsOf(terms, lines, money),
    totals: {
      linesMinor: priced.netMinor + priced.discountMinor,
      discountMinor: priced.discountMinor,
      netMinor: priced.netMinor,
      taxMinor: priced.taxMinor.reduce((sum, tax) => sum + tax.minor, 0),
      totalMinor: priced.grossMinor,
      depositMinor: priced.depositMinor,
    },
    costMinor: counted.reduce((sum, line) => sum + (costOf.get(line.id) ?? 0), 0),
    marginPct: priced.marginPct,
  };
}

/** @throws {AppError} `invalid-input` where the amounts leave what can be written exactly. */
export function priceDraft(terms: Rates, lines: readonly DraftLine[], money: Money): DraftFigures {
  try {
    return figuresOf(terms, lines, money);
  } catch (error) {
    if (error instanceof EngineError)
      throw invalid('unitCost', 'With this the quote adds up to more than can be written exactly.');
    throw error;
  }
}
