/** Light, energy and money over time, in the order in which `engine -- list` names them. */
import type { Calculation } from '@/lib/engine/contract';
import { photometricFileCalculation } from './photometric-file';

export const lightingCalculations = [photometricFileCalculation] as unknown as Calculation[];
