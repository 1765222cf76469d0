/**
 * The browser's store: what the screens show and what is still to be sent. One database per shop and person, so
 * that nobody finds somebody else's work on a shared phone.
 */
import Dexie, { type Table } from 'dexie';
import { unwrittenNotes, wipeJournal } from './journal';
import type { QueuedPhoto } from './photos';
import type { Entity } from './protocol';

export interface StoredEntity extends Entity {
  /** The job or sheet that it belongs to. */
  scope: string;
  /** There is an edit on this device that the server has not confirmed. */
  dirty: 0 | 1;
}

export type EventState = 'pending' | 'sending' | 'conflict' | 'refused';

export interface QueuedEvent {
  seq?: number;
  id: string;
  scope: string;
  collection: string;
  kind: string;
  entityId: string;
  body: Record<string, unknown>;
  /** Fixed when it is first sent, so that a repeat is the same to the letter. */
  baseVersion: number | null;
  at: string;
  state: EventState;
  message?: string;
  issues?: { path: string; message: string }[];
  /** What stood here when the edit was begun: by it, mine is told from theirs. Null for a new entry. */
  base?: Record<string, unknown> | null;
  /** What stands on the server instead, on a conflict. */
  current?: Entity;
}

export class OfflineStore extends Dexie {
  entities!: Table<StoredEntity, [string, string, string]>;
  queue!: Table<QueuedEvent, number>;
  meta!: Table<{ key: string; value: unknown }, string>;
  photos!: Table<QueuedPhoto, string>;

  constructor(shopId: string, personId: string) {
    super(`${STORE_PREFIX}${shopId}-${personId}`);
    this.version(1).stores({
      entities: '[scope+collection+id], [scope+collection], scope',
      queue: '++seq, &id, scope, [scope+entityId]',
      meta: 'key',
    });
    this.version(2).stores({ photos: 'id, scope, [scope+subjectId]' });
  }
}

const STORE_PREFIX = 'lampwright-';
const open = new Map<string, OfflineStore>();

export function offlineStore(shopId: string, personId: string): OfflineStore {
  const name = `${shopId}-${personId}`;
  const known = open.get(name);
  if (known) return known;
  const store = new OfflineStore(shopId, personId);
  open.set(name, store);
  return store;
}

/** The shop's and the person's store, as named on the device. */
const storeNames = async (): Promise<string[]> =>
  (await Dexie.getDatabaseNames()).filter((name) => name.startsWith(STORE_PREFIX));

async function unsentIn(name: string): Promise<number> {
  const store = await new Dexie(name).open();
  const kept = store.tables.filter(({ name: table }) => table === 'queue' || table === 'photos');
  const counts = await Promise.all(kept.map((table) => table.count()));
  store.close();
  return counts.reduce((sum, own) => sum + own, 0) + (await unwrittenNotes(name));
}

/** Whether anything on this device, of anybody, has not been sent. */
export async function hasUnsent(): Promise<boolean> {
  for (const name of await storeNames()) if ((await unsentIn(name)) > 0) return true;
  return false;
}

/** From now on nothing reads or writes them in this tab, not even an answer that is still on its way. */
export function closeStores(): void {
  for (const store of open.values()) store.close({ disableAutoOpen: true });
  open.clear();
}

/** At sign-out: nothing of this person stays on the device. Says false where unsent work was kept instead. */
export async function wipeOffline(force = false): Promise<boolean> {
  let clean = true;
  for (const name of await storeNames()) {
    if (!force && (await unsentIn(name)) > 0) {
      clean = false;
      continue;
    }
    await Dexie.delete(name);
    wipeJournal(name);
  }
  return clean;
}
