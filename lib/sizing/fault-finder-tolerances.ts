/** A circuit as drawn at the ends of its tolerances: what each reading can be, and what each tolerance moves it by. */
import { EngineError } from '@/lib/engine/contract';
import type { Model, Quantity, Solved } from './fault-finder-model';

export interface Spread {
  expected: number[];
  /** All figures that each reading can have: as drawn, and at every end that was solved. */
  figures: number[][];
  /** By tolerance, then by reading: half of what its two ends move it by. */
  moved: number[][];
  /** Ends at which the circuit has no operating point. */
  unsolved: number;
}

/**
 * A reading rises or falls with each tolerance all the way, so its lowest and highest lie where every tolerance stands
 * at the end that its own sign asks for: two ends each, and one circuit for each pattern of signs.
 * @throws {EngineError} where the circuit as drawn has no operating point
 */
export function spreadOf(model: Model, quantities: readonly Quantity[]): Spread {
  const figures: number[][] = quantities.map(() => []);
  let unsolved = 0;
  const take = (solved: Solved): number[] =>
    quantities.map((quantity, i) => {
      const figure = solved.read(quantity);
      if (Number.isFinite(figure)) figures[i]?.push(figure);
      return figure;
    });
  const none = model.axes.map(() => 0);
  const expected = take(model.solve(none));
  const tried = new Set<string>();
  const at = (ends: readonly number[]): number[] | null => {
    try {
      return take(model.solve(ends));
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      unsolved++;
      return null;
    }
  };
  const moved = model.axes.map((_, axis) => {
    const [low, high] = [-1, 1].map((end) => at(none.with(axis, end)) ?? expected);
    return expected.map((_own, i) => ((high?.[i] ?? 0) - (low?.[i] ?? 0)) / 2);
  });
  quantities.forEach((_, i) => {
    const signs = moved.map((by) => Math.sign(by[i] ?? 0));
    for (const ends of [signs, signs.map((sign) => -sign)]) {
      if (tried.has(ends.join())) continue;
      tried.add(ends.join());
      at(ends);
    }
  });
  return { expected, figures, moved, unsolved };
}
