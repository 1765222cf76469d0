/** The price calculations. */
import type { Calculation } from '@/lib/engine/contract';

export const pricingCalculations: Calculation[] = [];
