'use client';
/** The sign-off, by name, when nothing is missing any more; until then what is. */
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { Sheet } from '@/components/ui/sheet';
import { missingForSignOff } from '@/lib/wiring/schema/events';
import type { SheetOnPhone } from './use-sheet';

export function SignOff({ sheet }: { sheet: SheetOnPhone }) {
  const { t, progress, me } = sheet;
  const id = useId();
  const [name, setName] = useState(me.name);
  if (progress.signedOff)
    return (
      <Sheet title={t('wiring.sign.title')}>
        <p>
          ✓{' '}
          {t('wiring.sign.done', { name: progress.signedOff.name, time: sheet.time(progress.signedOff.at) })}
        </p>
      </Sheet>
    );
  const missing = missingForSignOff(sheet.sheet, progress, me.membershipId);
  return (
    <Sheet title={t('wiring.sign.title')}>
      {missing.length > 0 ? (
        <ul className="list-disc pl-5 text-ink-2">
          {missing.map((one) => (
            <li key={one}>{one}</li>
          ))}
        </ul>
      ) : (
        <p>{t('wiring.sign.all')}</p>
      )}
      <form
        className="mt-4 flex flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          if (name.trim()) sheet.happened('sign-off', { name: name.trim() });
        }}
      >
        <TextInput
          id={id}
          label={t('wiring.cautions.name')}
          value={name}
          maxLength={120}
          required
          onChange={(event) => setName(event.target.value)}
        />
        <Button type="submit" disabled={missing.length > 0 || name.trim() === '' || sheet.newer !== null}>
          {t('wiring.sign.press')}
        </Button>
      </form>
    </Sheet>
  );
}
