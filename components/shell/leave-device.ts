'use client';
/** Signing out, on the server and on the device. */
import { signOut } from 'next-auth/react';
import { forgetPersons, setLeaving, tellSignedOut } from '@/lib/offline/person';
import { closeStores, wipeOffline } from '@/lib/offline/store';

/**
 * The session ends first: no other tab can fetch again what is wiped then. With no signal the device is wiped all the
 * same, and the session ends when the server is next in reach. @returns false where it was not
 */
export async function leaveDevice(force: boolean): Promise<boolean> {
  setLeaving(true);
  const ended = await signOut({ redirect: false }).then(
    () => true,
    () => false,
  );
  closeStores();
  forgetPersons();
  tellSignedOut();
  await wipeOffline(force).catch(() => false);
  if (ended) setLeaving(false);
  return ended;
}
