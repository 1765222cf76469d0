'use client';
import { useEffect } from 'react';
import { forgetPersons, isLeaving, onSignedOut, rememberPerson } from '@/lib/offline/person';
import { leaveDevice } from './leave-device';

/** Makes the device ready for no signal: the service worker, and whose store to open. */
export function OnThisDevice({ shopId, membershipId }: { shopId: string; membershipId: string }) {
  useEffect(() => {
    // Signed out here with no server in reach: now there is one.
    if (isLeaving()) {
      void leaveDevice(false).then((ended) => ended && window.location.reload());
      return;
    }
    rememberPerson(shopId, membershipId);
    // Refused in private windows, without https and while developing: all works there with a signal alone.
    if ('serviceWorker' in navigator) void navigator.serviceWorker.register('/sw.js').catch(() => undefined);
  }, [shopId, membershipId]);
  // Signed out in another tab: what this one shows goes too.
  useEffect(() => onSignedOut(() => window.location.reload()), []);
  return null;
}

/** The server takes this browser for nobody's: with no signal, neither does the browser open anybody's store. */
export function NobodyOnThisDevice() {
  useEffect(forgetPersons, []);
  return null;
}
