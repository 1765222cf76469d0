/** What fits into one channel, and what it is worth: a knapsack by dynamic programming over whole cuts. */

/** Kinds of section at a site, by cuts (ascending), with how many there can be at once. */
export interface Kinds {
  cuts: number[];
  supply: number[];
}

export interface Load {
  kinds: number[];
  counts: number[];
}

/** Highest worth by room, once up to `supply` sections of a kind may be taken too. */
function withKind(best: Float64Array, cuts: number, supply: number, price: number): Float64Array {
  const next = best.slice();
  for (let room = cuts; room < best.length; room++)
    for (let n = 1; n <= supply && n * cuts <= room; n++) {
      const worth = (best[room - n * cuts] ?? 0) + n * price;
      if (worth > (next[room] ?? 0)) next[room] = worth;
    }
  return next;
}

/** What a channel at a site is worth by its room, and which load makes it so. */
export class Knapsack {
  /** Highest worth by room. */
  readonly worth: Float64Array;
  private readonly tables: Float64Array[];
  /** Kind, cuts, most and price of each table after the first. */
  private readonly used: { kind: number; cuts: number; supply: number; price: number }[] = [];

  /** Each kind of section counts at most as often as there can be one. */
  constructor(room: number, kinds: Kinds, price: (kind: number) => number) {
    let last = new Float64Array(room + 1) as Float64Array;
    this.tables = [last];
    kinds.cuts.forEach((cuts, kind) => {
      const own = { kind, cuts, supply: kinds.supply[kind] ?? 0, price: price(kind) };
      if (own.price <= 0 || cuts > room) return;
      last = withKind(last, cuts, own.supply, own.price);
      this.used.push(own);
      this.tables.push(last);
    });
    this.worth = last;
  }

  /** The load of the highest worth in the room. */
  load(room: number): Load {
    const load: Load = { kinds: [], counts: [] };
    let left = room;
    for (let i = this.used.length - 1; i >= 0; i--) {
      const { kind, cuts, supply, price } = this.used[i] ?? { kind: 0, cuts: 1, supply: 0, price: 0 };
      const before = this.tables[i];
      const worth = this.tables[i + 1]?.[left] ?? 0;
      let n = (before?.[left] ?? 0) < worth ? 1 : 0;
      if (n === 0) continue;
      // The tables hold the very sums that are compared here.
      const most = Math.min(supply, Math.floor(left / cuts));
      while (n < most && (before?.[left - n * cuts] ?? 0) + n * price < worth) n++;
      load.kinds.push(kind);
      load.counts.push(n);
      left -= n * cuts;
    }
    return load;
  }
}
