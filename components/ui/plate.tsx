import type { ReactNode } from 'react';
import { cx } from './cx';

function Screw() {
  return <span aria-hidden className="inline-block size-1.5 shrink-0 rounded-full bg-current opacity-40" />;
}

/** An engraved legend plate, as screwed to a switchboard: headings of sheets. */
export function LegendPlate({
  children,
  as: Tag = 'h2',
  id,
  className,
}: {
  children: ReactNode;
  as?: 'h2' | 'h3' | 'span' | undefined;
  id?: string | undefined;
  className?: string | undefined;
}) {
  return (
    <Tag
      id={id}
      className={cx(
        'inline-flex items-center gap-2.5 rounded-plate bg-plate px-2.5 py-1 font-plate text-lg leading-tight font-bold tracking-wider text-plate-ink uppercase',
        className,
      )}
    >
      <Screw />
      <span>{children}</span>
      <Screw />
    </Tag>
  );
}

/** A plate one can press; `lit` lights its pilot lamp and marks the current page. */
export function PlateFace({ children, lit }: { children: ReactNode; lit: boolean }) {
  return (
    <span className="flex flex-col items-center gap-1">
      <span
        aria-hidden
        className={cx('size-2.5 rounded-full border', lit ? 'border-ink bg-live' : 'border-rule-strong')}
      />
      <span
        className={cx(
          'inline-flex items-center gap-2 rounded-plate border-2 px-2.5 py-1 font-plate text-lg leading-tight font-bold tracking-wider whitespace-nowrap uppercase',
          lit ? 'border-plate bg-plate text-plate-ink' : 'border-rule bg-sheet text-ink',
        )}
      >
        <Screw />
        {children}
        <Screw />
      </span>
    </span>
  );
}
