/**
 * Sections into channels at least cost. Depth first: the largest section left goes into a channel, and that channel is
 * filled as far as anything fits that can be fed nowhere cheaper (moving it into room that is left never costs more,
 * so fuller loads suffice). Measured by the bound's prices, every channel wastes what it is worth less than it could
 * be; a branch ends when it wastes more than the budget, or reaches a state that was reached with less waste.
 */
import { type Bound, grantedCost, type Region } from './tape-plan-bound';
import type { Bin } from './tape-plan-choices';
import { Knapsack } from './tape-plan-knapsack';

/** Sections that are alike to the packer: as long, and costing the same more or less to feed from each site. */
export interface PackKind {
  cuts: number;
  count: number;
  /** By site: what feeding it from there costs above its cheapest; undefined where it can't be. */
  extra: readonly (number | undefined)[];
}

export interface PackJob {
  bins: readonly Bin[];
  /** Bins that its sections can go to, by index. */
  own: readonly number[];
  region: Region;
  bound: Bound;
  /** Longest first. */
  kinds: readonly PackKind[];
  /** Loads tried for each channel (1: the leanest, by knapsack), and steps in all. */
  width: number;
  steps: number;
}

export interface PackedChannel {
  bin: number;
  /** Sections of each kind. */
  counts: number[];
}

export interface Packing {
  /** Of the drivers, and of feeding sections from where it is not cheapest. */
  cost: number;
  channels: PackedChannel[];
}

export interface Packed {
  best: Packing | null;
  complete: boolean;
  steps: number;
}

interface Fill {
  counts: number[];
  waste: number;
  /** Feeding them from this site, above their cheapest. */
  extra: number;
}

/** Rounding of worths. */
const TINY = 1e-12;

class Packer {
  best: Packing | null = null;
  complete = true;
  steps = 0;
  private readonly seen = new Map<string, number>();
  private readonly left: number[];
  private readonly free: number[];
  private readonly drivers: number[];
  private readonly channels: PackedChannel[] = [];
  private extra = 0;
  /** Of each kind: what the bound counts for a section, above the cheapest way to feed it. */
  private readonly priced: number[];

  constructor(
    private readonly job: PackJob,
    private budget: number,
  ) {
    this.left = job.kinds.map(({ count }) => count);
    const { prices } = job.bound;
    this.priced = job.kinds.map(({ cuts, extra }) =>
      extra.reduce<number>(
        (least, own, site) =>
          own === undefined ? least : Math.min(least, own + (prices[site]?.[cuts] ?? 0)),
        Infinity,
      ),
    );
    this.free = job.own.map(() => 0);
    this.drivers = job.own.map(() => 0);
  }

  private bin(i: number): Bin {
    return this.job.bins[this.job.own[i] ?? 0] as Bin;
  }

  private worth(i: number): Float64Array {
    return this.job.bound.worth[this.bin(i).site] as Float64Array;
  }

  /** Loads of a channel that hold one section of kind `first` and leave room for nothing that belongs there. */
  private fills(i: number, first: number, mostWaste: number): Fill[] {
    const { kinds, width } = this.job;
    const { cuts: room, site } = this.bin(i);
    const worth = this.worth(i);
    const full = worth[room] ?? 0;
    const counts = kinds.map(() => 0);
    const found: Fill[] = [];
    let limit = mostWaste;
    const keep = (value: number, extra: number) => {
      found.push({ counts: [...counts], waste: full - value, extra });
      if (found.length <= width) return;
      found.sort((a, b) => a.waste - b.waste).pop();
      this.complete = false;
      limit = Math.min(limit, found[width - 1]?.waste ?? limit);
    };
    /** `skipped`: the shortest section passed over that belongs here. */
    const fill = (from: number, left: number, value: number, extra: number, skipped: number): void => {
      if (++this.steps > this.job.steps) {
        this.complete = false;
        if (found.length > 0 || this.spent()) return;
      }
      if (full - value - (worth[left] ?? 0) > limit + TINY * full) return;
      let next = from;
      while (next < kinds.length && !this.fits(next, site, left)) next++;
      const kind = kinds[next];
      if (!kind) {
        if (skipped > left) keep(value, extra);
        return;
      }
      const own = kind.extra[site] ?? 0;
      const waiting = this.left[next] ?? 0;
      const each = (this.priced[next] ?? 0) - own;
      for (let n = Math.min(waiting, Math.floor(left / kind.cuts)); n >= 0; n--) {
        counts[next] = (counts[next] ?? 0) + n;
        const passed = n < waiting && own === 0 ? Math.min(skipped, kind.cuts) : skipped;
        fill(next + 1, left - n * kind.cuts, value + n * each, extra + n * own, passed);
        counts[next] = (counts[next] ?? 0) - n;
      }
    };
    const own = kinds[first]?.extra[site] ?? 0;
    counts[first] = 1;
    this.left[first] = (this.left[first] ?? 0) - 1;
    fill(first, room - (kinds[first]?.cuts ?? 0), (this.priced[first] ?? 0) - own, own, Infinity);
    this.left[first] = (this.left[first] ?? 0) + 1;
    return found.sort((a, b) => a.waste - b.waste);
  }

