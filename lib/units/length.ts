/** Lengths: stored in metres, typed and shown as the shop works, feet-inch fractions as people write them. */
import type { Parsed } from './money';
import type { ShopSettings } from './settings';

const METRES_PER_INCH = 0.0254;
const INCHES_PER_FOOT = 12;

type LengthSettings = Pick<ShopSettings, 'units'>;

/** "3 1/2", "1/2", "3.5" or "3" as a number. */
function mixedNumber(text: string): number | null {
  const match = /^(?:(\d+(?:\.\d+)?))?(?:[\s-]*(\d+)\/(\d+))?$/.exec(text.trim());
  if (!match || (match[1] === undefined && match[2] === undefined)) return null;
  if (match[2] !== undefined && match[1] === undefined) return ratio(match[2], match[3]);
  const part = match[2] === undefined ? 0 : ratio(match[2], match[3]);
  return part === null ? null : Number(match[1]) + part;
}

function ratio(top: string | undefined, bottom: string | undefined): number | null {
  const denominator = Number(bottom);
  return denominator > 0 ? Number(top) / denominator : null;
}

function feetAndInches(text: string): number | null {
  const match = /^(?:(.+?)\s*(?:'|ft|feet|foot))?\s*-?\s*(?:(.+?)\s*(?:"|''|in|inch|inches))?$/.exec(text);
  if (!match || (match[1] === undefined && match[2] === undefined)) return null;
  const feet = match[1] === undefined ? 0 : mixedNumber(match[1]);
  const inches = match[2] === undefined ? 0 : mixedNumber(match[2]);
  return feet === null || inches === null ? null : (feet * INCHES_PER_FOOT + inches) * METRES_PER_INCH;
}

const METRIC: Readonly<Record<string, number>> = { m: 1, cm: 0.01, mm: 0.001 };

function metric(text: string): number | null {
  const match = /^(\d+(?:\.\d+)?)\s*(m|cm|mm|metres?|meters?)$/.exec(text);
  if (!match) return null;
  return Number(match[1]) * (METRIC[match[2] ?? 'm'] ?? 1);
}

/**
 * Reads a length: `3.2 m`, `320 cm`, `12' 6 1/2"`, `12ft 6in`, `150"`, or a bare number in the shop's unit
 * (feet or metres).
 */
export function parseLength(text: string, settings: LengthSettings): Parsed<number> {
  const clean = text.trim().toLowerCase().replace(/[’′]/g, "'").replace(/[”″]/g, '"').replace(/,/g, '.');
  const example = settings.units === 'us' ? `12' 6"` : '3.8';
  const bare = mixedNumber(clean);
  const bareMetres =
    bare === null ? null : bare * (settings.units === 'us' ? INCHES_PER_FOOT * METRES_PER_INCH : 1);
  const value = bareMetres ?? metric(clean) ?? feetAndInches(clean);
  if (value === null || !Number.isFinite(value))
    return { ok: false, message: `Type a length such as ${example}.` };
  return { ok: true, value };
}

/** Feet and inches to the nearest eighth, or metres with two decimals. */
export function formatLength(metres: number, settings: LengthSettings): string {
  if (settings.units === 'metric') return `${metres.toFixed(2)} m`;
  const eighths = Math.round((metres / METRES_PER_INCH) * 8);
  const feet = Math.floor(eighths / 96);
  const inches = Math.floor((eighths % 96) / 8);
  const rest = eighths % 8;
  const divisor = rest % 4 === 0 ? 4 : rest % 2 === 0 ? 2 : 1;
  const fraction = rest === 0 ? '' : `${inches > 0 ? ' ' : ''}${rest / divisor}/${8 / divisor}`;
  const inchText = inches > 0 || rest === 0 ? String(inches) : '';
  return `${feet}' ${inchText}${fraction}"`;
}

/** The unit that a bare number means. */
export const lengthUnit = (settings: LengthSettings): string => (settings.units === 'us' ? 'ft' : 'm');
