/** A quote as its reader sees it: by the customer's link, and at the desk. */
import type { Actor } from '@/lib/access/policy';
import type { DocumentState } from '@/lib/documents/schema';
import { getJob } from '@/lib/jobs/queries';
import { withShop } from '@/lib/platform/db';
import { composeQuote } from '../compose';
import { livePorts } from '../ports';
import type { CustomerView } from '../schema/view';
import type { SourcePorts } from '../sources';
import { contentOf, type QuoteForReader, quoteForCustomer, sentQuotes } from './sent';

type Stands = Pick<CustomerView, 'steps' | 'waitsFor'>;

const UNACCEPTED = {
  draft: 'customer.wait.quote-not-sent',
  sent: 'customer.wait.quote-waits-for-answer',
  opened: 'customer.wait.quote-waits-for-answer',
  declined: 'customer.wait.declined',
  expired: 'customer.wait.expired',
  withdrawn: 'customer.wait.withdrawn',
  superseded: 'customer.wait.superseded',
} as const;

const PATH = ['survey', 'quote', 'deposit', 'install', 'closeout', 'paid'] as const;

/** Until it is accepted, the quote is what a customer's job waits at, whatever else the shop still has to do. */
async function standsOf(jobId: string, state: DocumentState): Promise<Stands> {
  if (state !== 'accepted') {
    const stateAt = (index: number) => (index === 0 ? 'reached' : index === 1 ? 'open' : 'beyond');
    return {
      steps: PATH.map((key, index) => ({ key, state: stateAt(index) })),
      waitsFor: UNACCEPTED[state],
    };
  }
  const { steps } = await getJob(jobId);
  return {
    steps: steps.map((step) => ({ key: step.key, state: step.state })),
    waitsFor: `customer.wait.${steps.find((step) => step.state === 'open')?.waitsFor ?? 'nothing'}`,
  };
}

function viewOf({ document, state, content, acceptance }: QuoteForReader, stands: Stands): CustomerView {
  return {
    documentId: document.id,
    sha256: document.sha256,
    hasPdf: document.pdfSha256 !== null,
    state,
    content,
    acceptance: acceptance && {
      name: acceptance.name,
      at: acceptance.at,
      totalMinor: acceptance.totalMinor,
      sha256: acceptance.sha256,
      shownText: acceptance.shownText,
      choices: acceptance.choices,
    },
    ...stands,
  };
}

/** @returns null while nothing has been sent. */
export function customerView(shopId: string, jobId: string): Promise<CustomerView | null> {
  return withShop(shopId, async () => {
    const quote = await quoteForCustomer(shopId, jobId);
    return quote ? viewOf(quote, await standsOf(jobId, quote.state)) : null;
  });
}

/** One sent revision. @returns null when the job has no such revision. */
export function sentView(actor: Actor, jobId: string, documentId: string): Promise<CustomerView | null> {
  const { shopId } = actor;
  return withShop(shopId, async () => {
    const quote = (await sentQuotes(shopId, jobId)).find((sent) => sent.document.id === documentId);
    if (!quote) return null;
    return viewOf({ ...quote, content: await contentOf(documentId) }, await standsOf(jobId, quote.state));
  });
}

/** The draft as the customer would see it. @returns null without a draft. */
export function previewView(
  actor: Actor,
  jobId: string,
  ports: SourcePorts = livePorts,
): Promise<CustomerView | null> {
  return withShop(actor.shopId, async () => {
    const composed = await composeQuote(actor.shopId, jobId, new Date(), ports);
    if (!composed) return null;
    const { content, bodySha256 } = composed;
    const unsent = {
      documentId: '',
      sha256: bodySha256,
      hasPdf: false,
      state: 'sent',
      acceptance: null,
    } as const;
    return { ...unsent, content, ...(await standsOf(jobId, 'sent')) };
  });
}
