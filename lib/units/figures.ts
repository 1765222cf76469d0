/** Electrical and other figures as screens print them: units always shown, a sensible number of digits. */
import type { Parsed } from './money';
import type { ShopSettings } from './settings';

export interface Figure {
  value: string;
  unit: string;
}

const MINUS = '\u2212';

/** A number with about four significant digits, never in exponent form, with a true minus sign. */
export function formatNumber(value: number, decimals?: number): string {
  const size = Math.abs(value);
  const auto = size === 0 ? 0 : size >= 1000 ? 0 : size >= 100 ? 1 : size >= 10 ? 2 : size >= 1 ? 3 : 4;
  const fixed = Math.abs(value).toFixed(decimals ?? auto);
  const text = decimals === undefined && fixed.includes('.') ? fixed.replace(/\.?0+$/, '') : fixed;
  const [units = '0', rest] = text.split('.');
  const grouped = units.replace(/\B(?=(\d{3})+(?!\d))/g, ',');
  const negative = value < 0 && Number(text) !== 0;
  return `${negative ? MINUS : ''}${grouped}${rest === undefined ? '' : `.${rest}`}`;
}

const SI_STEPS = [
  { from: 1, factor: 1, prefix: '' },
  { from: 1e-3, factor: 1e3, prefix: 'm' },
  { from: 0, factor: 1e6, prefix: 'µ' },
] as const;

/** Amps and watts below one are shown in milli or micro. */
function withPrefix(value: number, unit: string): Figure {
  const size = Math.abs(value);
  const step =
    size === 0 ? SI_STEPS[0] : (SI_STEPS.find((one) => size >= one.from * (1 - 1e-12)) ?? SI_STEPS[2]);
  return { value: formatNumber(value * step.factor), unit: `${step.prefix}${unit}` };
}

/** A figure in an engine unit (`V`, `A`, `W`, `ohm`, `m`, `C`, `%`, …) as the shop shows it. */
export function formatFigure(value: number, unit: string, settings: Pick<ShopSettings, 'units'>): Figure {
  switch (unit) {
    case 'V':
      return { value: formatNumber(value, 2), unit: 'V' };
    case 'A':
    case 'W':
      return withPrefix(value, unit);
    case '%':
      return { value: formatNumber(value, 1), unit: '%' };
    case 'ohm':
      return Math.abs(value) >= 1000
        ? { value: formatNumber(value / 1000), unit: 'kΩ' }
        : { value: formatNumber(value), unit: 'Ω' };
    case 'ohm/m':
      return { value: formatNumber(value * 1000), unit: 'mΩ/m' };
    case 'C':
      return settings.units === 'us'
        ? { value: formatNumber(value * 1.8 + 32, 0), unit: '°F' }
        : { value: formatNumber(value, 0), unit: '°C' };
    case 'm':
      return settings.units === 'us'
        ? { value: formatNumber(value / 0.3048, 1), unit: 'ft' }
        : { value: formatNumber(value, 2), unit: 'm' };
    default:
      return { value: formatNumber(value), unit };
  }
}

/** A plain number as people type it: a decimal comma is taken for a point, grouping spaces are dropped. */
export function parseNumber(text: string): Parsed<number> {
  const clean = text.trim().replace(/\s/g, '').replace(MINUS, '-');
  const pointed = /^-?\d+,\d{1,2}$/.test(clean)
    ? clean.replace(',', '.')
    : clean.replace(/,(?=\d{3}(\D|$))/g, '');
  if (!/^-?(\d+\.?\d*|\.\d+)$/.test(pointed)) return { ok: false, message: 'Type a number.' };
  return { ok: true, value: Number(pointed) };
}

/** A temperature in the shop's degrees as Celsius. */
export function parseTemperature(text: string, settings: Pick<ShopSettings, 'units'>): Parsed<number> {
  const unit = /([cf])\s*$/i.exec(text.trim())?.[1]?.toLowerCase();
  const parsed = parseNumber(text.replace(/°?\s*[cf]?\s*$/i, ''));
  if (!parsed.ok) return { ok: false, message: 'Type a temperature such as 77 or 25 C.' };
  const fahrenheit = unit === 'f' || (unit === undefined && settings.units === 'us');
  return { ok: true, value: fahrenheit ? (parsed.value - 32) / 1.8 : parsed.value };
}

/** Wire sizes as the trade writes them: "12 AWG", "1.5 mm²". */
export function formatWireSize(size: string): string {
  const awg = /^AWG (.+)$/.exec(size);
  return awg ? `${awg[1]} AWG` : size.replace('mm2', 'mm²');
}

/** Paper sizes in millimetres. */
export const PAPER = { letter: { width: 215.9, height: 279.4 }, a4: { width: 210, height: 297 } } as const;
