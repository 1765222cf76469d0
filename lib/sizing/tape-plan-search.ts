/**
 * The cheapest plan: branch and bound over numbers of drivers and options of runs. A part of the search is bounded by
 * prices; within it, options whose price difference is under the gap are tried in order, and the sections they leave
 * at each site are packed. What ends without being searched through keeps its bound, and the least of those says how
 * far the plan can be from the best.
 */
import { REL } from '@/lib/engine/contract';
import {
  type Bound,
  boundOf,
  kindOf,
  kindsOf,
  pricedOption,
  type Prices,
  pricesByCuts,
  type Region,
} from './tape-plan-bound';
import type { Choices, Option } from './tape-plan-choices';
import type { Kinds } from './tape-plan-knapsack';
import { pack, type Packed } from './tape-plan-pack';
import { componentsOf } from './tape-plan-components';
import { type Pool, Relaxation, type Relaxed } from './tape-plan-prices';

/** Extra costs that differ by less than this share of the gap are alike. */
const ALIKE = 1e-6;

/** How hard the options of one part are tried. */
export interface Trial {
  /** Combinations of options. */
  combinations: number;
  /** Loads tried for each channel, and steps of packing in all. */
  width: number;
  steps: number;
}

/** How much work a search may do: counts, so that every machine ends at the same plan. */
export interface Effort {
  /** Multiplications of the linear programs in all. */
  work: number;
  /** Steps of packing in all. */
  steps: number;
  parts: number;
  /** Of a part that can be split further, and of one that can't. */
  trial: Trial;
  last: Trial;
  /** Before them at first: the leanest loads. */
  lean: Trial;
}

export interface Found {
  cost: number;
  /** Option of each run. */
  options: number[];
  /** What each channel feeds. */
  channels: { bin: number; sections: SectionId[] }[];
}

export interface SectionId {
  run: number;
  section: number;
}

export interface Searched {
  best: Found | null;
  /** No plan costs less than this. */
  bound: number;
}

interface Choice {
  option: number;
  /** Least cost of its feeders. */
  cost: number;
  /** At the prices, above the run's cheapest. */
  extra: number;
}

class Search {
  best: Found | null = null;
  work = 0;
  steps = 0;
  private readonly memo = new Map<string, Packed>();

  constructor(private readonly choices: Choices) {}

  private get incumbent(): number {
    return this.best?.cost ?? Infinity;
  }

  /** Packs the sections of the options; keeps the plan if it is the cheapest so far. Whether no cheaper was overlooked. */
  private packOptions(chosen: readonly Choice[], region: Region, bound: Bound, effort: Trial): boolean {
    const budget = this.incumbent - bound.looseCost;
    const channels: Found['channels'] = [];
    let cost = chosen.reduce((sum, own) => sum + own.cost, 0);
    let complete = true;
    for (const { own, kinds, members } of componentsOf(this.choices, chosen)) {
      const key = `${own.join()}|${kinds.map(({ cuts, count, extra }) => `${cuts}*${count}:${extra.join()}`).join('|')}`;
      let found = this.memo.get(key);
      if (!found) {
        const { width, steps } = effort;
        found = pack({ bins: this.choices.bins, own, region, bound, kinds, width, steps }, budget);
        this.steps += found.steps;
        this.memo.set(key, found);
      }
      complete = complete && found.complete;
      if (!found.best) return complete;
      cost += found.best.cost;
      const waiting = members.map((all) => [...all]);
      for (const { bin, counts } of found.best.channels)
        channels.push({ bin, sections: counts.flatMap((n, kind) => waiting[kind]?.splice(0, n) ?? []) });
    }
    if (cost < this.incumbent) this.best = { cost, options: chosen.map(({ option }) => option), channels };
    return complete;
  }

  /** Tries the options of a region whose extra cost lies within the gap. Whether all was searched. */
  tryOptions(region: Region, bound: Bound, effort: Trial, shares?: Relaxed['shares']): boolean {
    this.memo.clear();
    const gap = this.incumbent - bound.looseCost;
    const byRun = this.choices.runs.map(({ options }, r) => {
      const all = (region.options[r] ?? []).map((option): Choice => {
        const own = options[option] as Option;
        const extra = pricedOption(own, bound.prices) - (bound.runs[r]?.cost ?? 0);
        return { option, cost: own.leastCost, extra };
      });
      const share = ({ option }: Choice) => shares?.[r]?.[option] ?? 0;
      const near = ALIKE * Math.min(gap, bound.cost);
      const byExtra = (a: Choice, b: Choice) =>
        Math.abs(a.extra - b.extra) > near ? a.extra - b.extra : share(b) - share(a) || a.extra - b.extra;
      return all.filter(({ extra }) => extra < gap).sort(byExtra);
    });
    let complete = true;
    let tried = 0;
    const walk = (r: number, chosen: Choice[], extra: number): void => {
      const own = byRun[r];
      if (!own) {
        if (++tried > effort.combinations || !this.packOptions(chosen, region, bound, effort))
          complete = false;
        return;
      }
      for (const one of own) {
        if (tried > effort.combinations) return;
        // The best may have been improved on the way.
        if (extra + one.extra < this.incumbent - bound.looseCost)
          walk(r + 1, [...chosen, one], extra + one.extra);
      }
    };
    walk(0, [], 0);
    return complete;
  }
}

