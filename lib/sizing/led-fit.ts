/** 12. The LED's figures from readings on the bench: least squares on volts. */
import * as z from 'zod/mini';
import { atLeast, defineCalculation, type Outcome, refuse } from '@/lib/engine/contract';
import { thermalVolts } from './diode';
import { celsius, count, positive } from './inputs';
import { fitCurve, type FittedCurve, voltsAt } from './led-fit-curve';
import { findingsOf } from './led-fit-findings';
import { workingOf } from './led-fit-working';

/** Three figures are sought: a fourth current shows whether the law holds at all. */
const LEAST_CURRENTS = 4;
const LEAST_RATIO = 10;
const MOST_POINTS = 2000;
/** A saturation current below this is none that the other calculations could take up. */
const LEAST_SATURATION_AMPS = 1e-300;
const LEAST_EMISSION = 0.01;

const schema = z.strictObject({
  points: z
    .array(
      z.strictObject({
        volts: positive,
        amps: positive,
        /** Which LED was measured, where there are several. */
        sample: z.optional(
          z.string().check(z.minLength(1, 'must not be empty'), z.maxLength(40, 'is too long')),
        ),
      }),
    )
    .check(
      z.minLength(LEAST_CURRENTS, `needs at least ${LEAST_CURRENTS} readings`),
      z.maxLength(MOST_POINTS, `takes at most ${MOST_POINTS} readings`),
    ),
  /** Of the LED while it was measured. */
  celsius,
  /** Current that the LED will work at: where the samples' spread is told. */
  workingAmps: z.optional(positive),
  /** Currents to give the forward volts at; those of the readings unless given. */
  atAmps: z.optional(z.array(positive).check(z.maxLength(200, 'takes at most 200 currents'))),
  /** Junctions in series within one package; 1 unless given. Only what n is usual depends on it. */
  junctions: z.optional(count),
});

export type LedFitInput = z.infer<typeof schema>;
type Point = LedFitInput['points'][number];

interface Figures {
  saturationAmps: number | null;
  emissionCoefficient: number | null;
  seriesOhms: number | null;
  residualVolts: number | null;
}

export interface LedFit extends Figures {
  /** Largest miss of any reading. */
  residualMaxVolts: number | null;
  /** Of the three columns scaled to unit length. */
  conditionNumber: number | null;
  forwardVoltsAt: { amps: number; volts: number | null }[];
  /** Each LED by itself; one where no reading names a sample. */
  samples: (Figures & { sample: string | null; points: number; workingVolts: number | null })[];
  /** Of the samples' forward volts at the working current; null for one sample, or without that current. */
  spread: {
    amps: number;
    meanVolts: number;
    standardDeviationVolts: number;
    minVolts: number;
    maxVolts: number;
  } | null;
}

/** One fit with what its findings and working read. */
export interface Fit {
  input: LedFitInput;
  thermalVolts: number;
  curve: FittedCurve | null;
  result: LedFit;
}

function checkCurrents(points: readonly Point[], whose: string): void {
  const amps = points.map((point) => point.amps);
  const different = new Set(amps).size;
  if (different < LEAST_CURRENTS)
    refuse('points', `${whose}needs readings at ${LEAST_CURRENTS} different currents at least`);
  const ratio = amps.reduce((a, b) => Math.max(a, b)) / amps.reduce((a, b) => Math.min(a, b));
  if (!atLeast(ratio, LEAST_RATIO))
    refuse('points', `${whose}needs currents over a decade at least, highest ten times the lowest`);
}

function bySample(points: readonly Point[]): Map<string | null, Point[]> {
  const named = points.filter((point) => point.sample !== undefined).length;
  if (named > 0 && named < points.length) {
    const bare = points.findIndex((point) => point.sample === undefined);
    refuse(`points.${bare}.sample`, 'is missing: name the sample of every reading, or of none');
  }
  const samples = new Map<string | null, Point[]>();
  for (const point of points) {
    const key = point.sample ?? null;
    samples.set(key, [...(samples.get(key) ?? []), point]);
  }
  for (const [sample, own] of samples) checkCurrents(own, sample === null ? '' : `sample "${sample}" `);
  return samples;
}