  /** The one load that wastes least. */
  private leanest(i: number, first: number): Fill[] {
    const { kinds } = this.job;
    const { cuts: room, site } = this.bin(i);
    const value = (k: number) => (this.priced[k] ?? 0) - (kinds[k]?.extra[site] ?? Infinity);
    const left = room - (kinds[first]?.cuts ?? 0);
    const supply = this.left.map((own, k) => (k === first ? own - 1 : own));
    const { kinds: used, counts: taken } = new Knapsack(
      left,
      { cuts: kinds.map(({ cuts }) => cuts), supply },
      value,
    ).load(left);
    const counts = kinds.map((_, k) => Number(k === first));
    used.forEach((k, j) => (counts[k] = (counts[k] ?? 0) + (taken[j] ?? 0)));
    let [waste, extra] = [this.worth(i)[room] ?? 0, 0];
    counts.forEach((n, k) => {
      if (n === 0) return;
      waste -= n * value(k);
      extra += n * (kinds[k]?.extra[site] ?? 0);
    });
    this.steps += kinds.length;
    this.complete = false;
    return [{ counts, waste, extra }];
  }

  private fits(k: number, site: number, room: number): boolean {
    const kind = this.job.kinds[k];
    return (
      kind !== undefined && kind.cuts <= room && (this.left[k] ?? 0) > 0 && kind.extra[site] !== undefined
    );
  }

  /** A first packing is found in any case where nothing limits it; within a budget it gets a little longer. */
  private spent(): boolean {
    if (!this.best && this.budget === Infinity) return false;
    return this.steps > (this.best ? 1 : 4) * this.job.steps;
  }

  /** What the bound counts here: the sections at their prices, and the drivers that it takes for granted. */
  private counted(): number {
    const { job } = this;
    const sections = job.kinds.reduce((sum, { count }, k) => sum + count * (this.priced[k] ?? 0), 0);
    return job.own.reduce((sum, b) => sum + grantedCost(job.bound, job.region, b), sections);
  }

  private finish(): void {
    const cost = this.drivers.reduce((sum, own, i) => sum + own * this.bin(i).cost, this.extra);
    const waste = cost - this.counted();
    if (waste >= this.budget) return;
    this.budget = waste;
    this.best = { cost, channels: this.channels.map((own) => ({ ...own })) };
  }

  /** What channels that stand open must waste, as the sections left can't fill them. */
  private idle(): number {
    let open = 0;
    for (let i = 0; i < this.free.length; i++) {
      open += (this.free[i] ?? 0) * (this.worth(i)[this.bin(i).cuts] ?? 0);
    }
    if (open === 0) return 0;
    const value = this.left.reduce((sum, own, kind) => sum + own * (this.priced[kind] ?? 0), 0);
    return Math.max(0, open - value);
  }

  private reachedBefore(waste: number): boolean {
    const key = `${this.left.join()}|${this.free.join()}|${this.drivers.join()}`;
    const before = this.seen.get(key);
    if (before !== undefined && before <= waste) return true;
    this.seen.set(key, waste);
    return false;
  }

  search(waste: number): void {
    const { width } = this.job;
    if (waste + this.idle() >= this.budget) return;
    const first = this.left.findIndex((own) => own > 0);
    if (first < 0) return this.finish();
    if (this.reachedBefore(waste)) return;
    const moves: { i: number; fill: Fill; opening: number; waste: number }[] = [];
    this.job.own.forEach((b, i) => {
      if (!this.fits(first, this.bin(i).site, this.bin(i).cuts)) return;
      let opening = 0;
      if ((this.free[i] ?? 0) === 0) {
        const drivers = this.drivers[i] ?? 0;
        if (drivers >= (this.job.region.most[b] ?? 0)) return;
        if (drivers >= (this.job.region.least[b] ?? 0))
          opening = Math.max(0, this.job.bound.driverCosts[b] ?? 0);
      }
      const spent = waste + opening;
      const fills = width > 1 ? this.fills(i, first, this.budget - spent) : this.leanest(i, first);
      for (const fill of fills) moves.push({ i, fill, opening, waste: spent + fill.waste });
    });
    moves.sort((a, b) => a.waste - b.waste || this.bin(a.i).cost - this.bin(b.i).cost);
    for (const move of moves) {
      if (this.spent()) {
        this.complete = false;
        return;
      }
      this.take(move.i, move.fill, move.waste);
    }
    return undefined;
  }

  private take(i: number, { counts, extra }: Fill, waste: number): void {
    const opens = (this.free[i] ?? 0) === 0;
    const channels = this.bin(i).channels;
    if (opens) this.drivers[i] = (this.drivers[i] ?? 0) + 1;
    this.free[i] = (this.free[i] ?? 0) + (opens ? channels : 0) - 1;
    counts.forEach((own, kind) => (this.left[kind] = (this.left[kind] ?? 0) - own));
    this.channels.push({ bin: this.job.own[i] ?? 0, counts });
    this.extra += extra;
    this.search(waste);
    this.extra -= extra;
    this.channels.pop();
    counts.forEach((own, kind) => (this.left[kind] = (this.left[kind] ?? 0) + own));
    this.free[i] = (this.free[i] ?? 0) - (opens ? channels : 0) + 1;
    if (opens) this.drivers[i] = (this.drivers[i] ?? 0) - 1;
  }
}

/** The cheapest packing that wastes less than the budget, or null; `complete` says that there is none cheaper. */
export function pack(job: PackJob, budget: number): Packed {
  const packer = new Packer(job, budget);
  packer.search(0);
  return { best: packer.best, complete: packer.complete, steps: packer.steps };
}
