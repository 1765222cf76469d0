/** Every calculation by its name: the command line, the HTTP route and the screens look it up here. */
import type { Calculation } from './contract';
import { lightingCalculations } from '@/lib/lighting';
import { sizingCalculations } from '@/lib/sizing';
import { pricingCalculations } from '@/lib/pricing';

export const calculations: ReadonlyMap<string, Calculation> = new Map(
  [...sizingCalculations, ...lightingCalculations, ...pricingCalculations].map((calculation) => [
    calculation.name,
    calculation,
  ]),
);
