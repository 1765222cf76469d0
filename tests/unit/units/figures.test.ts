/** Figures, percents, temperatures and wire sizes: shown as the shop works, read as people type. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatFigure,
  formatNumber,
  formatWireSize,
  parseFigure,
  parseNumber,
  parsePercent,
  parseTemperature,
  parseWireSize,
  plainNumber,
} from '@/lib/units';
import { ALL_SIZES } from '@/lib/sizing/tables/conductors';

const US = { units: 'us', basis: 'us', currency: 'USD', locale: 'en-US' } as const;
const METRIC = { units: 'metric', basis: 'iec', currency: 'GBP', locale: 'en-GB' } as const;
const shown = (value: number, unit: string, settings: typeof US | typeof METRIC = METRIC) => {
  const figure = formatFigure(value, unit, settings);
  return `${figure.value} ${figure.unit}`;
};
const value = <T>(parsed: { ok: true; value: T } | { ok: false; message: string }) =>
  parsed.ok ? parsed.value : null;

describe('formatNumber', () => {
  it.each([
    [0, '0'],
    [1234567.8, '1,234,568'],
    [123.456, '123.5'],
    [9.99996, '10'],
    [0.0082812, '0.008281'],
    [-5, '−5'],
    [-1e-15, '0'],
    [Number.NaN, '–'],
    [Number.POSITIVE_INFINITY, '–'],
  ])('%d as %s', (number, text) => expect(formatNumber(number)).toBe(text));

  it('holds to the decimals it is given, and to four figures otherwise', () => {
    expect(formatNumber(24, 2)).toBe('24.00');
    fc.assert(
      fc.property(fc.double({ min: 1e-8, max: 1e9, noNaN: true }), (number) => {
        const back = Number(formatNumber(number).replaceAll(',', ''));
        expect(Math.abs(back - number)).toBeLessThanOrEqual(5e-4 * number + 1e-12);
      }),
    );
  });
});

describe('formatFigure', () => {
  it.each([
    [23.456, 'V', '23.46 V'],
    [0.35, 'A', '350 mA'],
    [0.00002, 'A', '20 µA'],
    [12.5, 'A', '12.5 A'],
    [0, 'W', '0 W'],
    [4700, 'ohm', '4.7 kΩ'],
    [0.00828, 'ohm/m', '8.28 mΩ/m'],
    [3.04, '%', '3.0 %'],
    [6.889, 'W/m2', '6.889 W/m²'],
    [25, 'C', '25 °C'],
    [1.5, 'mm2', '1.5 mm²'],
    [123456, 'minor', '1,234.56 GBP'],
  ])('%d %s as %s', (number, unit, text) => expect(shown(number, unit)).toBe(text));

  it('follows the shop in degrees and lengths', () => {
    expect(shown(25, 'C', US)).toBe('77 °F');
    expect(shown(3.048, 'm', US)).toBe('10.0 ft');
    expect(shown(3.048, 'm')).toBe('3.05 m');
    expect(shown(6.889, 'W/m2', US)).toBe('0.64 W/ft²');
  });
});

describe('plainNumber', () => {
  it('gives a field all digits back', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e12, max: 1e12, noNaN: true }), (number) => {
        const text = plainNumber(number);
        expect(text).toMatch(/^-?\d+(\.\d+)?$/);
        expect(Number(text)).toBeCloseTo(number, 15);
      }),
    );
    expect(plainNumber(1234.5678)).toBe('1234.5678');
  });
});

describe('parsers', () => {
  it.each([
    ['1,234.5', 1234.5],
    ['1 234.5', 1234.5],
    ['3,5', 3.5],
    ['−2', -2],
    ['.5', 0.5],
    ['1,2345', null],
    ['1e5', null],
    ['', null],
    ['12 apples', null],
    ['9'.repeat(100), null],
  ])('number %s', (text, number) => expect(value(parseNumber(text))).toBe(number));

  it.each([
    ['8.25 %', 8.25],
    ['20%', 20],
    ['8,25', 8.25],
    ['%', null],
  ])('percent %s', (text, number) => expect(value(parsePercent(text))).toBe(number));

  it('temperature in the shop’s degrees, or in those named', () => {
    expect(value(parseTemperature('77', US))).toBe(25);
    expect(value(parseTemperature('25 C', US))).toBe(25);
    expect(value(parseTemperature('−20 °C', METRIC))).toBe(-20);
    expect(value(parseTemperature('86°F', METRIC))).toBe(30);
    expect(parseTemperature('warm', US).ok).toBe(false);
  });

  it.each([
    ['277V', 'V', 277],
    ['350 mA', 'A', 0.35],
    ['20 µA', 'A', 0.00002],
    ['1.2 kW', 'W', 1200],
    ['4.7k', 'ohm', 4700],
    ['4.7 kΩ', 'ohm', 4700],
    ['300 ohms', 'ohm', 300],
    ['44 VA', 'VA', 44],
    ['44 W', 'VA', null],
    ['V', 'V', null],
  ] as const)('%s in %s', (text, unit, number) => expect(value(parseFigure(text, unit))).toBe(number));

  it.each([
    ['12', 'us', 'AWG 12'],
    ['#14', 'us', 'AWG 14'],
    ['12 awg', 'iec', 'AWG 12'],
    ['AWG 1/0', 'us', 'AWG 1/0'],
    ['2.5', 'iec', '2.5 mm2'],
    ['2,5 mm²', 'us', '2.5 mm2'],
    ['13', 'us', null],
    ['2.5', 'us', null],
    ['thick', 'us', null],
  ] as const)('wire %s on %s', (text, basis, size) =>
    expect(value(parseWireSize(text, { basis }))).toBe(size),
  );

  it('reads every wire size back as it is shown', () => {
    for (const size of ALL_SIZES)
      for (const settings of [US, METRIC])
        expect(value(parseWireSize(formatWireSize(size), settings))).toBe(size);
  });
});

it('shows a saturation current as a power of ten', () => {
  expect(formatFigure(2.34e-18, 'A', US)).toEqual({ value: '2.34 × 10^-18', unit: 'A' });
  expect(formatFigure(0, 'A', US).value).toBe('0');
});
