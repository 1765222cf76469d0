'use client';
import { useEffect } from 'react';
import { rememberPerson } from '@/lib/offline/person';

/** Makes the device ready for no signal: the service worker, and whose store to open. */
export function OnThisDevice({ shopId, membershipId }: { shopId: string; membershipId: string }) {
  useEffect(() => {
    rememberPerson(shopId, membershipId);
    if (!('serviceWorker' in navigator)) return;
    // Refused in private windows, without https and while developing: all works there with a signal alone.
    void navigator.serviceWorker.register('/sw.js').catch(() => undefined);
  }, [shopId, membershipId]);
  return null;
}
