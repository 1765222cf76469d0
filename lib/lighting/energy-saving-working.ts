/** How an energy saving came about. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import type { Saving } from './energy-saving';

const UNIFORM_METHODS = 'NREL/SR-7A40-68558 (2017), ch. 2, from memory';
const BPA = 'HVAC Interactive Effects, Bonneville Power Administration, 2012, read in a copy';

const of = (name: string, value: number | null, unit = ''): WorkingInput => ({ name, value, unit });

function energySteps({ input, result, interactionFactor }: Saving): WorkingStep[] {
  const energy = 'sum of quantity * watts * hours * control factor / 1000';
  return [
    {
      key: 'energy-before',
      name: 'Energy before',
      formula: energy,
      inputs: [of('lines', input.existing.length), of('connected', result.connectedWattsBefore, 'W')],
      value: result.kilowattHoursBefore,
      unit: 'kWh',
      basis: UNIFORM_METHODS,
    },
    {
      key: 'energy-after',
      name: 'Energy after',
      formula: energy,
      inputs: [of('lines', input.proposed.length), of('connected', result.connectedWattsAfter, 'W')],
      value: result.kilowattHoursAfter,
      unit: 'kWh',
      basis: UNIFORM_METHODS,
    },
    {
      key: 'energy-net',
      name: 'Energy saved with heating and cooling',
      formula: '(before - after) * interaction factor',
      inputs: [
        of('before', result.kilowattHoursBefore, 'kWh'),
        of('after', result.kilowattHoursAfter, 'kWh'),
        of('interaction factor', interactionFactor),
      ],
      value: result.netKilowattHoursSaved,
      unit: 'kWh',
      basis: BPA,
    },
  ];
}

function moneySteps({ input, result, coincidence, demandMonths }: Saving): WorkingStep[] {
  return [
    {
      key: 'energy-demand-cost',
      name: 'Demand charge saved',
      formula: '(connected before - after) / 1000 * coincidence * rate * months',
      inputs: [
        of('connected before', result.connectedWattsBefore, 'W'),
        of('after', result.connectedWattsAfter, 'W'),
        of('coincidence', coincidence),
        of('rate', input.demandRate ?? 0, '/kW'),
        of('months', demandMonths),
      ],
      value: result.demandCostSaved,
      unit: '',
      basis: UNIFORM_METHODS,
    },
    {
      key: 'energy-fuel-cost',
      name: 'Heating fuel that takes the place of the lights’ heat',
      formula: 'lighting kWh saved * fuel penalty',
      inputs: [
        of('lighting kWh saved', result.kilowattHoursSaved, 'kWh'),
        of('fuel penalty', input.fuelPenaltyPerKilowattHour ?? 0, '/kWh'),
      ],
      value: result.fuelCostAdded,
      unit: '',
      basis: BPA,
    },
    {
      key: 'energy-cost',
      name: 'Money saved in a year',
      formula: 'net kWh * energy rate + demand charge saved - heating fuel',
      inputs: [
        of('net kWh', result.netKilowattHoursSaved, 'kWh'),
        of('energy rate', input.energyRate, '/kWh'),
        of('demand charge saved', result.demandCostSaved),
        of('heating fuel', result.fuelCostAdded),
      ],
      value: result.costSaved,
      unit: '',
      basis: UNIFORM_METHODS,
    },
    {
      key: 'energy-carbon',
      name: 'Carbon dioxide saved in a year',
      formula: 'net kWh * factor',
      inputs: [
        of('net kWh', result.netKilowattHoursSaved, 'kWh'),
        of('factor', input.kgCo2PerKilowattHour ?? null, 'kg/kWh'),
      ],
      value: result.kgCo2Saved,
      unit: 'kg',
      basis: 'the grid’s factor as given',
    },
  ];
}

export const workingOf = (saving: Saving): WorkingStep[] => [...energySteps(saving), ...moneySteps(saving)];
