/** The circuit calculations, in the order in which `engine -- list` names them. */
import type { Calculation } from '@/lib/engine/contract';

export const sizingCalculations: Calculation[] = [];
