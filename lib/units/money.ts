/** Money: integer minor units with a currency. Formatting and parsing in one place. */
import { CURRENCY_CODES, minorDigits } from '@/lib/pricing/currencies';
import { parsed, type Parsed, pointed, squeeze, unread } from './parsed';
import type { ShopSettings } from './settings';

export { CURRENCY_CODES, minorDigits };

type MoneySettings = Pick<ShopSettings, 'currency' | 'locale'>;

/** "1,234.50" or, with `symbol`, "$1,234.50". Exact for any integer that a bigint column holds. */
export function formatMoney(
  minor: number | bigint | string,
  settings: MoneySettings,
  { symbol = true }: { symbol?: boolean } = {},
): string {
  const digits = minorDigits(settings.currency) ?? 2;
  const whole = BigInt(minor);
  const text = (whole < 0n ? -whole : whole).toString().padStart(digits + 1, '0');
  const units = digits === 0 ? text : text.slice(0, -digits);
  const grouped = units.replace(/\B(?=(\d{3})+(?!\d))/g, ',');
  const amount = digits === 0 ? grouped : `${grouped}.${text.slice(-digits)}`;
  const sign = whole < 0n ? '−' : '';
  return `${sign}${symbol ? currencySymbol(settings) : ''}${amount}`;
}

function currencySymbol({ currency, locale }: MoneySettings): string {
  const parts = new Intl.NumberFormat(locale, { style: 'currency', currency }).formatToParts(0);
  const symbol = parts.find((part) => part.type === 'currency')?.value ?? currency;
  return /[A-Za-z]$/.test(symbol) ? `${symbol}\u00a0` : symbol;
}

/**
 * Reads "1,234.50", "$1234.5" or "12,50" as integer minor units. More digits than the currency has are refused, and
 * so is a comma that is neither between groups of three nor a decimal one.
 */
export function parseMoney(text: string, settings: MoneySettings): Parsed<bigint> {
  const digits = minorDigits(settings.currency) ?? 2;
  const bare = squeeze(text)
    .replace(/[$£€¥₩]/, '')
    .replace(new RegExp(`^${settings.currency}|${settings.currency}$`, 'i'), '');
  const match = /^([-+])?(\d{1,13})(?:\.(\d*))?$/.exec(pointed(bare) ?? '');
  if (!match) return unread('Type an amount such as 1,234.50.');
  const [, sign, units = '0', decimals = ''] = match;
  if (decimals.length > digits)
    return unread(
      digits === 0
        ? `Whole amounts only in ${settings.currency}.`
        : `At most ${digits} digits after the point in ${settings.currency}.`,
    );
  const value = BigInt(units + decimals.padEnd(digits, '0'));
  return parsed(sign === '-' ? -value : value);
}

/** Integer minor units as a plain decimal string in currency units: "1234.50". */
export function minorToDecimal(minor: number | bigint | string, currency: string): string {
  const digits = minorDigits(currency) ?? 2;
  const whole = BigInt(minor);
  const text = (whole < 0n ? -whole : whole).toString().padStart(digits + 1, '0');
  const sign = whole < 0n ? '-' : '';
  return digits === 0 ? `${sign}${text}` : `${sign}${text.slice(0, -digits)}.${text.slice(-digits)}`;
}
