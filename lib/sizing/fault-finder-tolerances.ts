/** A circuit as drawn at the ends of its tolerances: what each reading can be, and what each tolerance moves it by. */
import { EngineError } from '@/lib/engine/contract';
import type { Model, Quantity, Solved } from './fault-finder-model';

export interface Spread {
  drawn: Solved;
  /** All figures that each reading can have: as drawn, and at every end that was solved. */
  figures: number[][];
  /** By tolerance: half of what its two ends move a reading by. */
  movedBy: (quantity: Quantity) => number[];
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
  const take = (solved: Solved): Solved => {
    quantities.forEach((quantity, i) => {
      const figure = solved.read(quantity);
      if (Number.isFinite(figure)) figures[i]?.push(figure);
    });
    return solved;
  };
  const drawn = take(model.solve(model.axes.map(() => 0)));
  const at = (ends: readonly number[]): Solved | null => {
    try {
      return take(model.solve(ends));
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      unsolved++;
      return null;
    }
  };
  const ends = model.axes.map((_, axis) =>
    [-1, 1].map((end) => at(model.axes.map((_axis, i) => (i === axis ? end : 0))) ?? drawn),
  );
  const movedBy = (quantity: Quantity) =>
    ends.map(([low, high]) => ((high ?? drawn).read(quantity) - (low ?? drawn).read(quantity)) / 2);
  const tried = new Set<string>();
  for (const quantity of quantities) {
    const signs = movedBy(quantity).map(Math.sign);
    for (const corner of [signs, signs.map((sign) => -sign)]) {
      if (tried.has(corner.join())) continue;
      tried.add(corner.join());
      at(corner);
    }
  }
  return { drawn, figures, movedBy, unsolved };
}
