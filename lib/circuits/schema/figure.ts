/**
 * From a circuit's form to its answer: the engine's input, its answer, and what the circuit's own limits say of it.
 * Pure: the browser figures while one types, the server figures again when it is saved, with this same code.
 */
import * as z from 'zod/mini';
import {
  type Answer,
  atLeast,
  atMost,
  type Calculation,
  EngineError,
  type EngineIssue,
  type Finding,
  ceilWithin,
} from '@/lib/engine/contract';
import { runCalculation, toIssues } from '@/lib/engine/run';
import { branchCircuitCalculation } from '@/lib/sizing/branch-circuit';
import { conductorResistance } from '@/lib/sizing/conductor-resistance';
import { resistorArrayCalculation } from '@/lib/sizing/resistor-array';
import { classTwoLimitAmps } from '@/lib/sizing/tables/nec-ampacity';
import { tapeAnalysisCalculation } from '@/lib/sizing/tape-analysis';
import type { ShopSettings } from '@/lib/units/settings';
import {
  type BranchCircuit,
  type CircuitKind,
  ELECTRICAL,
  type ResistorArray,
  type TapeRun,
} from './electrical';

export type Figured =
  | { ok: true; engineInput: Record<string, unknown>; answer: Answer }
  | { ok: false; code: string; message: string; issues: EngineIssue[] };

/** Named one by one: the registry would bring every calculation there is to the phone. */
const CALCULATION: Record<CircuitKind, Calculation> = {
  'tape-run': tapeAnalysisCalculation as unknown as Calculation,
  'branch-circuit': branchCircuitCalculation as unknown as Calculation,
  'resistor-array': resistorArrayCalculation as unknown as Calculation,
};

const refusal = (path: string, message: string) =>
  new EngineError('invalid-input', message, [{ path, message }]);

/** Feeder lengths to where each feed joins, one way. A far feed runs along the tape. */
export function feedsOf(run: TapeRun, cuts: number): { at: number; metres: number }[] {
  const start = { at: 0, metres: run.driverMetres };
  const far = { at: cuts, metres: run.driverMetres + run.runMetres };
  if (run.feed === 'start') return [start];
  // Fed at its end alone, the tape is laid so that its end is what the driver is near.
  if (run.feed === 'end') return [{ at: cuts, metres: run.driverMetres }];
  if (run.feed === 'both') return [start, far];
  return [{ at: Math.floor(cuts / 2), metres: run.driverMetres + run.runMetres / 2 }];
}

function tapeInput(run: TapeRun): Record<string, unknown> {
  const { tape, driver } = run;
  if (!tape) throw refusal('tape', 'Choose the tape.');
  if (!driver) throw refusal('driver', 'Choose the driver.');
  const cuts = ceilWithin(run.runMetres / tape.cutMetres);
  const { ohmsPerMetre } = conductorResistance(run.feederSize, run.feederStranding, run.conductorCelsius);
  return {
    cuts,
    cutMetres: tape.cutMetres,
    railOhmsPerMetre: tape.railOhmsPerMetre,
    load: tape.load,
    feeds: feedsOf(run, cuts).map(({ at, metres }) => ({
      at,
      volts: driver.volts,
      positiveOhms: ohmsPerMetre * metres,
      negativeOhms: ohmsPerMetre * metres,
    })),
  };
}

function branchInput(circuit: BranchCircuit, settings: ShopSettings): Record<string, unknown> {
  const { inrushAmps, pulseFactor, unitsPerBreaker, unitsPerB16, curve } = circuit;
  return {
    basis: settings.basis,
    system: circuit.system,
    volts: circuit.volts,
    breakerAmps: circuit.breakerAmps,
    continuous: circuit.continuous,
    metres: circuit.metres,
    spacingMetres: circuit.spacingMetres,
    maxDropPct: circuit.maxDropPct,
    ...(curve === null ? {} : { curve }),
    loads: [
      {
        name: circuit.luminaire || 'luminaire',
        quantity: circuit.quantity,
        voltAmps: circuit.voltAmps,
        ...(inrushAmps === null ? {} : { inrushAmps }),
        ...(pulseFactor === null ? {} : { pulseFactor }),
        ...(unitsPerBreaker === null ? {} : { unitsPerBreaker }),
        ...(unitsPerB16 === null ? {} : { unitsPerB16 }),
      },
    ],
  };
}

