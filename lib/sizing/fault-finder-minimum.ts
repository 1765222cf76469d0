/** Lowest point of a figure of one variable. */

export interface Minimum {
  at: number;
  least: number;
}

const GOLDEN = (3 - Math.sqrt(5)) / 2;
const GRID = 12;
const MAX_STEPS = 40;

/** Vertex of the parabola through three points; NaN where they lie on a line or one has no figure. */
function vertex(a: Minimum, b: Minimum, c: Minimum): number {
  const ab = (b.at - a.at) * (b.least - c.least);
  const cb = (b.at - c.at) * (b.least - a.least);
  return b.at - ((b.at - a.at) * ab - (b.at - c.at) * cb) / (2 * (ab - cb));
}

/**
 * The lowest point between two others that are no lower, by steps to the vertex of the parabola through the three, or
 * by the golden section where that leads nowhere; ended when two parabolas agree with the best.
 */
function bottom(
  figure: (x: number) => number,
  [left, best, right]: readonly [Minimum, Minimum, Minimum],
  width: number,
): Minimum {
  let agreed = 0;
  for (let step = 0; step < MAX_STEPS && right.at - left.at > width; step++) {
    let at = vertex(left, best, right);
    agreed = Math.abs(at - best.at) <= width ? agreed + 1 : 0;
    if (agreed === 2) break;
    const inside = at > left.at && at < right.at && agreed === 0;
    if (!inside || step % 3 === 2) {
      const wider = best.at - left.at > right.at - best.at ? left : right;
      at = best.at + GOLDEN * (wider.at - best.at);
    }
    const next = { at, least: figure(at) };
    if (next.least < best.least) {
      if (at < best.at) right = best;
      else left = best;
      best = next;
    } else if (at < best.at) left = next;
    else right = next;
  }
  return best;
}

/**
 * Between `low` and `high`: a coarse row of points, then the bottoms of its two lowest valleys.
 * @param figure may be Infinity where there is none
 * @param width how near the place is wanted
 * @param points of the row, less one
 */
export function lowest(
  figure: (x: number) => number,
  low: number,
  high: number,
  width: number,
  points = GRID,
): Minimum {
  const row = Array.from({ length: points + 1 }, (_, i): Minimum => {
    const at = low + ((high - low) * i) / points;
    return { at, least: figure(at) };
  });
  const valleys = row
    .map((own, i) => [row[i - 1] ?? own, own, row[i + 1] ?? own] as const)
    .filter(([left, own, right]) => own.least <= left.least && own.least <= right.least)
    .sort((a, b) => a[1].least - b[1].least);
  const [first, second] = valleys.slice(0, 2).map((valley) => bottom(figure, valley, width));
  if (!first) return row[0] as Minimum;
  return second && second.least < first.least ? second : first;
}

/** Among whole numbers: the lowest of `grid` (sorted), then halving on both sides of it. */
export function lowestWhole(figure: (x: number) => number, grid: readonly number[]): Minimum {
  const known = new Map<number, number>();
  const of = (at: number): Minimum => {
    const least = known.get(at) ?? figure(at);
    known.set(at, least);
    return { at, least };
  };
  const row = grid.map(of);
  const i = row.reduce((best, { least }, n) => (least < (row[best]?.least ?? Infinity) ? n : best), 0);
  let best = row[i] as Minimum;
  let left = row[Math.max(0, i - 1)]?.at ?? best.at;
  let right = row[Math.min(row.length - 1, i + 1)]?.at ?? best.at;
  while (best.at - left > 1 || right - best.at > 1) {
    const before = of(Math.floor((left + best.at) / 2));
    const after = of(Math.ceil((best.at + right) / 2));
    if (before.least < best.least) {
      right = best.at;
      best = before;
    } else if (after.least < best.least) {
      left = best.at;
      best = after;
    } else {
      left = before.at;
      right = after.at;
    }
  }
  return best;
}

/** 1, 2, 3, 5, 8 ... and the last: a row that finds one valley among many whole numbers. */
export function growingRow(low: number, high: number): number[] {
  const row = [low];
  for (let [a, b] = [1, 1]; low + b < high; [a, b] = [b, a + b]) row.push(low + b);
  if (high > low) row.push(high);
  return [...new Set(row)];
}
