/**
 * What one edit changed, and that change on top of whatever stands in the store by now. A screen shows what it read
 * a moment ago: writing all of it back would undo a field that was typed in between.
 */
type Data = Record<string, unknown>;

/** Marks a key that the edit took out. */
export const GONE = Symbol('gone');

const isPlain = (value: unknown): value is Data =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** The keys of `next` that differ from `base`, nested objects key by key; null where nothing does. */
export function changesBetween(base: Data, next: Data): Data | null {
  const changes: Data = {};
  for (const key of Object.keys(next)) {
    const before = base[key];
    const after = next[key];
    if (isPlain(before) && isPlain(after)) {
      const nested = changesBetween(before, after);
      if (nested) changes[key] = nested;
    } else if (JSON.stringify(before) !== JSON.stringify(after)) changes[key] = after;
  }
  for (const key of Object.keys(base)) if (!(key in next)) changes[key] = GONE;
  return Object.keys(changes).length > 0 ? changes : null;
}

export function withChanges(stored: Data, changes: Data): Data {
  const result: Data = { ...stored };
  for (const [key, change] of Object.entries(changes)) {
    const before = result[key];
    if (change === GONE) delete result[key];
    else if (isPlain(change)) result[key] = withChanges(isPlain(before) ? before : {}, change);
    else result[key] = change;
  }
  return result;
}
