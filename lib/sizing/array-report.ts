/** What to know about an array's operating point, and how it was figured. */
import { atMost, type Finding, type WorkingStep } from '@/lib/engine/contract';
import type { ArrayAnalysis, ArrayInput } from './array-analysis';
import { fieldBuilt } from './bench-work';
import { DARK_AMPS, LED_LAW_BASIS, thermalVolts } from './diode';

/** Further than this from the LED's temperature a saturation current without its gap volts misleads. */
const SATURATION_KELVIN = 5;

const caution = (code: string, message: string, values: Finding['values'], basis: string): Finding => ({
  code,
  severity: 'caution',
  hard: false,
  message,
  values,
  basis,
});

/** The string that takes most, from 1, and how many times its even share of the current that is. */
function greediest({ strings }: ArrayAnalysis): { string: number; overShare: number | null; amps: number } {
  const amps = strings.map((string) => string.amps);
  const most = amps.reduce((best, own, i) => (own > (amps[best] ?? 0) ? i : best), 0);
  const total = amps.reduce((sum, own) => sum + own, 0);
  const own = amps[most] ?? 0;
  return { string: most + 1, overShare: total > 0 ? (own * strings.length) / total : null, amps: own };
}

function sharedResistor(input: ArrayInput, result: ArrayAnalysis): Finding[] {
  const sharedOhms = input.sharedOhms ?? 0;
  if (sharedOhms === 0 || input.strings.length < 2) return [];
  const { imbalance } = result;
  const { string, overShare } = greediest(result);
  const ratio = imbalance === null ? 'a string is dark' : `highest over lowest is ${imbalance}`;
  return [
    caution(
      'shared-resistor',
      `One resistor is shared by ${input.strings.length} strings: nothing makes them share the current (${ratio}). The one with the lowest volts takes the most: string ${string}, ${overShare} times an even share. It runs hottest and ages first.`,
      { sharedOhms, strings: input.strings.length, imbalance, string, overShare },
      'common practice',
    ),
  ];
}

function saturationTemperature(input: ArrayInput): Finding[] {
  let worst = 0;
  let affected = 0;
  for (const { leds } of input.strings) {
    for (const { gapVolts, celsius = 25, saturationCelsius = celsius } of leds) {
      const apart = Math.abs(saturationCelsius - celsius);
      if (gapVolts !== undefined || atMost(apart, SATURATION_KELVIN)) continue;
      affected++;
      worst = Math.max(worst, apart);
    }
  }
  if (affected === 0) return [];
  return [
    caution(
      'saturation-temperature',
      `The saturation current of ${affected} LEDs is given up to ${worst} K away from their temperature and without gap volts: it is used as given.`,
      { leds: affected, kelvin: worst },
      LED_LAW_BASIS,
    ),
  ];
}

function darkStrings(result: ArrayAnalysis): Finding[] {
  const dark = result.strings.filter(({ amps }) => amps < DARK_AMPS).length;
  if (dark === 0) return [];
  return [
    caution(
      'dark-string',
      `${dark} of ${result.strings.length} strings are dark: the volts do not reach their LEDs.`,
      { dark, strings: result.strings.length },
      'common practice',
    ),
  ];
}

export function findingsOf(input: ArrayInput, result: ArrayAnalysis): Finding[] {
  return [
    fieldBuilt(),
    ...sharedResistor(input, result),
    ...saturationTemperature(input),
    ...darkStrings(result),
  ];
}

export function workingOf(input: ArrayInput, result: ArrayAnalysis): WorkingStep[] {
  const amps = result.strings.map((string) => string.amps);
  const { amps: highest, overShare } = greediest(result);
  const lowest = amps.reduce((least, own) => Math.min(least, own), Infinity);
  const at = input.strings[0]?.leds[0]?.celsius ?? 25;
  return [
    {
      key: 'thermal-volts',
      name: 'Thermal voltage of the first LED',
      formula: 'Vt = k * T / q',
      inputs: [{ name: 'T', value: at, unit: 'C' }],
      value: thermalVolts(at),
      unit: 'V',
      basis: LED_LAW_BASIS,
    },
    {
      key: 'array-amps',
      name: 'Current of all strings together',
      formula: 'sum of I, each with V = R * I + sum of (n * Vt * ln(1 + I / Is) + Rs * I)',
      inputs: [
        { name: 'V at the supply', value: result.supplyVolts, unit: 'V' },
        { name: 'shared R', value: input.sharedOhms ?? 0, unit: 'ohm' },
        { name: 'strings', value: amps.length, unit: '' },
      ],
      value: result.supplyAmps,
      unit: 'A',
      basis: `${LED_LAW_BASIS}; Kirchhoff's laws`,
    },
    {
      key: 'imbalance',
      name: 'Highest over lowest string current',
      formula: 'Imax / Imin; none where a string is dark',
      inputs: [
        { name: 'Imax', value: highest, unit: 'A' },
        { name: 'Imin', value: lowest, unit: 'A' },
      ],
      value: result.imbalance,
      unit: '',
      basis: 'common practice',
    },
    {
      key: 'string-share',
      name: 'Highest string current over an even share',
      formula: 'Imax / (sum of I / strings)',
      inputs: [
        { name: 'Imax', value: highest, unit: 'A' },
        { name: 'strings', value: amps.length, unit: '' },
      ],
      value: overShare,
      unit: '',
      basis: "Kirchhoff's laws",
    },
  ];
}
