'use client';
/** React's side of the store: live entities, edits, and what the status line says. */
import { useLiveQuery } from 'dexie-react-hooks';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { writeLeftBehind, writeSnapshot } from './edits';
import type { Entity } from './protocol';
import { type OfflineStore, offlineStore, type QueuedEvent, type StoredEntity } from './store';
import { sendAll, type SyncOutcome } from './sync';

export interface OfflineScope {
  store: OfflineStore;
  scope: string;
  /** Every entity of the scope, archived ones too. Undefined until the store has been read. */
  entities: StoredEntity[] | undefined;
  queue: QueuedEvent[];
  outcome: SyncOutcome | 'starting';
  /** Further data of the snapshot (settings, parts), as last synchronised. */
  extra: unknown;
  nudge: () => void;
}

const RETRY_MS = 5_000;
const SEND_AFTER_MS = 700;

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
  const [outcome, setOutcome] = useState<SyncOutcome | 'starting'>('starting');
  const busy = useRef(false);
  const entities = useLiveQuery(() => store.entities.where({ scope }).toArray(), [store, scope]);
  const queue = useLiveQuery(() => store.queue.where({ scope }).sortBy('seq'), [store, scope]);
  const extra = useLiveQuery(async () => (await store.meta.get(`extra:${scope}`))?.value, [store, scope]);

  const pull = useCallback(async () => {
    const response = await fetch(snapshotUrl).catch(() => null);
    if (!response?.ok) return;
    const { entities: fresh, ...rest } = (await response.json()) as { entities: Entity[] };
    await writeSnapshot(store, scope, fresh);
    await store.meta.put({ key: `extra:${scope}`, value: rest });
  }, [store, scope, snapshotUrl]);

  const sync = useCallback(async () => {
    if (busy.current) return;
    busy.current = true;
    try {
      setOutcome(await sendAll(store, scope, eventsUrl));
    } finally {
      busy.current = false;
    }
  }, [store, scope, eventsUrl]);

  useEffect(() => {
    void writeLeftBehind(store).then(sync).then(pull);
    const again = () => void sync().then(pull);
    const timer = setInterval(() => void sync(), RETRY_MS);
    window.addEventListener('online', again);
    window.addEventListener('focus', again);
    return () => {
      clearInterval(timer);
      window.removeEventListener('online', again);
      window.removeEventListener('focus', again);
    };
  }, [store, sync, pull]);

  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  const nudge = useCallback(() => {
    if (timer.current) clearTimeout(timer.current);
    timer.current = setTimeout(() => void sync(), SEND_AFTER_MS);
  }, [sync]);

  return { store, scope, entities, queue: queue ?? [], outcome, extra, nudge };
}
