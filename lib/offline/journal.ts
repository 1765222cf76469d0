/**
 * What was typed in the very last moment. The store writes when the browser gets to it; a tab that is closed meanwhile
 * would lose those writes. Each one is therefore noted at once, in storage that is written before the key's event
 * returns, and struck out when the store has it. What a closed tab left noted is written by the next that opens.
 */
const PREFIX = 'lampwright-journal-';
const LOCK = 'lampwright-tab-';
const TAB = crypto.randomUUID();

let count = 0;
let holding = false;

const storage = (): Storage | null => {
  try {
    return typeof localStorage === 'undefined' ? null : localStorage;
  } catch {
    return null;
  }
};

/** Held as long as this tab lives: by it, others know whose notes are not theirs to write. */
function holdTab(): void {
  if (holding || typeof navigator === 'undefined' || !navigator.locks) return;
  holding = true;
  void navigator.locks.request(LOCK + TAB, () => new Promise<never>(() => undefined));
}

/** Notes one write, before anything is awaited. @returns strikes it out */
export function note(store: string, write: object): () => void {
  const kept = storage();
  holdTab();
  const key = `${PREFIX}${store}|${TAB}|${Date.now()}|${String(count++).padStart(9, '0')}`;
  try {
    kept?.setItem(key, JSON.stringify(write));
  } catch {
    // Full, or not allowed: the store alone holds it then.
  }
  return () => kept?.removeItem(key);
}

async function livingTabs(): Promise<Set<string>> {
  const locks = typeof navigator === 'undefined' ? undefined : await navigator.locks?.query();
  return new Set([LOCK + TAB, ...(locks?.held ?? []).map((lock) => lock.name ?? '')]);
}

/** What closed tabs left, in the order in which it was typed; struck out as each is written. */
export async function leftBehind(store: string, write: (noted: unknown) => Promise<void>): Promise<void> {
  const kept = storage();
  if (!kept) return;
  const living = await livingTabs();
  const order = (key: string) => key.split('|').slice(2).join('|');
  const keys = Object.keys(kept)
    .filter((key) => key.startsWith(`${PREFIX}${store}|`) && !living.has(LOCK + (key.split('|')[1] ?? '')))
    .sort((a, b) => order(a).localeCompare(order(b)));
  for (const key of keys) {
    const text = kept.getItem(key);
    if (text !== null) await write(JSON.parse(text));
    kept.removeItem(key);
  }
}

/** At sign-out, with the stores. */
export function wipeJournal(): void {
  const kept = storage();
  if (kept) for (const key of Object.keys(kept)) if (key.startsWith(PREFIX)) kept.removeItem(key);
}
