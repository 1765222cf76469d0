/** The price calculations. */
import type { Calculation } from '@/lib/engine/contract';
import { priceLinesCalculation } from './price-lines';

export { priceLines } from './price-lines';

export const pricingCalculations = [priceLinesCalculation] as unknown as Calculation[];
