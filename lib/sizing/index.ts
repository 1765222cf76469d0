/** The circuit calculations, in the order in which `engine -- list` names them. */
import type { Calculation } from '@/lib/engine/contract';
import { arrayAnalysisCalculation } from './array-analysis';
import { arraySpreadCalculation } from './array-spread';
import { branchCircuitCalculation } from './branch-circuit';
import { conductorResistanceCalculation } from './conductor-resistance';
import { conductorSizeCalculation } from './conductor-size';
import { currentSinkCalculation } from './current-sink';
import { dimmingBusCalculation } from './dimming-bus';
import { faultFinderCalculation } from './fault-finder';
import { ledFitCalculation } from './led-fit';
import { linearCurrentSourceCalculation } from './linear-current-source';
import { resistorArrayCalculation } from './resistor-array';
import { resistorCodeCalculation } from './resistor-code';
import { retrofitCheckCalculation } from './retrofit-check';
import { seriesStringCalculation } from './series-string';
import { tapeAnalysisCalculation } from './tape-analysis';
import { tapePlanCalculation } from './tape-plan';
import { voltageDropCalculation } from './voltage-drop';

export const sizingCalculations = [
  conductorResistanceCalculation,
  voltageDropCalculation,
  conductorSizeCalculation,
  resistorArrayCalculation,
  resistorCodeCalculation,
  arrayAnalysisCalculation,
  arraySpreadCalculation,
  linearCurrentSourceCalculation,
  seriesStringCalculation,
  currentSinkCalculation,
  tapeAnalysisCalculation,
  tapePlanCalculation,
  branchCircuitCalculation,
  dimmingBusCalculation,
  ledFitCalculation,
  faultFinderCalculation,
  retrofitCheckCalculation,
] as unknown as Calculation[];
