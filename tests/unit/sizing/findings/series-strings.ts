/** Findings of `series-string`. */
import { AT_LEAST, AT_MOST, type FindingRow, OVER, rowsOf, UNDER } from './row';

/** Modules that stay as they are, hot and cold: 11.4 V at least and 12.6 V at most each. */
const driver = { sku: 'A', amps: 0.35, minVolts: 18, maxVolts: 42, maxWatts: 20, cost: 14 };
const base = {
  module: {
    ...{ forwardVolts: 12, forwardVoltsMin: 11.4, forwardVoltsMax: 12.6, voltsPerKelvin: 0, maxAmps: 0.5 },
  },
  count: 3,
  ambientMinCelsius: -10,
  ambientMaxCelsius: 40,
  riseCelsius: 0,
  drivers: [driver],
  loadFraction: 1,
};
const { hardStop, softStop, caution, note } = rowsOf('series-string', base);

/** A driver that takes three modules and no other number, and one that takes four. */
const three = { ...driver, minVolts: 3 * 11.4, maxVolts: 3 * 12.6 };
const four = { ...driver, sku: 'B', minVolts: 4 * 11.4, maxVolts: 4 * 12.6 };
const ofThree = { ...base, drivers: [three] };

const openVolts = (volts: number) => ({ 'drivers.0.openCircuitVolts': volts });
const both = (amps: number) => ({ count: 7, drivers: [three, { ...four, amps }] });

export const seriesStringRows: FindingRow[] = [
  hardStop(
    'string-over-insulation',
    /datasheet/,
    { 'module.insulationVolts': 42 * UNDER },
    { 'module.insulationVolts': 42 * AT_LEAST },
  ),
  softStop(
    'driver-over-module-amps',
    /datasheet/,
    { 'module.maxAmps': 0.35 * UNDER },
    { 'module.maxAmps': 0.35 * AT_LEAST },
  ),
  softStop(
    'string-window-too-narrow',
    /datasheet/,
    { 'drivers.0.maxVolts': 3 * 12.6 * UNDER },
    { 'drivers.0.maxVolts': 3 * 12.6 * AT_LEAST },
    ofThree,
  ),
  // Three modules take 0.35 A * 36 V.
  softStop(
    'string-over-watts',
    /common practice/,
    { 'drivers.0.maxWatts': 12.6 * UNDER },
    { 'drivers.0.maxWatts': 12.6 * AT_LEAST },
    ofThree,
  ),
  softStop(
    'too-few-modules',
    /datasheet/,
    { 'drivers.0.maxVolts': 60, 'drivers.0.minVolts': 3 * 11.4 * OVER },
    { 'drivers.0.maxVolts': 60, 'drivers.0.minVolts': 3 * 11.4 * AT_MOST },
  ),
  softStop('count-does-not-split', /datasheet/, { count: 7 }, { count: 6 }, ofThree),
  caution('temperature-not-counted', /datasheet/, { 'module.voltsPerKelvin': undefined }, {}),
  note('rise-not-counted', /common practice/, { riseCelsius: undefined }, { riseCelsius: 0 }),
  caution('led-max-amps-not-given', /datasheet/, { 'module.maxAmps': undefined }, {}),
  // Without a plan there is no string to be opened.
  caution('live-string', /common practice/, {}, { 'module.maxAmps': 0.35 * UNDER }),
  caution('string-over-class-two-volts', /Table 11\(B\)/, openVolts(60 * OVER), openVolts(60 * AT_MOST)),
  caution('string-over-class-two-volts', /Table 11\(B\)/, openVolts(120 * AT_MOST), openVolts(120 * OVER)),
  caution('string-over-selv-volts', /61140/, openVolts(120 * OVER), openVolts(120 * AT_MOST)),
  // 0.35 A * 37.8 V at a cold start.
  caution(
    'cold-start-over-watts',
    /datasheet/,
    { 'drivers.0.maxWatts': 13.23 * UNDER },
    { 'drivers.0.maxWatts': 13.23 * AT_LEAST },
  ),
  // 2 % apart look alike.
  caution(
    'strings-of-different-amps',
    /common practice/,
    both(0.35 * 1.02 * OVER),
    both(0.35 * 1.02 * AT_MOST),
  ),
  note('spare-channels', /common practice/, { 'drivers.0.channels': 2 }, { 'drivers.0.channels': 1 }),
];
