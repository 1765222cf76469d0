/** 14. What is wrong with a circuit, from the crew's readings: bands, ranked causes and the reading to take next. */
import { defineCalculation, EngineError, type Limits, type Outcome } from '@/lib/engine/contract';
import { bandOver, judge, nearBand, type Verdict } from './fault-finder-band';
import { findingsOf } from './fault-finder-findings';
import type { Fit } from './fault-finder-fit';
import { meterError, type MeterPct, Weighed } from './fault-finder-weighed';
import { arrayModel } from './fault-finder-array';
import { type FaultFinderInput, meterOf, readingsOf, schema, tolerancesOf } from './fault-finder-input';
import type { CauseCode, Family, Model, Quantity, Rail, Reading, Tolerances } from './fault-finder-model';
import { type Candidate, candidatesOf, type NextReading, nextReading, suspects } from './fault-finder-rank';
import { stringModel } from './fault-finder-string';
import { tapeModel } from './fault-finder-tape';
import { spreadOf } from './fault-finder-tolerances';
import { workingOf } from './fault-finder-working';

export interface JudgedReading extends Quantity {
  /** As drawn, V or A. */
  expected: number;
  /** The band, and half a band more on either side. */
  low: number;
  high: number;
  nearLow: number;
  nearHigh: number;
  measured: number;
  verdict: Verdict;
}

export interface Cause {
  cause: CauseCode;
  /** boundary b lies between segments b and b + 1 of a tape; index from 1, null where no reading tells the place. */
  at: Family['at'];
  index: number | null;
  /** null where it makes no difference, or does not apply. */
  rail: Rail | null;
  /** First and last place that explain the readings nearly as well. */
  from: number | null;
  to: number | null;
  /**
   * What explains the readings: ohms of a joint, volts or amps of a setting, volts of an open driver; without unit:
   * times the feeder's resistance, number of open segments, shorted LEDs or shorted modules. null: nothing to fit.
   */
  value: number | null;
  unit: 'ohm' | 'V' | 'A' | '';
  /** Heat in a joint, W; and the most of it that any place from `from` to `to` would have. */
  watts: number | null;
  wattsMost: number | null;
  /** What is left unexplained, root mean square in meter errors; what tolerances may explain is not counted. */
  residual: number;
  rank: number;
}

export interface FaultFinder {
  readings: JudgedReading[];
  /** Best first; empty where every reading is in its band. */
  causes: Cause[];
  /** The one that would tell the best two causes apart. */
  nextReading: NextReading | null;
}

const readAt = (readings: readonly Reading[], at: Quantity['at']): number[] =>
  [...new Set(readings.filter((own) => own.at === at).map(({ index }) => index))].sort((a, b) => a - b);

function modelOf({ circuit }: FaultFinderInput, t: Tolerances, readings: readonly Reading[]): Model {
  const cuts = readAt(readings, 'cut');
  if (circuit.kind === 'tape') return tapeModel(circuit.input, t, cuts);
  return circuit.kind === 'array' ? arrayModel(circuit.input, t) : stringModel(circuit.input, t, cuts);
}

/** Fields of the circuit are named as they stand in this input. */
function inCircuit<T>(solve: () => T): T {
  try {
    return solve();
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    const issues = error.issues.map(({ path, message }) => ({ path: `circuit.input.${path}`, message }));
    throw new EngineError(error.code, error.message, issues);
  }
}

/** null where the cause is no joint. */
const jointWatts = ({ family, value, solved }: Fit): number | null =>
  family.parameter?.unit === 'ohm' && solved.jointAmps !== undefined ? value * solved.jointAmps ** 2 : null;

function causeOf({ fit, range, ends }: Candidate, count: number, rank: number): Cause {
  const { family, value, misfit } = fit;
  const { parameter, grid } = family;
  const watts = jointWatts(fit);
  return {
    cause: family.cause,
    at: family.at,
    index: grid ? fit.place : null,
    rail: family.rail,
    from: range?.from ?? null,
    to: range?.to ?? null,
    value: parameter ? value : null,
    unit: parameter?.unit ?? '',
    watts,
    wattsMost: watts && Math.max(watts, ...ends.map((end) => jointWatts(end) ?? 0)),
    residual: Math.sqrt(misfit / count),
    rank,
  };
}

interface Searched {
  result: FaultFinder;
  suspected: Cause[];
  unsolved: number;
  /** Misfit with nothing wrong. */
  nothing: number;
}

function search(
  input: FaultFinderInput,
  readings: readonly Reading[],
  t: Tolerances,
  meter: MeterPct,
): Searched {
  const model = inCircuit(() => modelOf(input, t, readings));
  const spread = inCircuit(() => spreadOf(model, readings));
  const { drawn } = spread;
  const judged = readings.map(({ measured, ...quantity }, i): JudgedReading => {
    const band = bandOver(spread.figures[i] ?? [], meter[quantity.quantity]);
    const near = nearBand(band);
    const expected = drawn.read(quantity);
    const verdict = judge(band, measured);
    return { ...quantity, expected, ...band, nearLow: near.low, nearHigh: near.high, measured, verdict };
  });
  const errors = readings.map((own) => meterError(meter, own, own.measured, drawn.read(own)));
  const weighed = new Weighed(readings, errors, drawn, spread.movedBy);
  const nothing = weighed.misfit(drawn).misfit;
  const wrong = judged.some(({ verdict }) => verdict !== 'in');
  const candidates = wrong ? candidatesOf(model, weighed, nothing) : [];
  const causes = candidates.map((candidate, i) => causeOf(candidate, readings.length, i + 1));
  const next = nextReading({ model, weighed, meter, drawn }, candidates);
  return {
    result: { readings: judged, causes, nextReading: next },
    suspected: causes.slice(0, suspects(candidates).length),
    unsolved: spread.unsolved,
    nothing,
  };
}

/**
 * Bands of readings and what explains those that are off. Each cause is put into the circuit, which is then solved
 * exactly; its figure (and along a tape its place) is that which leaves least of the readings unexplained, in units of
 * the meter's error, beside what the tolerances may explain. Causes are ranked by what they leave plus 2 for each
 * figure or place fitted (Akaike); within 9 (three sigma) they are not told apart, and the reading whose figures under
 * the best two lie furthest apart, in the error that meter and tolerances leave beside the readings taken, is named.
 * @returns volts V, amps A, ohms, watts W
 * @throws {EngineError} `invalid-input` with the field, `too-large`, `no-solution` where the circuit as drawn has no
 * operating point.
 * Source: Kirchhoff's laws; generalised least squares (Aitken); Akaike's criterion; meter error common practice.
 */
export function faultFinder(input: FaultFinderInput, limits: Limits): FaultFinder {
  return search(input, readingsOf(input, limits), tolerancesOf(input), meterOf(input)).result;
}

export const faultFinderCalculation = defineCalculation({
  name: 'fault-finder',
  summary:
    'What is wrong with a tape, an array or a string: bands of readings, ranked causes, the next reading',
  bench: false,
  schema,
  calculate: (input, limits): Outcome<FaultFinder> => {
    const readings = readingsOf(input, limits);
    const [t, meter] = [tolerancesOf(input), meterOf(input)];
    const { result, suspected, unsolved, nothing } = search(input, readings, t, meter);
    return {
      result,
      findings: findingsOf({ input, result, suspected, unsolved }),
      working: workingOf(result, t, meter, nothing),
    };
  },
});
