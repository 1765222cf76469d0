/** The settings' schema, apart from their type: what only shows figures loads no schema. */
import * as z from 'zod/mini';
import { CURRENCY_CODES } from '@/lib/pricing/currencies';
import type { ShopSettings } from './settings';

/** Asking for a format is the one test of a zone's name that every machine answers. */
function isTimeZone(name: string): boolean {
  try {
    return new Intl.DateTimeFormat('en-US', { timeZone: name }).format(0) !== '';
  } catch {
    return false;
  }
}

export const shopSettings = z.strictObject({
  basis: z.enum(['us', 'iec']),
  basisEdition: z
    .string()
    .check(z.trim(), z.minLength(1, 'Name the edition.'), z.maxLength(60, 'At most 60 characters.')),
  units: z.enum(['us', 'metric']),
  currency: z.string().check(z.refine((code) => CURRENCY_CODES.includes(code), 'Choose a currency.')),
  locale: z.enum(['en-US', 'en-GB']),
  timeZone: z.string().check(z.refine(isTimeZone, 'Choose a time zone such as America/New_York.')),
  paper: z.enum(['letter', 'a4']),
  taxRounding: z.enum(['line', 'document']),
}) satisfies z.ZodMiniType<ShopSettings>;
