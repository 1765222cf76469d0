/**
 * The cheapest plan: branch and bound over numbers of drivers and options of runs. A part of the search is bounded by
 * prices; within it, options whose price difference is under the gap are tried in order, and the sections they leave
 * at each site are packed. What ends without being searched through keeps its bound, and the least of those says how
 * far the plan can be from the best.
 */
import { REL } from '@/lib/engine/contract';
import { type Bound, boundOf, kindsOf, pricesByCuts, type Region } from './tape-plan-bound';
import type { Choices, Option } from './tape-plan-choices';
import type { Kinds } from './tape-plan-knapsack';
import { packSite, type Packing } from './tape-plan-pack';
import { type Pool, Relaxation, type Relaxed } from './tape-plan-prices';

/** How much work a search may do: counts, so that every machine ends at the same plan. */
export interface Effort {
  /** Multiplications of the linear programs in all. */
  work: number;
  parts: number;
  /** Combinations of options tried in one part. */
  combinations: number;
  width: number;
  steps: number;
}

export interface Found {
  cost: number;
  /** Of each run: its option, and the spot of each section. */
  options: { option: number; spots: number[] }[];
  /** Of each site: what its sections are packed into. */
  packings: { site: number; kinds: number[]; packing: Packing }[];
}

export interface Searched {
  best: Found | null;
  /** No plan costs less than this. */
  bound: number;
}

interface SiteLoad {
  /** Cuts of each kind, descending. */
  cuts: number[];
  counts: number[];
}

interface Choice {
  option: number;
  spots: number[];
  cost: number;
  /** Above the run's cheapest at the prices. */
  extra: number;
}

/** Ways to serve a section that cost at most `most` more than its cheapest, as combinations over an option. */
function choicesWithin(
  option: Option,
  index: number,
  bound: Bound,
  runCost: number,
  most: number,
  limit: number,
): Choice[] {
  const priced = option.sections.map(({ cuts, spots }) => {
    const own = spots.map(({ site, variant }, spot) => ({
      spot,
      cost: variant.cost,
      priced: variant.cost + (bound.prices[site]?.[cuts] ?? 0),
    }));
    return own.sort((a, b) => a.priced - b.priced);
  });
  const least = priced.reduce((sum, own) => sum + (own[0]?.priced ?? 0), 0) - runCost;
  const found: Choice[] = [];
  const walk = (j: number, spots: number[], cost: number, extra: number): void => {
    if (found.length >= limit) return;
    const own = priced[j];
    if (!own) return void found.push({ option: index, spots, cost, extra });
    for (const one of own) {
      const more = extra + one.priced - (own[0]?.priced ?? 0);
      if (more > most) break;
      walk(j + 1, [...spots, one.spot], cost + one.cost, more);
    }
    return undefined;
  };
  if (least <= most) walk(0, [], 0, least);
  return found;
}

class Search {
  best: Found | null = null;
  work = 0;
  private readonly siteBins: number[][];
  private readonly memo = new Map<string, { best: Packing | null; complete: boolean }>();

  constructor(
    private readonly choices: Choices,
    private readonly effort: Effort,
  ) {
    this.siteBins = Array.from({ length: choices.sites }, (_, site) =>
      choices.bins.map((_own, b) => b).filter((b) => choices.bins[b]?.site === site),
    );
  }

  private get incumbent(): number {
    return this.best?.cost ?? Infinity;
  }

  /** Sections of the chosen options by site and kind. */
  private siteLoads(chosen: readonly Choice[]): SiteLoad[] {
    const sites = this.siteBins.map(() => new Map<number, number>());
    chosen.forEach(({ option, spots }, r) =>
      this.choices.runs[r]?.options[option]?.sections.forEach(({ cuts, spots: all }, j) => {
        const own = sites[all[spots[j] ?? 0]?.site ?? 0];
        own?.set(cuts, (own.get(cuts) ?? 0) + 1);
      }),
    );
    return sites.map((own) => {
      const cuts = [...own.keys()].sort((a, b) => b - a);
      return { cuts, counts: cuts.map((kind) => own.get(kind) ?? 0) };
    });
  }

