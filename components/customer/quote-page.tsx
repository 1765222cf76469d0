/** The whole of a customer's quote, in each of its states. */
import { canBeSigned } from '@/lib/documents/schema';
import { message } from '@/lib/messages';
import type { QuoteContent } from '@/lib/quotes/schema/content';
import { defaultChoices } from '@/lib/quotes/schema/content';
import { totalsOf } from '@/lib/quotes/schema/totals';
import type { CustomerView } from '@/lib/quotes/schema/view';
import { type Answerable, QuoteAnswer } from './answer';
import { SettledOptions } from './options';
import { QuoteFoot, QuoteHead, QuoteNotes, QuoteWork } from './quote-sheet';
import { AcceptedNotice, ClosedNotice, type ClosedState } from './state';
import { Totals } from './totals';

/** Only what the browser figures with; line texts stay in the markup. */
function answerable(content: QuoteContent): Answerable {
  const { number, revision, shop, customer, options, terms, settings } = content;
  const lines = content.lines.map((line) => ({ ...line, area: '', text: '' }));
  return { number, revision, shop, customer, lines, options, terms, settings };
}

function askAddress({ shop, number }: QuoteContent): string | null {
  const subject = encodeURIComponent(message('customer.ask-subject', { number }));
  if (shop.email) return `mailto:${shop.email}?subject=${subject}`;
  return shop.phone ? `tel:${shop.phone.replace(/[^\d+]/g, '')}` : null;
}

/** Read, and no longer answered. */
function Settled({ view }: { view: CustomerView }) {
  const { content, acceptance } = view;
  const choices = acceptance?.choices ?? defaultChoices(content);
  return (
    <>
      <QuoteWork content={content} />
      <SettledOptions options={content.options} settings={content.settings} choices={choices} />
      <Totals content={content} totals={totalsOf(content, choices)} />
      <QuoteNotes content={content} />
    </>
  );
}

export function CustomerQuote({
  view,
  base,
  pdf,
}: {
  view: CustomerView;
  /** Where answers go; null in a preview. */
  base: string | null;
  pdf: string | null;
}) {
  const { content, acceptance, state } = view;
  const steps = view.steps.map((step) => ({ ...step, label: message(`job.step.${step.key}`) }));
  const open = canBeSigned(state);
  return (
    <>
      <QuoteHead content={content} steps={steps} stands={message(view.waitsFor)} />
      {acceptance ? <AcceptedNotice acceptance={acceptance} settings={content.settings} /> : null}
      {!open && !acceptance ? <ClosedNotice state={state as ClosedState} /> : null}
      {open ? (
        <QuoteAnswer
          base={base}
          documentId={view.documentId}
          sha256={view.sha256}
          content={answerable(content)}
          ask={askAddress(content)}
          work={<QuoteWork content={content} />}
        >
          <QuoteNotes content={content} />
        </QuoteAnswer>
      ) : (
        <Settled view={view} />
      )}
      <QuoteFoot content={content} pdf={pdf} />
    </>
  );
}
