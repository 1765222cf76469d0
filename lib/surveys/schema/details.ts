/** What a survey may also say of an area and of what hangs in it. All of it may stay unknown. zod/mini: phones load it. */
import * as z from 'zod/mini';

export const yesNo = z.enum(['yes', 'no', 'unknown']);
export type YesNo = z.infer<typeof yesNo>;

const short = (most: number) =>
  z._default(z.string().check(z.maxLength(most, `At most ${most} characters.`)), '');
const metres = z._default(
  z.nullable(z.number().check(z.nonnegative('must not be negative'), z.maximum(200, 'is too high'))),
  null,
);
const reflectance = z._default(
  z.nullable(z.number().check(z.minimum(0, 'must not be negative'), z.maximum(1, 'must be at most 100 %'))),
  null,
);
const answer = z._default(yesNo, 'unknown');

export const CEILINGS = ['unknown', 'grid', 'plaster', 'concrete', 'open', 'metal', 'other'] as const;
export const ACCESS = ['unknown', 'floor', 'ladder', 'tower', 'lift'] as const;
export const CONTROLS = ['unknown', 'none', 'occupancy', 'daylight', 'timer', 'dimming', 'several'] as const;
export const MOUNTINGS = [
  'unknown',
  'recessed',
  'surface',
  'pendant',
  'high-bay',
  'wall',
  'track',
  'pole',
] as const;

/** A year has 8,760 hours: 365 days. */
export const HOURS_IN_YEAR = 8760;
const WEEKS_IN_YEAR = 365 / 7;

/** Monday to Sunday. */
const dayHours = z
  .array(z.number().check(z.minimum(0, 'must not be negative'), z.maximum(24, 'a day has 24 hours')))
  .check(z.length(7, 'needs seven days'));

/** What light the area is to have, and by what. */
const light = z.strictObject({
  /** As the table of targets names it. */
  use: short(120),
  targetLux: z._default(
    z.nullable(z.number().check(z.positive('must be greater than zero'), z.maximum(100_000, 'is too much'))),
    null,
  ),
  partId: z._default(z.nullable(z.uuid()), null),
  quantity: z._default(
    z.nullable(z.number().check(z.int('must be a whole number'), z.minimum(1), z.maximum(100_000))),
    null,
  ),
  utilisationFactor: z._default(
    z.nullable(z.number().check(z.positive('must be greater than zero'), z.maximum(1.5))),
    null,
  ),
  /** Share of the first light that is left when lamps are old and dirty. */
  lossFactor: z._default(
    z.number().check(z.positive('must be greater than zero'), z.maximum(1, 'must be at most 100 %')),
    0.8,
  ),
});

export const areaDetails = z.strictObject({
  /** Of the luminaires, over the floor. */
  mountingMetres: metres,
  /** Of the plane that is worked on, over the floor. */
  workplaneMetres: metres,
  ceilingReflectance: reflectance,
  wallReflectance: reflectance,
  floorReflectance: reflectance,
  /** As marked or wanted, e.g. IP65. */
  ipRating: short(20),
  ceiling: z._default(z.enum(CEILINGS), 'unknown'),
  plenum: answer,
  insulationContact: answer,
  access: z._default(z.enum(ACCESS), 'unknown'),
  /** How the area is switched: which switch lights what. */
  switching: short(400),
  controls: z._default(z.enum(CONTROLS), 'unknown'),
  panel: short(60),
  circuitNumber: short(60),
  light: z.prefault(light, {}),
  dayHours: z._default(z.nullable(dayHours), null),
  weeksPerYear: z._default(
    z.nullable(z.number().check(z.minimum(0, 'must not be negative'), z.maximum(53, 'a year has 52 weeks'))),
    null,
  ),
});
export type AreaDetails = z.infer<typeof areaDetails>;
export const NO_AREA_DETAILS: AreaDetails = z.parse(areaDetails, {});

export const weekOf = (days: readonly number[]): number => days.reduce((sum, hours) => sum + hours, 0);

/** Hours a year of a weekly pattern; 52 weeks and a day unless the weeks are given. */
export function hoursPerYear(weeklyHours: number | null, weeksPerYear: number | null): number | null {
  if (weeklyHours === null) return null;
  return Math.min(HOURS_IN_YEAR, weeklyHours * (weeksPerYear ?? WEEKS_IN_YEAR));
}

const recount = z.strictObject({
  quantity: z.number().check(z.int('must be a whole number'), z.minimum(0), z.maximum(1_000_000)),
  at: z.iso.datetime({ offset: true }),
});

export const luminaireDetails = z.strictObject({
  lampsOut: z._default(
    z.number().check(z.int('must be a whole number'), z.minimum(0), z.maximum(1_000_000)),
    0,
  ),
  mounting: z._default(z.enum(MOUNTINGS), 'unknown'),
  zone: short(60),
  dimmerModel: short(120),
  panel: short(60),
  circuitNumber: short(60),
  /** Every count that was made, the last one standing. */
  recounts: z._default(z.array(recount).check(z.maxLength(50, 'At most 50 counts.')), []),
});
export type LuminaireDetails = z.infer<typeof luminaireDetails>;
export const NO_LUMINAIRE_DETAILS: LuminaireDetails = z.parse(luminaireDetails, {});
