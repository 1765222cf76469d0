'use client';
/** The part of a quote that a customer answers: additions, the total that follows, and the signature. */
import { type ReactNode, useMemo, useState } from 'react';
import { customerMessage as message } from '@/lib/messages/quotes';
import { acceptText } from '@/lib/quotes/schema/accept-text';
import { defaultChoices, type QuoteContent } from '@/lib/quotes/schema/content';
import { totalsOf } from '@/lib/quotes/schema/totals';
import { formatMoney } from '@/lib/units/money';
import { DeclinePanel } from './decline';
import { Options } from './options';
import { Band } from './section';
import { SignPanel } from './sign';
import { Totals } from './totals';

/** What the browser needs to figure and show; the words of the work stay in the server's markup. */
export type Answerable = Pick<
  QuoteContent,
  'number' | 'revision' | 'shop' | 'customer' | 'lines' | 'options' | 'terms' | 'settings'
>;

function Bar({ total, ask }: { total: string; ask: string | null }) {
  const shape =
    'inline-flex min-h-touch items-center justify-center rounded-md border-2 px-4 font-bold no-underline';
  return (
    <div className="sticky bottom-0 z-10 border-t border-rule bg-sheet px-5 py-3 sm:px-8 print:hidden">
      <p className="mb-2 flex items-baseline justify-between gap-4">
        <span>{message('customer.total.total')}</span>
        <span className="font-mono text-lg font-bold">{total}</span>
      </p>
      <div className="flex gap-3">
        {ask ? (
          <a href={ask} className={`${shape} grow border-ink`}>
            {message('customer.ask')}
          </a>
        ) : null}
        <a href="#sign" className={`${shape} grow-[2] border-plate bg-plate text-plate-ink`}>
          {message('customer.go-sign')}
        </a>
      </div>
    </div>
  );
}

export function QuoteAnswer({
  base,
  documentId,
  sha256,
  content,
  ask,
  work,
  children,
}: {
  /** `/l/{link}`; null in a preview, where nothing can be sent. */
  base: string | null;
  documentId: string;
  sha256: string;
  content: Answerable;
  ask: string | null;
  /** What is read before the additions. */
  work: ReactNode;
  /** What stands between the total and the signature. */
  children: ReactNode;
}) {
  const [choices, setChoices] = useState<string[]>(() => defaultChoices(content));
  const totals = useMemo(() => totalsOf(content, choices), [content, choices]);
  const toggle = (id: string) =>
    setChoices((now) => (now.includes(id) ? now.filter((other) => other !== id) : [...now, id]));
  const shownText = acceptText(content, choices, totals);
  return (
    <>
      {/* The bar follows the reader through this part and stays behind where the signature begins. */}
      <div>
        {work}
        <Options options={content.options} settings={content.settings} choices={choices} onToggle={toggle} />
        <Totals content={content} totals={totals} live />
        {children}
        <Bar total={formatMoney(totals.totalMinor, content.settings)} ask={ask} />
      </div>
      <Band id="sign" title={message('customer.sign-title')}>
        <SignPanel
          base={base}
          shownText={shownText}
          answer={{ documentId, sha256, choices, totalMinor: totals.totalMinor, shownText }}
        />
        <DeclinePanel base={base} documentId={documentId} />
      </Band>
    </>
  );
}
