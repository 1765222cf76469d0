/** 22. The price of a quote's lines: the calculation with its findings and working. */
import { defineCalculation, type Finding, type Outcome, type WorkingStep } from '@/lib/engine/contract';
import { type Figures, figure, type PriceLinesResult, resultOf, safe } from './figure';
import { type PriceLinesInput, priceLinesSchema } from './schema';

export { priceLines, type PricedLine, type PriceLinesResult } from './figure';

const BASIS = 'common practice; largest remainder for shares; half-up rounding';

function findingsOf(figures: Figures): Finding[] {
  if (figures.counted.length === 0 || figures.net.gte(figures.cost)) return [];
  return [
    {
      code: 'priced-below-cost',
      severity: 'caution',
      hard: false,
      message: 'The price before tax is below what the work costs the shop.',
      values: { netMinor: safe(figures.net), costMinor: safe(figures.cost) },
      basis: 'common practice',
    },
  ];
}

function working(input: PriceLinesInput, result: PriceLinesResult): WorkingStep[] {
  const step = (
    key: string,
    name: string,
    formula: string,
    inputs: [string, number, string][],
    value: number | null,
    unit: string,
  ) => ({
    key,
    name,
    formula,
    inputs: inputs.map(([label, v, u]) => ({ name: label, value: v, unit: u })),
    value,
    unit,
    basis: BASIS,
  });
  const cost = result.lines.reduce((sum, line) => sum + line.costMinor, 0);
  const tax = result.taxMinor.reduce((sum, one) => sum + one.minor, 0);
  return [
    step(
      'price-net',
      'Before tax',
      'net = sum of lines - discount',
      [
        ['sum of lines', result.netMinor + result.discountMinor, 'minor'],
        ['discount', result.discountMinor, 'minor'],
      ],
      result.netMinor,
      'minor',
    ),
    step(
      'price-gross',
      'Total',
      'gross = net + tax',
      [
        ['net', result.netMinor, 'minor'],
        ['tax', tax, 'minor'],
      ],
      result.grossMinor,
      'minor',
    ),
    step(
      'price-deposit',
      'Deposit',
      'deposit = gross * %',
      [
        ['gross', result.grossMinor, 'minor'],
        ['%', input.depositPct ?? 0, '%'],
      ],
      result.depositMinor,
      'minor',
    ),
    step(
      'price-margin',
      'Margin',
      'margin = (net - cost) / net * 100',
      [
        ['net', result.netMinor, 'minor'],
        ['cost', cost, 'minor'],
      ],
      result.marginPct,
      '%',
    ),
  ];
}

export const priceLinesCalculation = defineCalculation({
  name: 'price-lines',
  summary: 'Price of a quote: cost, markup or margin, discount, tax, deposit, to the last minor unit',
  bench: false,
  schema: priceLinesSchema,
  calculate: (input): Outcome<PriceLinesResult> => {
    const figures = figure(input);
    const result = resultOf(input, figures);
    return { result, findings: findingsOf(figures), working: working(input, result) };
  },
});
