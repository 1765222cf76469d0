/** The electrical figures of a circuit as its form holds them: numbers in SI, no money. zod/mini: phones load it. */
import * as z from 'zod/mini';
import { tapeDatasheet } from '@/lib/parts/schema';

const positive = z.number().check(z.positive('must be greater than zero'));
const notNegative = z.number().check(z.nonnegative('must not be negative'));
const percent = z
  .number()
  .check(z.positive('must be greater than zero'), z.maximum(100, 'must be at most 100'));
const text = z.string().check(z.maxLength(200, 'At most 200 characters.'));

export const tapeRun = z.strictObject({
  tape: z.nullable(tapeDatasheet),
  runMetres: positive,
  driverMetres: notNegative,
  feed: z.enum(['start', 'end', 'both', 'middle']),
  feederSize: text,
  feederStranding: z.enum(['solid', 'stranded', 'flexible']),
  conductorCelsius: z.number(),
  driver: z.nullable(z.strictObject({ volts: positive, watts: positive, classTwo: z.boolean() })),
  maxDropPct: percent,
  minDimmestPct: percent,
  loadFractionPct: percent,
});
export type TapeRun = z.infer<typeof tapeRun>;

export const branchCircuit = z.strictObject({
  system: z.enum(['single-phase', 'three-phase']),
  volts: positive,
  luminaire: text,
  quantity: z.number().check(z.int('must be a whole number'), z.positive('must be at least 1')),
  voltAmps: positive,
  breakerAmps: positive,
  curve: z.nullable(z.enum(['B', 'C', 'D'])),
  continuous: z.boolean(),
  metres: notNegative,
  spacingMetres: notNegative,
  maxDropPct: percent,
  inrushAmps: z.nullable(positive),
  pulseFactor: z.nullable(positive),
  unitsPerBreaker: z.nullable(positive),
  unitsPerB16: z.nullable(positive),
});
export type BranchCircuit = z.infer<typeof branchCircuit>;

export const resistorArray = z.strictObject({
  supplyVolts: positive,
  supplyMinVolts: positive,
  supplyMaxVolts: positive,
  forwardVolts: positive,
  forwardVoltsMin: positive,
  forwardVoltsMax: positive,
  amps: positive,
  maxAmps: positive,
  count: z.number().check(z.int('must be a whole number'), z.positive('must be at least 1')),
  perString: z.nullable(z.number().check(z.int('must be a whole number'), z.positive('must be at least 1'))),
  series: z.enum(['E6', 'E12', 'E24', 'E96']),
  tolerancePct: notNegative,
  ratedWatts: z.array(positive).check(z.minLength(1, 'Give at least one rating.')),
  loadFraction: z.number().check(z.positive('must be greater than zero'), z.maximum(1, 'must be at most 1')),
  ambientCelsius: z.number(),
});
export type ResistorArray = z.infer<typeof resistorArray>;

export const ELECTRICAL = {
  'tape-run': tapeRun,
  'branch-circuit': branchCircuit,
  'resistor-array': resistorArray,
} as const;
export type CircuitKind = keyof typeof ELECTRICAL;
export interface ElectricalOf {
  'tape-run': TapeRun;
  'branch-circuit': BranchCircuit;
  'resistor-array': ResistorArray;
}

/** Which parts were chosen, by their place in the circuit. */
export const circuitChoices = z.strictObject({
  roles: z.partialRecord(z.enum(['tape', 'driver', 'cable', 'luminaire', 'led', 'resistor']), z.uuid()),
  parts: z.optional(z.array(z.strictObject({ partId: z.uuid(), quantity: z.string() }))),
  labourHours: z.optional(z.string()),
});
export type CircuitChoices = z.infer<typeof circuitChoices>;

/** Where a new circuit of a kind starts: common practice, every figure to be looked at. */
export function startingPoint(kind: CircuitKind, basis: 'us' | 'iec'): ElectricalOf[CircuitKind] {
  if (kind === 'tape-run')
    return {
      tape: null,
      runMetres: 5,
      driverMetres: 2,
      feed: 'start',
      feederSize: basis === 'us' ? 'AWG 16' : '1.5 mm2',
      feederStranding: 'stranded',
      conductorCelsius: 40,
      driver: null,
      maxDropPct: 5,
      minDimmestPct: 90,
      loadFractionPct: 80,
    };
  if (kind === 'branch-circuit')
    return {
      system: 'single-phase',
      volts: basis === 'us' ? 120 : 230,
      luminaire: '',
      quantity: 12,
      voltAmps: 40,
      breakerAmps: basis === 'us' ? 20 : 10,
      curve: basis === 'us' ? null : 'B',
      continuous: true,
      metres: 15,
      spacingMetres: 2.4,
      maxDropPct: 3,
      inrushAmps: null,
      pulseFactor: null,
      unitsPerBreaker: null,
      unitsPerB16: null,
    };
  return {
    supplyVolts: 12.6,
    supplyMinVolts: 11,
    supplyMaxVolts: 14.4,
    forwardVolts: 3.2,
    forwardVoltsMin: 3,
    forwardVoltsMax: 3.4,
    amps: 0.02,
    maxAmps: 0.03,
    count: 12,
    perString: null,
    series: 'E24',
    tolerancePct: 5,
    ratedWatts: [0.25, 0.5, 1, 2],
    loadFraction: 0.6,
    ambientCelsius: 40,
  };
}
