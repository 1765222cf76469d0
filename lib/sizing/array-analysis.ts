/** 5. Operating point of strings of LEDs in parallel, each LED with its own figures. */
import * as z from 'zod/mini';
import { defineCalculation, EngineError, type Limits, type Outcome, refuse } from '@/lib/engine/contract';
import { findingsOf, workingOf } from './array-report';
import { DARK_AMPS, saturationAt, type SeriesString, stringVolts, thermalVolts } from './diode';
import { celsius, notNegative, positive } from './inputs';
import { type NodeSupply, solveNode } from './parallel-strings';

const LED_CELSIUS = 25;
const XTI = 3;

const led = z.strictObject({
  saturationAmps: positive,
  emissionCoefficient: positive,
  seriesOhms: notNegative,
  celsius: z.optional(celsius),
  saturationCelsius: z.optional(celsius),
  gapVolts: z.optional(positive),
  xti: z.optional(notNegative),
});

/** One supply, as volts behind a resistance or as amps: which of the two is checked by hand, to name the field. */
export const arraySupply = z.strictObject({
  volts: z.optional(positive),
  sourceOhms: z.optional(notNegative),
  amps: z.optional(notNegative),
});

export const arrayFields = {
  supply: arraySupply,
  sharedOhms: z.optional(notNegative),
  strings: z
    .array(
      z.strictObject({
        ballastOhms: notNegative,
        leds: z.array(led).check(z.minLength(1, 'needs at least one LED')),
      }),
    )
    .check(z.minLength(1, 'needs at least one string')),
};
const schema = z.strictObject(arrayFields);

export type ArrayInput = z.infer<typeof schema>;
type Led = z.infer<typeof led>;

export interface ArrayAnalysis {
  supplyAmps: number;
  /** At the supply's terminals, after its own resistance. */
  supplyVolts: number;
  strings: { amps: number; ballastWatts: number; ledVolts: number[] }[];
  /** Highest over lowest string current; null when a string is dark. */
  imbalance: number | null;
}

function ledCurve(part: Led, path: string): SeriesString {
  const at = part.celsius ?? LED_CELSIUS;
  const { gapVolts, emissionCoefficient } = part;
  const saturationAmps =
    gapVolts === undefined
      ? part.saturationAmps
      : saturationAt({ ...part, gapVolts, xti: part.xti ?? XTI }, part.saturationCelsius ?? at, at);
  if (!(saturationAmps > 0) || !Number.isFinite(saturationAmps)) {
    refuse(`${path}.gapVolts`, 'gives no saturation current that can be computed at this temperature');
  }
  const slopeVolts = emissionCoefficient * thermalVolts(at);
  return { ohms: part.seriesOhms, junctions: [{ slopeVolts, saturationAmps }] };
}

/** Each LED as a piece of curve of its own, string by string. */
export function ledCurves(input: ArrayInput): SeriesString[][] {
  return input.strings.map((string, i) =>
    string.leds.map((part, k) => ledCurve(part, `strings.${i}.leds.${k}`)),
  );
}

/** LEDs alike are one junction with their slopes added: the solver's work then grows with kinds, not with LEDs. */
export function inSeries(ballastOhms: number, leds: readonly SeriesString[]): SeriesString {
  const slopes = new Map<number, number>();
  let ohms = ballastOhms;
  for (const piece of leds) {
    ohms += piece.ohms;
    for (const { saturationAmps, slopeVolts } of piece.junctions) {
      slopes.set(saturationAmps, (slopes.get(saturationAmps) ?? 0) + slopeVolts);
    }
  }
  return {
    ohms,
    junctions: [...slopes].map(([saturationAmps, slopeVolts]) => ({ saturationAmps, slopeVolts })),
  };
}

/** Checks that exactly one kind of supply is given. */
export function supplyOf(input: ArrayInput): NodeSupply {
  const { volts, amps, sourceOhms } = input.supply;
  if (volts === undefined && amps === undefined) return refuse('supply.volts', 'is needed, or amps');
  if (volts !== undefined && amps !== undefined)
    return refuse('supply.amps', 'is not given together with volts');
  if (amps === undefined) {
    return { volts: volts ?? 0, ohms: (sourceOhms ?? 0) + (input.sharedOhms ?? 0) };
  }
  if (sourceOhms !== undefined) {
    refuse('supply.sourceOhms', 'belongs to a supply in volts: a current source has none');
  }
  return { amps };
}

/** Highest over lowest; null when one is dark. */
export function imbalanceOf(amps: readonly number[]): number | null {
  let lowest = Infinity;
  let highest = 0;
  for (const own of amps) {
    lowest = Math.min(lowest, own);
    highest = Math.max(highest, own);
  }
  return lowest < DARK_AMPS ? null : highest / lowest;
}

/**
 * Exact operating point, I = Is * (exp((V - I*Rs)/(n*kT/q)) - 1) in every LED.
 * @returns amps A, volts V, watts W
 * @throws {EngineError} `invalid-input` with the field, `no-solution` where nothing limits the current.
 * Source: Shockley equation with series resistance, Kirchhoff's laws.
 */
export function arrayAnalysis(input: ArrayInput, curves = ledCurves(input)): ArrayAnalysis {
  const supply = supplyOf(input);
  const node = solveNode(
    input.strings.map(({ ballastOhms }, i) => inSeries(ballastOhms, curves[i] ?? [])),
    supply,
  );
  const strings = input.strings.map(({ ballastOhms }, i) => {
    const amps = node.amps[i] ?? 0;
    const ledVolts = (curves[i] ?? []).map((piece) => stringVolts(piece, amps));
    return { amps, ballastWatts: amps * amps * ballastOhms, ledVolts };
  });
  const supplyAmps = 'amps' in supply ? supply.amps : node.supplyAmps;
  const supplyVolts =
    'amps' in supply
      ? node.volts + supplyAmps * (input.sharedOhms ?? 0)
      : supply.volts - supplyAmps * (input.supply.sourceOhms ?? 0);
  return { supplyAmps, supplyVolts, strings, imbalance: imbalanceOf(node.amps) };
}

/** Refuses arrays over the limit before anything is solved. */
export function checkSize(input: ArrayInput, limits: Limits): void {
  const leds = input.strings.reduce((sum, string) => sum + string.leds.length, 0);
  if (leds <= limits.maxCuts) return;
  const message = `must hold at most ${limits.maxCuts} LEDs in all here`;
  throw new EngineError('too-large', `strings: ${message}`, [{ path: 'strings', message }]);
}

export const arrayAnalysisCalculation = defineCalculation({
  name: 'array-analysis',
  summary: 'Operating point of strings of LEDs in parallel: currents, volts and imbalance (bench work)',
  bench: true,
  schema,
  calculate: (input, limits): Outcome<ArrayAnalysis> => {
    checkSize(input, limits);
    const result = arrayAnalysis(input);
    return { result, findings: findingsOf(input, result), working: workingOf(input, result) };
  },
});