interface Part {
  region: Region;
  bound: number;
  /** To start from. */
  prices: Prices;
}

/** Beyond this a figure of the linear program is not whole. */
const WHOLE = 1e-5;
const fromWhole = (x: number) => Math.abs(x - Math.round(x));

function withDrivers(region: Region, b: number, least: number, most: number): Region {
  return {
    ...region,
    least: region.least.map((own, i) => (i === b ? Math.max(own, least) : own)),
    most: region.most.map((own, i) => (i === b ? Math.min(own, most) : own)),
  };
}

function withTotal(
  region: Region,
  own: readonly number[],
  type: number,
  least: number,
  most: number,
): Region {
  const { total } = region;
  return {
    ...region,
    most: region.most.map((all, b) => (own.includes(b) ? Math.min(all, most) : all)),
    total: {
      least: total.least.map((all, t) => (t === type ? Math.max(all, least) : all)),
      most: total.most.map((all, t) => (t === type ? Math.min(all, most) : all)),
    },
  };
}

/** On a driver type that the linear program has in part over all places. */
function splitTotal({ bins }: Choices, { drivers }: Relaxed, region: Region): Region[] | null {
  const totals = region.total.least.map((_, type) =>
    drivers.reduce((sum, own, b) => sum + (bins[b]?.type === type ? own : 0), 0),
  );
  let [type, most] = [-1, WHOLE];
  totals.forEach((own, t) => {
    if (fromWhole(own) > most) [type, most] = [t, fromWhole(own)];
  });
  if (type < 0) return null;
  const own = bins.flatMap((bin, b) => (bin.type === type ? [b] : []));
  const floor = Math.floor(totals[type] ?? 0);
  return [withTotal(region, own, type, 0, floor), withTotal(region, own, type, floor + 1, Infinity)];
}

/** The region with an option of a run forced, and with it left out. */
function onOption(region: Region, run: number, option: number): Region[] {
  return [(o: number) => o === option, (o: number) => o !== option].map((kept) => ({
    ...region,
    options: region.options.map((own, r) => (r === run ? own.filter(kept) : own)),
  }));
}

/** On a number of drivers, else on an option, that the linear program has in part. */
function splitPart({ drivers, shares }: Relaxed, region: Region): Region[] | null {
  let [at, most] = [-1, WHOLE];
  drivers.forEach((own, b) => {
    if (fromWhole(own) > most) [at, most] = [b, fromWhole(own)];
  });
  const floor = Math.floor(drivers[at] ?? 0);
  if (at >= 0) return [withDrivers(region, at, 0, floor), withDrivers(region, at, floor + 1, Infinity)];
  let [run, option] = [-1, -1];
  shares.forEach((own, r) =>
    own.forEach((share, o) => {
      if (fromWhole(share) > most) [run, option, most] = [r, o, fromWhole(share)];
    }),
  );
  return run < 0 ? null : onOption(region, run, option);
}

/** Where the program is whole but its loads can't be made: on what is not settled yet; null where all is. */
function splitWhole({ drivers, shares }: Relaxed, region: Region): Region[] | null {
  const open = drivers.findIndex((_, b) => (region.least[b] ?? 0) < (region.most[b] ?? 0));
  if (open >= 0) {
    const whole = Math.round(drivers[open] ?? 0);
    const parts = [withDrivers(region, open, whole, whole), withDrivers(region, open, whole + 1, Infinity)];
    if (whole > 0) parts.push(withDrivers(region, open, 0, whole - 1));
    return parts.filter(({ least, most }) => (least[open] ?? 0) <= (most[open] ?? 0));
  }
  const run = region.options.findIndex((own) => own.length > 1);
  const option = (shares[run] ?? []).findIndex((share) => share > 0.5);
  return run < 0 ? null : onOption(region, run, option < 0 ? (region.options[run]?.[0] ?? 0) : option);
}

