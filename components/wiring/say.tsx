'use client';
/** A note, or what was found different from the sheet. */
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextArea } from '@/components/ui/field';
import type { SheetOnPhone } from './use-sheet';

export function Say({ sheet, target }: { sheet: SheetOnPhone; target: string }) {
  const { t } = sheet;
  const id = useId();
  const [kind, setKind] = useState<'note' | 'different' | null>(null);
  const [text, setText] = useState('');
  const said = sheet.progress.said.filter((one) => one.target === target);
  const keep = () => {
    if (!kind || !text.trim()) return;
    sheet.happened(kind, { target, text: text.trim() });
    setKind(null);
    setText('');
  };
  return (
    <div className="flex flex-col gap-3 border-t border-rule pt-4">
      {said.length > 0 ? (
        <ul className="flex flex-col gap-2">
          {said.map((one) => (
            <li key={one.id} className="break-words whitespace-pre-line">
              <strong>{t(`wiring.say.${one.kind}`)}: </strong>
              {one.text}{' '}
              <span className="text-sm text-ink-2">
                {one.by}, {sheet.time(one.at)}
              </span>
            </li>
          ))}
        </ul>
      ) : null}
      {kind ? (
        <>
          <TextArea
            id={id}
            label={t(`wiring.say.${kind}-label`)}
            value={text}
            maxLength={2000}
            onChange={(event) => setText(event.target.value)}
          />
          <div className="flex flex-wrap gap-3">
            <Button onClick={keep} disabled={text.trim() === ''}>
              {t('wiring.say.keep')}
            </Button>
            <Button look="secondary" onClick={() => setKind(null)}>
              {t('wiring.say.away')}
            </Button>
          </div>
        </>
      ) : (
        <div className="flex flex-wrap gap-3">
          <Button look="secondary" onClick={() => setKind('note')}>
            {t('wiring.say.note')}
          </Button>
          <Button look="secondary" onClick={() => setKind('different')}>
            {t('wiring.say.different')}
          </Button>
        </div>
      )}
    </div>
  );
}
