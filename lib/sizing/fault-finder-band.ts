/** What a meter should say, and how far off it is. */
import { atLeast, atMost } from '@/lib/engine/contract';

/** A meter's error, % of the reading: common practice; a better meter only helps. */
export const METER_PCT = { volts: 1, amps: 3 } as const;

/** A supply is taken to be within 5 % of what it is marked with, unless its window is known: common practice. */
export const SUPPLY_PCT = 5;
/** Conductors are not colder than this when they are read. */
export const COLD_CELSIUS = 20;

export interface Band {
  low: number;
  high: number;
}

export type Verdict = 'in' | 'near' | 'out';

/**
 * Lowest to highest of what a circuit can give on the day, widened by the meter's error.
 * @param figures as drawn and at the ends of every tolerance, V or A
 * @param meterPct % of the reading
 */
export function bandOver(figures: readonly number[], meterPct: number): Band {
  const share = meterPct / 100;
  const [least, most] = [Math.min(...figures), Math.max(...figures)];
  return { low: least - share * Math.abs(least), high: most + share * Math.abs(most) };
}

/** Half a band more on either side. */
export function nearBand({ low, high }: Band): Band {
  const half = (high - low) / 2;
  return { low: low - half, high: high + half };
}

const within = ({ low, high }: Band, value: number) => atLeast(value, low) && atMost(value, high);

/** In the band, near it (within half a band more), or out of it. */
export function judge(band: Band, value: number): Verdict {
  if (within(band, value)) return 'in';
  return within(nearBand(band), value) ? 'near' : 'out';
}
