/** How many drivers may start at once on one breaker, from what makers of driver and breaker say. */
import { floorWithin } from '@/lib/engine/contract';
import { type Curve, INSTANT_TRIP } from './tables/breakers';

export interface InrushFigures {
  /** The driver maker's count for the very breaker. */
  unitsPerBreaker?: number | undefined;
  /** The driver maker's count for a B16. */
  unitsPerB16?: number | undefined;
  /** Peak of one driver, A. */
  inrushAmps?: number | undefined;
  /** The breaker maker's factor for pulses of that length. */
  pulseFactor?: number | undefined;
}

/**
 * US: the maker's count for the breaker. IEC: that, or floor(unitsPerB16 * (In/16) * m/3) with m = 3 for B and 5 for C,
 * or floor(pulseFactor * m * In / inrushAmps). A D curve by the breaker maker's pulse factor alone, or by a count.
 * @param breaker rating A, and the curve where it is known
 * @returns null where no maker's figure tells
 * Source: IEC 60898-1 trip bands, read in a summary; makers' tables.
 */
export function unitsByInrush(
  basis: 'us' | 'iec',
  breaker: { amps: number; curve?: Curve | undefined },
  figures: InrushFigures,
): number | null {
  const { unitsPerBreaker, unitsPerB16, inrushAmps, pulseFactor } = figures;
  if (unitsPerBreaker !== undefined) return floorWithin(unitsPerBreaker);
  if (basis === 'us' || breaker.curve === undefined) return null;
  const multiple = INSTANT_TRIP[breaker.curve];
  if (unitsPerB16 !== undefined && breaker.curve !== 'D')
    return floorWithin((unitsPerB16 * breaker.amps * multiple) / (16 * 3));
  if (pulseFactor !== undefined && inrushAmps !== undefined)
    return floorWithin((pulseFactor * multiple * breaker.amps) / inrushAmps);
  return null;
}

export const INRUSH_BASIS = {
  us: 'datasheet (units per breaker)',
  iec: 'IEC 60898-1 trip bands, read in a summary, with the maker’s figures',
} as const;
