'use client';
/** Steps to tick: what goes where, conductor colours as they are beside their names, an ink tick with the word. */
import { cx } from '@/components/ui/cx';
import { messageOr, type MessageKey } from '@/lib/messages';
import type { Conductor } from '@/lib/wiring/schema/colours';
import type { Step } from '@/lib/wiring/schema/sheet';
import type { SheetOnPhone } from './use-sheet';

/** As insulation looks; not of the product's palette, and the same in both themes. */
const SWATCH: Record<Conductor['colour'], string> = {
  black: '#1a1a1a',
  red: '#c4161c',
  blue: '#1f5fb4',
  white: '#ffffff',
  gray: '#8b8f92',
  green: '#1d8a3a',
  brown: '#6f4122',
  orange: '#ef7d16',
  yellow: '#f5d21f',
  'green-yellow': 'repeating-linear-gradient(135deg, #1d8a3a 0 6px, #f5d21f 6px 12px)',
};

function Conductors({ step, sheet }: { step: Step; sheet: SheetOnPhone }) {
  const { t } = sheet;
  return (
    <ul className="mt-2 flex flex-wrap gap-x-5 gap-y-2">
      {step.conductors.map(({ role, colour }) => (
        <li key={role} className="flex items-center gap-2">
          <span
            aria-hidden
            className="inline-block h-4 w-9 rounded-sm border border-ink"
            style={{ background: SWATCH[colour] }}
          />
          <span>
            {t(`wiring.colour.${colour}` as MessageKey)}
            {': '}
            <strong>{t(`wiring.role.${role}` as MessageKey)}</strong>
          </span>
        </li>
      ))}
    </ul>
  );
}

function StepRow({ step, sheet }: { step: Step; sheet: SheetOnPhone }) {
  const { t } = sheet;
  const ticked = sheet.progress.ticks.get(step.id);
  return (
    <li className="border-t border-rule py-2 first:border-t-0">
      <button
        type="button"
        role="checkbox"
        aria-checked={ticked !== undefined}
        disabled={!sheet.open}
        onClick={() => sheet.happened(ticked ? 'untick' : 'tick', { target: step.id })}
        className="flex min-h-touch w-full items-start gap-4 py-1 text-left disabled:cursor-not-allowed"
      >
        <span
          aria-hidden
          className={cx(
            'flex size-12 shrink-0 items-center justify-center rounded-md border-2 text-2xl leading-none font-bold',
            ticked ? 'border-ink' : 'border-rule-strong',
            sheet.open || ticked ? '' : 'opacity-50',
          )}
        >
          {ticked ? '✓' : ''}
        </span>
        <span className="min-w-0 self-center">
          {messageOr(step.key, step.key, step.values, sheet.settings)}
          {ticked ? (
            <span className="block text-sm text-ink-2">
              {t('wiring.steps.done', { time: sheet.time(ticked.at), by: ticked.name })}
            </span>
          ) : null}
        </span>
      </button>
      {step.conductors.length > 0 || step.lines.length > 0 ? (
        <div className="pl-16">
          {step.conductors.length > 0 ? <Conductors step={step} sheet={sheet} /> : null}
          {step.lines.length > 0 ? (
            <div className="mt-1 rounded-md border-2 border-ink p-3">
              {step.lines.map((line) => (
                <p key={line.key}>{messageOr(line.key, line.key, line.values, sheet.settings)}</p>
              ))}
            </div>
          ) : null}
        </div>
      ) : null}
    </li>
  );
}

export function Steps({ steps, sheet }: { steps: readonly Step[]; sheet: SheetOnPhone }) {
  const waits = !sheet.open && sheet.progress.signedOff === null;
  const sources = [...new Set(steps.map((step) => step.conductorSource).filter(Boolean))];
  return (
    <div>
      {waits ? <p className="mb-2 text-ink-2">{sheet.t('wiring.steps.first')}</p> : null}
      <ul>
        {steps.map((step) => (
          <StepRow key={step.id} step={step} sheet={sheet} />
        ))}
      </ul>
      {sources.map((source) => (
        <p key={source} className="text-sm text-ink-2">
          {sheet.t('wiring.colours.source', { source })}
        </p>
      ))}
    </div>
  );
}
