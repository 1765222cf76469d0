/** How an LED's figures were read out of its readings. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import { LED_LAW_BASIS } from './diode';
import type { Fit } from './led-fit';
import { voltsAt } from './led-fit-curve';

const LEAST_SQUARES = 'least squares on volts';
const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});

function fitted({ input, thermalVolts, curve, result }: Fit): WorkingStep[] {
  const readings = given('readings', input.points.length, '');
  const n = given('n', result.emissionCoefficient, '');
  const vt = given('kT/q', thermalVolts, 'V');
  return [
    {
      key: 'fit-thermal-volts',
      name: 'Thermal voltage while measuring',
      formula: 'kT/q',
      inputs: [given('T', input.celsius, 'C')],
      value: thermalVolts,
      unit: 'V',
      basis: LED_LAW_BASIS,
    },
    {
      key: 'fit-emission',
      name: 'Emission coefficient',
      formula: 'n = a / (kT/q), a of the least squares of V - (a*ln(I/Is + 1) + I*Rs)',
      inputs: [readings, given('a', curve && curve.slopeVolts, 'V'), vt],
      value: result.emissionCoefficient,
      unit: '',
      basis: LEAST_SQUARES,
    },
    {
      key: 'fit-saturation-amps',
      name: 'Saturation current',
      formula: 'Is of the same least squares',
      inputs: [readings],
      value: result.saturationAmps,
      unit: 'A',
      basis: LEAST_SQUARES,
    },
    {
      key: 'fit-series-ohms',
      name: 'Series resistance',
      formula: 'Rs of the same least squares, not below 0',
      inputs: [readings],
      value: result.seriesOhms,
      unit: 'ohm',
      basis: LEAST_SQUARES,
    },
    {
      key: 'fit-residual',
      name: 'How far the readings miss the curve',
      formula: 'sqrt(sum((V - (n*kT/q*ln(I/Is + 1) + I*Rs))^2) / readings)',
      inputs: [
        readings,
        n,
        vt,
        given('Is', result.saturationAmps, 'A'),
        given('Rs', result.seriesOhms, 'ohm'),
      ],
      value: result.residualVolts,
      unit: 'V',
      basis: LEAST_SQUARES,
    },
  ];
}

function atWork({ input, curve, result }: Fit): WorkingStep[] {
  const { workingAmps } = input;
  if (workingAmps === undefined) return [];
  const amps = given('I', workingAmps, 'A');
  const volts = result.samples.map(({ sample, workingVolts }, i) =>
    given(`V of ${sample ?? i + 1}`, workingVolts, 'V'),
  );
  return [
    {
      key: 'fit-working-volts',
      name: 'Forward volts at the working current',
      formula: 'V = n*kT/q*ln(I/Is + 1) + I*Rs',
      inputs: [
        amps,
        given('n', result.emissionCoefficient, ''),
        given('Is', result.saturationAmps, 'A'),
        given('Rs', result.seriesOhms, 'ohm'),
      ],
      value: curve && voltsAt(curve, workingAmps),
      unit: 'V',
      basis: LED_LAW_BASIS,
    },
    ...(result.spread === null
      ? []
      : [
          {
            key: 'fit-spread',
            name: 'Standard deviation of the samples at the working current',
            formula: 'sqrt(sum((V - mean)^2) / (samples - 1))',
            inputs: [amps, ...volts],
            value: result.spread.standardDeviationVolts,
            unit: 'V',
            basis: 'standard deviation of a sample',
          },
        ]),
  ];
}

export function workingOf(fit: Fit): WorkingStep[] {
  return [...fitted(fit), ...atWork(fit)];
}
