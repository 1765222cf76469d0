/** Decimal arithmetic of money: exact, half-up, and shares that add up to the last unit. */
import { Decimal } from 'decimal.js';

/** Room for numeric(18,6) quantities times rates times percents without a rounding on the way. */
export const Exact = Decimal.clone({ precision: 60, rounding: Decimal.ROUND_HALF_UP });

export const decimalOf = (value: string | number | undefined) => new Exact(value ?? 0);

/**
 * Rounds an amount in currency units to whole minor units, half away from zero.
 * @param digits of the minor unit: 0, 2 or 3
 */
export function toMinor(amount: Decimal, digits: number): Decimal {
  return amount.times(new Exact(10).pow(digits)).toDecimalPlaces(0, Decimal.ROUND_HALF_UP);
}

/**
 * Splits a whole number of minor units over weights so that the parts add up to it exactly: each gets the floor
 * of its share, and what is left goes one by one to the largest remainders, the earlier line first on a tie.
 * Where all weights are zero nothing distinguishes the lines and the first takes it all.
 * Source: largest remainder (Hamilton's) method of apportionment.
 */
export function spread(total: Decimal, weights: readonly Decimal[]): Decimal[] {
  const sum = weights.reduce((a, b) => a.plus(b), new Exact(0));
  if (weights.length === 0) return [];
  if (sum.isZero()) return weights.map((_, index) => (index === 0 ? total : new Exact(0)));
  // Whole quotients and remainders, not fractions: a third is a tie with a third, whatever stands before the point.
  const products = weights.map((weight) => total.times(weight));
  const parts = products.map((product) => product.divToInt(sum));
  const left = total.minus(parts.reduce((a, b) => a.plus(b), new Exact(0))).toNumber();
  const order = products
    .map((product, index) => ({ index, rest: product.mod(sum) }))
    .sort((a, b) => b.rest.cmp(a.rest) || a.index - b.index);
  for (const { index } of order.slice(0, left)) parts[index] = (parts[index] ?? new Exact(0)).plus(1);
  return parts;
}
