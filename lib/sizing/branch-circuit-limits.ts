/** How many units of each load one breaker carries, by steady current and by inrush. */
import { EngineError, floorWithin, refuse } from '@/lib/engine/contract';
import { type BranchCircuitInput, type BranchLoad, MOST_KINDS, MOST_UNITS } from './branch-circuit-input';
import { unitsByInrush } from './inrush';
import type { Curve } from './tables/breakers';

export interface LoadLimits {
  load: BranchLoad;
  /** null: it takes nothing. */
  byLoad: number | null;
  /** By the breaker and by the control; null where no maker's figure tells. */
  byInrush: number | null;
  /** The breaker alone. */
  byBreakerInrush: number | null;
  /** The control alone. */
  byControlInrush: number | null;
  /** Most on one circuit; Infinity where nothing limits. */
  most: number;
}

export interface BranchCase {
  input: BranchCircuitInput;
  /** 125 % of a continuous load on the US basis. */
  continuousFactor: number;
  /** Volts times conductors that share the current: VA per ampere. */
  voltAmpsPerAmp: number;
  /** For the loads of the input, after what stays beside them. */
  capacityVoltAmps: number;
  curve: Curve | undefined;
  limits: LoadLimits[];
}

const least = (...figures: (number | null)[]) => Math.min(...figures.map((figure) => figure ?? Infinity));

function byControl({ control }: BranchCircuitInput, { inrushAmps }: BranchLoad): number | null {
  if (!control) return null;
  const { ratedInrushAmps, maxUnits } = control;
  const byRating =
    ratedInrushAmps === undefined || inrushAmps === undefined ? null : ratedInrushAmps / inrushAmps;
  const most = least(byRating, maxUnits ?? null);
  return most === Infinity ? null : floorWithin(most);
}

function limitsOf(input: BranchCircuitInput, load: BranchLoad, capacity: number, curve?: Curve): LoadLimits {
  const byBreakerInrush = unitsByInrush(input.basis, { amps: input.breakerAmps, curve }, load);
  const byControlInrush = byControl(input, load);
  const byInrush = least(byBreakerInrush, byControlInrush);
  const byLoad = load.voltAmps === 0 ? null : Math.max(0, floorWithin(capacity / load.voltAmps));
  return {
    load,
    byLoad,
    byBreakerInrush,
    byControlInrush,
    byInrush: byInrush === Infinity ? null : byInrush,
    most: least(byLoad, byInrush),
  };
}

function tooLarge(path: string, message: string): never {
  throw new EngineError('too-large', `${path}: ${message}`, [{ path, message }]);
}

function checked({ loads }: BranchCircuitInput): void {
  const total = loads.reduce((sum, { quantity }) => sum + quantity, 0);
  const path = loads.length === 1 ? 'loads.0.quantity' : 'loads';
  if (total > MOST_UNITS) tooLarge(path, `must be at most ${MOST_UNITS} units together`);
  if (loads.length > MOST_KINDS) tooLarge(path, `must have at most ${MOST_KINDS} kinds of load`);
  for (const [place, { ratedVoltsMin, ratedVoltsMax }] of loads.entries())
    if (ratedVoltsMin !== undefined && ratedVoltsMax !== undefined && ratedVoltsMin > ratedVoltsMax)
      refuse(`loads.${place}.ratedVoltsMin`, 'must not be above ratedVoltsMax');
}

/** @throws {EngineError} `too-large` over 10,000 units, `invalid-input` with the field */
export function branchCase(input: BranchCircuitInput): BranchCase {
  checked(input);
  const continuousFactor = input.basis === 'us' && input.continuous ? 1.25 : 1;
  const voltAmpsPerAmp = input.system === 'three-phase' ? Math.sqrt(3) * input.volts : input.volts;
  const whole = (input.breakerAmps * voltAmpsPerAmp) / continuousFactor;
  const capacityVoltAmps = whole - (input.existing?.otherVoltAmps ?? 0);
  // B is the curve that holds the fewest drivers: an unknown one is taken for it.
  const curve = input.basis === 'iec' ? (input.curve ?? 'B') : undefined;
  return {
    input,
    continuousFactor,
    voltAmpsPerAmp,
    capacityVoltAmps,
    curve,
    limits: input.loads.map((load) => limitsOf(input, load, capacityVoltAmps, curve)),
  };
}

/** Units of each load on one circuit, in the order of the loads. */
export type Bin = readonly number[];

export const unitsIn = (bin: Bin) => bin.reduce((sum, quantity) => sum + quantity, 0);

type Limit = 'byLoad' | 'byInrush' | 'byBreakerInrush' | 'byControlInrush' | 'most';

/** Share of one circuit that the units take: q/N added up, with N by one of the limits or by the lowest. */
export function fraction({ limits }: BranchCase, bin: Bin, by: Limit): number {
  return limits.reduce((sum, limit, place) => {
    const quantity = bin[place] ?? 0;
    return quantity === 0 ? sum : sum + quantity / (limit[by] ?? Infinity);
  }, 0);
}

export const wholeLoad = ({ input }: BranchCase): Bin => input.loads.map(({ quantity }) => quantity);
