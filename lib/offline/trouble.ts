/** A device that is full, or a browser that keeps nothing: the person is told at once, not when the work is gone. */
const listeners = new Set<() => void>();
let trouble = false;

function set(value: boolean): void {
  if (trouble === value) return;
  trouble = value;
  for (const listener of listeners) listener();
}

/** Watches one write to the device's store. @throws what the write throws */
export async function notKept<T>(write: PromiseLike<T>): Promise<T> {
  try {
    const written = await write;
    set(false);
    return written;
  } catch (error) {
    set(true);
    throw error;
  }
}

export const isTroubled = (): boolean => trouble;

export function onTrouble(listener: () => void): () => void {
  listeners.add(listener);
  return () => void listeners.delete(listener);
}
