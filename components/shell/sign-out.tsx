'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { hasUnsent } from '@/lib/offline/store';
import { leaveDevice } from './leave-device';

/** Nothing of a person stays on the device; what was never sent does, or goes only on their word. */
export function SignOut() {
  const [pending, setPending] = useState(false);
  const [unsent, setUnsent] = useState(false);
  const leave = async (force: boolean) => {
    setPending(true);
    if (!force && !unsent && (await hasUnsent().catch(() => false))) {
      setUnsent(true);
      setPending(false);
      return;
    }
    await leaveDevice(force);
    // The server answers with the sign-in page; where there is none, the device with a page of nobody's.
    window.location.reload();
  };
  return (
    <div className="flex flex-col gap-3">
      {unsent ? (
        <p role="alert" className="text-sm">
          Not all of your work has been sent. Keep it here until you sign in again on this device, or throw it
          away.
        </p>
      ) : null}
      <Button look="secondary" pending={pending} onClick={() => void leave(false)}>
        {unsent ? 'Sign out, keep it here' : 'Sign out'}
      </Button>
      {unsent ? (
        <Button look="danger" pending={pending} onClick={() => void leave(true)}>
          Throw it away and sign out
        </Button>
      ) : null}
    </div>
  );
}
