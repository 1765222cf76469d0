/**
 * 22. The price of a quote's lines, without the schema: a customer's page figures with this and loads nothing else.
 */
import type { Decimal } from 'decimal.js';
import { EngineError, refuse } from '@/lib/engine/contract';
import { minorDigits } from './currencies';
import { decimalOf, Exact, spread, toMinor } from './money';
import type { PriceLine, PriceLinesInput } from './schema';

export interface PricedLine {
  id: string;
  /** Loaded cost: direct cost with overhead and contingency. */
  costMinor: number;
  /** After this line's share of minimum charge and discount. */
  netMinor: number;
}

export interface PriceLinesResult {
  lines: PricedLine[];
  netMinor: number;
  discountMinor: number;
  taxMinor: { id: string; minor: number }[];
  grossMinor: number;
  depositMinor: number;
  /** (net - cost) / net, in percent; null where net is zero. */
  marginPct: number | null;
}

const ZERO = new Exact(0);
const sumOf = (parts: readonly Decimal[]) => parts.reduce((a, b) => a.plus(b), ZERO);
const ratio = (percent: number | undefined) => new Exact(percent ?? 0).div(100);

/** A line that is not chosen counts in nothing: an option must be chosen, a base line may be left out. */
const counts = (line: PriceLine) => line.chosen ?? !(line.optional ?? false);

function checkReferences(input: PriceLinesInput): void {
  const taxes = new Set(input.taxes.map((tax) => tax.id));
  if (taxes.size !== input.taxes.length) refuse('taxes', 'two taxes have the same id');
  const seen = new Set<string>();
  input.lines.forEach((line, index) => {
    if (seen.has(line.id)) refuse(`lines.${index}.id`, 'another line has this id');
    seen.add(line.id);
    if ((line.markupPct === undefined) === (line.marginPct === undefined))
      refuse(`lines.${index}.markupPct`, 'give either markupPct or marginPct, not both');
    line.taxIds.forEach((tax, at) => {
      if (!taxes.has(tax)) refuse(`lines.${index}.taxIds.${at}`, 'is not the id of a tax');
      if (line.taxIds.indexOf(tax) !== at) refuse(`lines.${index}.taxIds.${at}`, 'stands twice');
    });
  });
}

/** Direct cost -> + overhead -> + contingency of both: what the line costs the shop, in currency units. */
function loadedCost(line: PriceLine, input: PriceLinesInput): Decimal {
  const labour = decimalOf(line.unitLabourHours).times(decimalOf(line.labourRate));
  const direct = decimalOf(line.quantity).times(decimalOf(line.unitCost).plus(labour));
  return direct.times(ratio(input.overheadPct).plus(1)).times(ratio(input.contingencyPct).plus(1));
}

function sellingPrice(line: PriceLine, cost: Decimal): Decimal {
  if (line.marginPct !== undefined) return cost.div(new Exact(1).minus(ratio(line.marginPct)));
  return cost.times(ratio(line.markupPct).plus(1));
}

export interface Counted {
  line: PriceLine;
  cost: Decimal;
  net: Decimal;
}

function afterMinimum(nets: Decimal[], input: PriceLinesInput, digits: number): Decimal[] {
  const missing = toMinor(decimalOf(input.minimumCharge), digits).minus(sumOf(nets));
  if (missing.lte(0)) return nets;
  const shares = spread(missing, nets);
  return nets.map((net, index) => net.plus(shares[index] ?? ZERO));
}

function taxOf(rate: number, lines: readonly Counted[], rounding: PriceLinesInput['taxRounding']): Decimal {
  const round = (amount: Decimal) => amount.toDecimalPlaces(0, Exact.ROUND_HALF_UP);
  if (rounding === 'line') return sumOf(lines.map(({ net }) => round(net.times(ratio(rate)))));
  return round(sumOf(lines.map(({ net }) => net)).times(ratio(rate)));
}

export function safe(amount: Decimal): number {
  if (amount.abs().gt(Number.MAX_SAFE_INTEGER))
    throw new EngineError('no-solution', 'The amounts are larger than can be written exactly.', [
      { path: 'lines', message: 'add up to more than can be written exactly' },
    ]);
  return amount.toNumber();
}

export interface Figures {
  counted: Counted[];
  discount: Decimal;
  net: Decimal;
  taxes: { id: string; amount: Decimal }[];
  gross: Decimal;
  cost: Decimal;
}

export function figure(input: PriceLinesInput): Figures {
  checkReferences(input);
  const digits = minorDigits(input.currency) ?? 2;
  const lines = input.lines.filter(counts);
  const costs = lines.map((line) => loadedCost(line, input));
  const rounded = lines.map((line, index) => toMinor(sellingPrice(line, costs[index] ?? ZERO), digits));
  const nets = afterMinimum(rounded, input, digits);
  const discount = sumOf(nets).times(ratio(input.discountPct)).toDecimalPlaces(0, Exact.ROUND_HALF_UP);
  const shares = spread(discount, nets);
  const counted = lines.map((line, index) => ({
    line,
    cost: toMinor(costs[index] ?? ZERO, digits),
    net: (nets[index] ?? ZERO).minus(shares[index] ?? ZERO),
  }));
  const net = sumOf(counted.map((one) => one.net));
  const taxes = input.taxes.map((tax) => ({
    id: tax.id,
    amount: taxOf(
      tax.ratePct,
      counted.filter(({ line }) => line.taxIds.includes(tax.id)),
      input.taxRounding,
    ),
  }));
  return {
    counted,
    discount,
    net,
    taxes,
    gross: net.plus(sumOf(taxes.map((tax) => tax.amount))),
    cost: sumOf(counted.map((one) => one.cost)),
  };
}

export function resultOf(input: PriceLinesInput, figures: Figures): PriceLinesResult {
  const byId = new Map(figures.counted.map((one) => [one.line.id, one]));
  const deposit = figures.gross.times(ratio(input.depositPct)).toDecimalPlaces(0, Exact.ROUND_HALF_UP);
  return {
    lines: input.lines.map(({ id }) => ({
      id,
      costMinor: safe(byId.get(id)?.cost ?? ZERO),
      netMinor: safe(byId.get(id)?.net ?? ZERO),
    })),
    netMinor: safe(figures.net),
    discountMinor: safe(figures.discount),
    taxMinor: figures.taxes.map((tax) => ({ id: tax.id, minor: safe(tax.amount) })),
    grossMinor: safe(figures.gross),
    depositMinor: safe(deposit),
    marginPct: figures.net.isZero()
      ? null
      : figures.net.minus(figures.cost).div(figures.net).times(100).toNumber(),
  };
}

/**
 * Prices a quote: direct cost (materials, labour hours x rate) -> + overhead % -> + contingency % of both ->
 * x (1 + markup) or / (1 - margin), rounded half-up per line -> minimum charge (what is missing is spread over the
 * lines) -> discount, spread by largest remainder -> tax, rounded per line or per document -> deposit on gross.
 * @param input unit money in currency units as decimal strings or numbers
 * @returns integer minor units; the parts add up to the totals to the last unit
 * @throws {EngineError} `invalid-input` with the path, `no-solution` past exact integers
 * Source: common practice of estimating; rounding per line or per document as HMRC VAT Notice 700, 17.5 allows.
 */
export function priceLines(input: PriceLinesInput): PriceLinesResult {
  return resultOf(input, figure(input));
}
