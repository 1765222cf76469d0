/** Light levels in the shop's unit, typed and shown. */
import { describe, expect, it } from 'vitest';
import {
  DEFAULT_SETTINGS,
  formatFigure,
  formatIlluminance,
  illuminanceFigure,
  parseIlluminance,
} from '@/lib/units';

const US = DEFAULT_SETTINGS;
const METRIC = { ...DEFAULT_SETTINGS, units: 'metric' } as const;
// A footcandle is a lumen on a square foot of 0.3048 m a side (the foot is exact since 1959).
const FOOTCANDLE = 1 / (0.3048 * 0.3048);

describe('illuminance', () => {
  it.each([
    ['500', METRIC, 500],
    ['500 lx', US, 500],
    ['50', US, 50 * FOOTCANDLE],
    ['50 fc', METRIC, 50 * FOOTCANDLE],
    ['1,200 lux', METRIC, 1200],
    ['0', METRIC, 0],
  ])('%s', (text, settings, lux) => {
    const read = parseIlluminance(text, settings);
    expect(read.ok && read.value).toBeCloseTo(lux, 9);
  });

  it.each(['', '-3', 'bright', '50 fc 500 lx'])('%s is not read', (text) => {
    expect(parseIlluminance(text, US)).toEqual({
      ok: false,
      message: 'Type a light level such as 50 fc or 500 lx.',
    });
  });

  it('is shown in the shop’s unit', () => {
    expect(formatIlluminance(500, METRIC)).toBe('500 lx');
    expect(formatIlluminance(500, US)).toBe('46 fc');
    expect(formatIlluminance(54, US)).toBe('5.0 fc');
    expect(illuminanceFigure(NaN, US)).toBe('–');
    expect(formatFigure(500, 'lx', US)).toEqual({ value: '46', unit: 'fc' });
  });
});
