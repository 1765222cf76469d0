/** The circuit calculations, in the order in which `engine -- list` names them. */
import type { Calculation } from '@/lib/engine/contract';
import { arrayAnalysisCalculation } from './array-analysis';
import { conductorResistanceCalculation } from './conductor-resistance';
import { resistorArrayCalculation } from './resistor-array';
import { voltageDropCalculation } from './voltage-drop';

export const sizingCalculations = [
  conductorResistanceCalculation,
  voltageDropCalculation,
  resistorArrayCalculation,
  arrayAnalysisCalculation,
] as unknown as Calculation[];