  /** Packs every site; keeps the plan if it is the cheapest so far. Whether nothing cheaper was overlooked. */
  private pack(chosen: readonly Choice[], region: Region, bound: Bound, budget: number): boolean {
    let cost = chosen.reduce((sum, own) => sum + own.cost, 0);
    let complete = true;
    const packings: Found['packings'] = [];
    for (const [site, { cuts, counts }] of this.siteLoads(chosen).entries()) {
      if (cuts.length === 0) continue;
      const key = `${site}|${cuts.join()}|${counts.join()}`;
      let found = this.memo.get(key);
      if (!found) {
        const prices = cuts.map((own) => bound.prices[site]?.[own] ?? 0);
        const { width, steps } = this.effort;
        const own = this.siteBins[site] ?? [];
        const job = { bins: this.choices.bins, own, region, bound, cuts, prices, counts, width, steps };
        found = packSite(job, budget);
        this.memo.set(key, found);
      }
      complete = complete && found.complete;
      if (!found.best) return complete;
      cost += found.best.cost;
      packings.push({ site, kinds: cuts, packing: found.best });
    }
    if (cost < this.incumbent)
      this.best = { cost, options: chosen.map(({ option, spots }) => ({ option, spots })), packings };
    return complete;
  }

  /** Tries the options of a region whose extra cost lies within the gap. Whether all was searched. */
  tryOptions(region: Region, bound: Bound, combinations: number): boolean {
    this.memo.clear();
    const gap = this.incumbent - bound.cost;
    let complete = true;
    const byRun = this.choices.runs.map(({ options }, r) => {
      const all = (region.options[r] ?? []).flatMap((o) => {
        const found = choicesWithin(
          options[o] as Option,
          o,
          bound,
          bound.runCosts[r] ?? 0,
          gap,
          combinations,
        );
        if (found.length >= combinations) complete = false;
        return found;
      });
      return all.sort((a, b) => a.extra - b.extra);
    });
    let tried = 0;
    const walk = (r: number, chosen: Choice[], extra: number): void => {
      const own = byRun[r];
      if (!own) {
        if (++tried > combinations) complete = false;
        else if (!this.pack(chosen, region, bound, this.incumbent - bound.cost)) complete = false;
        return;
      }
      for (const one of own) {
        if (tried > combinations) return;
        // The best may have been improved on the way.
        if (extra + one.extra >= this.incumbent - bound.cost) break;
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
  const whole: Region = {
    least: choices.bins.map(() => 0),
    most: choices.bins.map(() => Infinity),
    options: choices.runs.map(({ options }) => options.map((_, o) => o)),
  };
  const search = new Search(choices, effort);
  const even = boundOf(choices, kinds, whole, evenPrices(choices, kinds));
  search.tryOptions(whole, even, 1);
  const pool: Pool = { options: [], loads: [] };
  const dear = dearOf(choices);
  const open: Part[] = [{ region: whole, bound: even.cost }];
  /** Least bound of the parts that were left without being searched through. */
  let left = Infinity;
  const enough = () => (search.best?.cost ?? Infinity) * (1 - REL);
  for (let part = 0; open.length > 0 && part < effort.parts && search.work < effort.work; part++) {
    open.sort((a, b) => b.bound - a.bound);
    const { region, bound } = open.pop() as Part;
    if (bound >= enough()) continue;
    const relaxed = new Relaxation(choices, kinds, region, pool, dear).run(
      effort.work - search.work,
      enough(),
    );
    search.work += relaxed.work;
    const own = Math.max(bound, relaxed.bound.cost);
    if (own >= enough()) continue;
    const searched = search.tryOptions(region, relaxed.bound, effort.combinations);
    if (searched || own >= enough()) continue;
    const parts = splitPart(relaxed, region) ?? splitWhole(relaxed, region);
    if (parts) open.push(...parts.map((one) => ({ region: one, bound: own })));
    else left = Math.min(left, own);
  }
  const best = search.best;
  const bound = open.reduce(
    (least, own) => Math.min(least, own.bound),
    Math.min(left, best?.cost ?? Infinity),
  );
  return { best, bound };
}
