'use client';
import { useId } from 'react';
import { Button } from '@/components/ui/button';

/** A count with buttons that a thumb finds while walking. */
export function Counter({
  label,
  value,
  onSave,
}: {
  label: string;
  value: number;
  onSave: (value: number) => void;
}) {
  const id = useId();
  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="text-[0.95rem]">
        {label}
      </label>
      <div className="flex gap-2">
        <Button
          look="secondary"
          aria-label={`One less: ${label}`}
          disabled={value <= 0}
          onClick={() => onSave(Math.max(0, value - 1))}
        >
          −
        </Button>
        <input
          id={id}
          inputMode="numeric"
          value={String(value)}
          onChange={(event) => {
            const digits = event.target.value.replace(/\D/g, '').slice(0, 6);
            onSave(Number(digits || '0'));
          }}
          className="min-h-touch w-20 min-w-0 rounded-md border-2 border-rule-strong bg-sheet px-2 text-center font-mono text-xl font-bold"
        />
        <Button look="secondary" aria-label={`One more: ${label}`} onClick={() => onSave(value + 1)}>
          +
        </Button>
      </div>
    </div>
  );
}
