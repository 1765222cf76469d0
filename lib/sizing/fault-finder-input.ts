/** What the fault finder is asked: the circuit as drawn, its tolerances, the meter and its readings. */
import * as z from 'zod/mini';
import { EngineError, type Limits, refuse } from '@/lib/engine/contract';
import { arrayAnalysisCalculation } from './array-analysis';
import { conductorResistance } from './conductor-resistance';
import { COLD_CELSIUS, METER_PCT, SUPPLY_PCT } from './fault-finder-band';
import { PLACES, type Quantity, type Reading, type Tolerances } from './fault-finder-model';
import { celsius, notNegative, positive } from './inputs';
import { checkForwardVolts, forwardVoltsShape } from './led-range';
import { tapeAnalysisCalculation } from './tape-analysis';

const MOST_CUTS = 5_000;
const MOST_FEEDS = 20;
const MOST_STRINGS = 50;
const MOST_LEDS = 1_000;
const MOST_READINGS = 100;

const index = z
  .number()
  .check(z.int('must be a whole number'), z.minimum(1, 'must be at least 1: the first is 1'));
const tolerancePct = notNegative.check(z.maximum(50, 'must be at most 50'));
const errorPct = positive.check(z.maximum(20, 'must be at most 20'));
const figure = z.number().check(z.minimum(-1e6, 'is no reading'), z.maximum(1e6, 'is no reading'));

const string = z.strictObject({
  amps: positive,
  count: index.check(z.maximum(1000, 'must be at most 1,000')),
  module: z.strictObject(forwardVoltsShape),
  positiveOhms: notNegative,
  negativeOhms: notNegative,
  openCircuitVolts: z.optional(positive),
});

export const schema = z.strictObject({
  circuit: z
    .discriminatedUnion('kind', [
      z.strictObject({ kind: z.literal('tape'), input: tapeAnalysisCalculation.schema }),
      z.strictObject({ kind: z.literal('array'), input: arrayAnalysisCalculation.schema }),
      z.strictObject({ kind: z.literal('string'), input: string }),
    ])
    .check(
      z.describe(
        'As drawn, with resistances of conductors at working temperature. tape: as tape-analysis; array: as array-analysis; string: modules in series on a constant-current driver.',
      ),
    ),
  tolerances: z.optional(
    z
      .strictObject({
        supplyPct: z.optional(tolerancePct),
        currentPct: z.optional(tolerancePct),
        resistorPct: z.optional(tolerancePct),
        spreadVolts: z.optional(notNegative.check(z.maximum(2, 'must be at most 2 V'))),
        workingCelsius: z.optional(celsius),
      })
      .check(
        z.describe(
          'Half widths: supply volts 5 %, regulated current 5 %, resistors 5 %, forward volts of an LED 0.1 V unless given; conductors from 20 C to workingCelsius, 75 unless given.',
        ),
      ),
  ),
  meter: z.optional(
    z
      .strictObject({ voltsPct: z.optional(errorPct), ampsPct: z.optional(errorPct) })
      .check(z.describe('Error in % of the reading: 1 for volts, 3 for a clamp unless given.')),
  ),
  readings: z
    .array(
      z.strictObject({
        at: z
          .enum(PLACES)
          .check(
            z.describe(
              "feed: at the driver's terminals of that feed (volts, amps). cut: volts at the load of that segment, or across that module. string: amps of that string, volts across its LEDs. positive-conductor, negative-conductor: volts along that conductor of that feed.",
            ),
          ),
        index: index.check(z.describe('Which feed, segment, module or string, from 1.')),
        volts: z.optional(figure.check(z.describe('Negative where the polarity is the wrong way round.'))),
        amps: z.optional(figure),
      }),
    )
    .check(
      z.minLength(1, 'needs at least one reading'),
      z.maxLength(MOST_READINGS, `holds at most ${MOST_READINGS} readings`),
    ),
});

export type FaultFinderInput = z.infer<typeof schema>;
type Circuit = FaultFinderInput['circuit'];

/** Resistance of copper at 20 C over the same at working temperature; the law is the same for all sizes. */
function coldShare(workingCelsius: number): number {
  const at = (own: number) => conductorResistance('1.5 mm2', 'solid', own).ohmsPerMetre;
  return at(COLD_CELSIUS) / at(workingCelsius);
}

