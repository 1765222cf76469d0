/** Electrical and other figures as screens print them: units always shown, a sensible number of digits. */
import { formatMoney } from './money';
import { DEFAULT_SETTINGS, type ShopSettings } from './settings';

export interface Figure {
  value: string;
  unit: string;
}

const MINUS = '\u2212';

/** Decimals that leave about four significant digits, at most twelve. */
function decimalsFor(size: number): number {
  if (size === 0 || size >= 1000) return 0;
  return Math.min(12, 3 - Math.floor(Math.log10(size)));
}

/** A number with about four significant digits, never in exponent form, with a true minus sign. */
export function formatNumber(value: number, decimals?: number): string {
  if (!Number.isFinite(value)) return '–';
  const auto = decimalsFor(Math.abs(value));
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

/** A number for a field that is edited: all of its digits, no grouping, no exponent. */
export function plainNumber(value: number): string {
  if (!Number.isFinite(value)) return '';
  const text = String(value);
  return text.includes('e') ? value.toFixed(Math.abs(value) < 1 ? 20 : 0).replace(/\.?0+$/, '') : text;
}

type FigureSettings = Pick<ShopSettings, 'units'> & Partial<Pick<ShopSettings, 'currency' | 'locale'>>;

/** Spelling of units that need no conversion. */
const SPELLED: Readonly<Record<string, string>> = { mm2: 'mm²', m2: 'm²' };

/** One lumen a square foot. */
export const LUX_PER_FOOTCANDLE = 1 / 0.3048 ** 2;

function illuminance(lux: number, settings: FigureSettings): Figure {
  if (settings.units !== 'us') return { value: formatNumber(lux, 0), unit: 'lx' };
  const footcandles = lux / LUX_PER_FOOTCANDLE;
  return { value: formatNumber(footcandles, footcandles < 10 ? 1 : 0), unit: 'fc' };
}

/** Saturation currents lie eighteen decades under an amp: a power of ten, where no prefix helps. */
const LEAST_PREFIXED_AMPS = 1e-9;
const powerOfTen = (value: number): string => {
  const [digits = '0', exponent = '0'] = value.toExponential(2).split('e');
  return `${digits} × 10^${Number(exponent)}`;
};

/** A figure in an engine unit (`V`, `A`, `W`, `ohm`, `m`, `C`, `%`, `minor`, …) as the shop shows it. */
export function formatFigure(value: number, unit: string, settings: FigureSettings): Figure {
  if (!Number.isFinite(value)) return { value: '–', unit: SPELLED[unit] ?? unit };
  switch (unit) {
    case 'V':
      return { value: formatNumber(value, 2), unit: 'V' };
    case 'lx':
      return illuminance(value, settings);
    case 'A':
      if (value !== 0 && Math.abs(value) < LEAST_PREFIXED_AMPS)
        return { value: powerOfTen(value), unit: 'A' };
      return withPrefix(value, unit);
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
    case 'W/m2':
      return settings.units === 'us'
        ? { value: formatNumber(value * 0.3048 ** 2), unit: 'W/ft²' }
        : { value: formatNumber(value), unit: 'W/m²' };
    case 'minor': {
      const money = { ...DEFAULT_SETTINGS, ...settings };
      return { value: formatMoney(Math.round(value), money, { symbol: false }), unit: money.currency };
    }
    default:
      return { value: formatNumber(value), unit: SPELLED[unit] ?? unit };
  }
}

/** Paper sizes in millimetres. */
export const PAPER = { letter: { width: 215.9, height: 279.4 }, a4: { width: 210, height: 297 } } as const;
