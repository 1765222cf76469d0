/** Steps of "how it was figured" that both bases share. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';

export const ampacityStep = (
  formula: string,
  inputs: WorkingInput[],
  value: number,
  basis: string,
): WorkingStep => ({
  key: 'conductor-ampacity',
  name: 'What the conductor may carry',
  formula,
  inputs,
  value,
  unit: 'A',
  basis,
});

/** @param given the breaker where it is not chosen here */
export const overcurrentStep = (
  neededAmps: number,
  given: number | undefined,
  value: number | null,
  basis: string,
): WorkingStep => ({
  key: 'overcurrent-rating',
  name: 'Rating of the overcurrent device',
  formula: given === undefined ? 'smallest standard rating not under the load' : 'as given',
  inputs: [{ name: 'load', value: neededAmps, unit: 'A' }],
  value,
  unit: 'A',
  basis,
});
