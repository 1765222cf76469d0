/**
 * Good prices for the bound, by column generation: a linear program over options of runs, loads of channels and
 * numbers of drivers, all allowed in part. It starts with few columns; its duals are prices, and whatever option or
 * load is worth more than it costs at them is added, until nothing is.
 */
import { type Bound, boundOf, kindOf, pricedOption, pricesByCuts, type Region } from './tape-plan-bound';
import type { Choices } from './tape-plan-choices';
import { fullestLoad, type Kinds, type Load } from './tape-plan-knapsack';
import { type Column, GrowingProgram } from './tape-plan-simplex';

/** Keeps the program from going round in circles where many amounts are zero. */
const spread = (row: number) => 1e-7 * (1 + ((row * 0.618034) % 1));
const TINY = 1e-9;
const MAX_ROUNDS = 400;

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
  limits: number[];
}

function rowsOf({ runs, bins }: Choices, kinds: readonly Kinds[], { least, most }: Region): Rows {
  const limits: number[] = runs.map(() => 1);
  const row = (limit: number) => limits.push(limit + spread(limits.length)) - 1;
  return {
    kind: kinds.map((own) => own.cuts.map(() => row(0))),
    bin: bins.map((bin, b) => row(bin.channels * (least[b] ?? 0))),
    most: bins.map((_, b) => ((most[b] ?? 0) === Infinity ? -1 : row((most[b] ?? 0) - (least[b] ?? 0)))),
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
    choices.bins.forEach((bin, b) => {
      const most = this.rows.most[b] ?? -1;
      const binRow = this.rows.bin[b] ?? 0;
      this.program.add({
        cost: bin.cost,
        rows: most < 0 ? [binRow] : [binRow, most],
        factors: most < 0 ? [-bin.channels] : [-bin.channels, 1],
      });
    });
    pool.options.forEach((own) => this.addOption(own));
    pool.loads.forEach((own) => this.program.add(this.loadColumn(own)));
  }

  private addOption(own: OptionColumn): void {
    if (!this.region.options[own.run]?.includes(own.option)) return;
    const column: Column = { cost: -this.dear, rows: [own.run], factors: [1] };
    const [rows, factors] = [[own.run], [1]];
    this.choices.runs[own.run]?.options[own.option]?.sections.forEach(({ cuts, spots }, j) => {
      const spot = spots[own.spots[j] ?? 0];
      if (!spot) return;
      column.cost += spot.variant.cost;
      const kind = kindOf(this.kinds[spot.site] ?? { cuts: [], supply: [] }, cuts);
      const row = this.rows.kind[spot.site]?.[kind];
      if (row === undefined) return;
      const at = rows.indexOf(row);
      if (at < 0) {
        rows.push(row);
        factors.push(1);
      } else factors[at] = (factors[at] ?? 0) + 1;
    });
    this.optionOf.set(this.program.columns.length, own);
    this.program.add({ cost: column.cost, rows, factors });
  }

  private loadColumn({ bin, kinds, counts }: LoadColumn): Column {
    const site = this.choices.bins[bin]?.site ?? 0;
    return {
      cost: 0,
      rows: [this.rows.bin[bin] ?? 0, ...kinds.map((kind) => this.rows.kind[site]?.[kind] ?? 0)],
      factors: [1, ...counts.map((count) => -count)],
    };
  }

  private price = (site: number, kind: number) =>
    Math.max(0, -(this.program.duals[this.rows.kind[site]?.[kind] ?? 0] ?? 0));

  /** Adds the best column of every run and bin that lowers the cost; how many there were. */
  private grow(): number {
    const { duals } = this.program;
    const before = this.program.columns.length;
    const prices = pricesByCuts(this.choices, this.kinds, this.price);
    this.choices.runs.forEach(({ options }, run) => {
      let best: OptionColumn | null = null;
      let least = (duals[run] ?? 0) + this.dear - TINY * this.dear;
      for (const option of this.region.options[run] ?? []) {
        const own = options[option];
        if (!own) continue;
        const { cost, chosen } = pricedOption(own, prices);
        if (cost < least) [best, least] = [{ run, option, spots: chosen }, cost];
      }
      if (!best) return;
      this.pool.options.push(best);
      this.addOption(best);
    });
    this.choices.bins.forEach((bin, b) => {
      const kinds = this.kinds[bin.site];
      if (!kinds || this.region.most[b] === 0) return;
      const { worth, ...load } = fullestLoad(bin.cuts, kinds, (kind) => this.price(bin.site, kind));
      if (worth <= -(duals[this.rows.bin[b] ?? 0] ?? 0) + TINY * this.dear) return;
      this.pool.loads.push({ bin: b, ...load });
      this.program.add(this.loadColumn({ bin: b, ...load }));
    });
    return this.program.columns.length - before;
  }

  /** Solves and grows in turn. The best bound seen on the way is as true as the last. */
  run(mostWork: number, enough: number): Relaxed {
    let best: Bound | null = null;
    for (let round = 0; round < MAX_ROUNDS; round++) {
      this.program.solve(mostWork);
      const grown = this.grow();
      const over = this.program.work >= mostWork || round === MAX_ROUNDS - 1;
      if (grown > 0 && !over && round % 8 !== 7) continue;
      const bound = boundOf(
        this.choices,
        this.kinds,
        this.region,
        pricesByCuts(this.choices, this.kinds, this.price),
      );
      if (!best || bound.cost > best.cost) best = bound;
      if (grown === 0 || over || best.cost >= enough) break;
    }
    return { ...this.amounts(), bound: best as Bound, work: this.program.work };
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