export function tolerancesOf({ tolerances = {} }: FaultFinderInput): Tolerances {
  const {
    supplyPct = SUPPLY_PCT,
    currentPct = 5,
    resistorPct = 5,
    spreadVolts = 0.1,
    workingCelsius = 75,
  } = tolerances;
  return { supplyPct, currentPct, resistorPct, spreadVolts, coldShare: coldShare(workingCelsius) };
}

export const meterOf = ({ meter = {} }: FaultFinderInput) => ({
  volts: meter.voltsPct ?? METER_PCT.volts,
  amps: meter.ampsPct ?? METER_PCT.amps,
});

function tooLarge(path: string, message: string): never {
  throw new EngineError('too-large', `${path}: ${message}`, [{ path, message }]);
}

/** The search solves the circuit some hundred times over: smaller limits than a single analysis has. */
function checkSize({ kind, input }: Circuit, limits: Limits): void {
  if (kind === 'tape') {
    const cuts = Math.min(limits.maxCuts, MOST_CUTS);
    if (input.cuts > cuts) tooLarge('circuit.input.cuts', `must be at most ${cuts} here`);
    if (input.feeds.length > MOST_FEEDS)
      tooLarge('circuit.input.feeds', `holds at most ${MOST_FEEDS} feeds here`);
    if ((input.joints ?? []).length > 0) refuse('circuit.input.joints', 'are looked for here, not given');
    input.feeds.forEach(({ at }, i) => {
      if (at > input.cuts)
        refuse(
          `circuit.input.feeds.${i}.at`,
          `must not be beyond the end of the tape, boundary ${input.cuts}`,
        );
    });
  }
  if (kind === 'array') {
    if (input.strings.length > MOST_STRINGS)
      tooLarge('circuit.input.strings', `holds at most ${MOST_STRINGS} strings here`);
    const leds = input.strings.reduce((sum, own) => sum + own.leds.length, 0);
    if (leds > MOST_LEDS)
      tooLarge('circuit.input.strings', `must hold at most ${MOST_LEDS} LEDs in all here`);
  }
  if (kind === 'string') checkForwardVolts(input.module, 'circuit.input.module');
}

const WHAT = { tape: 'tape', array: 'array', string: 'string' } as const;

/** How many of a place the circuit has, by what can be read there. */
function placesOf(
  circuit: Circuit,
): Partial<Record<Quantity['at'], { most: number; amps: boolean; volts: boolean }>> {
  const both = (most: number) => ({ most, amps: true, volts: true });
  const volts = (most: number) => ({ most, amps: false, volts: true });
  if (circuit.kind === 'tape') {
    const { cuts, feeds } = circuit.input;
    const conductors = volts(feeds.length);
    return {
      feed: both(feeds.length),
      cut: volts(cuts),
      'positive-conductor': conductors,
      'negative-conductor': conductors,
    };
  }
  if (circuit.kind === 'array') return { feed: both(1), string: both(circuit.input.strings.length) };
  return {
    feed: both(1),
    cut: volts(circuit.input.count),
    string: both(1),
    'positive-conductor': volts(1),
    'negative-conductor': volts(1),
  };
}

function readingOf(
  { at, index: own, volts, amps }: FaultFinderInput['readings'][number],
  path: string,
): Reading {
  if (volts !== undefined && amps !== undefined)
    refuse(`${path}.amps`, 'is not given together with volts: one reading, one quantity');
  if (volts === undefined && amps === undefined) refuse(`${path}.volts`, 'is needed, or amps');
  return {
    at,
    index: own,
    quantity: volts === undefined ? 'amps' : 'volts',
    measured: volts ?? amps ?? 0,
  };
}

/** @throws {EngineError} `invalid-input` with the field's path, `too-large` over the limits */
export function readingsOf(input: FaultFinderInput, limits: Limits): Reading[] {
  const { circuit } = input;
  checkSize(circuit, limits);
  const places = placesOf(circuit);
  return input.readings.map((given, i) => {
    const path = `readings.${i}`;
    const reading = readingOf(given, path);
    const place = places[reading.at];
    if (!place) return refuse(`${path}.at`, `can not be read on a ${WHAT[circuit.kind]}`);
    if (reading.index > place.most)
      refuse(`${path}.index`, `must be at most ${place.most}: the drawing has no more`);
    if (!place[reading.quantity]) refuse(`${path}.${reading.quantity}`, 'can not be read there: only volts');
    return reading;
  });
}
