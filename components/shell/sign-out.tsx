'use client';
import { signOut } from 'next-auth/react';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { forgetPersons, tellSignedOut } from '@/lib/offline/person';
import { closeStores, hasUnsent, wipeOffline } from '@/lib/offline/store';

/** The session ends first: no other tab can fetch again what is wiped then. @returns false where no server was reached */
async function leaveDevice(force: boolean): Promise<boolean> {
  const ended = await signOut({ redirect: false }).then(
    () => true,
    () => false,
  );
  closeStores();
  forgetPersons();
  tellSignedOut();
  await wipeOffline(force).catch(() => false);
  return ended;
}

/** Nothing of a person stays on the device; what was never sent does, or goes only on their word. */
export function SignOut() {
  const [pending, setPending] = useState(false);
  const [unsent, setUnsent] = useState(false);
  const [noSignal, setNoSignal] = useState(false);
  const leave = async (force: boolean) => {
    setPending(true);
    if (!force && !unsent && (await hasUnsent().catch(() => false))) {
      setUnsent(true);
      setPending(false);
      return;
    }
    if (await leaveDevice(force)) window.location.assign('/sign-in');
    else {
      setNoSignal(true);
      setPending(false);
    }
  };
  return (
    <div className="flex flex-col gap-3">
      {noSignal ? (
        <p role="alert" className="text-sm">
          No signal: this device shows nothing of yours any more, but the server has not heard of it. Sign out
          once more when there is a signal.
        </p>
      ) : null}
      {unsent && !noSignal ? (
        <p role="alert" className="text-sm">
          Not all of your work has been sent. Keep it here until you sign in again on this device, or throw it
          away.
        </p>
      ) : null}
      <Button look="secondary" pending={pending} onClick={() => void leave(false)}>
        {unsent && !noSignal ? 'Sign out, keep it here' : 'Sign out'}
      </Button>
      {unsent && !noSignal ? (
        <Button look="danger" pending={pending} onClick={() => void leave(true)}>
          Throw it away and sign out
        </Button>
      ) : null}
    </div>
  );
}
