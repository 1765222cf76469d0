/** How series strings were figured: the module hot and cold, and the window of each driver that is used. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import type { Case, SeriesString } from './series-string';
import type { DriverWindow } from './series-string-window';

const DATASHEET = 'datasheet';
const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});

function moduleSteps({ input, ofModule }: Case): WorkingStep[] {
  const { forwardVoltsMin, forwardVoltsMax, voltsPerKelvin = 0 } = input.module;
  const slope = given('c', voltsPerKelvin, 'V/K');
  return [
    {
      key: 'module-hot-volts',
      name: 'Lowest volts of a module, hot',
      formula: 'VfMin + c * (ambientMax + rise - 25)',
      inputs: [
        given('VfMin', forwardVoltsMin, 'V'),
        slope,
        given('ambientMax', input.ambientMaxCelsius, 'C'),
        given('rise', input.riseCelsius ?? 0, 'K'),
      ],
      value: ofModule.hotVolts,
      unit: 'V',
      basis: DATASHEET,
    },
    {
      key: 'module-cold-volts',
      name: 'Highest volts of a module, at a cold start',
      formula: 'VfMax + c * (ambientMin - 25)',
      inputs: [
        given('VfMax', forwardVoltsMax, 'V'),
        slope,
        given('ambientMin', input.ambientMinCelsius, 'C'),
      ],
      value: ofModule.coldVolts,
      unit: 'V',
      basis: DATASHEET,
    },
  ];
}

function windowSteps({ input, ofModule }: Case, window: DriverWindow): WorkingStep[] {
  const driver = given('driver', window.sku, '');
  const drop = given('dU', window.feederDropVolts, 'V');
  const steps: WorkingStep[] = [
    {
      key: 'string-fewest',
      name: 'Fewest modules of a string, hot',
      formula: 'minVolts / hot, rounded up',
      inputs: [driver, given('minVolts', window.minVolts, 'V'), given('hot', ofModule.hotVolts, 'V')],
      value: window.fewest,
      unit: '',
      basis: DATASHEET,
    },
    {
      key: 'string-most',
      name: 'Most modules of a string, at a cold start',
      formula: '(maxVolts - dU) / cold, rounded down',
      inputs: [driver, given('maxVolts', window.maxVolts, 'V'), drop, given('cold', ofModule.coldVolts, 'V')],
      value: window.most,
      unit: '',
      basis: DATASHEET,
    },
    {
      key: 'driver-limit-watts',
      name: 'Watts that the driver may be loaded with',
      formula: 'load fraction * maxWatts',
      inputs: [
        driver,
        given('load fraction', input.loadFraction, ''),
        given('maxWatts', window.maxWatts, 'W'),
      ],
      value: window.limitWatts,
      unit: 'W',
      basis: 'common practice',
    },
  ];
  if (!input.feeder) return steps;
  return [
    {
      key: 'string-feeder-drop',
      name: 'Drop in the feeder of a string',
      formula: 'dU = 2 * I * L * R',
      inputs: [
        driver,
        given('I', window.amps, 'A'),
        given('L', input.feeder.metres, 'm'),
        given('size', input.feeder.size, ''),
      ],
      value: window.feederDropVolts,
      unit: 'V',
      basis: "Ohm's law",
    },
    ...steps,
  ];
}

/** Windows of the drivers in the plan; of all that were offered where there is none. */
export function workingOf(c: Case, result: SeriesString): WorkingStep[] {
  const used = new Set(c.plan?.map(({ window }) => window));
  const shown = c.plan === null ? c.windows : [...used];
  return [
    ...moduleSteps(c),
    ...shown.flatMap((window) => windowSteps(c, window)),
    {
      key: 'plan-cost',
      name: 'Cost of the drivers, the least there is',
      formula: 'sum of the costs of the drivers',
      inputs: result.purchase.map(({ sku, cost }) => given(sku, cost, '')),
      value: result.cost,
      unit: '',
      basis: 'dynamic programming over the number of modules',
    },
  ];
}
