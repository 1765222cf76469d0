/** What `retrofit-check` takes: one change line, as far as it is known. What is left out counts as not known. */
import * as z from 'zod/mini';
import { notNegative, positive } from './inputs';

export const RETROFIT_ACTIONS = [
  'leave',
  'relamp',
  'bypass',
  'external-driver',
  'listed-kit',
  'new-luminaire',
  'add',
  'remove',
  'relocate',
] as const;
export type RetrofitAction = (typeof RETROFIT_ACTIONS)[number];

export const RETROFIT_HAZARDS = [
  'suspectBallasts',
  'suspectCeiling',
  'sharedNeutral',
  'aluminiumConductors',
  'noEquipmentGround',
  'oldWireAboveLuminaires',
  'noIsolationPoint',
] as const;
export type RetrofitHazard = (typeof RETROFIT_HAZARDS)[number];

/** Luminaires; zero is a line that is being typed. */
const quantity = z
  .number()
  .check(
    z.int('must be a whole number'),
    z.nonnegative('must not be negative'),
    z.maximum(1_000_000, 'must be at most 1,000,000'),
  );
const units = z.number().check(z.int('must be a whole number'), z.nonnegative('must not be negative'));
const yesNo = z.enum(['yes', 'no', 'unknown']);
const ballastKind = z.enum(['magnetic', 'instant-start', 'rapid-start', 'programmed-start', 'none']);

/** What hangs there now. `ballast` "none" is a luminaire whose lampholders are already on the supply. */
const existing = z.strictObject({
  lampType: z.optional(z.string().check(z.maxLength(60, 'must have at most 60 characters'))),
  quantity: z.optional(quantity),
  voltAmps: z.optional(notNegative),
  ballast: z.enum([...ballastKind.options, 'unknown']),
  lampholder: z.enum(['shunted', 'non-shunted', 'unknown']),
  /** How tubes that are fed by the supply are wired at present. */
  fedEnd: z.optional(z.enum(['single', 'double', 'unknown'])),
});

/** What the maker says of the new lamp, kit or luminaire: per unit of the line. */
const product = z
  .strictObject({
    listed: z.boolean(),
    /** The maker's window of nominal supply volts; null for what is fed by the ballast alone. */
    ratedVoltsMin: z.nullable(positive),
    ratedVoltsMax: z.nullable(positive),
    voltAmps: z.optional(notNegative),
    watts: z.optional(notNegative),
    tubeType: z.nullable(z.enum(['A', 'B', 'A-B', 'C'])),
    fedEnd: z.nullable(z.enum(['single', 'double'])),
    /** Kinds of ballast that the maker allows; and whether the very ballast stands in the maker's list. */
    ballastKinds: z.optional(z.array(ballastKind)),
    ballastListed: z.optional(yesNo),
    /** What the maker asks of the lampholders, where it asks. */
    lampholders: z.optional(z.enum(['non-shunted', 'either'])),
    dimming: z.optional(
      z.nullable(z.enum(['none', 'phase', 'phase-forward', 'phase-reverse', '0-10v', 'dali'])),
    ),
    unitsPerBreaker: z.optional(positive),
    unitsPerB16: z.optional(positive),
    inrushAmps: z.optional(positive),
    pulseFactor: z.optional(positive),
  })
  .check(
    z.refine((p) => (p.ratedVoltsMin === null) === (p.ratedVoltsMax === null), {
      path: ['ratedVoltsMax'],
      message: 'give both ends of the window, or neither',
    }),
    z.refine(
      (p) => p.ratedVoltsMin === null || p.ratedVoltsMax === null || p.ratedVoltsMin <= p.ratedVoltsMax,
      { path: ['ratedVoltsMin'], message: 'must not be above ratedVoltsMax' },
    ),
  );

export const retrofitCheckSchema = z.strictObject({
  basis: z.enum(['us', 'iec']),
  action: z.enum(RETROFIT_ACTIONS),
  /** New units of this line. */
  quantity,
  /** Nominal volts where the luminaire connects; null while not known. */
  supplyVolts: z.nullable(positive),
  existing: z.optional(z.nullable(existing)),
  product: z.optional(z.nullable(product)),
  /** New lampholders come with this line: non-shunted where they are fed at one end. */
  lampholdersReplaced: z.optional(z.boolean()),
  /** The way the luminaires are switched and dimmed once the work is done. */
  control: z.optional(
    z.strictObject({
      kind: z.enum([
        'none',
        'switch',
        'sensor',
        'contactor',
        'step',
        'phase-forward',
        'phase-reverse',
        '0-10v',
        'dali',
        'unknown',
      ]),
      minimumLoadWatts: z.optional(notNegative),
      ratedInrushAmps: z.optional(positive),
    }),
  ),
  emergency: z.optional(
    z.strictObject({
      kind: z.enum(['none', 'unswitched', 'battery-pack', 'generator', 'unknown']),
      /** What the emergency unit is fed by once the work is done. */
      feedAfter: z.optional(z.enum(['unswitched', 'switched', 'unknown'])),
      /** What runs the lamp from the battery once the work is done. */
      driverAfter: z.optional(z.enum(['listed-led', 'existing', 'unknown'])),
    }),
  ),
  breaker: z.optional(
    z.strictObject({
      amps: positive,
      curve: z.optional(z.enum(['B', 'C', 'D'])),
      /** New units on this one breaker, where the line is spread over several. All of them unless given. */
      units: z.optional(units),
      /** Other load that stays on it. */
      otherVoltAmps: z.optional(notNegative),
    }),
  ),
  hazards: z.optional(z.partialRecord(z.enum(RETROFIT_HAZARDS), yesNo)),
  /** A means to disconnect comes with this line. */
  disconnectAdded: z.optional(z.boolean()),
  /** False for displays, vehicles, boats and signs. */
  buildingLighting: z.optional(z.boolean()),
});

export type RetrofitCheckInput = z.infer<typeof retrofitCheckSchema>;
export type Existing = z.infer<typeof existing>;
export type Product = z.infer<typeof product>;
