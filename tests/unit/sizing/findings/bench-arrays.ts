/** Findings of `resistor-array`, `resistor-code`, `array-analysis` and `array-spread`. */
import { AT_LEAST, AT_MOST, type FindingRow, OVER, rowsOf, UNDER } from './row';

const led = { forwardVolts: 3.2, forwardVoltsMin: 3, forwardVoltsMax: 3.4, amps: 0.02, maxAmps: 0.03 };
const array = rowsOf('resistor-array', {
  supply: { volts: 12 },
  led,
  count: 1,
  perString: 1,
  resistor: { series: 'E24', tolerancePct: 0, ratedWatts: [0.5], loadFraction: 0.6 },
  ambientCelsius: 40,
});
/** One LED on 12 V: 440 ohm, so 470 ohm of E24; at the lowest forward volts 9 V stand across it. */
const MOST_AMPS = 9 / 470;
const MOST_WATTS = (9 * 9) / 470;
/** At the highest forward volts. */
const LEAST_AMPS = (12 - 3.4) / 470;

const code = rowsOf('resistor-code', { ohms: 470, tolerancePct: 1 });

const diode = { saturationAmps: 1e-18, emissionCoefficient: 3.2, seriesOhms: 5 };
const string = { ballastOhms: 300, leds: [diode] };
const strings = { supply: { volts: 9 }, strings: [string, string] };
const analysis = rowsOf('array-analysis', strings);
const spread = rowsOf('array-spread', {
  ...strings,
  forwardVolts: { distribution: 'normal', spreadVolts: 0.05 },
  draws: 20,
  seed: 7,
});
/** Under this a string gives no light to speak of. */
const DARK_AMPS = 1e-6;
const oneString = (amps: number) => ({ supply: { amps }, strings: [string] });
/** Without gap volts a saturation current holds 5 K to either side. */
const givenAt = (kelvinOff: number) => ({ 'strings.0.leds.0.saturationCelsius': 25 - kelvinOff });

export const benchArrayRows: FindingRow[] = [
  array.note('field-built', /common practice/, {}, null),
  // n * Vf as large as the supply, or equal within the margin, leaves the resistor nothing.
  array.softStop(
    'does-not-fit',
    /datasheet/,
    { 'supply.volts': 3.2 * AT_MOST },
    { 'supply.volts': 3.2 * OVER },
  ),
  array.softStop(
    'over-max-amps',
    /60063/,
    { 'led.maxAmps': MOST_AMPS * UNDER },
    { 'led.maxAmps': MOST_AMPS * AT_LEAST },
  ),
  array.softStop(
    'no-count-fits',
    /datasheet/,
    { perString: undefined, 'led.maxAmps': MOST_AMPS * UNDER },
    { perString: undefined, 'led.maxAmps': MOST_AMPS * AT_LEAST },
  ),
  array.softStop(
    'no-rating',
    /datasheet/,
    { 'resistor.ratedWatts': [(MOST_WATTS / 0.6) * UNDER] },
    { 'resistor.ratedWatts': [(MOST_WATTS / 0.6) * AT_LEAST] },
  ),
  array.caution(
    'low-current',
    /common practice/,
    { minCurrentFraction: (LEAST_AMPS / 0.02) * OVER },
    { minCurrentFraction: (LEAST_AMPS / 0.02) * AT_MOST },
  ),

  code.caution('not-preferred-value', /60063/, { ohms: 471 }, { ohms: 470 * AT_MOST }),
  // Brown grey is 18, a value of E12; grey brown, the same bands from the other end, is 81.
  code.caution(
    'not-preferred-value',
    /60063/,
    { bands: ['grey', 'brown', 'brown', 'brown'] },
    { bands: ['brown', 'grey', 'brown', 'brown'] },
    {},
  ),

  analysis.note('field-built', /common practice/, {}, null),
  analysis.caution('shared-resistor', /common practice/, { sharedOhms: 10 }, { sharedOhms: 0 }),
  // One string has its resistor to itself, however it is drawn.
  analysis.caution(
    'shared-resistor',
    /common practice/,
    { sharedOhms: 10 },
    { sharedOhms: 10, strings: [string] },
  ),
  analysis.caution('saturation-temperature', /Shockley/, givenAt(5 * OVER), givenAt(5 * AT_MOST)),
  analysis.caution('saturation-temperature', /Shockley/, givenAt(20), {
    ...givenAt(20),
    'strings.0.leds.0.gapVolts': 2.6,
  }),
  analysis.caution(
    'dark-string',
    /common practice/,
    oneString(DARK_AMPS * UNDER),
    oneString(DARK_AMPS * OVER),
  ),

  spread.note('field-built', /common practice/, {}, null),
  spread.caution('shared-resistor', /common practice/, { sharedOhms: 10 }, { sharedOhms: 0 }),
  spread.caution('saturation-temperature', /Shockley/, givenAt(5 * OVER), givenAt(5 * AT_MOST)),
  spread.caution('dark-string', /common practice/, oneString(DARK_AMPS * UNDER), oneString(DARK_AMPS * OVER)),
];
