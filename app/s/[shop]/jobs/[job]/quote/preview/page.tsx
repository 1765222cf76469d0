import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { CustomerQuote } from '@/components/customer/quote-page';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { pageActor } from '@/lib/access/actor';
import { previewView } from '@/lib/quotes/queries';
import { found } from '../found';

export const metadata: Metadata = { title: 'Preview of the quote' };

export default async function PreviewPage({ params }: { params: Promise<{ shop: string; job: string }> }) {
  const { shop, job } = await params;
  const actor = await pageActor(shop, 'price:see');
  const view = await found(previewView(actor, job));
  if (!view) notFound();
  return (
    <PageBody
      title="As the customer will see it"
      sub="A preview: nothing has been sent, and nothing can be signed here."
      actions={
        <ButtonLink look="secondary" href={`/s/${shop}/jobs/${job}/quote`}>
          Back to the draft
        </ButtonLink>
      }
    >
      <div className="mx-auto w-full max-w-3xl rounded-md border border-rule bg-sheet">
        <CustomerQuote view={view} base={null} pdf={null} />
      </div>
    </PageBody>
  );
}
