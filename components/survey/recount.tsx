'use client';
/** Counting again, blind: from nothing, with one large button; both counts are kept and the last one stands. */
import { useState } from 'react';
import { Button } from '@/components/ui/button';

interface Count {
  quantity: number;
  at: string;
}

export function Recount({
  name,
  quantity,
  recounts,
  onDone,
}: {
  name: string;
  quantity: number;
  recounts: readonly Count[];
  onDone: (quantity: number, recounts: Count[]) => void;
}) {
  const [counted, setCounted] = useState<number | null>(null);
  if (counted === null)
    return (
      <div className="flex flex-wrap items-center gap-3">
        <Button look="secondary" onClick={() => setCounted(0)}>
          Count again<span className="sr-only">: {name}</span>
        </Button>
        {recounts.length > 0 ? (
          <p className="text-sm text-ink-2">Counted {recounts.map((one) => one.quantity).join(', then ')}.</p>
        ) : null}
      </div>
    );
  const done = () => {
    const before = recounts.length > 0 ? recounts : [{ quantity, at: new Date().toISOString() }];
    onDone(counted, [...before, { quantity: counted, at: new Date().toISOString() }].slice(-50));
    setCounted(null);
  };
  return (
    <div className="rounded-md border-2 border-ink p-4" role="group" aria-label={`Counting ${name} again`}>
      <p className="mb-3 text-center font-mono text-5xl font-bold" role="status">
        {counted}
      </p>
      <div className="grid grid-cols-[1fr_3fr] gap-3">
        <Button
          look="secondary"
          aria-label="One less"
          disabled={counted === 0}
          onClick={() => setCounted(Math.max(0, counted - 1))}
        >
          −
        </Button>
        <Button className="min-h-24 text-3xl" aria-label="One more" onClick={() => setCounted(counted + 1)}>
          +1
        </Button>
      </div>
      <div className="mt-3 flex flex-wrap gap-3">
        <Button look="secondary" onClick={done}>
          That is all of them
        </Button>
        <Button look="secondary" onClick={() => setCounted(null)}>
          Leave it at {quantity}
        </Button>
      </div>
    </div>
  );
}
