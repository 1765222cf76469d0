/** A sent quote as the customer reads it. Server-rendered; only answering needs script. */
import type { ReactNode } from 'react';
import { JobLine, type JobLineStep } from '@/components/job-line/job-line';
import { message } from '@/lib/messages';
import { byArea, type QuoteContent } from '@/lib/quotes/schema/content';
import { formatDate, formatMoney } from '@/lib/units';
import { Band } from './section';

export function QuoteHead({
  content,
  steps,
  stands,
}: {
  content: QuoteContent;
  steps: readonly JobLineStep[];
  stands: string;
}) {
  const { shop, settings } = content;
  return (
    <header className="px-5 pt-6 pb-6 sm:px-8 sm:pt-9 print:px-0">
      <p className="text-ink-2">
        {shop.name}
        {shop.licenceNumber ? `, ${message('customer.licence', { licence: shop.licenceNumber })}` : ''}
      </p>
      <h1 className="mt-2 text-4xl sm:text-5xl">{content.title}</h1>
      <p className="mt-3 text-ink-2">
        {message('customer.quote-line', {
          number: content.number,
          revision: content.revision,
          issued: formatDate(content.issuedOn, settings),
          until: formatDate(content.validUntil, settings),
        })}
      </p>
      <div className="mt-5 print:hidden">
        <JobLine steps={steps} size="small" />
        <p className="mt-2">
          {message('customer.stands')}: <strong>{stands}</strong>
        </p>
      </div>
    </header>
  );
}

function Line({ text, amount }: { text: string; amount: string }) {
  return (
    <li className="flex items-baseline justify-between gap-5 border-b border-rule py-3 last:border-b-0 print:break-inside-avoid">
      <span className="min-w-0 text-pretty">{text}</span>
      <span className="font-mono whitespace-nowrap">{amount}</span>
    </li>
  );
}

export function QuoteWork({ content }: { content: QuoteContent }) {
  const { settings, site } = content;
  const named = content.lines.some((line) => line.area !== '');
  return (
    <Band title={message('customer.work')}>
      <p className="mb-2 text-ink-2">{[site.name, site.address].filter(Boolean).join(', ')}</p>
      {content.scopeNote ? <p className="mb-3 whitespace-pre-line">{content.scopeNote}</p> : null}
      {byArea(content.lines).map((group) => (
        <div key={group.area} className="mt-3">
          {named || group.area ? (
            <h3 className="font-sans text-base font-bold">{group.area || message('customer.whole-job')}</h3>
          ) : null}
          <ul>
            {group.lines.map((line) => (
              <Line
                key={line.id}
                text={line.text}
                amount={formatMoney(line.amountMinor, settings, { symbol: false })}
              />
            ))}
          </ul>
        </div>
      ))}
    </Band>
  );
}

function Items({ title, items }: { title: string; items: readonly string[] }) {
  if (items.length === 0) return null;
  return (
    <Band title={title}>
      <ul className="flex list-disc flex-col gap-1.5 pl-5">
        {items.map((item) => (
          <li key={item}>{item}</li>
        ))}
      </ul>
    </Band>
  );
}

export function QuoteNotes({ content }: { content: QuoteContent }) {
  return (
    <>
      <Items title={message('customer.not-included')} items={content.exclusions} />
      <Items title={message('customer.assumed')} items={content.assumedCounts} />
      <Band>
        {content.cautions.map((caution) => (
          <p key={caution} className="mb-2 text-ink-2 last:mb-0">
            {caution}
          </p>
        ))}
      </Band>
    </>
  );
}

function Reach({ label, children }: { label: string; children: ReactNode }) {
  return (
    <p>
      <span className="text-ink-2">{label} </span>
      {children}
    </p>
  );
}

/** The paper itself, and how to reach the shop. */
export function QuoteFoot({ content, pdf }: { content: QuoteContent; pdf: string | null }) {
  const { shop } = content;
  return (
    <Band>
      <div className="flex flex-col gap-1.5">
        {pdf ? (
          <p className="mb-2 print:hidden">
            <a
              href={pdf}
              className="inline-flex min-h-touch items-center font-bold underline"
              target="_blank"
              rel="noreferrer"
            >
              {message('customer.pdf')}
            </a>
          </p>
        ) : null}
        <p>{shop.name}</p>
        {shop.address ? <p className="text-ink-2">{shop.address}</p> : null}
        {shop.phone ? (
          <Reach label={message('customer.phone')}>
            <a className="underline" href={`tel:${shop.phone.replace(/[^\d+]/g, '')}`}>
              {shop.phone}
            </a>
          </Reach>
        ) : null}
        {shop.email ? (
          <Reach label={message('customer.mail')}>
            <a className="underline" href={`mailto:${shop.email}`}>
              {shop.email}
            </a>
          </Reach>
        ) : null}
      </div>
    </Band>
  );
}
