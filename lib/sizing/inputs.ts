/** Schema pieces that several calculations share. Phones load them: zod/mini. */
import * as z from 'zod/mini';
import { ALL_SIZES } from './tables/conductors';

/** Zero is allowed for rates, costs, watts, ohms, metres and amps. */
export const notNegative = z.number().check(z.nonnegative('must not be negative'));
export const positive = z.number().check(z.positive('must be greater than zero'));
export const percent = z
  .number()
  .check(z.nonnegative('must not be negative'), z.maximum(100, 'must be at most 100'));
export const percentAbove0 = z
  .number()
  .check(z.positive('must be greater than zero'), z.maximum(100, 'must be at most 100'));
export const fraction = z
  .number()
  .check(z.positive('must be greater than zero'), z.maximum(1, 'must be at most 1'));
/** Copper's law is used between the cold store and the hottest insulation class. */
export const celsius = z
  .number()
  .check(z.minimum(-60, 'must be at least -60'), z.maximum(250, 'must be at most 250'));
export const count = z
  .number()
  .check(
    z.int('must be a whole number'),
    z.minimum(1, 'must be at least 1'),
    z.maximum(1_000_000, 'must be at most 1,000,000'),
  );

export const conductorSize = z.enum(ALL_SIZES as [string, ...string[]], {
  error: `must be a size from AWG 24 to AWG 4/0 or from 0.5 mm2 to 35 mm2, e.g. "AWG 14" or "1.5 mm2"`,
});
export const stranding = z.enum(['solid', 'stranded', 'flexible']);
export const system = z.enum(['dc', 'single-phase', 'three-phase']);
