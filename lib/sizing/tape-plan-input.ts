/** What `tape-plan` takes: runs and driver places, the tape's data sheet, what is offered, what it costs, limits. */
import * as z from 'zod/mini';
import { basis } from './conductor-size-input';
import { celsius, conductorSize, count, fraction, notNegative, percent, positive, stranding } from './inputs';

export const FEEDS = ['start', 'end', 'middle', 'both'] as const;
export type Feed = (typeof FEEDS)[number];

/** Sections that a run may be cut into, unless given. */
export const MAX_SECTIONS = 12;

const name = z.string().check(z.minLength(1, 'must not be empty'), z.maxLength(200, 'is too long'));

const load = z.discriminatedUnion('model', [
  z.strictObject({
    model: z.literal('constant-current'),
    amps: notNegative,
    dropoutVolts: z.optional(notNegative),
  }),
  z.strictObject({ model: z.literal('resistive'), ohms: positive }),
  z.strictObject({
    model: z.literal('led-string'),
    leds: count,
    ballastOhms: notNegative,
    saturationAmps: positive,
    emissionCoefficient: positive,
    seriesOhms: notNegative,
  }),
]);

const tape = z.strictObject({
  volts: positive,
  /** Length between two cutting marks. */
  cutMetres: positive,
  railOhmsPerMetre: z.strictObject({ positive: notNegative, negative: notNegative }),
  /** Of one cut, as in `tape-analysis`. */
  load,
  /** Data sheet: longest tape fed from one end. */
  maxRunMetres: z.optional(positive),
  /** Data sheet; the larger of this and the load at the full volts counts towards the drivers. */
  wattsPerMetre: z.optional(notNegative),
  /** Data sheet: for Class 2 (limited power) sources only. */
  classLimitedOnly: z.optional(z.boolean()),
  /** The LEDs' temperature, at which their saturation current is given; 25 unless given. */
  celsius: z.optional(celsius),
});

const place = z.strictObject({
  place: name,
  /** One way, as the cable is laid, to the start of the run; and to its end (along the run unless given). */
  startMetres: notNegative,
  endMetres: z.optional(notNegative),
});

const run = z.strictObject({
  id: name,
  metres: positive,
  places: z
    .array(place)
    .check(z.minLength(1, 'needs at least one place'), z.maxLength(20, 'holds at most 20')),
  /** Choices that stay as they are while the rest is planned. */
  pinned: z.optional(
    z.strictObject({
      sections: z.optional(count),
      feed: z.optional(z.enum(FEEDS)),
      size: z.optional(conductorSize),
      place: z.optional(name),
    }),
  ),
});

const driver = z.strictObject({
  sku: name,
  volts: positive,
  channels: z
    .number()
    .check(
      z.int('must be a whole number'),
      z.minimum(1, 'must be at least 1'),
      z.maximum(32, 'must be at most 32'),
    ),
  /** Rating of one channel. */
  channelWatts: positive,
  /** Rating of all channels together: each is then counted on with its even share at most. */
  totalWatts: z.optional(positive),
  /** US: marked Class 2. IEC: marked as a limited power source. */
  classLimited: z.boolean(),
  /** IEC: marked SELV. */
  selv: z.optional(z.boolean()),
  cost: notNegative,
});

const conductor = z.strictObject({
  size: conductorSize,
  stranding,
  /** Of the cable: both conductors. */
  costPerMetre: notNegative,
  /** The cable's own rating; as tables have its size unless given. */
  amps: z.optional(positive),
});

export const tapePlanSchema = z.strictObject({
  basis,
  wet: z.optional(z.boolean()),
  /** No bare live part can be touched: sleeved tape, closed joints. No unless given. */
  insulated: z.optional(z.boolean()),
  /** Of the feeders' conductors. */
  celsius,
  tape,
  // No most here: what is too large depends on where it runs.
  runs: z.array(run).check(z.minLength(1, 'needs at least one run')),
  drivers: z
    .array(driver)
    .check(z.minLength(1, 'needs at least one driver'), z.maxLength(50, 'holds at most 50')),
  conductors: z
    .array(conductor)
    .check(z.minLength(1, 'needs at least one conductor'), z.maxLength(40, 'holds at most 40')),
  labour: z.strictObject({
    ratePerHour: notNegative,
    hoursPerFeed: notNegative,
    hoursPerDriver: notNegative,
    /** Of feeder. */
    hoursPerMetre: notNegative,
  }),
  limits: z.strictObject({
    maxDropPct: percent,
    minDimmestPct: percent,
    /** Load <= fraction * rating. */
    loadFraction: fraction,
    /** Longest unbroken tape, however it is fed. */
    longestRunMetres: z.optional(positive),
    maxSections: z.optional(
      z
        .number()
        .check(
          z.int('must be a whole number'),
          z.minimum(1, 'must be at least 1'),
          z.maximum(100, 'must be at most 100'),
        ),
    ),
  }),
});

export type TapePlanInput = z.infer<typeof tapePlanSchema>;
export type PlanRun = TapePlanInput['runs'][number];
export type PlanDriver = TapePlanInput['drivers'][number];
export type PlanConductor = TapePlanInput['conductors'][number];
