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

/** Tables after each kind that is worth anything and fits. */
function tables(room: number, kinds: Kinds, price: (kind: number) => number) {
  const found: Float64Array[] = [new Float64Array(room + 1)];
  const used: number[] = [];
  kinds.cuts.forEach((cuts, kind) => {
    const own = price(kind);
    if (own <= 0 || cuts > room) return;
    used.push(kind);
    found.push(withKind(found[found.length - 1] as Float64Array, cuts, kinds.supply[kind] ?? 0, own));
  });
  return { found, used };
}

/** Highest worth of a channel by its room, each kind of section at most as often as there can be one. */
export function worthByRoom(room: number, kinds: Kinds, price: (kind: number) => number): Float64Array {
  const { found } = tables(room, kinds, price);
  return found[found.length - 1] as Float64Array;
}

/** The load of the highest worth. */
export function fullestLoad(
  room: number,
  kinds: Kinds,
  price: (kind: number) => number,
): Load & { worth: number } {
  const { found, used } = tables(room, kinds, price);
  const load = { kinds: [] as number[], counts: [] as number[], worth: found[used.length]?.[room] ?? 0 };
  let left = room;
  for (let i = used.length - 1; i >= 0; i--) {
    const kind = used[i] ?? 0;
    const cuts = kinds.cuts[kind] ?? 1;
    const worth = found[i + 1]?.[left] ?? 0;
    const most = Math.min(kinds.supply[kind] ?? 0, Math.floor(left / cuts));
    let n = 0;
    // The tables hold the very sums that are compared here.
    while (
      n < most &&
      (n === 0 ? (found[i]?.[left] ?? 0) : (found[i]?.[left - n * cuts] ?? 0) + n * price(kind)) < worth
    )
      n++;
    if (n === 0) continue;
    load.kinds.push(kind);
    load.counts.push(n);
    left -= n * cuts;
  }
  return load;
}
