import type { ReactNode } from 'react';
import { LegendPlate } from '@/components/ui/plate';

/** One band of the customer's page, ruled off from the next. */
export function Band({ title, children, id }: { title?: string; children: ReactNode; id?: string }) {
  return (
    <section id={id} className="border-t border-rule px-5 py-6 sm:px-8 print:px-0 print:py-3">
      {title ? <LegendPlate className="mb-4">{title}</LegendPlate> : null}
      {children}
    </section>
  );
}

/** Words at the left, a figure at the right in the tabular face. */
export function PriceRow({
  children,
  amount,
  strong = false,
  second = false,
}: {
  children: ReactNode;
  amount: string;
  strong?: boolean;
  second?: boolean;
}) {
  return (
    <div
      className={
        strong
          ? 'flex items-baseline justify-between gap-4 py-1.5 text-2xl font-bold'
          : second
            ? 'flex items-baseline justify-between gap-4 py-1.5 text-ink-2'
            : 'flex items-baseline justify-between gap-4 py-1.5'
      }
    >
      <span className="min-w-0">{children}</span>
      <span className="font-mono whitespace-nowrap">{amount}</span>
    </div>
  );
}
