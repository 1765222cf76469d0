/** How a linear current source was figured. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import { DATASHEET, junctionStep, wattsAllowed } from './constant-current';
import type { Case, LinearCurrentSource } from './linear-current-source';
import { E_SERIES_BASIS } from './tables/e-series';

const OHMS_LAW = "Ohm's law";
const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});

function current(c: Case, r: LinearCurrentSource): WorkingStep[] {
  const reference = given('Vref', c.referenceVolts, 'V');
  const set = given('R', r.setOhms, 'ohm');
  return [
    {
      key: 'set-ohms-exact',
      name: 'Exact set resistor',
      formula: 'R = Vref / I',
      inputs: [reference, given('I', c.input.amps, 'A')],
      value: r.setOhmsExact,
      unit: 'ohm',
      basis: OHMS_LAW,
    },
    {
      key: 'set-ohms',
      name: 'Next standard value',
      formula: 'smallest preferred value not below R',
      inputs: [given('R', r.setOhmsExact, 'ohm'), given('series', c.input.series, '')],
      value: r.setOhms,
      unit: 'ohm',
      basis: E_SERIES_BASIS,
    },
    {
      key: 'source-amps',
      name: 'Current with the chosen resistor',
      formula: 'I = Vref / R',
      inputs: [reference, set],
      value: r.amps,
      unit: 'A',
      basis: OHMS_LAW,
    },
    {
      key: 'source-amps-max',
      name: 'Highest current',
      formula: 'Imax = VrefMax / (R * (1 - tr))',
      inputs: [given('VrefMax', c.referenceMaxVolts, 'V'), set, given('tr', c.tolerance, '')],
      value: r.ampsMax,
      unit: 'A',
      basis: OHMS_LAW,
    },
    {
      key: 'set-watts',
      name: 'Watts of the set resistor',
      formula: 'P = I^2 * R',
      inputs: [given('I', r.amps, 'A'), set],
      value: r.setWatts,
      unit: 'W',
      basis: OHMS_LAW,
    },
  ];
}

function heat(c: Case, r: LinearCurrentSource): WorkingStep[] {
  const { input, supply } = c;
  const leds = given('n', input.perString, '');
  const reference = given('Vref', c.referenceVolts, 'V');
  const typical = given('Vf', input.led.forwardVolts, 'V');
  const allowed = wattsAllowed(input);
  return [
    {
      key: 'headroom-volts',
      name: 'Volts to spare at the lowest supply',
      formula: 'Vmin - n * VfMax - Vref - dropout',
      inputs: [
        given('Vmin', supply.minVolts, 'V'),
        leds,
        given('VfMax', input.led.forwardVoltsMax, 'V'),
        reference,
        given('dropout', input.dropoutVolts, 'V'),
      ],
      value: r.headroomVolts,
      unit: 'V',
      basis: DATASHEET,
    },
    {
      key: 'regulator-watts',
      name: 'Watts of the regulator, without the set resistor',
      formula: 'P = (V - n * Vf - Vref) * I',
      inputs: [given('V', supply.volts, 'V'), leds, typical, reference, given('I', r.amps, 'A')],
      value: r.regulatorWatts,
      unit: 'W',
      basis: OHMS_LAW,
    },
    {
      key: 'regulator-watts-max',
      name: 'Worst watts of the regulator',
      formula: 'Pmax = (Vmax - n * VfMin - Vref) * Imax',
      inputs: [
        given('Vmax', supply.maxVolts, 'V'),
        leds,
        given('VfMin', input.led.forwardVoltsMin, 'V'),
        reference,
        given('Imax', r.ampsMax, 'A'),
      ],
      value: r.regulatorWattsMax,
      unit: 'W',
      basis: OHMS_LAW,
    },
    junctionStep(input, r.regulatorWattsMax),
    {
      key: 'regulator-watts-allowed',
      name: 'Watts at which the junction reaches its limit',
      formula: 'P = (TjMax - Ta) / Rth',
      inputs: [
        given('TjMax', input.maxJunctionCelsius, 'C'),
        given('Ta', input.ambientCelsius, 'C'),
        given('Rth', input.thermalCelsiusPerWatt, 'K/W'),
      ],
      value: allowed,
      unit: 'W',
      basis: DATASHEET,
    },
    {
      key: 'regulator-amps-allowed',
      name: 'Current at which the junction reaches its limit',
      formula: 'I = P / (Vmax - n * VfMin - Vref)',
      inputs: [given('P', allowed, 'W'), given('Vmax - n * VfMin - Vref', c.differenceMaxVolts, 'V')],
      value: allowed === null || c.differenceMaxVolts <= 0 ? null : allowed / c.differenceMaxVolts,
      unit: 'A',
      basis: OHMS_LAW,
    },
    {
      key: 'source-efficiency',
      name: 'Share of the supply watts that the LEDs get',
      formula: 'n * Vf / V',
      inputs: [leds, typical, given('V', supply.volts, 'V')],
      value: r.efficiency,
      unit: '',
      basis: OHMS_LAW,
    },
    {
      key: 'switching-heat',
      name: 'Watts that a switching driver would lose',
      formula: 'P = Pled / efficiency - Pled',
      inputs: [
        given('Pled', r.comparison.ledWatts, 'W'),
        given('efficiency', r.comparison.switching.efficiency, ''),
      ],
      value: r.comparison.switching.heatWatts,
      unit: 'W',
      basis: input.switchingEfficiencyPct === undefined ? 'common practice' : DATASHEET,
    },
  ];
}

export const workingOf = (c: Case, result: LinearCurrentSource): WorkingStep[] => [
  ...current(c, result),
  ...heat(c, result),
];
