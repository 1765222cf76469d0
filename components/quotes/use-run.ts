'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { ActionResult } from '@/lib/messages/result';

type Failed = Extract<ActionResult<unknown>, { ok: false }>;

/** A button's action: one at a time, the page read again after it, what went wrong kept for showing. */
export function useRun() {
  const router = useRouter();
  const [running, setRunning] = useState(false);
  const [failure, setFailure] = useState<Failed | null>(null);
  async function run<T>(work: () => Promise<ActionResult<T>>, onDone?: (data: T) => void): Promise<void> {
    if (running) return;
    setRunning(true);
    setFailure(null);
    const result = await work().catch((): ActionResult<T> => ({
      ok: false,
      code: 'unreachable',
      message: 'The server could not be reached. Nothing was changed; try again.',
      issues: [],
    }));
    setRunning(false);
    if (result.ok) onDone?.(result.data);
    else setFailure(result);
    router.refresh();
  }
  return { running, failure, run };
}
