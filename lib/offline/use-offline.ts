'use client';
/** React's side of the store: live entities, edits, and what the status line says. */
import { useLiveQuery } from 'dexie-react-hooks';
import { useCallback, useEffect, useMemo, useRef, useState, useSyncExternalStore } from 'react';
import { writeLeftBehind } from './edits';
import { exchange, extraKey, syncedKey } from './keep';
import { SyncLoop } from './loop';
import { onSignedOut } from './person';
import { closeStores, type OfflineStore, offlineStore, type QueuedEvent, type StoredEntity } from './store';
import type { SyncOutcome } from './sync';
import { isTroubled, onTrouble } from './trouble';

export interface OfflineScope {
  store: OfflineStore;
  scope: string;
  /** Every entity of the scope, archived ones too. Undefined until the store has been read. */
  entities: StoredEntity[] | undefined;
  queue: QueuedEvent[];
  outcome: SyncOutcome | 'starting';
  /** When device and server last had the same; null before the first time. */
  syncedAt: string | null;
  /** The device did not keep the last edit. */
  troubled: boolean;
  /** Further data of the snapshot (settings, parts), as last synchronised. */
  extra: unknown;
  nudge: () => void;
}

/** Keeps the loop going while a screen is open, and hurries it when there is reason to. */
function useLoop(store: OfflineStore, run: (pull: boolean) => Promise<SyncOutcome>) {
  const [outcome, setOutcome] = useState<SyncOutcome | 'starting'>('starting');
  const loop = useRef<SyncLoop | null>(null);
  useEffect(() => {
    const own = new SyncLoop(run, setOutcome);
    loop.current = own;
    const hurry = () => {
      if (!document.hidden) own.hurry();
    };
    const begin = () => own.hurry();
    void writeLeftBehind(store).then(begin, begin);
    // Asked for, a browser that runs short of room clears other sites first.
    void navigator.storage?.persist?.().catch(() => false);
    const away = onSignedOut(() => {
      own.stop();
      closeStores();
      location.reload();
    });
    window.addEventListener('online', hurry);
    window.addEventListener('focus', hurry);
    document.addEventListener('visibilitychange', hurry);
    return () => {
      own.stop();
      away();
      window.removeEventListener('online', hurry);
      window.removeEventListener('focus', hurry);
      document.removeEventListener('visibilitychange', hurry);
    };
  }, [store, run]);
  const nudge = useCallback(() => loop.current?.nudge(), []);
  return { outcome, nudge };
}

/** Keeps one scope (a job's survey, a wiring sheet) in step with the server while its screen is open. */
export function useOffline(options: {
  shopId: string;
  personId: string;
  scope: string;
  snapshotUrl: string;
  eventsUrl: string;
}): OfflineScope {
  const { shopId, personId, scope, snapshotUrl, eventsUrl } = options;
  const store = useMemo(() => offlineStore(shopId, personId), [shopId, personId]);
  const entities = useLiveQuery(() => store.entities.where({ scope }).toArray(), [store, scope]);
  const queue = useLiveQuery(() => store.queue.where({ scope }).sortBy('seq'), [store, scope]);
  const extra = useLiveQuery(async () => (await store.meta.get(extraKey(scope)))?.value, [store, scope]);
  const synced = useLiveQuery(async () => (await store.meta.get(syncedKey(scope)))?.value, [store, scope]);
  const troubled = useSyncExternalStore(onTrouble, isTroubled, () => false);
  // A screen that nobody looks at sends what it has and asks for nothing.
  const run = useCallback(
    (pull: boolean) => exchange(store, scope, { snapshotUrl, eventsUrl }, { pull: pull && !document.hidden }),
    [store, scope, snapshotUrl, eventsUrl],
  );
  const { outcome, nudge } = useLoop(store, run);
  const syncedAt = typeof synced === 'string' ? synced : null;
  return { store, scope, entities, queue: queue ?? [], outcome, syncedAt, troubled, extra, nudge };
}
