/**
 * Good prices for the bound, by column generation: a linear program over options of runs, loads of channels and
 * numbers of drivers, all allowed in part. It starts with few columns; its duals are prices, and whatever option or
 * load is worth more than it costs at them is added, until nothing is.
 */
import { type Bound, boundOf, kindOf, type Prices, pricesByCuts, type Region } from './tape-plan-bound';
import type { Choices } from './tape-plan-choices';
import type { Kinds, Load } from './tape-plan-knapsack';
import { type Column, GrowingProgram } from './tape-plan-simplex';

/** Keeps the program from going round in circles where many amounts are zero. */
const spread = (row: number) => 1e-7 * (1 + ((row * 0.618034) % 1));
const TINY = 1e-9;
const MAX_ROUNDS = 400;
/** Share of the best prices so far in those that columns are sought at. */
const NEARER = 0.7;

interface OptionColumn {
  run: number;
  option: number;
  /** Index of the chosen spot of each section. */
  spots: number[];
}

interface LoadColumn extends Load {
  bin: number;
}

/** Columns found so far; shared by all parts of the search. */
export interface Pool {
  options: OptionColumn[];
  loads: LoadColumn[];
}

export interface Relaxed {
  bound: Bound;
  /** Number of drivers of each bin, and share of each option of each run, as the program has them. */
  drivers: number[];
  shares: number[][];
  work: number;
}

/** Rows of one program: runs first, then kinds of each site, channels of each bin, most drivers of each bin. */
interface Rows {
  kind: number[][];
  bin: number[];
  most: number[];
  /** Of each driver type: most in all (-1: none), what counts towards the least in all, and how much of it is wanted. */
  totalMost: number[];
  counted: number[];
  wanted: number[];
  limits: number[];
}

function rowsOf({ runs, bins }: Choices, kinds: readonly Kinds[], { least, most, total }: Region): Rows {
  const limits: number[] = runs.map(() => 1);
  const row = (limit: number) => limits.push(limit + spread(limits.length)) - 1;
  const granted = total.least.map((_, type) =>
    bins.reduce((sum, bin, b) => sum + (bin.type === type ? (least[b] ?? 0) : 0), 0),
  );
  const asked = (type: number) => (total.least[type] ?? 0) > (granted[type] ?? 0);
  return {
    kind: kinds.map((own) => own.cuts.map(() => row(0))),
    bin: bins.map((bin, b) => row(bin.channels * (least[b] ?? 0))),
    most: bins.map((_, b) => ((most[b] ?? 0) === Infinity ? -1 : row((most[b] ?? 0) - (least[b] ?? 0)))),
    totalMost: total.most.map((own, type) =>
      own === Infinity ? -1 : row(Math.max(0, own - (granted[type] ?? 0))),
    ),
    counted: granted.map((own, type) => (asked(type) ? row(own) : -1)),
    wanted: total.least.map((own, type) => (asked(type) ? row(own) : -1)),
    limits,
  };
}

export class Relaxation {
  private readonly rows: Rows;
  private readonly program: GrowingProgram;
  private readonly optionOf = new Map<number, OptionColumn>();

  /** @param dear more than any run costs with drivers of its own: what taking an option is rewarded with */
  constructor(
    private readonly choices: Choices,
    private readonly kinds: readonly Kinds[],
    private readonly region: Region,
    private readonly pool: Pool,
    private readonly dear: number,
  ) {
    this.rows = rowsOf(choices, kinds, region);
    this.program = new GrowingProgram(this.rows.limits);
    const { rows } = this;
    choices.bins.forEach((bin, b) => {
      const limited = [rows.most[b] ?? -1, rows.totalMost[bin.type] ?? -1].filter((row) => row >= 0);
      const counted = [rows.counted[bin.type] ?? -1].filter((row) => row >= 0);
      this.program.add({
        cost: bin.cost,
        rows: [rows.bin[b] ?? 0, ...limited, ...counted],
        factors: [-bin.channels, ...limited.map(() => 1), ...counted.map(() => -1)],
      });
    });
    // At least so many in all: each that counts towards it is rewarded, as a run's option is.
    rows.wanted.forEach((row, type) => {
      if (row >= 0) this.program.add({ cost: -dear, rows: [row, rows.counted[type] ?? 0], factors: [1, 1] });
    });
    pool.options.forEach((own) => this.addOption(own));
    pool.loads.forEach((own) => this.program.add(this.loadColumn(own)));
  }

