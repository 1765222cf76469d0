/** Illuminance: stored in lux, typed and shown in footcandles where a shop works in feet. */
import { formatFigure, LUX_PER_FOOTCANDLE } from './figures';
import { parseNumber } from './parse-figures';
import { type Parsed, parsed, unread } from './parsed';
import type { ShopSettings } from './settings';

type LightSettings = Pick<ShopSettings, 'units'>;

const perUnit = (settings: LightSettings) => (settings.units === 'us' ? LUX_PER_FOOTCANDLE : 1);

export const illuminanceUnit = (settings: LightSettings): string => (settings.units === 'us' ? 'fc' : 'lx');

/** The figure alone: whole lux, footcandles to a tenth under ten. */
export const illuminanceFigure = (lux: number, settings: LightSettings): string =>
  formatFigure(lux, 'lx', settings).value;

export function formatIlluminance(lux: number, settings: LightSettings): string {
  const { value, unit } = formatFigure(lux, 'lx', settings);
  return `${value} ${unit}`;
}

/** Reads a bare number in the shop's unit, or one that names lx, lux or fc itself. */
export function parseIlluminance(text: string, settings: LightSettings): Parsed<number> {
  const match = /^(.*?)\s*(lx|lux|fc|footcandles?)?$/i.exec(text.trim());
  const unit = match?.[2]?.toLowerCase();
  const number = parseNumber(match?.[1] ?? text);
  if (!number.ok || number.value < 0) return unread('Type a light level such as 50 fc or 500 lx.');
  const factor = unit === undefined ? perUnit(settings) : unit.startsWith('l') ? 1 : LUX_PER_FOOTCANDLE;
  return parsed(number.value * factor);
}
