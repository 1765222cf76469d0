/** 6. A linear regulator as current source for one string, beside a resistor and a switching driver. */
import * as z from 'zod/mini';
import { defineCalculation, type Outcome, refuse } from '@/lib/engine/contract';
import { junctionAt, leftOver } from './constant-current';
import { nextPreferred } from './e-series';
import { celsius, count, notNegative, percentAbove0, positive } from './inputs';
import { checkForwardVolts, sourceLed } from './led-range';
import { type Comparison, comparisonOf } from './linear-current-source-comparison';
import { findingsOf } from './linear-current-source-findings';
import { workingOf } from './linear-current-source-working';
import { type SupplyWindow, supplyWindow, supplyWindowOf } from './supply-window';
import { E_SERIES_NAMES } from './tables/e-series';

/** Bandgap reference of the adjustable regulators in use for this (makers' sheets, typical). */
const REFERENCE_VOLTS = 1.25;

const schema = z.strictObject({
  supply: supplyWindow,
  led: sourceLed,
  perString: count,
  /** Wanted; the set resistor's standard value gives this or a little less. */
  amps: positive,
  /** 1.25 V unless given. */
  referenceVolts: z.optional(positive),
  /** Highest reference over parts and temperature. */
  referenceMaxVolts: z.optional(positive),
  /** Volts from input to output that the regulator needs. */
  dropoutVolts: notNegative,
  /** Junction to ambient, with its heat sink. */
  thermalCelsiusPerWatt: notNegative,
  maxJunctionCelsius: celsius,
  ambientCelsius: celsius,
  series: z.enum(E_SERIES_NAMES),
  /** Of the set resistor; 0 unless given. */
  setTolerancePct: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.lt(100, 'must be below 100')),
  ),
  /** Least current at which the regulator regulates. */
  minLoadAmps: z.optional(notNegative),
  /** Most volts from input to output. */
  maxDifferenceVolts: z.optional(positive),
  /** Of the switching driver that it is compared with. */
  switchingEfficiencyPct: z.optional(percentAbove0),
});

export type LinearCurrentSourceInput = z.infer<typeof schema>;

export interface LinearCurrentSource {
  setOhmsExact: number;
  setOhms: number;
  amps: number | null;
  ampsMax: number | null;
  setWatts: number | null;
  headroomVolts: number;
  regulatorWatts: number | null;
  regulatorWattsMax: number | null;
  junctionCelsius: number | null;
  efficiency: number | null;
  comparison: Comparison;
}

/** The input with its defaults filled in; what figures, findings and working read. */
export interface Case {
  input: LinearCurrentSourceInput;
  supply: SupplyWindow;
  referenceVolts: number;
  referenceMaxVolts: number;
  tolerance: number;
  /** Volts over the regulator: nominal, and the most with the LEDs lit. */
  differenceVolts: number;
  differenceMaxVolts: number;
}

function caseOf(input: LinearCurrentSourceInput): Case {
  const { led, perString } = input;
  checkForwardVolts(led, 'led');
  const referenceVolts = input.referenceVolts ?? REFERENCE_VOLTS;
  const referenceMaxVolts = input.referenceMaxVolts ?? referenceVolts;
  if (referenceMaxVolts < referenceVolts) refuse('referenceMaxVolts', 'must not be below referenceVolts');
  const supply = supplyWindowOf(input.supply, 'supply');
  return {
    input,
    supply,
    referenceVolts,
    referenceMaxVolts,
    tolerance: (input.setTolerancePct ?? 0) / 100,
    differenceVolts: leftOver(supply.volts, perString * led.forwardVolts + referenceVolts),
    differenceMaxVolts: leftOver(supply.maxVolts, perString * led.forwardVoltsMin + referenceVolts),
  };
}

/**
 * Set resistor, headroom, heat and junction of a linear current source: R = reference / I, then the next preferred
 * value, so that the current is never above what is wanted; headroom = Vmin - n * VfMax - reference - dropout;
 * regulator watts = (V - n * Vf - reference) * I, without the set resistor's; the worst with Vmax, n * VfMin and the
 * highest current; the junction from the worst.
 * @returns ohm, A, W, V, celsius; nulls where the supply does not reach the LEDs and the reference at all.
 * @throws {EngineError} `invalid-input` with the field.
 * Source: Ohm's law; the reference and its spread from the regulator's sheet; preferred values IEC 60063:2015.
 */
function linearCurrentSource(c: Case): LinearCurrentSource {
  const { input, supply, referenceVolts } = c;
  const { led, perString } = input;
  const setOhmsExact = referenceVolts / input.amps;
  const setOhms = nextPreferred(setOhmsExact, input.series);
  const reaches = c.differenceVolts >= 0;
  const reachesAtBest = c.differenceMaxVolts >= 0;
  const amps = reaches ? referenceVolts / setOhms : null;
  const ampsMax = reachesAtBest ? c.referenceMaxVolts / (setOhms * (1 - c.tolerance)) : null;
  const headroomVolts = leftOver(
    supply.minVolts,
    perString * led.forwardVoltsMax + referenceVolts + input.dropoutVolts,
  );
  const regulatorWattsMax = ampsMax === null ? null : c.differenceMaxVolts * ampsMax;
  return {
    setOhmsExact,
    setOhms,
    amps,
    ampsMax,
    setWatts: amps === null ? null : amps * amps * setOhms,
    headroomVolts,
    regulatorWatts: amps === null ? null : c.differenceVolts * amps,
    regulatorWattsMax,
    junctionCelsius: regulatorWattsMax === null ? null : junctionAt(input, regulatorWattsMax),
    efficiency: amps === null ? null : (perString * led.forwardVolts) / supply.volts,
    comparison: comparisonOf(c, { headroomVolts, setOhms, amps, ampsMax }),
  };
}

export const linearCurrentSourceCalculation = defineCalculation({
  name: 'linear-current-source',
  summary: 'Linear regulator as current source: set resistor, headroom, heat, efficiency (bench work)',
  bench: true,
  schema,
  calculate: (input): Outcome<LinearCurrentSource> => {
    const c = caseOf(input);
    const result = linearCurrentSource(c);
    return { result, findings: findingsOf(c, result), working: workingOf(c, result) };
  },
});