/** The curve, or null where what was found is no LED's: a straight line, or a step. */
function ledCurve(points: readonly Point[], thermal: number): FittedCurve | null {
  const curve = fitCurve(points);
  if (curve === null) return null;
  const highest = points.reduce((most, { amps }) => Math.max(most, amps), 0);
  const sound =
    curve.saturationAmps >= LEAST_SATURATION_AMPS &&
    curve.saturationAmps <= highest &&
    curve.slopeVolts / thermal >= LEAST_EMISSION;
  return sound ? curve : null;
}

const figuresOf = (curve: FittedCurve | null, thermal: number): Figures => ({
  saturationAmps: curve && curve.saturationAmps,
  emissionCoefficient: curve && curve.slopeVolts / thermal,
  seriesOhms: curve && curve.seriesOhms,
  residualVolts: curve && curve.residualVolts,
});

function spreadOf(amps: number | undefined, volts: readonly (number | null)[]): LedFit['spread'] {
  const known = volts.filter((one) => one !== null);
  if (amps === undefined || known.length < 2 || known.length < volts.length) return null;
  const mean = known.reduce((sum, one) => sum + one, 0) / known.length;
  const squares = known.reduce((sum, one) => sum + (one - mean) ** 2, 0);
  return {
    amps,
    meanVolts: mean,
    standardDeviationVolts: Math.sqrt(squares / (known.length - 1)),
    minVolts: Math.min(...known),
    maxVolts: Math.max(...known),
  };
}

function wantedAmps({ points, atAmps, workingAmps }: LedFitInput): number[] {
  const wanted = atAmps ?? points.map(({ amps }) => amps);
  return [...new Set([...wanted, ...(workingAmps === undefined ? [] : [workingAmps])])].sort((a, b) => a - b);
}

/**
 * Fits V = n*kT/q * ln(I/Is + 1) + I*Rs to readings of volts and amps, all samples together and each by itself.
 * @returns Is in A, n, Rs in ohm at the readings' temperature; residualVolts is the root of the mean square of what is
 * left; nulls where no LED's curve fits. forwardVoltsAt by the curve of all readings together. The spread is the
 * samples' standard deviation (divided by one less than their number).
 * @throws {EngineError} `invalid-input` on `points` under four currents over a decade (of each sample), on
 * `points.N.sample` where some readings name a sample and others do not.
 * Source: Shockley equation with series resistance, k and q exact (SI 2019); least squares.
 */
export function ledFit(input: LedFitInput): Fit {
  const thermal = thermalVolts(input.celsius);
  const groups = [...bySample(input.points)];
  const curve = ledCurve(input.points, thermal);
  const samples = groups.map(([sample, own]) => {
    const fitted = groups.length === 1 ? curve : ledCurve(own, thermal);
    const workingVolts =
      fitted === null || input.workingAmps === undefined ? null : voltsAt(fitted, input.workingAmps);
    return { sample, points: own.length, ...figuresOf(fitted, thermal), workingVolts };
  });
  const result: LedFit = {
    ...figuresOf(curve, thermal),
    residualMaxVolts: curve && curve.residualMaxVolts,
    conditionNumber: curve && curve.conditionNumber,
    forwardVoltsAt: wantedAmps(input).map((amps) => ({ amps, volts: curve && voltsAt(curve, amps) })),
    samples,
    spread: spreadOf(
      input.workingAmps,
      samples.map(({ workingVolts }) => workingVolts),
    ),
  };
  return { input, thermalVolts: thermal, curve, result };
}

export const ledFitCalculation = defineCalculation({
  name: 'led-fit',
  summary: 'LED figures (Is, n, Rs) from readings of volts and amps, and their spread (bench work)',
  bench: true,
  schema,
  calculate: (input): Outcome<LedFit> => {
    const fit = ledFit(input);
    return { result: fit.result, findings: findingsOf(fit), working: workingOf(fit) };
  },
});
