/**
 * price-lines a second time, by another road: fractions of whole numbers, nothing rounded but where the order of the
 * arithmetic says so. Slow and plain on purpose.
 */
import type { PriceLinesInput } from '@/lib/pricing/schema';

export interface Fraction {
  top: bigint;
  bottom: bigint;
}

export const fraction = (value: string | number): Fraction => {
  const [units = '0', decimals = ''] = String(value).split('.');
  return { top: BigInt(units + decimals), bottom: 10n ** BigInt(decimals.length) };
};
const times = (a: Fraction, b: Fraction): Fraction => ({ top: a.top * b.top, bottom: a.bottom * b.bottom });
const over = (a: Fraction, b: Fraction): Fraction => ({ top: a.top * b.bottom, bottom: a.bottom * b.top });
const plus = (a: Fraction, b: Fraction): Fraction => ({
  top: a.top * b.bottom + b.top * a.bottom,
  bottom: a.bottom * b.bottom,
});
const whole = (n: bigint): Fraction => ({ top: n, bottom: 1n });
const percent = (value: number | undefined) => over(fraction(value ?? 0), whole(100n));
const onePlus = (value: number | undefined) => plus(whole(1n), percent(value));

/** Half up; money here is never negative. */
const halfUp = ({ top, bottom }: Fraction): bigint => (2n * top + bottom) / (2n * bottom);
const sum = (parts: readonly bigint[]) => parts.reduce((a, b) => a + b, 0n);

function shares(total: bigint, weights: readonly bigint[]): bigint[] {
  const all = sum(weights);
  if (all === 0n) return weights.map((_, index) => (index === 0 ? total : 0n));
  const parts = weights.map((weight) => (total * weight) / all);
  const rests = weights.map((weight) => (total * weight) % all);
  for (let left = total - sum(parts); left > 0n; left--) {
    // The largest remainder that is still to be served; the earliest of equals.
    const at = rests.reduce((best, rest, index) => (rest > (rests[best] ?? -1n) ? index : best), 0);
    parts[at] = (parts[at] ?? 0n) + 1n;
    rests[at] = -1n;
  }
  return parts;
}

export interface ExactQuote {
  lines: { id: string; costMinor: number; netMinor: number }[];
  netMinor: number;
  discountMinor: number;
  taxMinor: { id: string; minor: number }[];
  grossMinor: number;
  depositMinor: number;
}

export function exactQuote(input: PriceLinesInput, digits: number): ExactQuote {
  const unit = whole(10n ** BigInt(digits));
  const lines = input.lines.filter((line) => line.chosen ?? !line.optional);
  const costs = lines.map((line) => {
    const labour = times(fraction(line.unitLabourHours ?? 0), fraction(line.labourRate ?? 0));
    const direct = times(fraction(line.quantity), plus(fraction(line.unitCost), labour));
    return times(times(direct, onePlus(input.overheadPct)), onePlus(input.contingencyPct));
  });
  let nets = lines.map((line, index) => {
    const cost = costs[index] ?? whole(0n);
    const price =
      line.marginPct === undefined
        ? times(cost, onePlus(line.markupPct))
        : over(cost, over(fraction(Number((100 - line.marginPct).toFixed(9))), whole(100n)));
    return halfUp(times(price, unit));
  });
  const missing = halfUp(times(fraction(input.minimumCharge ?? 0), unit)) - sum(nets);
  if (missing > 0n && nets.length > 0) {
    const parts = shares(missing, nets);
    nets = nets.map((net, index) => net + (parts[index] ?? 0n));
  }
  const discount = halfUp(times(whole(sum(nets)), percent(input.discountPct)));
  const off = shares(discount, nets);
  nets = nets.map((net, index) => net - (off[index] ?? 0n));
  const taxes = input.taxes.map(({ id, ratePct }) => {
    const taxed = nets.filter((_, index) => lines[index]?.taxIds.includes(id));
    const of = (net: bigint) => halfUp(times(whole(net), percent(ratePct)));
    return { id, minor: input.taxRounding === 'line' ? sum(taxed.map(of)) : of(sum(taxed)) };
  });
  const net = sum(nets);
  const gross = net + sum(taxes.map((tax) => tax.minor));
  const at = new Map(lines.map((line, index) => [line.id, index]));
  return {
    lines: input.lines.map(({ id }) => {
      const index = at.get(id);
      const [cost, own] = index === undefined ? [undefined, undefined] : [costs[index], nets[index]];
      return { id, costMinor: Number(cost ? halfUp(times(cost, unit)) : 0n), netMinor: Number(own ?? 0n) };
    }),
    netMinor: Number(net),
    discountMinor: Number(nets.length === 0 ? 0n : discount),
    taxMinor: taxes.map(({ id, minor }) => ({ id, minor: Number(minor) })),
    grossMinor: Number(gross),
    depositMinor: Number(halfUp(times(whole(gross), percent(input.depositPct)))),
  };
}
