import type { ReactNode } from 'react';
import { cx } from './cx';
import { LegendPlate } from './plate';

/** A sheet of paper on the ground: the one container. */
export function Sheet({
  title,
  aside,
  children,
  className,
}: {
  title?: ReactNode;
  aside?: ReactNode;
  children: ReactNode;
  className?: string | undefined;
}) {
  return (
    <section className={cx('rounded-md border border-rule bg-sheet p-4 sm:p-5', className)}>
      {title || aside ? (
        <div className="mb-4 flex flex-wrap items-center justify-between gap-3">
          {title ? <LegendPlate>{title}</LegendPlate> : <span />}
          {aside ? <div className="text-sm text-ink-2">{aside}</div> : null}
        </div>
      ) : null}
      {children}
    </section>
  );
}

/** What an empty list says: the first step. */
export function EmptyState({ children, action }: { children: ReactNode; action?: ReactNode }) {
  return (
    <div className="flex flex-col items-start gap-4 py-4">
      <p className="max-w-prose text-ink-2">{children}</p>
      {action}
    </div>
  );
}

const NOTICE = {
  note: { word: 'Note', style: 'border-rule-strong' },
  caution: { word: 'Caution', style: 'border-ink' },
  danger: { word: 'Stop', style: 'border-danger bg-danger-ground' },
  done: { word: 'Done', style: 'border-ink' },
} as const;

/** A message with its kind as a word: nothing is said by colour alone. */
export function Notice({
  kind = 'note',
  title,
  word,
  children,
  role,
}: {
  kind?: keyof typeof NOTICE;
  title?: ReactNode;
  /** Replaces the kind's word, e.g. "Not saved". */
  word?: string | undefined;
  children?: ReactNode;
  role?: 'alert' | 'status' | undefined;
}) {
  const { word: usual, style } = NOTICE[kind];
  return (
    <div role={role} className={cx('rounded-md border-2 p-3', style)}>
      <p className="flex flex-wrap items-baseline gap-2">
        <span
          className={cx(
            'rounded-plate border px-1.5 text-sm font-bold tracking-wide uppercase',
            kind === 'danger' ? 'border-danger text-danger' : 'border-current',
          )}
        >
          {kind === 'done' ? '✓ ' : ''}
          {word ?? usual}
        </span>
        {title ? <strong>{title}</strong> : null}
      </p>
      {children ? <div className="mt-1.5 text-[0.95rem]">{children}</div> : null}
    </div>
  );
}

/** A label and its figure, decimals aligned by the tabular mono face. */
export function KeyFigure({
  label,
  value,
  unit,
  tone,
}: {
  label: ReactNode;
  value: string;
  unit?: string | undefined;
  tone?: 'danger' | 'measured' | undefined;
}) {
  return (
    <div className="flex items-baseline justify-between gap-3 border-b border-rule py-2 last:border-b-0">
      <dt>{label}</dt>
      <dd className="text-right whitespace-nowrap">
        <span
          className={cx(
            'font-mono text-lg font-bold',
            tone === 'danger' && 'text-danger',
            tone === 'measured' && 'text-measured',
          )}
        >
          {value}
        </span>
        {unit ? <span className="ml-1 text-sm text-ink-2">{unit}</span> : null}
      </dd>
    </div>
  );
}
