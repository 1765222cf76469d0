/** ISO 4217 minor-unit digits of the currencies that are offered. */
export const MINOR_DIGITS: Readonly<Record<string, number>> = {
  USD: 2,
  CAD: 2,
  GBP: 2,
  EUR: 2,
  AUD: 2,
  NZD: 2,
  CHF: 2,
  SEK: 2,
  NOK: 2,
  DKK: 2,
  JPY: 0,
  KRW: 0,
  KWD: 3,
  BHD: 3,
};

export const CURRENCY_CODES = Object.keys(MINOR_DIGITS);

/** @returns how many digits the minor unit has, or null for a currency that is not known here. */
export function minorDigits(currency: string): number | null {
  return Object.hasOwn(MINOR_DIGITS, currency) ? (MINOR_DIGITS[currency] ?? null) : null;
}
