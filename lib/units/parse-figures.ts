/** Figures as people type them: plain numbers, percents, temperatures, and electrical figures with their prefixes. */
import { numberFrom, parsed, type Parsed, unread } from './parsed';
import type { ShopSettings } from './settings';

/** A plain number: a decimal comma is taken for a point, grouping is dropped. */
export function parseNumber(text: string): Parsed<number> {
  const value = numberFrom(text);
  return value === null ? unread('Type a number.') : parsed(value);
}

/** "8.25", "8,25" or "8.25 %" as 8.25. */
export function parsePercent(text: string): Parsed<number> {
  const value = numberFrom(text.replace(/%\s*$/, ''));
  return value === null ? unread('Type a percentage such as 8.25.') : parsed(value);
}

/** A temperature in the shop's degrees, or in the ones that are named, as Celsius. */
export function parseTemperature(text: string, settings: Pick<ShopSettings, 'units'>): Parsed<number> {
  const unit = /([cf])\s*$/i.exec(text.trim())?.[1]?.toLowerCase();
  const value = numberFrom(text.replace(/°?\s*[cf]?\s*$/i, ''));
  if (value === null) return unread('Type a temperature such as 77 F or 25 C.');
  const fahrenheit = unit === 'f' || (unit === undefined && settings.units === 'us');
  return parsed(fahrenheit ? (value - 32) / 1.8 : value);
}

const PREFIX: Readonly<Record<string, number>> = {
  '': 1,
  u: 1e-6,
  µ: 1e-6,
  μ: 1e-6,
  m: 1e-3,
  k: 1e3,
  K: 1e3,
  M: 1e6,
};
const SYMBOL = { V: '[vV]', A: '[aA]', W: '[wW]', VA: '[vV][aA]', ohm: '(?:[oO]hms?|Ω|Ω|R)' } as const;
const EXAMPLE = { V: '24 V', A: '350 mA', W: '40 W', VA: '44 VA', ohm: '4.7 k' } as const;

/** "277", "24 V", "350 mA", "1.2kW", "4.7k" in the unit that the field asks for. */
export function parseFigure(text: string, unit: keyof typeof SYMBOL): Parsed<number> {
  const match = new RegExp(`^(.*?)\\s*([uµμmkKM]?)\\s*(?:${SYMBOL[unit]})?$`).exec(text.trim());
  const value = match ? numberFrom(match[1] ?? '') : null;
  if (value === null) return unread(`Type a figure such as ${EXAMPLE[unit]}.`);
  // Divided where it can be: 350 / 1000 is 0.35, 350 * 0.001 is not.
  const factor = PREFIX[match?.[2] ?? ''] ?? 1;
  return parsed(factor < 1 ? value / Math.round(1 / factor) : value * factor);
}
