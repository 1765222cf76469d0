'use client';
/** The cautions, before the first step, acknowledged by name; then what was proved dead, by whom and when. */
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextArea, TextInput } from '@/components/ui/field';
import { LegendPlate } from '@/components/ui/plate';
import { Sheet } from '@/components/ui/sheet';
import { messageOr, type MessageKey } from '@/lib/messages';
import type { SheetOnPhone } from './use-sheet';

const isTitle = (key: string) => key.endsWith('.title');

function Texts({ sheet }: { sheet: SheetOnPhone }) {
  return (
    <div className="flex flex-col gap-2">
      {sheet.sheet.cautions.map((key) =>
        isTitle(key) ? (
          <h3 key={key} className="mt-2 text-2xl">
            {sheet.t(key as MessageKey)}
          </h3>
        ) : (
          <p key={key}>{sheet.t(key as MessageKey)}</p>
        ),
      )}
    </div>
  );
}

function Overridden({ sheet }: { sheet: SheetOnPhone }) {
  const { overridden } = sheet.sheet;
  if (overridden.length === 0) return null;
  return (
    <div className="mt-4 border-t border-rule pt-3">
      <h3 className="text-2xl">{sheet.t('wiring.overridden.title')}</h3>
      <ul className="mt-1 flex flex-col gap-3">
        {overridden.map((one) => (
          <li key={`${one.subject}-${one.code}`}>
            <strong>{one.subject}: </strong>
            {messageOr(`finding.${one.code}.title`, one.message, one.values, sheet.settings)}
            <p className="text-ink-2">{sheet.t('wiring.overridden.by', { ...one, values: null })}</p>
          </li>
        ))}
      </ul>
    </div>
  );
}

export function Cautions({ sheet }: { sheet: SheetOnPhone }) {
  const { t, progress, me } = sheet;
  const id = useId();
  const [name, setName] = useState(me.name);
  const mine = progress.acknowledged.get(me.membershipId);
  if (mine)
    return (
      <Sheet>
        <details>
          <summary className="flex min-h-touch flex-wrap items-center gap-x-3 gap-y-1">
            <LegendPlate>{t('wiring.cautions.title')}</LegendPlate>
            <span>✓ {t('wiring.cautions.by', { name: mine.name, time: sheet.time(mine.at) })}</span>
          </summary>
          <div className="pt-3">
            <Texts sheet={sheet} />
          </div>
        </details>
        <Overridden sheet={sheet} />
      </Sheet>
    );
  return (
    <Sheet title={t('wiring.cautions.title')}>
      <p className="text-ink-2">{t('wiring.cautions.first')}</p>
      <Texts sheet={sheet} />
      <Overridden sheet={sheet} />
      <form
        className="mt-4 flex flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          if (name.trim()) sheet.happened('acknowledge', { name: name.trim() });
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
        <Button type="submit">{t('wiring.cautions.done')}</Button>
      </form>
    </Sheet>
  );
}

function ProveForm({ sheet, again }: { sheet: SheetOnPhone; again: boolean }) {
  const { t } = sheet;
  const id = useId();
  const [note, setNote] = useState('');
  return (
    <form
      className="flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        if (!note.trim()) return;
        sheet.happened('dead-proved', { name: sheet.me.name, note: note.trim() });
        setNote('');
      }}
    >
      <p>{t('wiring.dead.how')}</p>
      {again ? null : <p className="border-l-4 border-live pl-3 font-bold">{t('wiring.dead.may-be-live')}</p>}
      <TextArea
        id={id}
        label={t('wiring.dead.note')}
        hint={t('wiring.dead.hint')}
        value={note}
        maxLength={2000}
        required
        onChange={(event) => setNote(event.target.value)}
      />
      <Button type="submit" disabled={!sheet.acknowledged || note.trim() === ''}>
        {t('wiring.dead.press')}
      </Button>
    </form>
  );
}

export function DeadProved({ sheet }: { sheet: SheetOnPhone }) {
  const { t } = sheet;
  const proved = sheet.progress.deadProved;
  if (!proved)
    return (
      <Sheet title={t('wiring.dead.title')}>
        <ProveForm sheet={sheet} again={false} />
      </Sheet>
    );
  return (
    <section className="rounded-md border-2 border-ink bg-sheet p-4 sm:p-5">
      <div className="mb-3 flex flex-wrap items-center justify-between gap-3">
        <LegendPlate>{t('wiring.dead.done')}</LegendPlate>
        <span className="font-mono text-xl">{sheet.time(proved.at)}</span>
      </div>
      <p className="break-words whitespace-pre-line">
        {proved.note} <span className="text-ink-2">{proved.name}</span>
      </p>
      {sheet.progress.signedOff ? null : (
        <details className="mt-2">
          <summary className="inline-flex min-h-touch items-center underline">
            {t('wiring.dead.again')}
          </summary>
          <ProveForm sheet={sheet} again />
        </details>
      )}
    </section>
  );
}
