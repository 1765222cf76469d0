/** Present value of yearly flows, and the rate at which they are worth nothing. */

/** Flows of year 0, 1, 2 and so on at their year's end, worth today at `rate` (a fraction a year). */
export function netPresentValue(rate: number, flows: readonly number[]): number {
  const factor = 1 / (1 + rate);
  return flows.reduceRight((worth, flow) => worth * factor + flow, 0);
}

/** How often the flows turn from money out to money in or back. */
export function changesOfSign(flows: readonly number[]): number {
  const signs = flows.filter((flow) => flow !== 0).map(Math.sign);
  return signs.filter((sign, k) => k > 0 && sign !== signs[k - 1]).length;
}

/** ln of the discount factor: e^690 is as far as a double goes. */
const FARTHEST = 690;
/** Each step halves 1,380; after 64 nothing is left to halve. */
const STEPS = 64;
/** Flows that add up to this share of themselves add up to nothing. */
const NOTHING = 1e-12;

/**
 * Internal rate as a fraction a year. With one change of sign there is exactly one (Descartes), above -100 %; it is
 * searched by halving on the logarithm of the discount factor, so that near 0 and near -100 % no digits are lost.
 * @returns null without exactly one change of sign from money out to money in
 */
export function internalRate(flows: readonly number[]): number | null {
  if (changesOfSign(flows) !== 1 || (flows.find((flow) => flow !== 0) ?? 0) > 0) return null;
  const total = flows.reduce((sum, flow) => sum + flow, 0);
  const size = flows.reduce((sum, flow) => sum + Math.abs(flow), 0);
  if (Math.abs(total) <= NOTHING * size) return 0;
  // Horner's rule, from the last year back: the last flows are money in, so an overflow keeps the right sign.
  const worth = (u: number) => flows.reduceRight((sum, flow) => sum * Math.exp(u) + flow, 0);
  let [low, high] = [-FARTHEST, FARTHEST];
  if (!(worth(low) < 0) || !(worth(high) > 0)) return null;
  for (let step = 0; step < STEPS; step++) {
    const middle = (low + high) / 2;
    if (worth(middle) > 0) high = middle;
    else low = middle;
  }
  return Math.expm1(-(low + high) / 2);
}
