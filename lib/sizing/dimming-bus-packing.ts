/** How many buses it takes, each holding no more than its limits. */
import { floorWithin } from '@/lib/engine/contract';

/** What one unit takes of each limit, in the order of the limits. */
export interface Units {
  count: number;
  uses: readonly number[];
}

export interface Packed {
  /** null where one unit alone is more than a bus holds. */
  segments: number | null;
  /** Of each limit, the most that one bus is given. */
  fullest: number[];
  /** Of each limit, the least that one bus is given. */
  emptiest: number[];
}

/** Buses that are filled alike. */
interface Alike {
  buses: number;
  used: readonly number[];
}

/** How many such units still fit beside what is there; Infinity where a unit takes nothing. */
export function unitsThatFit(
  uses: readonly number[],
  limits: readonly number[],
  used: readonly number[] = [],
): number {
  let most = Infinity;
  limits.forEach((limit, i) => {
    const each = uses[i] ?? 0;
    if (each > 0 && limit < Infinity)
      most = Math.min(most, Math.max(0, floorWithin((limit - (used[i] ?? 0)) / each)));
  });
  return most;
}

const withUnits = (used: readonly number[], uses: readonly number[], units: number): number[] =>
  uses.map((each, i) => (used[i] ?? 0) + each * units);

/** Puts `left` units into buses that are alike, as many as fit into each; what is over comes back. */
function fill(alike: Alike, uses: readonly number[], limits: readonly number[], left: number) {
  const each = Math.min(left, unitsThatFit(uses, limits, alike.used));
  if (each === 0) return { groups: [alike], left };
  const full = Math.min(alike.buses, Math.floor(left / each));
  const groups: Alike[] = [{ buses: full, used: withUnits(alike.used, uses, each) }];
  let over = left - full * each;
  let untouched = alike.buses - full;
  if (untouched > 0 && over > 0) {
    groups.push({ buses: 1, used: withUnits(alike.used, uses, over) });
    untouched--;
    over = 0;
  }
  if (untouched > 0) groups.push({ buses: untouched, used: alike.used });
  return { groups, left: over };
}

/**
 * First fit, the units that take most first: exact for units of one kind, never fewer than needed for several.
 * @param limits of one bus; Infinity where there is none
 */
export function pack(units: readonly Units[], limits: readonly number[]): Packed {
  const share = ({ uses }: Units) => Math.max(...uses.map((each, i) => each / (limits[i] ?? Infinity)));
  const empty = limits.map(() => 0);
  let groups: Alike[] = [{ buses: 1, used: empty }];
  for (const { count, uses } of [...units].sort((one, other) => share(other) - share(one))) {
    const each = unitsThatFit(uses, limits);
    if (each === 0) return { segments: null, fullest: empty, emptiest: empty };
    let left = count;
    const filled: Alike[] = [];
    for (const alike of groups) {
      const after = fill(alike, uses, limits, left);
      filled.push(...after.groups);
      left = after.left;
    }
    if (left > 0) {
      const buses = Math.ceil(left / each);
      filled.push(...fill({ buses, used: empty }, uses, limits, left).groups);
    }
    groups = filled;
  }
  const of = (pick: (...all: number[]) => number) =>
    limits.map((_, i) => pick(...groups.map(({ used }) => used[i] ?? 0)));
  return {
    segments: groups.reduce((sum, { buses }) => sum + buses, 0),
    fullest: of(Math.max),
    emptiest: of(Math.min),
  };
}
