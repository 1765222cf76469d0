/** What an owner may set for the shop. */
import { z } from 'zod';

const percent = (most: number) =>
  z.coerce
    .number<string | number>({ message: 'must be a number' })
    .min(0, 'must not be negative')
    .max(most, `must be at most ${most}`);

const KNOWN_ZONES = new Set(Intl.supportedValuesOf('timeZone').concat('UTC'));

export const CURRENCIES = ['USD', 'CAD', 'GBP', 'EUR', 'AUD', 'NZD', 'JPY', 'KWD'] as const;

export const shopSettingsForm = z.object({
  name: z.string().trim().min(1, 'The shop needs a name.').max(120, 'At most 120 characters.'),
  licenceNumber: z.string().trim().max(60, 'At most 60 characters.'),
  email: z.union([z.literal(''), z.email('This is not an e-mail address.')]),
  phone: z.string().trim().max(40, 'At most 40 characters.'),
  address: z.string().trim().max(400, 'At most 400 characters.'),
  basis: z.enum(['us', 'iec']),
  basisEdition: z
    .string()
    .trim()
    .min(1, 'Name the edition the shop works to.')
    .max(60, 'At most 60 characters.'),
  units: z.enum(['us', 'metric']),
  currency: z.enum(CURRENCIES),
  locale: z.enum(['en-US', 'en-GB']),
  timeZone: z.string().refine((zone) => KNOWN_ZONES.has(zone), 'This time zone is not known.'),
  paper: z.enum(['letter', 'a4']),
  taxRounding: z.enum(['line', 'document']),
  taxName: z.string().trim().min(1, 'Name the tax.').max(40, 'At most 40 characters.'),
  taxRatePct: percent(100),
  depositPct: percent(100),
  markupPct: percent(1000),
  labourRate: percent(100_000),
  quoteValidDays: z.coerce
    .number<string | number>()
    .int('must be whole days')
    .min(1, 'at least 1')
    .max(365, 'at most 365'),
  benchWork: z.boolean(),
  baseVersion: z.number().int(),
});

export type ShopSettingsForm = z.input<typeof shopSettingsForm>;
export type ShopSettingsInput = z.output<typeof shopSettingsForm>;
