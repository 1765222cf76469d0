/** Least squares in up to three unknowns: the equations, their solution, and how well they tell the unknowns apart. */

export type Three = readonly [number, number, number];

export interface Equations {
  matrix: number[][];
  right: number[];
}

/** Where the normal equations' own last bits end: nothing can be said of what lies beyond. */
const WORST_CONDITION = 1e8;

/** J'J and J'e of the columns that `columns` gives. */
export function normalEquations<P>(
  points: readonly P[],
  columns: (point: P) => Three,
  left: (point: P) => number,
): Equations {
  const matrix = [0, 1, 2].map(() => [0, 0, 0]);
  const right = [0, 0, 0];
  for (const point of points) {
    const row = columns(point);
    const error = left(point);
    for (let i = 0; i < 3; i++) {
      right[i] = (right[i] ?? 0) + (row[i] ?? 0) * error;
      for (let j = 0; j < 3; j++) {
        const line = matrix[i];
        if (line) line[j] = (line[j] ?? 0) + (row[i] ?? 0) * (row[j] ?? 0);
      }
    }
  }
  return { matrix, right };
}

/** Solves the first `size` equations, each scaled by its own diagonal, by Gauss with pivots; null if singular. */
export function solve({ matrix, right }: Equations, size: 1 | 2 | 3, damping: number): number[] | null {
  const at = (i: number, j: number) => matrix[i]?.[j] ?? 0;
  const scale = Array.from({ length: size }, (_, i) => Math.sqrt(at(i, i)));
  if (scale.some((one) => !(one > 0) || !Number.isFinite(one))) return null;
  const rows = scale.map((si, i) => [
    ...scale.map((sj, j) => at(i, j) / (si * sj) + (i === j ? damping : 0)),
    (right[i] ?? 0) / si,
  ]);
  for (let k = 0; k < size; k++) {
    let best = k;
    for (let i = k + 1; i < size; i++)
      if (Math.abs(rows[i]?.[k] ?? 0) > Math.abs(rows[best]?.[k] ?? 0)) best = i;
    const pivotRow = rows[best] ?? [];
    rows[best] = rows[k] ?? [];
    rows[k] = pivotRow;
    const pivot = pivotRow[k] ?? 0;
    if (Math.abs(pivot) < 1e-16) return null;
    for (let i = k + 1; i < size; i++) {
      const row = rows[i] ?? [];
      const factor = (row[k] ?? 0) / pivot;
      for (let j = k; j <= size; j++) row[j] = (row[j] ?? 0) - factor * (pivotRow[j] ?? 0);
    }
  }
  const found = new Array<number>(size).fill(0);
  for (let k = size - 1; k >= 0; k--) {
    let rest = rows[k]?.[size] ?? 0;
    for (let j = k + 1; j < size; j++) rest -= (rows[k]?.[j] ?? 0) * (found[j] ?? 0);
    found[k] = rest / (rows[k]?.[k] ?? 1);
  }
  return found.map((value, i) => value / (scale[i] ?? 1));
}

/** Eigenvalues of a symmetric 3 x 3 matrix, highest and lowest, in closed form (trigonometric solution). */
function extremes(m: readonly (readonly number[])[]): { highest: number; lowest: number } {
  const at = (i: number, j: number) => m[i]?.[j] ?? 0;
  const mean = (at(0, 0) + at(1, 1) + at(2, 2)) / 3;
  const off = at(0, 1) ** 2 + at(0, 2) ** 2 + at(1, 2) ** 2;
  const spread = (at(0, 0) - mean) ** 2 + (at(1, 1) - mean) ** 2 + (at(2, 2) - mean) ** 2 + 2 * off;
  const size = Math.sqrt(spread / 6);
  if (size === 0) return { highest: mean, lowest: mean };
  const b = (i: number, j: number) => (at(i, j) - (i === j ? mean : 0)) / size;
  const determinant =
    b(0, 0) * (b(1, 1) * b(2, 2) - b(1, 2) ** 2) -
    b(0, 1) * (b(0, 1) * b(2, 2) - b(1, 2) * b(0, 2)) +
    b(0, 2) * (b(0, 1) * b(1, 2) - b(1, 1) * b(0, 2));
  const angle = Math.acos(Math.min(1, Math.max(-1, determinant / 2))) / 3;
  return {
    highest: mean + 2 * size * Math.cos(angle),
    lowest: mean + 2 * size * Math.cos(angle + (2 * Math.PI) / 3),
  };
}

/** Highest over lowest singular value of the columns, each scaled to unit length. */
export function conditionNumber<P>(points: readonly P[], columns: (point: P) => Three): number {
  const { matrix } = normalEquations(points, columns, () => 0);
  const length = [0, 1, 2].map((i) => Math.sqrt(matrix[i]?.[i] ?? 0) || 1);
  const scaled = matrix.map((row, i) => row.map((value, j) => value / ((length[i] ?? 1) * (length[j] ?? 1))));
  const { highest, lowest } = extremes(scaled);
  return Math.sqrt(highest / Math.max(lowest, highest / WORST_CONDITION ** 2));
}
