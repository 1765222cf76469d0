/** Circuits with a fault, and what a meter with its error shows on them: the fault finder has not made these. */
import { arrayAnalysis, type ArrayInput } from '@/lib/sizing/array-analysis';
import type { Quantity } from '@/lib/sizing/fault-finder-model';
import { tapeAnalysis } from '@/lib/sizing/tape-analysis';
import type { TapeInput } from '@/lib/sizing/tape-operating-point';
import type { Random } from './random';

export type Meter = (quantity: Quantity) => number;

/** Anywhere within 1 % of volts, 3 % of amps. */
export const withError =
  (meter: Meter, random: Random): Meter =>
  (quantity) =>
    meter(quantity) * (1 + random.between(-1, 1) * (quantity.quantity === 'volts' ? 0.01 : 0.03));

/** Reads a tape that has one source without resistance. */
export function tapeMeter(faulty: TapeInput): Meter {
  const { feeds, loadVolts } = tapeAnalysis(faulty);
  return ({ at, index, quantity }) => {
    const feed = faulty.feeds[index - 1];
    const amps = feeds[index - 1]?.amps ?? 0;
    if (at === 'cut') return loadVolts[index - 1] ?? 0;
    if (at === 'positive-conductor') return amps * (feed?.positiveOhms ?? 0);
    if (at === 'negative-conductor') return amps * (feed?.negativeOhms ?? 0);
    return quantity === 'amps' ? amps : (feed?.volts ?? 0);
  };
}

export function arrayMeter(faulty: ArrayInput): Meter {
  const { supplyAmps, supplyVolts, strings } = arrayAnalysis(faulty);
  return ({ at, index, quantity }) => {
    if (at === 'feed') return quantity === 'volts' ? supplyVolts : supplyAmps;
    const string = strings[index - 1];
    if (quantity === 'amps') return string?.amps ?? 0;
    return (string?.ledVolts ?? []).reduce((sum, volts) => sum + volts, 0);
  };
}

type Read =
  { at: Quantity['at']; index: number; volts: number } | { at: Quantity['at']; index: number; amps: number };

/** As the fault finder takes readings. */
export const readingOf = (meter: Meter, quantity: Quantity): Read => {
  const { at, index } = quantity;
  const read = meter(quantity);
  return quantity.quantity === 'volts' ? { at, index, volts: read } : { at, index, amps: read };
};

/** `feed 1 V` `cut 20 V` `feed 1 A`, as one writes on paper. */
export const quantityOf = (written: string): Quantity => {
  const [at, index, unit] = written.split(' ');
  return { at: at as Quantity['at'], index: Number(index), quantity: unit === 'A' ? 'amps' : 'volts' };
};
