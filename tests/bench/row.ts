/** What a bench measures, and how: medians, beside a calibration loop so that two machines can be compared. */

export interface Row {
  what: string;
  value: number;
  unit: string;
  /** In words, as design asks for it; without one the figure is only watched. */
  target?: string;
  /** Null where there is no target. */
  ok: boolean | null;
}

const RUNS = 20;

export function median(figures: readonly number[]): number {
  const sorted = [...figures].sort((a, b) => a - b);
  const half = sorted.length / 2;
  return sorted.length % 2
    ? (sorted[Math.floor(half)] ?? NaN)
    : ((sorted[half - 1] ?? NaN) + (sorted[half] ?? NaN)) / 2;
}

/** Median milliseconds of `runs` calls, after one that warms up. */
export function milliseconds(work: () => unknown, runs = RUNS): number {
  work();
  return median(
    Array.from({ length: runs }, () => {
      const start = performance.now();
      work();
      return performance.now() - start;
    }),
  );
}

/** A fixed piece of arithmetic: its time says how fast this machine is today. */
export function calibration(): Row {
  const loop = () => {
    let sum = 0;
    for (let i = 1; i < 5_000_000; i++) sum += Math.sqrt(i) / (i + 1);
    return sum;
  };
  return { what: 'calibration loop', value: milliseconds(loop), unit: 'ms', ok: null };
}
