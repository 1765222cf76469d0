/** What `price-lines` takes. The same schema serves form, API and stored record. */
import * as z from 'zod/mini';
import { CURRENCY_CODES, minorDigits } from './currencies';

const MOST = 1e12;
const DECIMAL_TEXT = /^\d{1,13}(\.\d{1,12})?$/;

/** A decimal string or a number, not negative; kept as it came, so that 0.1 stays 0.1. */
const decimal = (what: string) =>
  z
    .union([z.number(), z.string().check(z.regex(DECIMAL_TEXT, `must be ${what} as digits with a point`))], {
      error: ({ input }) =>
        input === undefined ? 'is missing' : `must be ${what}: a number, or digits with a point as text`,
    })
    .check(
      z.refine(
        (value) => typeof value === 'string' || (value >= 0 && value <= MOST),
        `must be ${what}, not negative and at most 1e12`,
      ),
    );

const percent = (most: number) =>
  z.number().check(z.minimum(0, 'must not be negative'), z.maximum(most, `must be at most ${most}`));

const id = z
  .string()
  .check(z.minLength(1, 'must not be empty'), z.maxLength(200, 'must have at most 200 characters'));

const line = z.strictObject({
  id,
  quantity: decimal('a quantity'),
  unitCost: decimal('an amount'),
  unitLabourHours: z.optional(decimal('a number of hours')),
  labourRate: z.optional(decimal('a rate')),
  markupPct: z.optional(percent(100_000)),
  marginPct: z.optional(
    z.number().check(z.minimum(0, 'must not be negative'), z.lt(100, 'must be less than 100')),
  ),
  taxIds: z.array(id),
  optional: z.optional(z.boolean()),
  chosen: z.optional(z.boolean()),
});

export const priceLinesSchema = z.strictObject({
  currency: z
    .string()
    .check(z.refine((code) => minorDigits(code) !== null, `must be one of ${CURRENCY_CODES.join(', ')}`)),
  taxRounding: z.enum(['line', 'document']),
  lines: z.array(line).check(z.maxLength(20_000, 'must have at most 20,000 lines')),
  taxes: z.array(z.strictObject({ id, ratePct: percent(1_000) })),
  discountPct: z.optional(percent(100)),
  depositPct: z.optional(percent(100)),
  overheadPct: z.optional(percent(100_000)),
  contingencyPct: z.optional(percent(100_000)),
  minimumCharge: z.optional(decimal('an amount')),
});

export type PriceLinesInput = z.infer<typeof priceLinesSchema>;
export type PriceLine = PriceLinesInput['lines'][number];
