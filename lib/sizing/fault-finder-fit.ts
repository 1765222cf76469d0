/** The figure and the place with which a cause explains the readings best. */
import { EngineError } from '@/lib/engine/contract';
import { growingRow, lowest, lowestWhole } from './fault-finder-minimum';
import type { Family, Solved } from './fault-finder-model';
import type { Weighed } from './fault-finder-weighed';

/** Causes whose scores differ by less (three sigma) are not told apart. */
export const TOLD_APART = 9;
/** Akaike's price of a figure or a place that was fitted: what fits as well with less comes first. */
const PRICE = 2;
/** In ln of the figure: a thousandth. */
const LOG_WIDTH = 1e-3;
const LINEAR_WIDTH = 1e-4;

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
