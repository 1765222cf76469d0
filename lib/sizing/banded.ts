/** Linear systems whose entries lie near the diagonal: elimination with row exchanges, linear in the size. */

export interface Banded {
  size: number;
  /** Entries below and above the diagonal. */
  lower: number;
  upper: number;
  /** Row by row; column j of row i at i * width + j - i + lower. Room for what row exchanges fill in. */
  entries: Float64Array;
  width: number;
}

export interface Factored extends Banded {
  /** Row that was exchanged with row i. */
  pivots: Int32Array;
}

export function banded(size: number, lower: number, upper: number): Banded {
  const width = 2 * lower + upper + 1;
  return { size, lower, upper, width, entries: new Float64Array(size * width) };
}

export function setEntry(matrix: Banded, row: number, column: number, value: number): void {
  matrix.entries[row * matrix.width + column - row + matrix.lower] = value;
}

const at = (matrix: Banded, row: number, column: number) => row * matrix.width + column - row + matrix.lower;

function pivotRow(matrix: Banded, k: number): number {
  const { entries, size, lower } = matrix;
  let best = k;
  let largest = 0;
  for (let i = k; i < Math.min(size, k + lower + 1); i++) {
    const own = Math.abs(entries[at(matrix, i, k)] ?? 0);
    if (own > largest) {
      largest = own;
      best = i;
    }
  }
  return largest > 0 ? best : -1;
}

/**
 * LU by Gaussian elimination with partial pivoting, in place.
 * @returns null where the matrix is singular to the last bit.
 */
export function factor(matrix: Banded): Factored | null {
  const { entries, size, lower, upper } = matrix;
  const pivots = new Int32Array(size);
  for (let k = 0; k < size; k++) {
    const pivot = pivotRow(matrix, k);
    if (pivot < 0) return null;
    pivots[k] = pivot;
    const last = Math.min(size, k + lower + upper + 1);
    if (pivot !== k) {
      for (let j = k; j < last; j++) {
        const a = at(matrix, k, j);
        const b = at(matrix, pivot, j);
        const kept = entries[a] ?? 0;
        entries[a] = entries[b] ?? 0;
        entries[b] = kept;
      }
    }
    for (let i = k + 1; i < Math.min(size, k + lower + 1); i++) {
      const share = (entries[at(matrix, i, k)] ?? 0) / (entries[at(matrix, k, k)] ?? 0);
      entries[at(matrix, i, k)] = share;
      if (share === 0) continue;
      for (let j = k + 1; j < last; j++) {
        const target = at(matrix, i, j);
        entries[target] = (entries[target] ?? 0) - share * (entries[at(matrix, k, j)] ?? 0);
      }
    }
  }
  return { ...matrix, pivots };
}

/** Solves for one right-hand side, in place. */
export function solveFactored(matrix: Factored, rhs: Float64Array): Float64Array {
  const { entries, size, lower, upper, pivots } = matrix;
  for (let k = 0; k < size; k++) {
    const pivot = pivots[k] ?? k;
    const value = rhs[pivot] ?? 0;
    rhs[pivot] = rhs[k] ?? 0;
    rhs[k] = value;
    for (let i = k + 1; i < Math.min(size, k + lower + 1); i++) {
      rhs[i] = (rhs[i] ?? 0) - (entries[at(matrix, i, k)] ?? 0) * value;
    }
  }
  for (let k = size - 1; k >= 0; k--) {
    let value = rhs[k] ?? 0;
    for (let j = k + 1; j < Math.min(size, k + lower + upper + 1); j++) {
      value -= (entries[at(matrix, k, j)] ?? 0) * (rhs[j] ?? 0);
    }
    rhs[k] = value / (entries[at(matrix, k, k)] ?? 0);
  }
  return rhs;
}
