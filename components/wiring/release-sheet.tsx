'use client';
/** Releases the wiring sheet as the next frozen copy. */
import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { useHydrated } from '@/components/ui/form';
import { releaseSheet } from '@/lib/wiring/actions';

export function ReleaseSheet({ shopId, jobId, copies }: { shopId: string; jobId: string; copies: number }) {
  const router = useRouter();
  const hydrated = useHydrated();
  const [pending, setPending] = useState(false);
  const [said, setSaid] = useState('');
  // A press repeated after a dropped answer carries the same key and makes no second copy.
  const key = useRef<string | null>(null);
  const release = async () => {
    key.current ??= crypto.randomUUID();
    setPending(true);
    setSaid('');
    const result = await releaseSheet(shopId, { jobId }, { idempotencyKey: key.current }).catch(() => null);
    setPending(false);
    if (result) key.current = null;
    if (result?.ok) router.refresh();
    else setSaid(result ? result.message : 'The server could not be reached. Try again.');
  };
  return (
    <div className="flex flex-col items-start gap-2">
      <Button onClick={() => void release()} pending={pending || !hydrated}>
        {copies === 0 ? 'Release the wiring sheet' : `Release copy ${copies + 1}`}
      </Button>
      <p className="text-sm text-ink-2">
        {copies === 0
          ? 'The sheet is frozen as it stands: cautions, circuits, steps, expected readings. No money is on it.'
          : 'A new copy takes the place of the one before; the crew starts its ticks anew.'}
      </p>
      {said ? (
        <p role="alert" className="font-bold text-danger">
          {said}
        </p>
      ) : null}
    </div>
  );
}
