/** How a resistor array was figured, once for the whole strings and once for a shorter last one. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import { type ArrayString, type Case, distinct, type ResistorArray } from './resistor-array-string';
import { colourBands } from './resistor-code';
import { COLOUR_CODE_BASIS } from './tables/colour-code';
import { E_SERIES_BASIS } from './tables/e-series';

const OHMS_LAW = "Ohm's law";

const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});

function resistance(c: Case, s: ArrayString): WorkingStep[] {
  const leds = given('n', s.leds, '');
  const exactWatts = s.ballastOhmsExact === null ? null : c.led.amps * c.led.amps * s.ballastOhmsExact;
  return [
    {
      key: 'ballast-ohms-exact',
      name: `Exact resistor for ${s.leds} in series`,
      formula: 'R = (V - n * Vf) / I',
      inputs: [
        given('V', c.supply.volts, 'V'),
        leds,
        given('Vf', c.led.forwardVolts, 'V'),
        given('I', c.led.amps, 'A'),
      ],
      value: s.ballastOhmsExact,
      unit: 'ohm',
      basis: OHMS_LAW,
    },
    {
      key: 'ballast-watts-exact',
      name: 'Resistor watts at the exact value',
      formula: 'P = I^2 * R',
      inputs: [leds, given('I', c.led.amps, 'A'), given('R', s.ballastOhmsExact, 'ohm')],
      value: exactWatts,
      unit: 'W',
      basis: OHMS_LAW,
    },
    {
      key: 'ballast-ohms',
      name: 'Next standard value',
      formula: 'smallest preferred value not below R',
      inputs: [leds, given('R', s.ballastOhmsExact, 'ohm'), given('series', c.series, '')],
      value: s.ballastOhms,
      unit: 'ohm',
      basis: E_SERIES_BASIS,
    },
    {
      key: 'ballast-bands',
      name: 'Its colour bands',
      formula: 'digits, multiplier, tolerance',
      inputs: [leds, given('R', s.ballastOhms, 'ohm'), given('tr', c.tolerance, '')],
      value: (s.ballastOhms && colourBands(s.ballastOhms, c.tolerance * 100)?.join(' ')) || null,
      unit: '',
      basis: COLOUR_CODE_BASIS,
    },
  ];
}

function currents(c: Case, s: ArrayString): WorkingStep[] {
  const leds = given('n', s.leds, '');
  const ohms = given('R', s.ballastOhms, 'ohm');
  const tolerance = given('tr', c.tolerance, '');
  return [
    {
      key: 'string-amps',
      name: 'String current with the chosen resistor',
      formula: 'I = (V - n * Vf) / R',
      inputs: [given('V', c.supply.volts, 'V'), leds, given('Vf', c.led.forwardVolts, 'V'), ohms],
      value: s.amps,
      unit: 'A',
      basis: OHMS_LAW,
    },
    {
      key: 'string-amps-max',
      name: 'Highest string current',
      formula: 'Imax = (Vmax - n * VfMin) / (R * (1 - tr))',
      inputs: [
        given('Vmax', c.supply.maxVolts, 'V'),
        leds,
        given('VfMin', c.led.forwardVoltsMin, 'V'),
        ohms,
        tolerance,
      ],
      value: s.ampsMax,
      unit: 'A',
      basis: OHMS_LAW,
    },
    {
      key: 'string-amps-min',
      name: 'Lowest string current',
      formula: 'Imin = max(0, (Vmin - n * VfMax) / (R * (1 + tr)))',
      inputs: [
        given('Vmin', c.supply.minVolts, 'V'),
        leds,
        given('VfMax', c.led.forwardVoltsMax, 'V'),
        ohms,
        tolerance,
      ],
      value: s.ampsMin,
      unit: 'A',
      basis: OHMS_LAW,
    },
  ];
}

function rating(c: Case, s: ArrayString): WorkingStep[] {
  const leds = given('n', s.leds, '');
  const tolerance = given('tr', c.tolerance, '');
  const ohms = given('R', s.ballastOhms, 'ohm');
  return [
    {
      key: 'ballast-watts',
      name: 'Resistor watts',
      formula: 'P = I^2 * R',
      inputs: [leds, given('I', s.amps, 'A'), ohms],
      value: s.ballastWatts,
      unit: 'W',
      basis: OHMS_LAW,
    },
    {
      key: 'ballast-watts-max',
      name: 'Worst resistor watts',
      formula: 'Pmax = Imax^2 * R * (1 - tr)',
      inputs: [leds, given('Imax', s.ampsMax, 'A'), ohms, tolerance],
      value: s.ballastWattsMax,
      unit: 'W',
      basis: OHMS_LAW,
    },
    {
      key: 'ballast-rated-watts',
      name: 'Resistor rating',
      formula: 'smallest rating with rating * derate * load fraction >= Pmax',
      inputs: [
        leds,
        given('Pmax', s.ballastWattsMax, 'W'),
        given('derate', c.derate, ''),
        given('load fraction', c.loadFraction, ''),
      ],
      value: s.ballastRatedWatts,
      unit: 'W',
      basis: 'datasheet',
    },
  ];
}

function supply(c: Case, result: ResistorArray): WorkingStep[] {
  const amps = given('I', result.supplyAmps, 'A');
  const volts = given('V', c.supply.volts, 'V');
  return [
    {
      key: 'supply-watts',
      name: 'Supply watts',
      formula: 'P = V * sum of the string currents',
      inputs: [volts, amps],
      value: result.supplyWatts,
      unit: 'W',
      basis: OHMS_LAW,
    },
    {
      key: 'efficiency',
      name: 'Share of the supply watts that the LEDs get',
      formula: 'sum of n * Vf * I / (V * I)',
      inputs: [volts, amps, given('Vf', c.led.forwardVolts, 'V')],
      value: result.efficiency,
      unit: '',
      basis: OHMS_LAW,
    },
  ];
}

export function workingOf(c: Case, result: ResistorArray): WorkingStep[] {
  const strings = distinct(result.strings);
  return [
    ...strings.flatMap((s) => [...resistance(c, s), ...currents(c, s), ...rating(c, s)]),
    ...supply(c, result),
  ];
}
