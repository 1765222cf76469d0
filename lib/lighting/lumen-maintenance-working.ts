/** How a lumen maintenance projection came about. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import type { Projection } from './lumen-maintenance';
import type { Fit } from './lumen-maintenance-fit';

const TM_21 = 'IES TM-21-11 with Addendum B, read in copies';

const of = (name: string, value: number | null, unit = ''): WorkingInput => ({ name, value, unit });

const fitSteps = (fit: Fit): WorkingStep[] => {
  const inputs = [
    of('readings', fit.used.length),
    of('from', fit.used[0]?.hours ?? null, 'h'),
    of('to', fit.used.at(-1)?.hours ?? null, 'h'),
  ];
  return [
    {
      key: 'maintenance-alpha',
      name: 'Decay per hour',
      formula: 'slope of -ln(maintenance) over hours, least squares',
      inputs,
      value: fit.alpha,
      unit: '1/h',
      basis: TM_21,
    },
    {
      key: 'maintenance-b',
      name: 'Light at the start of the curve',
      formula: 'exp(ln(maintenance) of the line at 0 h)',
      inputs,
      value: fit.b,
      unit: '',
      basis: TM_21,
    },
  ];
};

function betweenSteps({ curve, input }: Projection): WorkingStep[] {
  const { between } = curve;
  if (!between) return [];
  const [cold, hot] = curve.fits;
  const alphas = [
    of('alpha cooler', cold?.alpha ?? null, '1/h'),
    of('alpha hotter', hot?.alpha ?? null, '1/h'),
  ];
  return [
    {
      key: 'maintenance-activation',
      name: 'Activation energy over Boltzmann’s constant',
      formula: 'ln(alpha hotter / alpha cooler) / (1/T cooler - 1/T hotter)',
      inputs: [
        ...alphas,
        of('T cooler', between.lowerCelsius + 273.15, 'K'),
        of('T hotter', between.upperCelsius + 273.15, 'K'),
      ],
      value: between.activationKelvin,
      unit: 'K',
      basis: TM_21,
    },
    {
      key: 'maintenance-alpha-in-use',
      name: 'Decay per hour at the temperature in use',
      formula: 'alpha cooler * exp(Ea/k * (1/T cooler - 1/T))',
      inputs: [
        ...alphas,
        of('Ea/k', between.activationKelvin, 'K'),
        of('T', (input.inSituCelsius ?? 0) + 273.15, 'K'),
      ],
      value: curve.alpha,
      unit: '1/h',
      basis: TM_21,
    },
    {
      key: 'maintenance-b-in-use',
      name: 'Light at the start of the curve between both cases',
      formula: 'sqrt(b cooler * b hotter)',
      inputs: [of('b cooler', cold?.b ?? null), of('b hotter', hot?.b ?? null)],
      value: curve.b,
      unit: '',
      basis: TM_21,
    },
  ];
}

export function workingOf(projection: Projection): WorkingStep[] {
  const { curve, input, capTimes, result } = projection;
  return [
    ...curve.fits.flatMap(fitSteps),
    ...betweenSteps(projection),
    {
      key: 'maintenance-calculated',
      name: 'Hours by the curve',
      formula: 'ln(b / threshold) / alpha',
      inputs: [of('b', curve.b), of('threshold', input.threshold), of('alpha', curve.alpha, '1/h')],
      value: result.calculatedHours,
      unit: 'h',
      basis: TM_21,
    },
    {
      key: 'maintenance-cap',
      name: 'Most hours that may be told',
      formula: 'times * hours of the test; 6 from 20 units on, 5.5 from 10 to 19',
      inputs: [
        of('times', capTimes),
        of('hours of the test', result.durationHours, 'h'),
        of('units', input.sampleSize),
      ],
      value: result.capHours,
      unit: 'h',
      basis: TM_21,
    },
    {
      key: 'maintenance-reported',
      name: 'Hours that are told',
      formula: 'the reading where the test passed the threshold, else the smaller of curve and cap',
      inputs: [
        of('passed in the test at', result.passedAtHours, 'h'),
        of('by the curve', result.calculatedHours, 'h'),
        of('cap', result.capHours, 'h'),
      ],
      value: result.reportedHours,
      unit: 'h',
      basis: TM_21,
    },
  ];
}
