/** 8. Operating point of an LED tape: a ladder of cuts with feeds. */
import * as z from 'zod/mini';
import {
  defineCalculation,
  EngineError,
  type Limits,
  type Outcome,
  REL,
  refuse,
} from '@/lib/engine/contract';
import { celsius, count, notNegative, positive } from './inputs';
import { operatingPoint, type OperatingPoint, type TapeInput } from './tape-operating-point';
import { findingsOf, workingOf } from './tape-report';

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

const feed = z.strictObject({
  at: z.number().check(z.int('must be a whole number of cuts'), z.nonnegative('must not be negative')),
  volts: positive,
  positiveOhms: notNegative,
  negativeOhms: notNegative,
  source: z.optional(z.string().check(z.minLength(1, 'must not be empty'), z.maxLength(200, 'is too long'))),
  sourceOhms: z.optional(notNegative),
});

const schema = z.strictObject({
  // No most here: what is too large depends on where it runs.
  cuts: z.number().check(z.int('must be a whole number'), z.minimum(1, 'must be at least 1')),
  cutMetres: notNegative,
  railOhmsPerMetre: z.strictObject({ positive: notNegative, negative: notNegative }),
  load,
  feeds: z
    .array(feed)
    .check(z.minLength(1, 'needs at least one feed'), z.maxLength(1000, 'holds at most 1,000 feeds')),
  sourceOhms: z.optional(notNegative),
  celsius: z.optional(celsius),
  /** Bad joints: resistance in one rail at a boundary between two cuts (1 to cuts - 1). */
  joints: z.optional(
    z
      .array(
        z.strictObject({
          at: z.number().check(z.int('must be a whole number of cuts'), z.minimum(1, 'must be at least 1')),
          rail: z.enum(['positive', 'negative']),
          ohms: notNegative,
        }),
      )
      .check(z.maxLength(1000, 'holds at most 1,000 joints')),
  ),
});

export interface TapeAnalysis {
  /** In the order given; amps positive out of the source, watts at its volts. */
  feeds: { amps: number; watts: number }[];
  loadVolts: number[];
  loadAmps: number[];
  minVolts: number;
  maxVolts: number;
  worstDropPct: number;
  dimmestPct: number | null;
  totalWatts: number;
}

function check(input: TapeInput, limits: Limits): void {
  if (input.cuts > limits.maxCuts) {
    const message = `must be at most ${limits.maxCuts} here`;
    throw new EngineError('too-large', `cuts: ${message}`, [{ path: 'cuts', message }]);
  }
  input.feeds.forEach(({ at }, i) => {
    if (at > input.cuts)
      refuse(`feeds.${i}.at`, `must not be beyond the end of the tape, boundary ${input.cuts}`);
  });
  input.joints?.forEach(({ at }, i) => {
    if (at >= input.cuts)
      refuse(`joints.${i}.at`, `must lie between two cuts, at most at boundary ${input.cuts - 1}`);
  });
}

/** A constant current is drawn whatever the volts: where they would have to be negative, nothing can flow so. */
function refuseNegative(input: TapeInput, minVolts: number, highestVolts: number): void {
  if (input.load.model !== 'constant-current' || minVolts >= -REL * highestVolts) return;
  const message =
    'the loads would need negative volts to draw this current: no physical solution (shorten the run, feed it at more places or use larger conductors)';
  throw new EngineError('no-solution', `The tape has no operating point: ${message}.`, [
    { path: 'load.amps', message },
  ]);
}

function range(figures: Float64Array): { least: number; most: number } {
  let least = Infinity;
  let most = -Infinity;
  for (const own of figures) {
    least = Math.min(least, own);
    most = Math.max(most, own);
  }
  return { least, most };
}

function resultOf(input: TapeInput, point: OperatingPoint): TapeAnalysis {
  const { highestVolts, loadDrops, loadVolts, loadAmps, sources } = point;
  const volts = range(loadVolts);
  const amps = range(loadAmps);
  refuseNegative(input, volts.least, highestVolts);
  const feeds = point.feedAmps.map((own, i) => ({
    amps: own,
    watts: (sources[point.sourceOfFeed[i] ?? 0]?.volts ?? 0) * own,
  }));
  return {
    feeds,
    loadVolts: Array.from(loadVolts),
    loadAmps: Array.from(loadAmps),
    minVolts: volts.least,
    maxVolts: volts.most,
    worstDropPct: (range(loadDrops).most / highestVolts) * 100,
    dimmestPct: amps.most === 0 ? null : (amps.least / amps.most) * 100,
    totalWatts: feeds.reduce((sum, { watts }) => sum + watts, 0),
  };
}

/**
 * A fed tape's volts and currents. Cut k is a piece of cutMetres with its load in the middle; a feed joins boundary
 * `at` through its own two conductors.
 * @returns amps A, volts V, watts W, shares in %
 * @throws {EngineError} `invalid-input` with the field, `too-large` over the limit of cuts, `no-solution` where the
 * circuit has no operating point.
 * Source: Kirchhoff's laws; Shockley equation with series resistance for LED strings.
 */
export function tapeAnalysis(input: TapeInput): TapeAnalysis {
  return resultOf(input, operatingPoint(input));
}

export const tapeAnalysisCalculation = defineCalculation({
  name: 'tape-analysis',
  summary: 'Volts, currents, drop and dimming along an LED tape with one or more feeds',
  bench: false,
  schema,
  calculate: (input, limits): Outcome<TapeAnalysis> => {
    check(input, limits);
    const point = operatingPoint(input);
    const result = resultOf(input, point);
    return { result, findings: findingsOf(input, point, result), working: workingOf(input, point, result) };
  },
});
