/**
 * How well a cause explains the readings. Differences are taken in units of the meter's error, and what a tolerance
 * may explain is not held against a cause: generalised least squares, with the covariance of the readings
 * C = diag(meter error squared) + sum over tolerances of s * s' / 3, s being what one tolerance moves the readings by
 * (a third of the square of the half width is the variance of anything between the two ends). s is that of the circuit
 * as drawn, in proportion to what the faulty circuit reads there; so C differs between causes, and ln det C counts.
 */
import { EngineError } from '@/lib/engine/contract';
import { growingRow, lowest, lowestWhole } from './fault-finder-minimum';
import type { Family, Quantity, Reading, Solved } from './fault-finder-model';

/** Causes whose scores differ by less (three sigma) are not told apart. */
export const TOLD_APART = 9;
/** Akaike's price of a figure or a place that was fitted: what fits as well with less comes first. */
const PRICE = 2;
/** In ln of the figure: a thousandth. */
const LOG_WIDTH = 1e-3;
const LINEAR_WIDTH = 1e-4;

export interface MeterPct {
  volts: number;
  amps: number;
}

/** Meter's error, V or A; near nought a tenth of what the circuit should give there counts. */
export function meterError(meter: MeterPct, { quantity }: Quantity, read: number, expected: number): number {
  return (meter[quantity] / 100) * Math.max(Math.abs(read), Math.abs(expected) / 10, 1e-9);
}

/** Square root of a symmetric matrix from below: C = L * L'. */
function cholesky(C: readonly (readonly number[])[]): number[][] {
  const L: number[][] = [];
  C.forEach((row, i) => {
    const own: number[] = [];
    for (let j = 0; j <= i; j++) {
      let left = row[j] ?? 0;
      for (let k = 0; k < j; k++) left -= (own[k] ?? 0) * (L[j]?.[k] ?? 0);
      own.push(j === i ? Math.sqrt(Math.max(left, 1e-12 * (row[i] ?? 0))) : left / (L[j]?.[j] ?? 1));
    }
    L.push(own);
  });
  return L;
}

/** Solves L * x = b from above. */
function forward(L: readonly (readonly number[])[], b: readonly number[]): number[] {
  const x: number[] = [];
  L.forEach((row, i) => {
    let left = b[i] ?? 0;
    for (let j = 0; j < i; j++) left -= (row[j] ?? 0) * (x[j] ?? 0);
    x.push(left / (row[i] ?? 1));
  });
  return x;
}

const dot = (a: readonly number[], b: readonly number[]) =>
  a.reduce((sum, own, i) => sum + own * (b[i] ?? 0), 0);

/** What a tolerance moves a figure by grows and shrinks with the figure: this many times at most. */
const MOST_SCALE = 1000;

const scaled = (moved: readonly number[], figure: number, drawn: number) => {
  const scale = drawn === 0 ? 1 : Math.min(Math.abs(figure / drawn), MOST_SCALE);
  return moved.map((own) => own * scale);
};

interface Errors {
  /** Square root of the covariance. */
  L: number[][];
  /** What tolerances move each reading by in this circuit. */
  moved: number[][];
  /** ln of the covariance's determinant. */
  size: number;
}

export interface Misfit {
  /** Sum of squares of what the readings are off, in their errors. */
  misfit: number;
  /** The same, with what larger errors cost beside the circuit as drawn (-2 ln of the likelihood). */
  cost: number;
}

export class Weighed {
  private readonly drawnSize: number;

  /**
   * @param errors of the meter, one a reading
   * @param movedBy what the tolerances move a reading of the circuit as drawn by, tolerance by tolerance
   */
  constructor(
    readonly readings: readonly Reading[],
    private readonly errors: readonly number[],
    private readonly drawn: Solved,
    private readonly movedBy: (quantity: Quantity) => number[],
  ) {
    this.moved = readings.map(movedBy);
    this.drawnSize = this.errorsOf(drawn).size;
  }
  private readonly moved: readonly (readonly number[])[];

  private errorsOf(solved: Solved): Errors {
    const moved = this.readings.map((reading, i) =>
      scaled(this.moved[i] ?? [], solved.read(reading), this.drawn.read(reading)),
    );
    const L = cholesky(
      moved.map((own, i) =>
        moved.map((other, j) => dot(own, other) / 3 + (i === j ? (this.errors[i] ?? 0) ** 2 : 0)),
      ),
    );
    return { L, moved, size: 2 * L.reduce((sum, row, i) => sum + Math.log(row[i] ?? 1), 0) };
  }

  /** Infinity where the circuit gives no figure. */
  misfit(solved: Solved): Misfit {
    const { L, size } = this.errorsOf(solved);
    const off = forward(
      L,
      this.readings.map((reading) => reading.measured - solved.read(reading)),
    );
    const misfit = dot(off, off);
    const cost = misfit + size - this.drawnSize;
    return Number.isFinite(cost) ? { misfit, cost } : { misfit: Infinity, cost: Infinity };
  }

