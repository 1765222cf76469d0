/** Rounding a resistance up to a value that is made. */
import { atLeast } from '@/lib/engine/contract';
import { E_SERIES, type ESeries } from './tables/e-series';

/** mantissa * 10^exponent with one rounding: 47 * 10^-2 is 47 / 100, not 47 * 0.01. */
function scaled(mantissa: number, exponent: number): number {
  return exponent < 0 ? mantissa / 10 ** -exponent : mantissa * 10 ** exponent;
}

/**
 * Smallest preferred value not below `ohms`; equal within 1e-9 relative is equal.
 * @param ohms ohm, above zero
 * @returns ohm
 * Source: IEC 60063:2015.
 */
export function nextPreferred(ohms: number, series: ESeries): number {
  const decade = E_SERIES[series];
  const digits = Math.round(Math.log10(decade[0] ?? 10));
  // One decade below the rough logarithm: its last bits must not decide where the search starts.
  const from = Math.floor(Math.log10(ohms)) - digits - 1;
  for (let exponent = from; ; exponent++) {
    for (const mantissa of decade) {
      const value = scaled(mantissa, exponent);
      if (atLeast(value, ohms)) return value;
    }
  }
}
