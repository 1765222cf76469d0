/**
 * Two people changed one entry: what each changed since the version that both began from. What only one of them
 * changed is nobody's loss; a field that both changed is a person's choice.
 */
import { changesBetween, GONE } from './patch';
import type { Entity } from './protocol';
import type { QueuedEvent } from './store';

type Data = Record<string, unknown>;

/** Their fields make one figure together: half of mine with half of theirs would be a circuit that nobody chose. */
const WHOLE: ReadonlySet<string> = new Set(['circuits', 'change-lines']);

export interface Clash {
  /** As in `details.ceilingHeight`. */
  path: string;
  mine: unknown;
  theirs: unknown;
}

const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b);

/** Changes as one value per field, however deep. */
function leavesOf(changes: Data | null, above = ''): [string, unknown][] {
  return Object.entries(changes ?? {}).flatMap(([key, value]): [string, unknown][] => {
    const path = above + key;
    if (value === GONE) return [[path, undefined]];
    const nested = typeof value === 'object' && value !== null && !Array.isArray(value);
    return nested && Object.keys(value).length > 0 ? leavesOf(value as Data, `${path}.`) : [[path, value]];
  });
}

const at = (data: Data, path: string): unknown =>
  path.split('.').reduce<unknown>((value, key) => (value as Data | null | undefined)?.[key], data);

const overlap = (a: string, b: string) => a === b || a.startsWith(`${b}.`) || b.startsWith(`${a}.`);

/** Theirs, without what the server alone writes: the fields that an edit names. */
export const theirsOf = (event: QueuedEvent, current: Entity): Data =>
  Object.fromEntries(Object.entries(current.data).filter(([key]) => key in event.body));

/** One of the two took it out, the beginning is not known, or its fields only make sense together. */
export const asAWhole = (event: QueuedEvent, current: Entity): boolean =>
  !event.base || WHOLE.has(event.collection) || event.kind.endsWith('.archive') || current.archived;

/** A field that I changed, and whether they changed it, or what it lies in, or what lies in it, too. */
function changedFields(event: QueuedEvent, current: Entity): { path: string; both: boolean }[] {
  const theirs = theirsOf(event, current);
  const mine = leavesOf(changesBetween(event.base ?? {}, event.body)).map(([path]) => path);
  const others = leavesOf(changesBetween(event.base ?? {}, theirs)).map(([path]) => path);
  const fields = new Map<string, boolean>();
  for (const path of mine) {
    const touching = others.filter((other) => overlap(path, other));
    const outermost = [path, ...touching].sort((a, b) => a.length - b.length)[0] ?? path;
    fields.set(outermost, touching.length > 0);
  }
  return [...fields].map(([path, both]) => ({ path, both }));
}

/** The fields that both changed and that stand differently; taken as a whole, all that stand differently. */
export function clashesOf(event: QueuedEvent, current: Entity): Clash[] {
  const theirs = theirsOf(event, current);
  const paths = asAWhole(event, current)
    ? leavesOf(changesBetween(theirs, event.body)).map(([path]) => path)
    : changedFields(event, current).flatMap(({ path, both }) => (both ? [path] : []));
  return paths
    .map((path) => ({ path, mine: at(event.body, path), theirs: at(theirs, path) }))
    .filter(({ mine, theirs: other }) => !same(mine, other));
}

function withField(data: Data, [key = '', ...rest]: string[], value: unknown): Data {
  if (rest.length > 0) return { ...data, [key]: withField((data[key] as Data | null) ?? {}, rest, value) };
  const others = Object.fromEntries(Object.entries(data).filter(([name]) => name !== key));
  return value === undefined ? others : { ...data, [key]: value };
}

/** What stands after the choice: where both changed a field `winner`'s, elsewhere whoever changed it. */
export function merged(event: QueuedEvent, current: Entity, winner: 'mine' | 'theirs'): Data {
  const theirs = theirsOf(event, current);
  if (asAWhole(event, current)) return winner === 'mine' ? event.body : theirs;
  return changedFields(event, current)
    .filter(({ both }) => !both || winner === 'mine')
    .reduce((data, { path }) => withField(data, path.split('.'), at(event.body, path)), theirs);
}

/** Nothing is left to send: theirs stands as mine does. */
export const nothingLeft = (event: QueuedEvent, current: Entity): boolean =>
  event.kind.endsWith('.archive')
    ? current.archived
    : !current.archived && changesBetween(theirsOf(event, current), event.body) === null;