  /**
   * What a further reading adds to telling two circuits apart: how far apart they are there, less what the readings
   * taken say of that difference already, in the error that the meter and the tolerances then leave.
   * @returns a function of the reading and its meter error
   */
  further(first: Solved, second: Solved) {
    const { L, moved } = this.errorsOf(first);
    const known = forward(
      L,
      this.readings.map((reading) => first.read(reading) - second.read(reading)),
    );
    return (quantity: Quantity, error: number): number => {
      const figure = first.read(quantity);
      const own = scaled(this.movedBy(quantity), figure, this.drawn.read(quantity));
      const shared = forward(
        L,
        moved.map((other) => dot(other, own) / 3),
      );
      // Rounding must not make less than the meter's own error of it.
      const left = Math.max(error * error + dot(own, own) / 3 - dot(shared, shared), error * error);
      return Math.abs(figure - second.read(quantity) - dot(known, shared)) / Math.sqrt(left);
    };
  }
}

export interface Fit {
  family: Family;
  /** 0 where the cause has no place. */
  place: number;
  value: number;
  solved: Solved;
  misfit: number;
  /** Cost with the price of what was fitted, and how unlikely that is beforehand. */
  score: number;
}

/** null where the circuit has no operating point with this fault. */
function trySolve(family: Family, place: number, value: number): Solved | null {
  try {
    return family.solve(place, value);
  } catch (error) {
    if (error instanceof EngineError && error.code === 'no-solution') return null;
    throw error;
  }
}

/** Figures at places side by side differ by less than this many times. */
const NEAR = Math.log(4);

function bestValue(
  { parameter }: Family,
  misfitAt: (value: number) => number,
  near: number | undefined,
): number {
  if (!parameter) return 0;
  const { low, high, scale } = parameter;
  if (scale === 'whole') return lowestWhole(misfitAt, growingRow(low, high)).at;
  if (scale === 'linear') return lowest(misfitAt, low, high, LINEAR_WIDTH * (high - low)).at;
  const misfitAtLn = (ln: number) => misfitAt(Math.exp(ln));
  if (near !== undefined) {
    const [from, to] = [Math.log(near) - NEAR, Math.log(near) + NEAR];
    const { at, least } = lowest(misfitAtLn, from, to, LOG_WIDTH, 4);
    const inside = at > from + LOG_WIDTH && at < to - LOG_WIDTH && least < Infinity;
    if (inside && at > Math.log(low) && at < Math.log(high)) return Math.exp(at);
  }
  return Math.exp(lowest(misfitAtLn, Math.log(low), Math.log(high), LOG_WIDTH).at);
}

/**
 * The figure that explains the readings best, with the fault at this place.
 * @param near the figure at a place close by, where one is known
 */
function fitAt(family: Family, weighed: Weighed, place: number, near?: number): Fit | null {
  const misfitAt = (value: number) => {
    const solved = trySolve(family, place, value);
    return solved ? weighed.misfit(solved).cost : Infinity;
  };
  const value = bestValue(family, misfitAt, near);
  const solved = trySolve(family, place, value);
  if (!solved) return null;
  const { misfit, cost } = weighed.misfit(solved);
  if (cost === Infinity) return null;
  const fitted = (family.parameter ? 1 : 0) + ((family.grid?.length ?? 0) > 1 ? 1 : 0);
  return {
    family,
    place,
    value,
    solved,
    misfit,
    score: cost + PRICE * fitted + (family.surprise?.(value) ?? 0),
  };
}

/** Fits at places, each only once. */
export class Places {
  private readonly fits = new Map<number, Fit | null>();

  constructor(
    readonly family: Family,
    private readonly weighed: Weighed,
  ) {}

  at(place: number): Fit | null {
    const known = this.fits.get(place);
    if (known !== undefined) return known;
    const fit = fitAt(this.family, this.weighed, place, this.nearest(place)?.value);
    this.fits.set(place, fit);
    return fit;
  }

  private nearest(place: number): Fit | null {
    let nearest: Fit | null = null;
    const off = (fit: Fit) => Math.abs(fit.place - place);
    for (const fit of this.fits.values()) if (fit && (!nearest || off(fit) < off(nearest))) nearest = fit;
    return nearest;
  }

  score = (place: number): number => this.at(place)?.score ?? Infinity;

  best(): Fit | null {
    const { grid } = this.family;
    if (!grid) return this.at(0);
    return this.at(lowestWhole(this.score, grid).at);
  }

  /** The furthest places on either side that explain the readings nearly as well. */
  range(best: Fit): { from: number; to: number } | null {
    const { grid } = this.family;
    if (!grid) return null;
    const edge = (good: number, end: number): number => {
      const explains = (place: number) => this.score(place) - best.score < TOLD_APART;
      if (explains(end)) return end;
      let [near, far] = [good, end];
      while (Math.abs(far - near) > 1) {
        const middle = Math.trunc((near + far) / 2);
        if (explains(middle)) near = middle;
        else far = middle;
      }
      return near;
    };
    return { from: edge(best.place, grid[0] ?? best.place), to: edge(best.place, grid.at(-1) ?? best.place) };
  }
}
