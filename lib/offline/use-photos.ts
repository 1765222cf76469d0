'use client';
/** Sends the photos that wait on this device, while a screen of their scope is open. */
import { useLiveQuery } from 'dexie-react-hooks';
import { useEffect } from 'react';
import { sendPhotos } from './photos';
import type { OfflineStore } from './store';

const RETRY_MS = 15_000;

/** @returns how many wait to be sent */
export function usePhotoSender(store: OfflineStore, scope: string, address: string): number {
  const waiting = useLiveQuery(
    () =>
      store.photos
        .where({ scope })
        .filter((photo) => photo.refusal === undefined)
        .count(),
    [store, scope],
  );
  const count = waiting ?? 0;
  useEffect(() => {
    if (count === 0) return;
    let busy = false;
    const send = () => {
      if (busy) return;
      busy = true;
      void sendPhotos(store, scope, address).finally(() => (busy = false));
    };
    send();
    const timer = setInterval(send, RETRY_MS);
    window.addEventListener('online', send);
    return () => {
      clearInterval(timer);
      window.removeEventListener('online', send);
    };
  }, [count, store, scope, address]);
  return count;
}
