/** A supply's nominal volts and the window that it keeps, as volts with a tolerance or as lowest and highest. */
import * as z from 'zod/mini';
import { atMost, refuse } from '@/lib/engine/contract';
import { positive } from './inputs';

export const supplyWindow = z.strictObject({
  volts: z.optional(positive),
  tolerancePct: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.lt(100, 'must be below 100')),
  ),
  minVolts: z.optional(positive),
  maxVolts: z.optional(positive),
});

export interface SupplyWindow {
  volts: number;
  minVolts: number;
  maxVolts: number;
}

/**
 * `{volts, tolerancePct?}` (tolerance 0 unless given) or `{minVolts, maxVolts, volts?}` (the middle of the window
 * unless volts are given).
 * @returns volts V, minVolts V, maxVolts V
 * @throws {EngineError} `invalid-input` where neither is whole, both are given, or they contradict each other.
 */
export function supplyWindowOf(supply: z.infer<typeof supplyWindow>, path: string): SupplyWindow {
  const { volts, tolerancePct, minVolts, maxVolts } = supply;
  if (minVolts === undefined && maxVolts === undefined) {
    if (volts === undefined) return refuse(`${path}.volts`, 'is needed, or minVolts and maxVolts');
    const share = (tolerancePct ?? 0) / 100;
    return { volts, minVolts: volts * (1 - share), maxVolts: volts * (1 + share) };
  }
  if (minVolts === undefined) return refuse(`${path}.minVolts`, 'is needed beside maxVolts');
  if (maxVolts === undefined) return refuse(`${path}.maxVolts`, 'is needed beside minVolts');
  if (tolerancePct !== undefined) {
    return refuse(`${path}.tolerancePct`, 'is not given together with minVolts and maxVolts');
  }
  if (minVolts > maxVolts) return refuse(`${path}.minVolts`, 'must not be above maxVolts');
  if (volts === undefined) return { volts: (minVolts + maxVolts) / 2, minVolts, maxVolts };
  if (!atMost(minVolts, volts) || !atMost(volts, maxVolts)) {
    return refuse(`${path}.volts`, 'must lie between minVolts and maxVolts');
  }
  return { volts, minVolts, maxVolts };
}
