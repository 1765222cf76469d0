/** 4. Strings of LEDs, each behind its own ballast resistor, on a voltage supply. */
import * as z from 'zod/mini';
import {
  atLeast,
  atMost,
  defineCalculation,
  EngineError,
  floorWithin,
  type Limits,
  type Outcome,
  refuse,
} from '@/lib/engine/contract';
import { celsius, fraction, positive } from './inputs';
import { checkForwardVolts, forwardVoltsShape } from './led-range';
import { findingsOf } from './resistor-array-findings';
import {
  type ArrayString,
  arrayString,
  type Case,
  distinct,
  type ResistorArray,
  saferOhms,
} from './resistor-array-string';
import { workingOf } from './resistor-array-working';
import { supplyWindow, supplyWindowOf } from './supply-window';
import { E_SERIES_NAMES } from './tables/e-series';

/** Film resistors carry their rating up to 70 C and nothing at 155 C (makers' sheets, unless given). */
const DERATE_FROM_CELSIUS = 70;
const DERATE_TO_CELSIUS = 155;
const MIN_CURRENT_FRACTION = 0.5;

const leds = z.number().check(z.int('must be a whole number'), z.minimum(1, 'must be at least 1'));

const schema = z.strictObject({
  supply: supplyWindow,
  led: z.strictObject({
    ...forwardVoltsShape,
    amps: positive,
    maxAmps: positive,
  }),
  // No most here: what is too large depends on where it runs.
  count: leds,
  perString: z.optional(leds),
  resistor: z.strictObject({
    series: z.enum(E_SERIES_NAMES),
    tolerancePct: z.number().check(z.nonnegative('must not be negative'), z.lt(100, 'must be below 100')),
    ratedWatts: z.array(positive).check(z.minLength(1, 'needs at least one rating')),
    loadFraction: fraction,
    derateFromCelsius: z.optional(celsius),
    derateToCelsius: z.optional(celsius),
  }),
  ambientCelsius: celsius,
  minCurrentFraction: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.maximum(1, 'must be at most 1')),
  ),
});

export type ResistorArrayInput = z.infer<typeof schema>;

function derateAt(input: ResistorArrayInput): number {
  const from = input.resistor.derateFromCelsius ?? DERATE_FROM_CELSIUS;
  const to = input.resistor.derateToCelsius ?? DERATE_TO_CELSIUS;
  if (from >= to) return refuse('resistor.derateToCelsius', 'must be above derateFromCelsius');
  return Math.min(1, Math.max(0, (to - input.ambientCelsius) / (to - from)));
}

function caseOf(input: ResistorArrayInput, limits: Limits): Case {
  const { led, resistor } = input;
  checkForwardVolts(led, 'led');
  if (input.perString !== undefined && input.perString > input.count) {
    refuse('perString', 'must not be above count');
  }
  if (input.count > limits.maxCuts) {
    const message = `must be at most ${limits.maxCuts} here`;
    throw new EngineError('too-large', `count: ${message}`, [{ path: 'count', message }]);
  }
  return {
    supply: supplyWindowOf(input.supply, 'supply'),
    led,
    series: resistor.series,
    tolerance: resistor.tolerancePct / 100,
    ratedWatts: [...resistor.ratedWatts].sort((a, b) => a - b),
    loadFraction: resistor.loadFraction,
    derate: derateAt(input),
    ampsWanted: (input.minCurrentFraction ?? MIN_CURRENT_FRACTION) * led.amps,
  };
}

/** The largest number in series that keeps the current in its limits over the whole window; null if none does. */
function choosePerString(c: Case, most: number): number | null {
  const start = Math.min(most, floorWithin(c.supply.volts / c.led.forwardVolts));
  for (let leds = start; leds >= 1; leds--) {
    const { ampsMin, ampsMax } = arrayString(c, leds);
    if (ampsMin === null || ampsMax === null) continue;
    if (atMost(ampsMax, c.led.maxAmps) && atLeast(ampsMin, c.ampsWanted)) return leds;
  }
  return null;
}

function stringsOf(c: Case, total: number, perString: number): ArrayString[] {
  const whole = arrayString(c, perString);
  const strings = Array.from({ length: Math.floor(total / perString) }, () => ({ ...whole }));
  const rest = total % perString;
  return rest === 0 ? strings : [...strings, arrayString(c, rest)];
}

function totals(
  c: Case,
  strings: ArrayString[],
): Pick<ResistorArray, 'supplyAmps' | 'supplyWatts' | 'efficiency'> {
  let supplyAmps = 0;
  let ledWatts = 0;
  for (const { amps, leds } of strings) {
    if (amps === null) return { supplyAmps: null, supplyWatts: null, efficiency: null };
    supplyAmps += amps;
    ledWatts += leds * c.led.forwardVolts * amps;
  }
  if (supplyAmps === 0) return { supplyAmps: null, supplyWatts: null, efficiency: null };
  const supplyWatts = c.supply.volts * supplyAmps;
  return { supplyAmps, supplyWatts, efficiency: ledWatts / supplyWatts };
}

/**
 * Ballast resistors for `count` LEDs in strings.
 * exact = (V - n*Vf)/I, then the next preferred value; worst figures with the supply at its highest or lowest,
 * forward volts at the other end and the resistor at the end of its tolerance.
 * @returns ohm, A, W per string and in all; nulls where a string can't work.
 * @throws {EngineError} `invalid-input` with the field, `too-large` where count is above the limit.
 * Source: Ohm's law; preferred values IEC 60063:2015; derating from the resistor's sheet.
 */
function resistorArray(c: Case, input: ResistorArrayInput): ResistorArray {
  const perString = input.perString ?? choosePerString(c, input.count);
  const strings = perString === null ? [] : stringsOf(c, input.count, perString);
  const safer = distinct(strings).map((string) => saferOhms(c, string));
  return {
    perString,
    strings,
    ...totals(c, strings),
    saferOhms: safer.find((ohms) => ohms !== null) ?? null,
  };
}

export const resistorArrayCalculation = defineCalculation({
  name: 'resistor-array',
  summary:
    'Strings of LEDs with ballast resistors on a voltage supply: values, currents, ratings (bench work)',
  bench: true,
  schema,
  calculate: (input, limits): Outcome<ResistorArray> => {
    const c = caseOf(input, limits);
    const result = resistorArray(c, input);
    return { result, findings: findingsOf(c, result), working: workingOf(c, result) };
  },
});
