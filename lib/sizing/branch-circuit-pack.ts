/** Units over circuits: equal shares of one kind; of several, the largest first into the first circuit with room. */
import { floorWithin } from '@/lib/engine/contract';
import type { Bin, BranchCase } from './branch-circuit-limits';

/** `quantity` units in the least number of circuits of at most `most`, as even as whole units go. */
export function evenShares(quantity: number, most: number): number[] {
  const circuits = Math.ceil(quantity / Math.min(quantity, most));
  const each = Math.floor(quantity / circuits);
  const larger = quantity % circuits;
  return Array.from({ length: circuits }, (_, place) => each + (place < larger ? 1 : 0));
}

/**
 * Mixed loads: the fractions q/N of a circuit add up to at most 1. Whole handfuls of the load with the largest unit go
 * first, each into the first circuit that still has room, so that small units fill the gaps.
 */
function mixed({ limits }: BranchCase): Bin[] {
  const bins: { units: number[]; used: number }[] = [];
  const order = limits
    .map((_, place) => place)
    .sort((a, b) => (limits[a]?.most ?? 0) - (limits[b]?.most ?? 0));
  for (const place of order) {
    const { most, load } = limits[place] ?? { most: 0, load: { quantity: 0 } };
    let left = load.quantity;
    for (let at = 0; left > 0; at++) {
      const bin = (bins[at] ??= { units: limits.map(() => 0), used: 0 });
      const room = most === Infinity ? left : Math.min(left, floorWithin((1 - bin.used) * most));
      if (room <= 0) continue;
      bin.units[place] = (bin.units[place] ?? 0) + room;
      bin.used += room / most;
      left -= room;
    }
  }
  return bins.map(({ units }) => units);
}

/** Circuits by load and inrush. Every load's `most` is at least one unit. */
export function pack(c: BranchCase): Bin[] {
  const [only] = c.limits;
  if (c.limits.length > 1 || !only) return mixed(c);
  return evenShares(only.load.quantity, only.most).map((units) => [units]);
}
