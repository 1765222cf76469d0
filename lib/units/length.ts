/** Lengths: stored in metres, typed and shown as the shop works, feet-inch fractions as people write them. */
import { parsed, type Parsed, pointed, unread } from './parsed';
import type { ShopSettings } from './settings';

const METRES_PER_INCH = 0.0254;
const INCHES_PER_FOOT = 12;
const FEET = METRES_PER_INCH * INCHES_PER_FOOT;

type LengthSettings = Pick<ShopSettings, 'units'>;

const FRACTIONS: Readonly<Record<string, string>> = {
  '½': '1/2',
  '¼': '1/4',
  '¾': '3/4',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
};

/** Marks and words as one spelling: ' for feet, " for inches, n/m for the fraction signs. */
const spelled = (text: string): string =>
  text
    .trim()
    .toLowerCase()
    .replace(/[’′]/g, "'")
    .replace(/[”″]|''/g, '"')
    .replace(/\s*(?:feet|foot|ft\.?)(?![a-z])/g, "'")
    .replace(/\s*(?:inches|inch|in\.?)(?![a-z])/g, '"')
    .replace(/[½¼¾⅛⅜⅝⅞]/g, (sign) => ` ${FRACTIONS[sign]}`);

/** "3 1/2", "3-1/2", "1/2", "3.5" or "3" as a number. The whole part stands apart: 15/16 is no 1 5/16. */
function mixedNumber(text: string): number | null {
  const match = /^(?:([\d.,]+)(?:[\s-]+|$))?(?:(\d+)\/(\d+))?$/.exec(text.trim());
  if (!match || (match[1] === undefined && match[2] === undefined)) return null;
  const whole = match[1] === undefined ? 0 : decimal(match[1]);
  const part = match[2] === undefined ? 0 : ratio(match[2], match[3]);
  return whole === null || part === null ? null : whole + part;
}

function decimal(text: string): number | null {
  const clean = pointed(text);
  return clean !== null && /^(\d+\.?\d*|\.\d+)$/.test(clean) ? Number(clean) : null;
}

function ratio(top: string, bottom: string | undefined): number | null {
  const denominator = Number(bottom);
  return denominator > 0 ? Number(top) / denominator : null;
}

/** `12' 6 1/2"`, `12'-6`, `12'`, `150"`, `6 1/2"`. */
function feetAndInches(text: string): number | null {
  const match = /^(?:([^'"]+)')?[\s-]*(?:([^'"]+)("?))?$/.exec(text);
  if (!match || (match[1] === undefined && match[3] !== '"')) return null;
  const feet = match[1] === undefined ? 0 : mixedNumber(match[1]);
  const inches = match[2] === undefined ? 0 : mixedNumber(match[2]);
  return feet === null || inches === null ? null : (feet * INCHES_PER_FOOT + inches) * METRES_PER_INCH;
}

/** Divided rather than multiplied, so that 320 cm is 3.2 m to the last bit. */
const PER_METRE: Readonly<Record<string, number>> = { m: 1, cm: 100, mm: 1000 };

function metric(text: string): number | null {
  const match = /^(.+?)\s*(mm|cm|m|millimet(?:re|er)s?|centimet(?:re|er)s?|met(?:re|er)s?)$/.exec(text);
  const value = match ? decimal(match[1] ?? '') : null;
  if (value === null) return null;
  const unit = match?.[2] ?? 'm';
  const short =
    unit.length <= 2 ? unit : unit.startsWith('m') && !unit.startsWith('mi') ? 'm' : `${unit[0]}m`;
  return value / (PER_METRE[short] ?? 1);
}

/**
 * Reads a length: `3.2 m`, `320 cm`, `12' 6 1/2"`, `12ft 6in`, `150"`, or a bare number in the shop's unit
 * (feet or metres).
 */
export function parseLength(text: string, settings: LengthSettings): Parsed<number> {
  const clean = spelled(text.slice(0, 80));
  const bare = mixedNumber(clean);
  const value =
    bare === null ? (metric(clean) ?? feetAndInches(clean)) : bare * (settings.units === 'us' ? FEET : 1);
  if (value === null && /['"]/.test(clean) && /\d\s*[cm]?m\b/.test(clean))
    return unread('Two units in one length: type feet and inches, or metres.');
  if (value === null || !Number.isFinite(value))
    return unread(`Type a length such as ${settings.units === 'us' ? `12' 6"` : '3.8'}.`);
  return parsed(value);
}

/** Feet and inches to the nearest eighth, or metres with two decimals. */
export function formatLength(metres: number, settings: LengthSettings): string {
  if (!Number.isFinite(metres)) return '–';
  if (metres < 0) return `\u2212${formatLength(-metres, settings)}`;
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
