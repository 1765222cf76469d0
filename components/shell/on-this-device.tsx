'use client';
import { useEffect } from 'react';
import { forgetPersons, rememberPerson } from '@/lib/offline/person';

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

/** The server takes this browser for nobody's: with no signal, neither does the browser open anybody's store. */
export function NobodyOnThisDevice() {
  useEffect(forgetPersons, []);
  return null;
}
