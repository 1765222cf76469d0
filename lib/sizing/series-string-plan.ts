/**
 * The cheapest set of drivers for all modules, by dynamic programming over the number of modules that are fed: every
 * set of drivers is a sum of options (one driver with so many modules), so the best plan for m modules is one option
 * more than the best plan for what is left. Nothing is guessed: it is the least cost there is.
 */
import { EngineError, REL } from '@/lib/engine/contract';
import type { Option } from './series-string-window';

/** Costs that differ by the rounding of their sums are one cost. */
const COST_MARGIN = REL / 1000;
/** Comparisons that a second or two holds. */
const MOST_STEPS = 4e8;

/** Squares of the lengths of `strings` strings that share `modules` evenly: the smaller, the more even. */
function squaresOf(modules: number, strings: number): number {
  const short = Math.floor(modules / strings);
  const longer = modules % strings;
  return (strings - longer) * short * short + longer * (short + 1) * (short + 1);
}

/** By cost, then fewest drivers, then fewest strings, then the most even split. */
class Ranking {
  readonly cost: Float64Array;
  readonly drivers: Int32Array;
  readonly strings: Int32Array;
  readonly squares: Float64Array;
  /** Which option was put on last; -1: this number can't be fed. */
  readonly last: Int32Array;

  constructor(size: number) {
    this.cost = new Float64Array(size);
    this.drivers = new Int32Array(size);
    this.strings = new Int32Array(size);
    this.squares = new Float64Array(size);
    this.last = new Int32Array(size).fill(-1);
  }

  /** Puts an option's figures on those of `from` at `at`, if that is better than what stands there. */
  offer(at: number, from: number, option: Option, index: number): boolean {
    const cost = (this.cost[from] ?? 0) + option.window.cost;
    const drivers = (this.drivers[from] ?? 0) + 1;
    const strings = (this.strings[from] ?? 0) + option.strings;
    const squares = (this.squares[from] ?? 0) + squaresOf(option.modules, option.strings);
    if ((this.last[at] ?? -1) >= 0) {
      const was = this.cost[at] ?? 0;
      const margin = COST_MARGIN * Math.max(was, cost);
      const better =
        cost < was - margin ||
        (cost <= was + margin &&
          (drivers - (this.drivers[at] ?? 0) ||
            strings - (this.strings[at] ?? 0) ||
            squares - (this.squares[at] ?? 0)) < 0);
      if (!better) return false;
    }
    this.cost[at] = cost;
    this.drivers[at] = drivers;
    this.strings[at] = strings;
    this.squares[at] = squares;
    this.last[at] = index;
    return true;
  }
}

/** For each number of modules up to `upTo` the one option that is best alone, the most modules first: no plan is worse for taking it. */
function bestAlone(all: Iterable<Option>, upTo: number): Option[] {
  const ranking = new Ranking(upTo + 1);
  const best: Option[] = [];
  for (const option of all)
    if (ranking.offer(option.modules, 0, option, option.modules)) best[option.modules] = option;
  return best.filter((option) => option !== undefined).reverse();
}

/** Best plans for every number of modules up to `count`. */
function ranked(options: readonly Option[], count: number): Ranking {
  if (options.length * count > MOST_STEPS)
    throw new EngineError(
      'too-large',
      'count: is too many for drivers that take so many numbers of modules',
      [{ path: 'count', message: 'is too many for drivers that take so many numbers of modules' }],
    );
  const ranking = new Ranking(count + 1);
  for (let at = 1; at <= count; at++)
    for (const [index, option] of options.entries()) {
      const from = at - option.modules;
      if (from < 0 || (from > 0 && (ranking.last[from] ?? -1) < 0)) continue;
      ranking.offer(at, from, option, index);
    }
  return ranking;
}

/**
 * @returns the options of the cheapest plan that feeds exactly `count` modules, the most modules first and drivers of
 * one kind together; null where none does.
 * @throws {EngineError} `too-large`
 */
export function cheapestPlan(all: Iterable<Option>, count: number): Option[] | null {
  const options = bestAlone(all, count);
  const { last } = ranked(options, count);
  if ((last[count] ?? -1) < 0) return null;
  const plan: Option[] = [];
  for (let left = count; left > 0;) {
    const option = options[last[left] ?? -1] as Option;
    plan.push(option);
    left -= option.modules;
  }
  return plan.sort((a, b) => a.window.index - b.window.index || b.modules - a.modules);
}

/**
 * The nearest numbers of modules that can be fed, below and above; null where there is none below.
 * @param all options of up to count + least modules
 * @param least fewest modules of any option: drivers with so many reach a number in each stretch of that length
 */
export function nearestCounts(
  all: Iterable<Option>,
  count: number,
  least: number,
): { below: number | null; above: number } {
  const { last } = ranked(bestAlone(all, count + least), count + least);
  const fed = (at: number) => (last[at] ?? -1) >= 0;
  let below = count - 1;
  while (below > 0 && !fed(below)) below--;
  let above = count + 1;
  while (!fed(above) && above < count + least) above++;
  return { below: below > 0 ? below : null, above };
}
