/** 5. What the spread of forward volts does to an array: string currents over many draws. */
import * as z from 'zod/mini';
import { defineCalculation, EngineError, type Limits, type Outcome, refuse } from '@/lib/engine/contract';
import {
  arrayAnalysis,
  arrayFields,
  checkSize,
  imbalanceOf,
  inSeries,
  ledCurves,
  supplyOf,
} from './array-analysis';
import { findingsOf } from './array-report';
import type { SeriesString } from './diode';
import { notNegative, positive } from './inputs';
import { solveNode } from './parallel-strings';
import { normal, uniform } from './random';

/** Currents that one run keeps for its percentiles, whatever the limit of draws. */
const MOST_CURRENTS = 20_000_000;
const PERCENTILES = [1, 5, 50, 95, 99] as const;

const schema = z.strictObject({
  ...arrayFields,
  /** Of each LED about its own curve. */
  forwardVolts: z.strictObject({
    distribution: z.enum(['normal', 'uniform']),
    /** Standard deviation (normal) or half the width (uniform), V. */
    spreadVolts: notNegative.check(z.maximum(2, 'must be at most 2 V')),
  }),
  draws: z.number().check(z.int('must be a whole number'), z.minimum(1, 'must be at least 1')),
  seed: z.number().check(z.int('must be a whole number'), z.minimum(0), z.maximum(2 ** 32 - 1)),
  minAmps: z.optional(notNegative),
  maxAmps: z.optional(positive),
});

export type ArraySpreadInput = z.infer<typeof schema>;

type Percentiles = Record<'p1' | 'p5' | 'p50' | 'p95' | 'p99', number>;

export interface ArraySpread {
  /** With every LED on its own curve. */
  nominal: { supplyAmps: number; stringAmps: number[]; imbalance: number | null };
  /** Of the currents of all strings in all draws. */
  stringAmps: Percentiles & { min: number; max: number };
  /** Of highest over lowest in each draw; null when a string was dark in any. */
  imbalance: Percentiles | null;
  /** Share of draws with every string from minAmps to maxAmps; null where neither is given. */
  yieldPct: number | null;
}

/** Between the two nearest of the sorted figures, in proportion. */
function percentile(sorted: Float64Array, percent: number): number {
  const place = ((sorted.length - 1) * percent) / 100;
  const below = Math.floor(place);
  const low = sorted[below] ?? 0;
  const high = sorted[Math.min(below + 1, sorted.length - 1)] ?? 0;
  return low + (high - low) * (place - below);
}

function percentiles(sorted: Float64Array): Percentiles {
  const [p1, p5, p50, p95, p99] = PERCENTILES.map((percent) => percentile(sorted, percent));
  return { p1: p1 ?? 0, p5: p5 ?? 0, p50: p50 ?? 0, p95: p95 ?? 0, p99: p99 ?? 0 };
}

function check(input: ArraySpreadInput, limits: Limits): void {
  checkSize(input, limits);
  const most = Math.min(limits.maxDraws, Math.floor(MOST_CURRENTS / input.strings.length));
  if (input.draws > most) {
    const message = `must be at most ${most} here`;
    throw new EngineError('too-large', `draws: ${message}`, [{ path: 'draws', message }]);
  }
  if (input.minAmps !== undefined && input.maxAmps !== undefined && input.minAmps > input.maxAmps) {
    refuse('minAmps', 'must not be above maxAmps');
  }
}

/** The same LED with its forward volts moved: its saturation current moves the other way, its slope stays. */
function moved(piece: SeriesString, volts: number): SeriesString {
  return {
    ohms: piece.ohms,
    junctions: piece.junctions.map(({ slopeVolts, saturationAmps }) => ({
      slopeVolts,
      saturationAmps: saturationAmps * Math.exp(-volts / slopeVolts),
    })),
  };
}

function drawAll(input: ArraySpreadInput, curves: readonly SeriesString[][]) {
  const { draws, minAmps = 0, maxAmps = Infinity } = input;
  const { distribution, spreadVolts } = input.forwardVolts;
  const supply = supplyOf(input);
  const next = uniform(input.seed);
  const shift = () => spreadVolts * (distribution === 'normal' ? normal(next) : 2 * next() - 1);
  const amps = new Float64Array(draws * input.strings.length);
  const imbalances = new Float64Array(draws);
  let dark = false;
  let within = 0;
  for (let draw = 0; draw < draws; draw++) {
    const strings = input.strings.map(({ ballastOhms }, i) =>
      inSeries(
        ballastOhms,
        (curves[i] ?? []).map((piece) => moved(piece, shift())),
      ),
    );
    const node = solveNode(strings, supply);
    amps.set(node.amps, draw * strings.length);
    const imbalance = imbalanceOf(node.amps);
    dark ||= imbalance === null;
    imbalances[draw] = imbalance ?? 0;
    if (node.amps.every((own) => own >= minAmps && own <= maxAmps)) within++;
  }
  return { amps: amps.sort(), imbalances: dark ? null : imbalances.sort(), within };
}

/**
 * Draws every LED's forward volts about its own curve and solves the array each time.
 * @returns amps A, shares in %
 * @throws {EngineError} as array-analysis, and `too-large` over the limit of draws.
 * Source: as array-analysis; percentiles between the two nearest order statistics, in proportion.
 */
export function arraySpread(input: ArraySpreadInput): ArraySpread {
  const curves = ledCurves(input);
  const nominal = arrayAnalysis(input, curves);
  const { amps, imbalances, within } = drawAll(input, curves);
  const limited = input.minAmps !== undefined || input.maxAmps !== undefined;
  return {
    nominal: {
      supplyAmps: nominal.supplyAmps,
      stringAmps: nominal.strings.map((string) => string.amps),
      imbalance: nominal.imbalance,
    },
    stringAmps: { ...percentiles(amps), min: amps[0] ?? 0, max: amps.at(-1) ?? 0 },
    imbalance: imbalances && percentiles(imbalances),
    yieldPct: limited ? (within / input.draws) * 100 : null,
  };
}

export const arraySpreadCalculation = defineCalculation({
  name: 'array-spread',
  summary: 'Spread of string currents over random forward volts: percentiles and yield (bench work)',
  bench: true,
  schema,
  calculate: (input, limits): Outcome<ArraySpread> => {
    check(input, limits);
    const result = arraySpread(input);
    return {
      result,
      findings: findingsOf(input, arrayAnalysis(input)),
      working: [
        {
          key: 'yield',
          name: 'Share of draws with every string within its limits',
          formula: 'draws within / draws * 100',
          inputs: [
            { name: 'draws', value: input.draws, unit: '' },
            { name: 'seed', value: input.seed, unit: '' },
            { name: 'spread', value: input.forwardVolts.spreadVolts, unit: 'V' },
            { name: 'distribution', value: input.forwardVolts.distribution, unit: '' },
          ],
          value: result.yieldPct,
          unit: '%',
          basis: 'random draws of forward volts from the seed',
        },
      ],
    };
  },
});
