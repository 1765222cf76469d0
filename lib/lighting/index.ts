/** Light, energy and money over time, in the order in which `engine -- list` names them. */
import type { Calculation } from '@/lib/engine/contract';
import { energySavingCalculation } from './energy-saving';
import { lumenMaintenanceCalculation } from './lumen-maintenance';
import { lumenMethodCalculation } from './lumen-method';
import { paybackCalculation } from './payback';
import { photometricFileCalculation } from './photometric-file';
import { pointIlluminanceCalculation } from './point-illuminance';

export const lightingCalculations = [
  lumenMethodCalculation,
  photometricFileCalculation,
  pointIlluminanceCalculation,
  energySavingCalculation,
  paybackCalculation,
  lumenMaintenanceCalculation,
] as unknown as Calculation[];
