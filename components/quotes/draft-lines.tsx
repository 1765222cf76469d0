'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import { moveLine, removeLine } from '@/lib/quotes/actions';
import { byArea } from '@/lib/quotes/schema/content';
import type { DeskLine } from '@/lib/quotes/schema/desk';
import { readingOrder } from '@/lib/quotes/schema/order';
import type { LineChange } from '@/lib/quotes/schema/lines';
import { formatMoney } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { type LineDefaults, LineForm } from './line-form';
import { useRun } from './use-run';

const CHANGED: Record<LineChange['what'], string> = {
  description: 'Words',
  area: 'Area',
  'parts-cost': 'Parts',
  hours: 'Hours',
  figures: 'The circuit’s figures were worked out again',
};

/** What a source says now, beside what the line says. */
export function Changes({ changes }: { changes: readonly LineChange[] }) {
  return (
    <ul className="flex flex-col gap-0.5">
      {changes.map((change) => (
        <li key={change.what}>
          {CHANGED[change.what]}
          {change.before !== change.after ? (
            <>
              : <s className="text-ink-2">{change.before}</s> → <strong>{change.after}</strong>
            </>
          ) : null}
        </li>
      ))}
    </ul>
  );
}

const KIND = { typed: 'Typed', circuit: 'From a circuit', 'change-line': 'From the survey' } as const;

function Marks({ line }: { line: DeskLine }) {
  const marks = [
    KIND[line.source],
    line.optional ? (line.chosen ? 'Addition, ticked' : 'Addition, not ticked') : '',
    line.taxable ? '' : 'Not taxed',
  ].filter(Boolean);
  return <p className="text-sm text-ink-2">{marks.join(' · ')}</p>;
}

function Troubles({ line }: { line: DeskLine }) {
  return (
    <>
      {line.openStops > 0 ? (
        <Notice kind="danger" title={line.openStops === 1 ? 'One open stop' : `${line.openStops} open stops`}>
          This line can not be quoted until the stop is cleared in the survey or overridden by a licensed
          person.
        </Notice>
      ) : null}
      {line.gone ? <Notice kind="caution" word="Gone" title="Its source is no longer in the survey" /> : null}
      {line.changes.length > 0 ? (
        <Notice kind="caution" word="Out of date" title="Its source or its price has changed">
          <Changes changes={line.changes} />
        </Notice>
      ) : null}
    </>
  );
}

export interface DraftLinesProps {
  shopId: string;
  jobId: string;
  lines: DeskLine[];
  settings: ShopSettings;
  /** Null for those who may read and not edit. */
  defaults: LineDefaults | null;
}

function Line({ line, all }: { line: DeskLine; all: DraftLinesProps }) {
  const { shopId, jobId, settings, defaults } = all;
  const [open, setOpen] = useState(false);
  const { running, failure, run } = useRun();
  const order = readingOrder(all.lines);
  const at = order.findIndex((other) => other.id === line.id);
  const areas = [...new Set(all.lines.map((other) => other.areaName).filter(Boolean))];
  const move = (direction: 'up' | 'down') => run(() => moveLine(shopId, { jobId, id: line.id, direction }));
  const remove = () => run(() => removeLine(shopId, { jobId, id: line.id, baseVersion: line.version }));
  const small = 'min-h-touch min-w-touch px-3';
  return (
    <li className="flex flex-col gap-2 border-b border-rule py-3 last:border-b-0">
      <div className="flex items-baseline justify-between gap-5">
        <div className="min-w-0">
          <p className="text-pretty">{line.description}</p>
          <Marks line={line} />
        </div>
        <p className="font-mono text-lg whitespace-nowrap">
          {line.optional ? '+ ' : ''}
          {formatMoney(line.amountMinor, settings, { symbol: false })}
        </p>
      </div>
      <Troubles line={line} />
      {failure ? <Notice kind="danger" word="Not changed" title={failure.message} role="alert" /> : null}
      {defaults && line.figures ? (
        <div className="flex flex-wrap gap-2">
          <Button look="secondary" className={small} aria-expanded={open} onClick={() => setOpen(!open)}>
            {open ? 'Close' : 'Edit'}
          </Button>
          <Button
            look="secondary"
            className={small}
            disabled={running || at === 0}
            onClick={() => void move('up')}
            aria-label={`Move up: ${line.description}`}
          >
            ↑
          </Button>
          <Button
            look="secondary"
            className={small}
            disabled={running || at === all.lines.length - 1}
            onClick={() => void move('down')}
            aria-label={`Move down: ${line.description}`}
          >
            ↓
          </Button>
          <Button look="danger" className={small} pending={running} onClick={() => void remove()}>
            Take out
          </Button>
        </div>
      ) : null}
      {open && defaults && line.figures ? (
        <div className="border-l-4 border-rule pl-4">
          <LineForm
            key={line.version}
            shopId={shopId}
            jobId={jobId}
            line={line}
            defaults={defaults}
            areas={areas}
            currency={settings.currency}
            onDone={() => setOpen(false)}
          />
        </div>
      ) : null}
    </li>
  );
}

export function DraftLines(props: DraftLinesProps) {
  return (
    <div className="flex flex-col gap-4">
      {byArea(props.lines.map((line) => ({ ...line, area: line.areaName }))).map((group) => (
        <section key={group.area}>
          <h3 className="font-sans text-lg font-bold">{group.area || 'The whole job'}</h3>
          <ul>
            {group.lines.map((line) => (
              <Line key={line.id} line={line} all={props} />
            ))}
          </ul>
        </section>
      ))}
    </div>
  );
}
