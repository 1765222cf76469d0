/** What every parser answers: the value, or a sentence that says what to type. */
export type Parsed<T> = { ok: true; value: T } | { ok: false; message: string };

export const parsed = <T>(value: T): Parsed<T> => ({ ok: true, value });
export const unread = <T>(message: string): Parsed<T> => ({ ok: false, message });

/** Longer than anything that a person means as one figure. */
const LONGEST = 64;

/** Spaces of all kinds (grouping ones too) dropped, the true minus sign taken for a hyphen. */
export const squeeze = (text: string): string =>
  text.length > LONGEST ? '?' : text.replace(/\s/g, '').replace(/[\u2212\u2013]/g, '-');

/**
 * Digits as people write them, with a point: commas between groups of three are dropped, a comma before one or two
 * last digits is a decimal comma. Null where it is neither.
 */
export function pointed(text: string): string | null {
  const clean = squeeze(text);
  if (!clean.includes(',')) return clean;
  if (/^[-+]?\d{1,3}(,\d{3})+(\.\d*)?$/.test(clean)) return clean.replaceAll(',', '');
  if (/^[-+]?\d+,\d{1,2}$/.test(clean)) return clean.replace(',', '.');
  return null;
}

/** A number as people type it, sign included; null where it is none. */
export function numberFrom(text: string): number | null {
  const clean = pointed(text);
  return clean !== null && /^[-+]?(\d+\.?\d*|\.\d+)$/.test(clean) ? Number(clean) : null;
}
