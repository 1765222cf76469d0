/**
 * How well a cause explains the readings. Differences are taken in units of the meter's error, and what a tolerance
 * may explain is not held against a cause: generalised least squares, with the covariance of the readings
 * C = diag(meter error squared) + sum over tolerances of s * s' / 3, s being what one tolerance moves the readings by
 * (a third of the square of the half width is the variance of anything between the two ends). s is that of the circuit
 * as drawn, in proportion to what the faulty circuit reads there; so C differs between causes, and ln det C counts.
 */
import type { Quantity, Reading, Solved } from './fault-finder-model';

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
  private readonly moved: readonly (readonly number[])[];
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
