import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { PlainPage } from '@/components/shell/plain-page';
import { ButtonLink } from '@/components/ui/button';
import { returnView } from '@/lib/invoices/queries';
import { message } from '@/lib/messages';
import { settleReturn } from '@/lib/payments/commands';

export const metadata: Metadata = { title: 'Payment', robots: { index: false }, referrer: 'no-referrer' };
export const dynamic = 'force-dynamic';

/** Where the card service sends people back to: asks the service itself what became of the payment. */
export default async function PayReturnPage({ params }: { params: Promise<{ session: string }> }) {
  const { session } = await params;
  const returned = await settleReturn(session).catch(() => 'unknown' as const);
  if (returned === null) notFound();
  if (returned === 'unknown')
    return (
      <PlainPage title="We do not know yet">
        <p>The card service does not answer just now. Do not pay again: reload this page in a minute.</p>
      </PlainPage>
    );
  const { number, shopName, linkId } = await returnView(returned.shopId, returned.invoiceId);
  return (
    <PlainPage title={message(`pay.${returned.state}.title`)}>
      <p>{message(`pay.${returned.state}.text`, { number, shop: shopName })}</p>
      {linkId ? (
        <ButtonLink
          href={
            returned.state === 'paid' || returned.state === 'pending'
              ? `/l/${linkId}`
              : `/l/${linkId}/invoices/${returned.invoiceId}`
          }
        >
          {message('pay.back')}
        </ButtonLink>
      ) : null}
    </PlainPage>
  );
}
