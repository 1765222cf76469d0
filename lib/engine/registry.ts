/** Every calculation by its name: the command line, the HTTP route and the screens look it up here. */
import type { Calculation } from './contract';
import { sizingCalculations } from '@/lib/sizing';
import { pricingCalculations } from '@/lib/pricing';

export const calculations: ReadonlyMap<string, Calculation> = new Map(
  [...sizingCalculations, ...pricingCalculations].map((calculation) => [calculation.name, calculation]),
);
