'use client';
/** One reading: type what the meter says, see at once in words and on the scale whether it is in its band. */
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { cx } from '@/components/ui/cx';
import { FigureInput, TextInput } from '@/components/ui/field';
import { LegendPlate } from '@/components/ui/plate';
import { messageOr, type MessageKey } from '@/lib/messages';
import { formatNumber, parseNumber } from '@/lib/units';
import { judge } from '@/lib/wiring/schema/bands';
import type { Measured } from '@/lib/wiring/schema/events';
import type { ExpectedReading } from '@/lib/wiring/schema/sheet';
import { BandScale } from './band-scale';
import { readingName, scaleOf } from './reading-names';
import type { SheetOnPhone } from './use-sheet';

function Verdict({
  reading,
  value,
  sheet,
}: {
  reading: ExpectedReading;
  value: number;
  sheet: SheetOnPhone;
}) {
  const { factor, unit, decimals } = scaleOf(reading);
  const verdict = judge(reading, value);
  const side = value < reading.low ? 'low' : 'high';
  return (
    <div className="mt-3">
      <p className="flex flex-wrap items-baseline justify-between gap-x-4" aria-live="polite">
        <span className="text-measured">
          <span className="font-mono text-5xl font-bold">{formatNumber(value * factor, decimals)}</span>{' '}
          <span className="text-xl">{unit}</span>
        </span>
        <strong className={cx('text-lg', verdict === 'out' && 'text-danger')}>
          {sheet.t(`wiring.verdict.${verdict}` as MessageKey)}
        </strong>
      </p>
      <BandScale band={reading} value={value} factor={factor} unit={unit} decimals={decimals} />
      {verdict === 'in' ? null : (
        <div
          className={cx('mt-2 rounded-md border-2 p-3', verdict === 'out' ? 'border-danger' : 'border-ink')}
        >
          <strong>{sheet.t('wiring.reading.most-likely')}</strong>
          <p>{messageOr(`wiring.hint.${reading.kind}.${side}`, '', {}, sheet.settings)}</p>
        </div>
      )}
    </div>
  );
}

function Kept({ measured, sheet }: { measured: Measured; sheet: SheetOnPhone }) {
  return (
    <p className="mt-2 text-sm text-ink-2">
      ✓ {measured.value === null ? `${sheet.t('wiring.reading.skipped')}. ` : ''}
      {sheet.t('wiring.reading.kept', { time: sheet.time(measured.at), by: measured.by })}
      {measured.note ? `. ${measured.note}` : ''}
    </p>
  );
}

function Entry({
  reading,
  measured,
  sheet,
}: {
  reading: ExpectedReading;
  measured: Measured | undefined;
  sheet: SheetOnPhone;
}) {
  const { t } = sheet;
  const id = useId();
  const scale = scaleOf(reading);
  const { factor, unit } = scale;
  const [text, setText] = useState<string | null>(null);
  const [note, setNote] = useState('');
  const parsed = text === null || text.trim() === '' ? null : parseNumber(text);
  const typed = parsed?.ok ? parsed.value / factor : null;
  const shown = typed ?? (text === null ? (measured?.value ?? null) : null);
  const barred = reading.mains && !sheet.me.mainsQualified;
  const keep = (value: number | null) => {
    sheet.happened('reading', { target: reading.id, value, note: note.trim() });
    setText(null);
    setNote('');
  };
  return (
    <form
      className="flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        if (typed !== null) keep(typed);
      }}
    >
      {barred ? (
        <p className="text-ink-2">{t('wiring.reading.mains-only')}</p>
      ) : (
        <FigureInput
          id={id}
          label={t('wiring.reading.says')}
          unit={unit}
          value={text ?? ''}
          disabled={!sheet.acknowledged}
          error={parsed && !parsed.ok ? parsed.message : undefined}
          onChange={(event) => setText(event.target.value)}
        />
      )}
      {shown === null ? (
        <BandScale band={reading} value={null} {...scale} />
      ) : (
        <Verdict reading={reading} value={shown} sheet={sheet} />
      )}
      {measured && text === null ? <Kept measured={measured} sheet={sheet} /> : null}
      <details>
        <summary className="inline-flex min-h-touch items-center underline">
          {t('wiring.reading.note')}
        </summary>
        <TextInput
          id={`${id}-note`}
          label={t('wiring.reading.note-label')}
          value={note}
          maxLength={500}
          disabled={!sheet.acknowledged}
          onChange={(event) => setNote(event.target.value)}
        />
      </details>
      <div className="flex flex-wrap gap-3">
        {barred ? null : (
          <Button type="submit" disabled={typed === null || !sheet.acknowledged}>
            {t('wiring.reading.keep')}
          </Button>
        )}
        <Button look="secondary" disabled={!sheet.acknowledged} onClick={() => keep(null)}>
          {t('wiring.reading.skip')}
        </Button>
      </div>
    </form>
  );
}

export function Readings({ readings, sheet }: { readings: readonly ExpectedReading[]; sheet: SheetOnPhone }) {
  const { t } = sheet;
  return (
    <ul className="flex flex-col gap-6">
      {readings.map((reading, index) => (
        <li key={reading.id} className="border-t border-rule pt-4">
          <LegendPlate as="span">
            {t('wiring.reading.title', { index: index + 1, of: readings.length })}
          </LegendPlate>
          <h3 className="mt-2 text-2xl">{readingName(reading, readings, sheet.settings)}</h3>
          <p className="mb-2 text-ink-2">
            {t(reading.kind === 'string-amps' ? 'wiring.how.string' : `wiring.how.${reading.unit}`)}
          </p>
          <Entry reading={reading} measured={sheet.progress.readings.get(reading.id)} sheet={sheet} />
        </li>
      ))}
    </ul>
  );
}
