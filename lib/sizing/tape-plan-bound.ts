/**
 * The bound. Give every section at every site a price that grows with its cuts. Whatever a channel holds is worth at
 * most its fullest load (a knapsack); a driver whose channels are worth no more than it costs can't be beaten by the
 * prices. So no plan costs less than: for every run its cheapest option at those prices, and for every driver that
 * must be or may be used what it costs above the worth of its channels. True for any prices at all; good prices come
 * from a linear program (tape-plan-prices.ts).
 */
import type { Choices, Option, Section, Spot } from './tape-plan-choices';
import { type Kinds, Knapsack } from './tape-plan-knapsack';

/** Price of a section by site and cuts. */
export type Prices = readonly Float64Array[];

/** What of the choices a part of the search keeps. */
export interface Region {
  /** Least and most drivers of each bin. */
  least: number[];
  most: number[];
  /** The same of each driver type over all places: what one place saves, another may buy. */
  total: { least: number[]; most: number[] };
  /** Options left of each run, by index. */
  options: number[][];
}

/** Cheapest option of a run at the prices, and the spots of its sections. */
export interface PricedRun {
  cost: number;
  option: number;
  spots: number[];
}

export interface Bound {
  cost: number;
  /** The same without what the totals of driver types add. */
  looseCost: number;
  prices: Prices;
  runs: PricedRun[];
  /** Of each site: most that one channel is worth by its room. */
  worth: Float64Array[];
  /** Of each bin: what one driver costs above the worth of its channels. */
  driverCosts: number[];
  /** Of each site, for the loads. */
  knapsacks: Knapsack[];
}