/** Prices in proportion to the cuts: what the cheapest driver of the site asks for one. */
function evenPrices(choices: Choices, kinds: readonly Kinds[]) {
  const perCut = kinds.map((_, site) =>
    choices.bins.reduce(
      (least, bin) =>
        bin.site === site && bin.cuts > 0 ? Math.min(least, bin.cost / bin.channels / bin.cuts) : least,
      Infinity,
    ),
  );
  return pricesByCuts(choices, kinds, (site, kind) => {
    const own = perCut[site] ?? 0;
    return own === Infinity ? 0 : own * (kinds[site]?.cuts[kind] ?? 0);
  });
}

/** The columns of a plan, for the linear program to start from. */
function poolOf(best: Found | null, { bins, runs }: Choices, kinds: readonly Kinds[]): Pool {
  const pool: Pool = { options: [], loads: [] };
  if (!best) return pool;
  const spots = best.options.map((option, r) => runs[r]?.options[option]?.sections.map(() => 0) ?? []);
  for (const { bin, sections } of best.channels) {
    const site = bins[bin]?.site ?? 0;
    const counts = new Map<number, number>();
    for (const { run, section } of sections) {
      const own = runs[run]?.options[best.options[run] ?? 0]?.sections[section];
      if (!own) continue;
      const spot = own.spots.findIndex((one) => one.site === site);
      if (spots[run]) spots[run][section] = spot;
      const kind = kindOf(kinds[site] ?? { cuts: [], supply: [] }, own.cuts);
      counts.set(kind, (counts.get(kind) ?? 0) + 1);
    }
    pool.loads.push({ bin, kinds: [...counts.keys()], counts: [...counts.values()] });
  }
  pool.options = best.options.map((option, run) => ({ run, option, spots: spots[run] ?? [] }));
  return pool;
}

/** More than any run costs with drivers of its own. */
function dearOf({ runs, bins }: Choices): number {
  const driver = bins.reduce((most, { cost }) => Math.max(most, cost), 0);
  const run = runs.reduce(
    (most, { options }) =>
      options.reduce(
        (all, { sections }) =>
          Math.max(
            all,
            sections.reduce(
              (sum, { spots }) => sum + driver + Math.max(...spots.map(({ variant }) => variant.cost)),
              0,
            ),
          ),
        most,
      ),
    0,
  );
  return 4 * run + 1;
}

/** Searches until the bound is met or the effort is used up. */
export function cheapestPlan(choices: Choices, effort: Effort): Searched {
  const kinds = kindsOf(choices.runs, choices.sites, () => true);
  const types = Array.from({ length: 1 + Math.max(...choices.bins.map(({ type }) => type)) });
  const whole: Region = {
    least: choices.bins.map(() => 0),
    most: choices.bins.map(() => Infinity),
    total: { least: types.map(() => 0), most: types.map(() => Infinity) },
    options: choices.runs.map(({ options }) => options.map((_, o) => o)),
  };
  const search = new Search(choices);
  const even = boundOf(choices, kinds, whole, evenPrices(choices, kinds));
  search.tryOptions(whole, even, { ...effort.trial, combinations: 1 });
  const pool = poolOf(search.best, choices, kinds);
  const dear = dearOf(choices);
  const open: Part[] = [{ region: whole, bound: even.cost, prices: even.prices }];
  /** Least bound of the parts that were left without being searched through. */
  let left = Infinity;
  const enough = () => (search.best?.cost ?? Infinity) * (1 - REL);
  const spent = () => search.work >= effort.work || search.steps >= effort.steps;
  for (let part = 0; open.length > 0 && part < effort.parts && !spent(); part++) {
    open.sort((a, b) => b.bound - a.bound);
    const { region, bound, prices } = open.pop() as Part;
    if (bound >= enough()) continue;
    const relaxed = new Relaxation(choices, kinds, region, pool, dear).run(
      boundOf(choices, kinds, region, prices),
      effort.work - search.work,
      enough(),
    );
    search.work += relaxed.work;
    const own = Math.max(bound, relaxed.bound.cost);
    if (own >= enough()) continue;
    const parts =
      splitTotal(choices, relaxed, region) ?? splitPart(relaxed, region) ?? splitWhole(relaxed, region);
    if (part === 0) search.tryOptions(region, relaxed.bound, effort.lean, relaxed.shares);
    const trial = parts ? effort.trial : effort.last;
    const searched = search.tryOptions(region, relaxed.bound, trial, relaxed.shares);
    if (searched || own >= enough()) continue;
    if (parts) open.push(...parts.map((one) => ({ region: one, bound: own, prices: relaxed.bound.prices })));
    else left = Math.min(left, own);
  }
  const best = search.best;
  const bound = open.reduce(
    (least, own) => Math.min(least, own.bound),
    Math.min(left, best?.cost ?? Infinity),
  );
  return { best, bound };
}
