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

const order = (key: string) => key.split('|').slice(2).join('|');

/** The notes of tabs that are gone, in the order in which they were made. */
async function leftKeys(kept: Storage, store: string): Promise<string[]> {
  const living = await livingTabs();
  return Object.keys(kept)
    .filter((key) => key.startsWith(`${PREFIX}${store}|`) && !living.has(LOCK + (key.split('|')[1] ?? '')))
    .sort((a, b) => order(a).localeCompare(order(b)));
}

const read = (text: string): unknown => {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
};

/** What closed tabs left; struck out as each is written. One that can't be written now stays for the next tab. */
export async function leftBehind(store: string, write: (noted: object) => Promise<void>): Promise<void> {
  const kept = storage();
  if (!kept) return;
  for (const key of await leftKeys(kept, store)) {
    const noted = read(kept.getItem(key) ?? '');
    if (typeof noted === 'object' && noted !== null) await write(noted);
    kept.removeItem(key);
  }
}

export async function unwrittenNotes(store: string): Promise<number> {
  const kept = storage();
  return kept ? (await leftKeys(kept, store)).length : 0;
}

/** At sign-out, with the store. */
export function wipeJournal(store: string): void {
  const kept = storage();
  if (kept)
    for (const key of Object.keys(kept)) if (key.startsWith(`${PREFIX}${store}|`)) kept.removeItem(key);
}
