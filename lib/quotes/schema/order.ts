/** The order in which a draft's lines are read: areas as they first come, lines within them. */
import { byArea } from './content';

interface Ordered {
  id: string;
  areaName: string;
}

const grouped = <L extends Ordered>(lines: readonly L[]) =>
  byArea(lines.map((line) => ({ line, area: line.areaName })));

/** Lines as the customer reads them. */
export const readingOrder = <L extends Ordered>(lines: readonly L[]): L[] =>
  grouped(lines).flatMap((group) => group.lines.map(({ line }) => line));

/**
 * Moves a line past its neighbour in the same area; the first or last of an area takes the whole area past the next.
 * @returns the ids in their new order; unchanged where there is nothing to pass.
 */
export function moved(lines: readonly Ordered[], id: string, direction: 'up' | 'down'): string[] {
  const step = direction === 'up' ? -1 : 1;
  const groups = grouped(lines).map((group) => group.lines.map(({ line }) => line.id));
  const at = groups.findIndex((group) => group.includes(id));
  const group = groups[at];
  if (!group) return groups.flat();
  const from = group.indexOf(id);
  const to = from + step;
  if (to >= 0 && to < group.length) group.splice(to, 0, ...group.splice(from, 1));
  else if (at + step >= 0 && at + step < groups.length) groups.splice(at + step, 0, ...groups.splice(at, 1));
  return groups.flat();
}
