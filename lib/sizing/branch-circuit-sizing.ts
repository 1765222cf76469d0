/** The conductor of each circuit, and smaller circuits where no conductor keeps the drop or the fault loop. */
import { type BranchCase, type Bin, unitsIn } from './branch-circuit-limits';
import { evenShares } from './branch-circuit-pack';
import type { GovernedBy } from './conductor-ladder';
import { conductorSize, type SizedConductor } from './conductor-size';
import type { SizeRequest } from './conductor-size-input';

export interface SizedBin {
  bin: Bin;
  voltAmps: number;
  amps: number;
  request: SizeRequest;
  sized: SizedConductor;
}

/** 110.14(C)(1): terminals to 100 A are of 60 C unless marked, above of 75 C. */
const terminals = (breakerAmps: number) => (breakerAmps <= 100 ? 60 : 75);

/** The run to the middle of a row carries its load; its end is where a fault sees most. */
function requestOf({ input }: BranchCase, units: number, amps: number): SizeRequest {
  const { basis, system, volts, metres, maxDropPct, continuous, breakerAmps } = input;
  const row = (input.spacingMetres ?? 0) * Math.max(0, units - 1);
  const { groupedCircuits, insulationCelsius, insulation, installMethod, stranding } = input;
  const { celsius, powerFactor, minimumSize, zeOhms, protectiveSize, curve } = input;
  return {
    ...{ basis, system, volts, amps, metres: metres + row / 2, faultMetres: metres + row, maxDropPct },
    ...{ continuous, breakerAmps, groupedCircuits, insulationCelsius, insulation, installMethod, stranding },
    ...{ celsius, powerFactor, minimumSize, zeOhms, protectiveSize, curve },
    ambientCelsius: input.ambientCelsius ?? 30,
    loadedConductors: input.loadedConductors ?? (system === 'three-phase' ? 3 : 2),
    terminalCelsius: input.terminalCelsius ?? (basis === 'us' ? terminals(breakerAmps) : undefined),
  };
}

export interface Sizer {
  size: (bin: Bin) => SizedBin;
}

/** Sizes circuits, equal ones once. */
export function sizer(c: BranchCase): Sizer {
  const known = new Map<string, SizedBin>();
  const other = c.input.existing?.otherVoltAmps ?? 0;
  const figure = (bin: Bin): SizedBin => {
    const voltAmps = c.limits.reduce((sum, { load }, at) => sum + load.voltAmps * (bin[at] ?? 0), other);
    const amps = voltAmps / c.voltAmpsPerAmp;
    const request = requestOf(c, unitsIn(bin), amps);
    return { bin, voltAmps, amps, request, sized: conductorSize(request) };
  };
  return {
    size: (bin) => {
      const key = bin.join();
      const found = known.get(key) ?? figure(bin);
      known.set(key, found);
      return found;
    },
  };
}

const fits = ({ sized }: SizedBin) => sized.choice.rung !== null;
/** Fewer units help where the run is what fails, not where the breaker is too large for any conductor. */
const splittable = ({ bin, sized }: SizedBin) =>
  unitsIn(bin) > 1 && sized.choice.failed.every((what) => what !== 'ampacity');

/** Most units of the one kind in `bin` that a conductor can serve; `low` can, the bin can't. */
function largestThatFits({ size }: Sizer, bin: Bin): number {
  let low = 1;
  let high = unitsIn(bin);
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (fits(size(bin.map((quantity) => (quantity > 0 ? middle : 0))))) low = middle;
    else high = middle;
  }
  return low;
}

function parts(s: Sizer, bin: Bin): Bin[] {
  const kinds = bin.filter((quantity) => quantity > 0).length;
  if (kinds === 1)
    return evenShares(unitsIn(bin), largestThatFits(s, bin)).map((units) =>
      bin.map((quantity) => (quantity > 0 ? units : 0)),
    );
  // Odd ones go to either half in turn, so that both get smaller.
  let turn = 0;
  const first = bin.map((quantity) =>
    quantity % 2 === 0 ? quantity / 2 : (quantity + (turn++ % 2 === 0 ? 1 : -1)) / 2,
  );
  return [first, bin.map((quantity, at) => quantity - (first[at] ?? 0))];
}

export interface Settled {
  circuits: SizedBin[];
  /** What made circuits smaller than load and inrush would have. */
  splitBy: GovernedBy | null;
}

/**
 * One kind of load, too much for its circuits' run: shared out anew over all of them, since cutting each circuit by
 * itself can take more than there need be. null where nothing is to be shared.
 */
function sharedAnew({ limits }: BranchCase, s: Sizer, bins: readonly Bin[]): Settled | null {
  const [only, other] = limits;
  // The first of even shares is the largest.
  const [largest] = bins;
  if (!only || other || !largest) return null;
  const one = s.size(largest);
  if (fits(one) || !splittable(one)) return null;
  const shares = evenShares(only.load.quantity, largestThatFits(s, largest));
  return {
    circuits: shares.map((units) => s.size([units])),
    splitBy: one.sized.choice.failed[0] ?? null,
  };
}

/**
 * Every circuit with a conductor, split where no conductor serves it and fewer units help. Where not even one unit
 * can be served, circuits stay as they are, without a size.
 */
export function settle(c: BranchCase, bins: readonly Bin[]): Settled {
  const s = sizer(c);
  const single = (at: number) => s.size(c.limits.map((_, place) => (place === at ? 1 : 0)));
  const servable = c.limits.every((_, at) => fits(single(at)));
  const anew = servable ? sharedAnew(c, s, bins) : null;
  if (anew) return anew;
  let splitBy: GovernedBy | null = null;
  const settled = (bin: Bin): SizedBin[] => {
    const one = s.size(bin);
    if (fits(one) || !servable || !splittable(one)) return [one];
    splitBy ??= one.sized.choice.failed[0] ?? null;
    return parts(s, bin).flatMap(settled);
  };
  return { circuits: bins.flatMap(settled), splitBy };
}
