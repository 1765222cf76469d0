/** Standard ratings of overcurrent devices, and where a miniature circuit-breaker trips at once. */
import { atMost } from '@/lib/engine/contract';

/** NEC 2023 240.6(A), standard ampere ratings, read in a public copy. */
export const NEC_240_6 = [
  15, 20, 25, 30, 35, 40, 45, 50, 60, 70, 80, 90, 100, 110, 125, 150, 175, 200, 225, 250, 300, 350, 400, 450,
  500, 600, 700, 800, 1000, 1200, 1600, 2000, 2500, 3000, 4000, 5000, 6000,
] as const;

/** IEC 60898-1 preferred ratings, read in a summary. */
export const IEC_60898_RATINGS = [6, 10, 13, 16, 20, 25, 32, 40, 50, 63, 80, 100, 125] as const;

export const CURVES = ['B', 'C', 'D'] as const;
export type Curve = (typeof CURVES)[number];

/** Lowest multiple of the rating at which a curve may trip at once. IEC 60898-1 trip bands, read in a summary. */
export const INSTANT_TRIP: Readonly<Record<Curve, number>> = { B: 3, C: 5, D: 10 };

/** Multiple of the rating at which a curve is sure to trip at once. Same source. */
export const SURE_TRIP: Readonly<Record<Curve, number>> = { B: 5, C: 10, D: 20 };

export const standardRatings = (basis: 'us' | 'iec'): readonly number[] =>
  basis === 'us' ? NEC_240_6 : IEC_60898_RATINGS;

/** Smallest standard rating not under `amps` (equal within 1e-9 is equal); null where none is large enough. */
export function nextStandardRating(basis: 'us' | 'iec', amps: number): number | null {
  return standardRatings(basis).find((rating) => atMost(amps, rating)) ?? null;
}