/** Kind that a section counts as: the largest that is not larger, or -1. */
export function kindOf({ cuts }: Kinds, own: number): number {
  let low = -1;
  let high = cuts.length - 1;
  while (low < high) {
    const middle = Math.ceil((low + high) / 2);
    if ((cuts[middle] ?? 0) <= own) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** What an option costs at the prices, each section at its cheapest spot. Called most of all: plain loops. */
export function pricedOption({ sections }: Option, prices: Prices): number {
  let cost = 0;
  for (let j = 0; j < sections.length; j++) {
    const { cuts, spots } = sections[j] as Section;
    let least = Infinity;
    for (let i = 0; i < spots.length; i++) {
      const { site, variant } = spots[i] as Spot;
      const own = variant.cost + ((prices[site] as Float64Array)[cuts] ?? 0);
      if (own < least) least = own;
    }
    cost += least;
  }
  return cost;
}

/** Those spots, by index. */
function cheapestSpots({ sections }: Option, prices: Prices): number[] {
  return sections.map(({ cuts, spots }) => {
    const priced = spots.map(({ site, variant }) => variant.cost + (prices[site]?.[cuts] ?? 0));
    return priced.indexOf(Math.min(...priced));
  });
}

/** Prices by cuts out of prices by kind: a section between two kinds is priced as the smaller. */
export function pricesByCuts(
  choices: Choices,
  kinds: readonly Kinds[],
  ofKind: (site: number, kind: number) => number,
) {
  const most = choices.runs.reduce((all, { cuts }) => Math.max(all, cuts), 0);
  return kinds.map((own, site) => {
    const prices = new Float64Array(most + 1);
    let kind = -1;
    for (let cuts = 0; cuts <= most; cuts++) {
      while ((own.cuts[kind + 1] ?? Infinity) <= cuts) kind++;
      prices[cuts] = kind < 0 ? 0 : ofKind(site, kind);
    }
    return prices;
  });
}

/** What drivers of a bin cost at least above their channels' worth: those that must be, or all that may. */
export function grantedCost(
  { driverCosts }: Pick<Bound, 'driverCosts'>,
  { least, most }: Region,
  b: number,
): number {
  const own = driverCosts[b] ?? 0;
  const number = own > 0 ? (least[b] ?? 0) : (most[b] ?? 0);
  return number === Infinity ? 0 : number * own;
}

/** What drivers of a type cost at least above their channels' worth, over all places; Infinity where they can't be. */
function grantedTotal(
  driverCosts: readonly number[],
  { least, most, total }: Region,
  own: readonly number[],
  type: number,
): number {
  const sorted = [...own].sort((a, b) => (driverCosts[a] ?? 0) - (driverCosts[b] ?? 0));
  let cost = 0;
  let number = 0;
  for (const b of sorted) {
    cost += (least[b] ?? 0) * (driverCosts[b] ?? 0);
    number += least[b] ?? 0;
  }
  for (const b of sorted) {
    const each = driverCosts[b] ?? 0;
    const until = each < 0 ? (total.most[type] ?? 0) : (total.least[type] ?? 0);
    const more = Math.min((most[b] ?? 0) - (least[b] ?? 0), until - number);
    // Without a most number no driver is worth more than it costs: nothing to gain.
    if (more <= 0 || more === Infinity) continue;
    cost += more * each;
    number += more;
  }
  return number < (total.least[type] ?? 0) || number > (total.most[type] ?? 0) ? Infinity : cost;
}

function cheapestOption(options: readonly Option[], left: readonly number[], prices: Prices): PricedRun {
  let best: PricedRun = { cost: Infinity, option: -1, spots: [] };
  for (const option of left) {
    const own = options[option];
    const cost = own ? pricedOption(own, prices) : Infinity;
    if (cost < best.cost) best = { cost, option, spots: [] };
  }
  const own = options[best.option];
  return own ? { ...best, spots: cheapestSpots(own, prices) } : best;
}

/** One knapsack a site, wide enough for its largest channel. */
function knapsacksOf({ bins }: Choices, kinds: readonly Kinds[], prices: Prices): Knapsack[] {
  return kinds.map((own, site) => {
    const room = bins.reduce((most, bin) => (bin.site === site ? Math.max(most, bin.cuts) : most), 0);
    return new Knapsack(room, own, (kind) => prices[site]?.[own.cuts[kind] ?? 0] ?? 0);
  });
}

/**
 * The bound at these prices within a region. Prices are first lowered until no driver without a most number is worth
 * more than it costs.
 */
export function boundOf(choices: Choices, kinds: readonly Kinds[], region: Region, prices: Prices): Bound {
  const knapsacks = knapsacksOf(choices, kinds, prices);
  let share = 1;
  choices.bins.forEach((bin, b) => {
    const channels = bin.channels * (knapsacks[bin.site]?.worth[bin.cuts] ?? 0);
    if (region.most[b] === Infinity && channels * share > bin.cost) share = bin.cost / channels;
  });
  const scaled = share < 1 ? prices.map((own) => own.map((one) => one * share)) : prices;
  const worth = knapsacks.map((own) => (share < 1 ? own.worth.map((one) => one * share) : own.worth));
  const runs = choices.runs.map(({ options }, r) => cheapestOption(options, region.options[r] ?? [], scaled));
  const driverCosts = choices.bins.map((bin) => bin.cost - bin.channels * (worth[bin.site]?.[bin.cuts] ?? 0));
  const found = { prices: scaled, runs, worth, driverCosts, knapsacks };
  const options = runs.reduce((sum, own) => sum + own.cost, 0);
  const looseCost = choices.bins.reduce((sum, _, b) => sum + grantedCost(found, region, b), options);
  const cost = region.total.least.reduce((sum, _, type) => {
    const own = choices.bins.flatMap((bin, b) => (bin.type === type ? [b] : []));
    return sum + grantedTotal(driverCosts, region, own, type);
  }, options);
  return { ...found, cost, looseCost };
}

/** Kinds of the sections that `wanted` keeps; supply counts all sections, each as its kind. */
export function kindsOf(
  runs: Choices['runs'],
  sites: number,
  wanted: (run: number, option: number) => boolean,
): Kinds[] {
  const sets = Array.from({ length: sites }, () => new Set<number>());
  runs.forEach(({ options }, r) =>
    options.forEach(({ sections }, o) => {
      if (!wanted(r, o)) return;
      for (const { cuts, spots } of sections) for (const { site } of spots) sets[site]?.add(cuts);
    }),
  );
  const kinds = sets.map((set): Kinds => {
    const cuts = [...set].sort((a, b) => a - b);
    return { cuts, supply: cuts.map(() => 0) };
  });
  for (const { options } of runs) {
    const most = new Map<Kinds, number[]>();
    for (const { sections } of options) {
      const here = new Map<Kinds, number[]>();
      for (const { cuts, spots } of sections)
        for (const { site } of spots) {
          const own = kinds[site] as Kinds;
          const kind = kindOf(own, cuts);
          if (kind < 0) continue;
          const counts = here.get(own) ?? own.cuts.map(() => 0);
          counts[kind] = (counts[kind] ?? 0) + 1;
          here.set(own, counts);
        }
      for (const [own, counts] of here) {
        const before = most.get(own) ?? own.cuts.map(() => 0);
        most.set(
          own,
          before.map((count, kind) => Math.max(count, counts[kind] ?? 0)),
        );
      }
    }
    for (const [own, counts] of most) own.supply = own.supply.map((sum, kind) => sum + (counts[kind] ?? 0));
  }
  return kinds;
}