function arrayInput(array: ResistorArray): Record<string, unknown> {
  return {
    supply: { volts: array.supplyVolts, minVolts: array.supplyMinVolts, maxVolts: array.supplyMaxVolts },
    led: {
      forwardVolts: array.forwardVolts,
      forwardVoltsMin: array.forwardVoltsMin,
      forwardVoltsMax: array.forwardVoltsMax,
      amps: array.amps,
      maxAmps: array.maxAmps,
    },
    count: array.count,
    ...(array.perString === null ? {} : { perString: array.perString }),
    resistor: {
      series: array.series,
      tolerancePct: array.tolerancePct,
      ratedWatts: array.ratedWatts,
      loadFraction: array.loadFraction,
    },
    ambientCelsius: array.ambientCelsius,
  };
}

export interface TapeResult {
  feeds: { amps: number; watts: number }[];
  loadVolts: number[];
  loadAmps: number[];
  minVolts: number;
  maxVolts: number;
  worstDropPct: number;
  dimmestPct: number | null;
  totalWatts: number;
}

const stop = (
  code: string,
  hard: boolean,
  message: string,
  values: Finding['values'],
  basis: string,
): Finding => ({
  code,
  severity: 'stop',
  hard,
  message,
  values,
  basis,
});

/** What the run's own limits say: engine figures against the limits typed beside them. */
function tapeFindings(run: TapeRun, result: TapeResult): Finding[] {
  const { driver } = run;
  const findings: Finding[] = [];
  const practice = 'common practice';
  if (!atMost(result.worstDropPct, run.maxDropPct))
    findings.push(
      stop(
        'far-end-too-low',
        false,
        'The lowest volts along the run are under the limit.',
        { minVolts: result.minVolts, dropPct: result.worstDropPct, limitPct: run.maxDropPct },
        practice,
      ),
    );
  if (result.dimmestPct !== null && !atLeast(result.dimmestPct, run.minDimmestPct))
    findings.push(
      stop(
        'dimmest-too-dim',
        false,
        'The dimmest segment is too dim beside the brightest.',
        { dimmestPct: result.dimmestPct, limitPct: run.minDimmestPct },
        practice,
      ),
    );
  if (!driver) return findings;
  const loadPct = (result.totalWatts / driver.watts) * 100;
  if (!atMost(loadPct, run.loadFractionPct))
    findings.push(
      stop(
        'driver-overloaded',
        false,
        'The driver is loaded above the share that was set.',
        { loadPct, limitPct: run.loadFractionPct, driverWatts: driver.watts },
        practice,
      ),
    );
  const amps = result.feeds.reduce((sum, feed) => sum + Math.max(0, feed.amps), 0);
  const limitAmps = classTwoLimitAmps(driver.volts) ?? 0;
  if (driver.classTwo && !atMost(amps, limitAmps))
    findings.push(
      stop(
        'class-two-exceeded',
        true,
        'This is more current than a Class 2 source may give.',
        { amps, limitAmps, volts: driver.volts },
        'NEC 2023 Chapter 9 Table 11(B) (read in an extract)',
      ),
    );
  return findings;
}

function inputOf(kind: CircuitKind, electrical: unknown, settings: ShopSettings): Record<string, unknown> {
  if (kind === 'tape-run') return tapeInput(electrical as TapeRun);
  if (kind === 'branch-circuit') return branchInput(electrical as BranchCircuit, settings);
  return arrayInput(electrical as ResistorArray);
}

/** Figures a circuit. Never throws: what can't be figured is said, with the field. */
export function figureCircuit(kind: CircuitKind, electrical: unknown, settings: ShopSettings): Figured {
  const parsed = z.safeParse(ELECTRICAL[kind] as z.ZodMiniType, electrical);
  if (!parsed.success) {
    const issues = toIssues(parsed.error);
    return { ok: false, code: 'invalid-input', message: 'Some figures need another look.', issues };
  }
  try {
    const engineInput = inputOf(kind, parsed.data, settings);
    const answer = runCalculation(CALCULATION[kind], engineInput);
    const own = kind === 'tape-run' ? tapeFindings(parsed.data as TapeRun, answer.result as TapeResult) : [];
    return { ok: true, engineInput, answer: { ...answer, findings: [...own, ...answer.findings] } };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { ok: false, code: error.code, message: error.message, issues: error.issues };
  }
}

/** The same figures with the run fed at both ends: for the dashed line and the offer to do so. */
export function figureFedAtBothEnds(run: TapeRun, settings: ShopSettings): TapeResult | null {
  const figured = figureCircuit('tape-run', { ...run, feed: 'both' }, settings);
  return figured.ok ? (figured.answer.result as TapeResult) : null;
}
