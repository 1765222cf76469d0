import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { CustomerQuote } from '@/components/customer/quote-page';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { pageActor } from '@/lib/access/actor';
import { sentView } from '@/lib/quotes/queries';
import { found } from '../found';

export const metadata: Metadata = { title: 'Sent quote' };

interface Props {
  params: Promise<{ shop: string; job: string; document: string }>;
}

export default async function SentQuotePage({ params }: Props) {
  const { shop, job, document } = await params;
  const actor = await pageActor(shop, 'price:see');
  const view = await found(sentView(actor, job, document));
  if (!view) notFound();
  const { content } = view;
  return (
    <PageBody
      title={`Quote ${content.number}, revision ${content.revision}`}
      sub="As the customer sees it. It is frozen, and nothing can be signed from here."
      actions={
        <>
          {view.hasPdf ? (
            <ButtonLink
              look="secondary"
              prefetch={false}
              href={`/api/v1/shops/${shop}/documents/${document}/pdf`}
            >
              PDF
            </ButtonLink>
          ) : null}
          <ButtonLink look="secondary" href={`/s/${shop}/jobs/${job}/quote`}>
            Back to the quote
          </ButtonLink>
        </>
      }
    >
      <div className="mx-auto w-full max-w-3xl rounded-md border border-rule bg-sheet">
        <CustomerQuote view={view} base={null} pdf={null} />
      </div>
    </PageBody>
  );
}