  private optionColumn(own: OptionColumn): Column {
    const [rows, factors] = [[own.run], [1]];
    let cost = -this.dear;
    this.choices.runs[own.run]?.options[own.option]?.sections.forEach(({ cuts, spots }, j) => {
      const spot = spots[own.spots[j] ?? 0];
      if (!spot) return;
      cost += spot.variant.cost;
      const kind = kindOf(this.kinds[spot.site] ?? { cuts: [], supply: [] }, cuts);
      const row = this.rows.kind[spot.site]?.[kind];
      if (row === undefined) return;
      const at = rows.indexOf(row);
      if (at < 0) {
        rows.push(row);
        factors.push(1);
      } else factors[at] = (factors[at] ?? 0) + 1;
    });
    return { cost, rows, factors };
  }

  private addOption(own: OptionColumn, column = this.optionColumn(own)): void {
    if (!this.region.options[own.run]?.includes(own.option)) return;
    this.optionOf.set(this.program.columns.length, own);
    this.program.add(column);
  }

  private loadColumn({ bin, kinds, counts }: LoadColumn): Column {
    const site = this.choices.bins[bin]?.site ?? 0;
    return {
      cost: 0,
      rows: [this.rows.bin[bin] ?? 0, ...kinds.map((kind) => this.rows.kind[site]?.[kind] ?? 0)],
      factors: [1, ...counts.map((count) => -count)],
    };
  }

  private prices(): Prices {
    const { duals } = this.program;
    return pricesByCuts(this.choices, this.kinds, (site, kind) =>
      Math.max(0, -(duals[this.rows.kind[site]?.[kind] ?? 0] ?? 0)),
    );
  }

  /** Adds the best column of every run and bin at the bound's prices that lowers the cost; how many there were. */
  private grow({ runs, knapsacks }: Bound): number {
    const before = this.program.columns.length;
    const helps = (column: Column) => this.program.reducedCost(column) < -TINY * this.dear;
    runs.forEach(({ option, spots }, run) => {
      if (option < 0) return;
      const own = { run, option, spots };
      const column = this.optionColumn(own);
      if (!helps(column)) return;
      this.pool.options.push(own);
      this.addOption(own, column);
    });
    this.choices.bins.forEach((bin, b) => {
      const knapsack = knapsacks[bin.site];
      if (!knapsack || this.region.most[b] === 0) return;
      const load = { bin: b, ...knapsack.load(bin.cuts) };
      const column = this.loadColumn(load);
      if (!helps(column)) return;
      this.pool.loads.push(load);
      this.program.add(column);
    });
    return this.program.columns.length - before;
  }

  /**
   * Solves and grows in turn, at prices between the program's and the best so far: the program's own swing widely
   * until it has the columns it needs. The best bound seen on the way is as true as the last.
   */
  run(start: Bound, mostWork: number, enough: number): Relaxed {
    let best = start;
    const growAt = (prices: Prices) => {
      const bound = boundOf(this.choices, this.kinds, this.region, prices);
      if (bound.cost > best.cost) best = bound;
      return this.grow(bound);
    };
    for (let round = 0; round < MAX_ROUNDS && best.cost < enough; round++) {
      this.program.solve(mostWork);
      const own = this.prices();
      const between = own.map((prices, site) =>
        prices.map((price, cuts) => NEARER * (best.prices[site]?.[cuts] ?? 0) + (1 - NEARER) * price),
      );
      if (growAt(between) === 0 && growAt(own) === 0) break;
      if (this.program.work >= mostWork) break;
    }
    return { ...this.amounts(), bound: best, work: this.program.work };
  }

  private amounts(): Pick<Relaxed, 'drivers' | 'shares'> {
    const amounts = this.program.amounts();
    const shares = this.choices.runs.map(({ options }) => options.map(() => 0));
    for (const [column, { run, option }] of this.optionOf) {
      const own = shares[run];
      if (own) own[option] = (own[option] ?? 0) + (amounts[column] ?? 0);
    }
    return {
      drivers: this.choices.bins.map((_, b) => (amounts[b] ?? 0) + (this.region.least[b] ?? 0)),
      shares,
    };
  }
}
