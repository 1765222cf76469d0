'use client';
import { signOut } from 'next-auth/react';
import { useState } from 'react';
import { Button } from '@/components/ui/button';

export function SignOut() {
  const [pending, setPending] = useState(false);
  return (
    <Button
      look="secondary"
      pending={pending}
      onClick={() => {
        setPending(true);
        void signOut({ callbackUrl: '/sign-in' });
      }}
    >
      Sign out
    </Button>
  );
}
