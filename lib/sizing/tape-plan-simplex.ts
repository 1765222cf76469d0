/**
 * A linear program that grows by columns: least cost * x with A x <= b, b >= 0, x >= 0. Revised simplex with the
 * inverse of the basis; starts with the slacks. Sparse columns, a few hundred rows at most. What it answers is only a
 * guide: the bound of a plan is figured from the prices themselves (tape-plan-bound.ts), so rounding can't harm it.
 */
export interface Column {
  cost: number;
  rows: readonly number[];
  factors: readonly number[];
}

const TINY = 1e-9;
/** Below this an entry of the inverse is rounding. */
const DUST = 1e-13;
/** Least pivot that the inverse is trusted with. */
const LEAST_PIVOT = 1e-7;

export class GrowingProgram {
  readonly columns: Column[] = [];
  /** Of the rows: what one unit more of b is worth (never above 0). */
  readonly duals: Float64Array;
  /** Multiplications so far: work is limited by count, never by the clock. */
  work = 0;
  private readonly inverse: Float64Array;
  private readonly values: Float64Array;
  /** Column of each row of the basis; -1: its slack. */
  private readonly basis: Int32Array;
  private readonly isBasic: boolean[] = [];
  private readonly direction: Float64Array;

  constructor(private readonly limits: readonly number[]) {
    const size = limits.length;
    this.duals = new Float64Array(size);
    this.inverse = new Float64Array(size * size);
    this.values = Float64Array.from(limits);
    this.basis = new Int32Array(size).fill(-1);
    this.direction = new Float64Array(size);
    for (let i = 0; i < size; i++) this.inverse[i * size + i] = 1;
  }

  add(column: Column): void {
    this.columns.push(column);
    this.isBasic.push(false);
  }

  /** What one unit of the column changes the cost by, at the duals. */
  reducedCost({ cost, rows, factors }: Column): number {
    let reduced = cost;
    for (let i = 0; i < rows.length; i++) reduced -= (this.duals[rows[i] ?? 0] ?? 0) * (factors[i] ?? 0);
    return reduced;
  }

  /** The column that lowers the cost fastest; `size + row` for a slack, -1 for none. */
  private entering(): number {
    let best = -1;
    let least = -TINY;
    this.columns.forEach((column, j) => {
      if (this.isBasic[j]) return;
      const reduced = this.reducedCost(column);
      if (reduced < least * (1 + Math.abs(column.cost)))
        [best, least] = [j, reduced / (1 + Math.abs(column.cost))];
    });
    if (best >= 0) return best;
    // A slack's reduced cost is minus its dual.
    for (let i = 0; i < this.duals.length; i++)
      if ((this.duals[i] ?? 0) > TINY) return this.columns.length + i;
    return -1;
  }

  private setDirection(entering: number): void {
    const size = this.limits.length;
    const { rows, factors } = this.columns[entering] ?? {
      rows: [entering - this.columns.length],
      factors: [1],
    };
    for (let i = 0; i < size; i++) {
      let sum = 0;
      for (let k = 0; k < rows.length; k++)
        sum += (this.inverse[i * size + (rows[k] ?? 0)] ?? 0) * (factors[k] ?? 0);
      this.direction[i] = sum;
    }
  }

  private leaving(): number {
    let row = -1;
    let least = Infinity;
    for (let i = 0; i < this.direction.length; i++) {
      const pivot = this.direction[i] ?? 0;
      if (pivot < LEAST_PIVOT) continue;
      const ratio = (this.values[i] ?? 0) / pivot;
      const better = ratio < least - TINY || (ratio < least + TINY && pivot > (this.direction[row] ?? 0));
      if (better) [row, least] = [i, Math.min(least, ratio)];
    }
    return row;
  }

  private pivot(entering: number, row: number, reduced: number): void {
    const size = this.limits.length;
    const { inverse, direction, values, duals } = this;
    const pivot = direction[row] ?? 1;
    const at = row * size;
    // Most of the inverse is zero: only where the pivot's row is not can anything change.
    const places: number[] = [];
    for (let j = 0; j < size; j++) {
      const own = (inverse[at + j] ?? 0) / pivot;
      inverse[at + j] = Math.abs(own) < DUST ? 0 : own;
      if (Math.abs(own) >= DUST) places.push(j);
    }
    const amount = Math.max(0, (values[row] ?? 0) / pivot);
    values[row] = amount;
    for (let i = 0; i < size; i++) {
      const factor = direction[i] ?? 0;
      if (i === row || factor === 0) continue;
      const to = i * size;
      for (const j of places) inverse[to + j] = (inverse[to + j] ?? 0) - factor * (inverse[at + j] ?? 0);
      values[i] = Math.max(0, (values[i] ?? 0) - factor * amount);
      this.work += places.length;
    }
    for (const j of places) duals[j] = (duals[j] ?? 0) + reduced * (inverse[at + j] ?? 0);
    const left = this.basis[row] ?? -1;
    if (left >= 0) this.isBasic[left] = false;
    const isSlack = entering >= this.columns.length;
    this.basis[row] = isSlack ? -1 : entering;
    if (!isSlack) this.isBasic[entering] = true;
    this.work += size + this.columns.length;
  }

  /** Afresh, as what is carried along gathers rounding. */
  private setDuals(): void {
    const size = this.limits.length;
    this.duals.fill(0);
    for (let i = 0; i < size; i++) {
      const cost = this.columns[this.basis[i] ?? -1]?.cost ?? 0;
      if (cost === 0) continue;
      for (let j = 0; j < size; j++)
        this.duals[j] = (this.duals[j] ?? 0) + cost * (this.inverse[i * size + j] ?? 0);
    }
  }

  /** Goes on from where it is until no column helps, or the work is used up. */
  solve(mostWork: number): void {
    this.setDuals();
    while (this.work < mostWork) {
      const entering = this.entering();
      if (entering < 0) return;
      const column = this.columns[entering];
      const reduced = column ? this.reducedCost(column) : -(this.duals[entering - this.columns.length] ?? 0);
      this.setDirection(entering);
      const row = this.leaving();
      if (row < 0) return;
      this.pivot(entering, row, reduced);
    }
  }

  /** Amount of every column. */
  amounts(): Float64Array {
    const found = new Float64Array(this.columns.length);
    this.basis.forEach((column, i) => {
      if (column >= 0) found[column] = this.values[i] ?? 0;
    });
    return found;
  }
}
