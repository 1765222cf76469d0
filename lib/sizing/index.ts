/** The circuit calculations, in the order in which `engine -- list` names them. */
import type { Calculation } from '@/lib/engine/contract';
import { arrayAnalysisCalculation } from './array-analysis';
import { arraySpreadCalculation } from './array-spread';
import { branchCircuitCalculation } from './branch-circuit';
import { conductorResistanceCalculation } from './conductor-resistance';
import { conductorSizeCalculation } from './conductor-size';
import { linearCurrentSourceCalculation } from './linear-current-source';
import { resistorArrayCalculation } from './resistor-array';
import { retrofitCheckCalculation } from './retrofit-check';
import { tapeAnalysisCalculation } from './tape-analysis';
import { voltageDropCalculation } from './voltage-drop';

export const sizingCalculations = [
  conductorResistanceCalculation,
  voltageDropCalculation,
  conductorSizeCalculation,
  resistorArrayCalculation,
  arrayAnalysisCalculation,
  arraySpreadCalculation,
  linearCurrentSourceCalculation,
  tapeAnalysisCalculation,
  branchCircuitCalculation,
  retrofitCheckCalculation,
] as unknown as Calculation[];
