/** What `branch-circuit` takes: loads of one or more kinds behind breakers of one rating. */
import * as z from 'zod/mini';
import { basis, curve, layingShape } from './conductor-size-input';
import { celsius, conductorSize, count, notNegative, percent, positive, system } from './inputs';

/** Over it a plan is no lighting circuit any more, and the answer would be a list that nobody reads. */
export const MOST_UNITS = 10_000;
export const MOST_KINDS = 100;

const load = z.strictObject({
  name: z.string().check(z.maxLength(200, 'must have at most 200 characters')),
  // No most here: too many in all is another refusal than bad input.
  quantity: z.number().check(z.int('must be a whole number'), z.minimum(1, 'must be at least 1')),
  voltAmps: notNegative,
  /** Makers' figures for inrush: see lib/sizing/inrush.ts. */
  unitsPerB16: z.optional(positive),
  unitsPerBreaker: z.optional(positive),
  inrushAmps: z.optional(positive),
  pulseFactor: z.optional(positive),
  /** The maker's window of nominal supply volts. */
  ratedVoltsMin: z.optional(positive),
  ratedVoltsMax: z.optional(positive),
});

export const branchCircuitSchema = z.strictObject({
  basis,
  /** Source; line to line for three-phase. */
  volts: positive,
  system,
  loads: z.array(load).check(z.minLength(1, 'needs at least one load')),
  breakerAmps: positive,
  continuous: z.boolean(),
  /** One way, to the first unit. */
  metres: notNegative,
  /** Between units of a row; all in one place unless given. */
  spacingMetres: z.optional(notNegative),
  maxDropPct: percent,
  /** An existing circuit is checked, not resized: one circuit, the breaker and conductor that are there. */
  existing: z.optional(
    z.strictObject({
      /** What the new loads take the place of. */
      voltAmps: notNegative,
      /** What stays on the circuit beside them. */
      otherVoltAmps: z.optional(notNegative),
      /** Its conductor, where it is known. */
      size: z.optional(conductorSize),
    }),
  ),
  /** What switches a circuit, with its listed rating. */
  control: z.optional(
    z.strictObject({
      kind: z.optional(z.enum(['switch', 'sensor', 'contactor'])),
      ratedInrushAmps: z.optional(positive),
      /** The control maker's own count of such units. */
      maxUnits: z.optional(positive),
    }),
  ),
  /** 30 unless given. */
  ambientCelsius: z.optional(celsius),
  /** 2, and 3 for three-phase, unless given. */
  loadedConductors: z.optional(count),
  /** US: 60 to 100 A and 75 above unless given (110.14(C)). */
  terminalCelsius: z.optional(celsius),
  ...layingShape,
  curve: z.optional(curve),
});

export type BranchCircuitInput = z.infer<typeof branchCircuitSchema>;
export type BranchLoad = BranchCircuitInput['loads'][number];
