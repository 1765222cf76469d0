import type { Metadata } from 'next';
import { notFound, redirect } from 'next/navigation';
import { cache } from 'react';
import { OpenedBeacon } from '@/components/customer/beacon';
import { CustomerQuote } from '@/components/customer/quote-page';
import { Band } from '@/components/customer/section';
import { CustomerInvoices } from '@/components/pay/customer-invoices';
import { customerInvoices } from '@/lib/invoices/queries';
import { visitorOfRequest } from '@/lib/links/request';
import { message } from '@/lib/messages';
import { toAppError } from '@/lib/platform/http/errors';
import { customerView } from '@/lib/quotes/queries';

interface Props {
  params: Promise<{ link: string }>;
}

/** Once for title and page together. */
const viewOf = cache(async (link: string) => {
  const visitor = await visitorOfRequest(link).catch((error: unknown) => {
    if (toAppError(error).code === 'too-many') redirect('/l/wait');
    throw error;
  });
  if (!visitor) notFound();
  const view = await customerView(visitor.shopId, visitor.link.jobId);
  const accepted = view?.acceptance ? await customerInvoices(visitor.shopId, visitor.link.jobId) : [];
  return view ? { ...view, invoices: accepted } : null;
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { link } = await params;
  const view = await viewOf(link);
  return view ? { title: { absolute: `${view.content.title} · ${view.content.shop.name}` } } : {};
}

export default async function CustomerPage({ params }: Props) {
  const { link } = await params;
  const view = await viewOf(link);
  return (
    <main id="main" className="mx-auto w-full max-w-3xl">
      {view ? (
        <>
          <OpenedBeacon link={link} documentId={view.documentId} />
          <CustomerInvoices base={`/l/${link}`} invoices={view.invoices} settings={view.content.settings} />
          <CustomerQuote
            view={view}
            base={`/l/${link}`}
            pdf={view.hasPdf ? `/l/${link}/documents/${view.documentId}` : null}
          />
        </>
      ) : (
        <Band>
          <p>{message('customer.nothing-yet')}</p>
        </Band>
      )}
    </main>
  );
}
