/** What a survey holds beside its areas: light that was measured, the utility's account, types of the shop's own. */
import * as z from 'zod/mini';

const text = (most: number) => z.string().check(z.maxLength(most, `At most ${most} characters.`));
const named = (most: number, missing: string) =>
  z.string().check(z.trim(), z.minLength(1, missing), z.maxLength(most, `At most ${most} characters.`));
const day = z.iso.date('Type a date.');
const notNegative = (most: number) =>
  z.number().check(z.nonnegative('must not be negative'), z.maximum(most, 'is too much'));

/** Illuminance at one point, with whose meter read it. */
export const reading = z.strictObject({
  areaId: z.uuid(),
  place: named(120, 'Say where it was read.'),
  /** Null: the point is marked, and not read yet. */
  lux: z.nullable(notNegative(200_000)),
  taken: z.enum(['before', 'after']),
  /** What else lit the point. */
  daylight: z.enum(['none', 'some', 'unknown']),
  meter: text(120),
  calibratedOn: z.nullable(day),
  readAt: z.iso.datetime({ offset: true }),
  notes: text(2_000),
});
export type Reading = z.infer<typeof reading>;

const bill = z
  .strictObject({
    from: day,
    to: day,
    kilowattHours: notNegative(1e9),
    demandKilowatts: z.nullable(notNegative(1e6)),
    amount: z.nullable(notNegative(1e9)),
  })
  .check(z.refine(({ from, to }) => from <= to, { path: ['to'], error: 'must not be before the first day' }));
export type Bill = z.infer<typeof bill>;

export const utilityAccount = z.strictObject({
  utility: named(120, 'Name the utility.'),
  accountNumber: text(60),
  rateSchedule: text(120),
  /** Currency for a kilowatt-hour. */
  energyRate: z.nullable(notNegative(1_000)),
  /** A bill's total over its kilowatt-hours, demand included. */
  blended: z.boolean(),
  /** Currency for a kilowatt of demand a month. */
  demandRate: z.nullable(notNegative(10_000)),
  bills: z.array(bill).check(z.maxLength(60, 'At most 60 bills.')),
  notes: text(2_000),
});
export type UtilityAccount = z.infer<typeof utilityAccount>;

/** A luminaire type that the shop met and keeps, beside the table of known ones. */
export const ownType = z.strictObject({
  name: named(120, 'Name the type.'),
  watts: notNegative(100_000),
  wattsSource: z.enum(['nameplate', 'measured', 'datasheet', 'typical']),
  ballast: z.enum(['magnetic', 'instant-start', 'programmed-start', 'rapid-start', 'none', 'unknown']),
});
export type OwnType = z.infer<typeof ownType>;
