import type { Metadata } from 'next';
import { notFound, redirect } from 'next/navigation';
import { Band, PriceRow } from '@/components/customer/section';
import { PayByCard } from '@/components/pay/pay-by-card';
import { isId } from '@/lib/access/actor';
import { customerInvoice } from '@/lib/invoices/queries';
import { visitorOfRequest } from '@/lib/links/request';
import { message } from '@/lib/messages';
import { toAppError } from '@/lib/platform/http/errors';
import { formatDate, formatMoney } from '@/lib/units';

export const metadata: Metadata = { title: 'Invoice' };

export default async function CustomerInvoicePage({
  params,
}: {
  params: Promise<{ link: string; invoice: string }>;
}) {
  const { link, invoice: id } = await params;
  const visitor = await visitorOfRequest(link).catch((error: unknown) => {
    if (toAppError(error).code === 'too-many') redirect('/l/wait');
    throw error;
  });
  const view = visitor && isId(id) ? await customerInvoice(visitor.shopId, visitor.link.jobId, id) : null;
  if (!view) notFound();
  const { content, invoice, balanceMinor, overCeiling } = view;
  const { settings, shop } = content;
  const money = (minor: number | string) => formatMoney(minor, settings, { symbol: false });
  const base = `/l/${link}`;
  return (
    <main id="main" className="mx-auto w-full max-w-3xl">
      <header className="px-5 py-6 sm:px-8">
        <p className="text-ink-2">{shop.name}</p>
        <h1 className="mt-1 text-3xl sm:text-4xl">
          {message(content.purpose === 'deposit' ? 'invoice.deposit' : 'invoice.final', {
            number: content.number,
          })}
        </h1>
        <p className="mt-1 text-ink-2">
          {content.title}.{' '}
          {message('invoice.line', {
            issued: formatDate(content.issuedOn, settings),
            due: formatDate(content.dueOn, settings),
          })}
        </p>
      </header>
      <Band>
        {content.rows.map((row) => (
          <PriceRow key={row.text} amount={money(row.amountMinor)}>
            {row.text}
          </PriceRow>
        ))}
        <PriceRow amount={formatMoney(content.totalMinor, settings)} strong>
          {message('invoice.total')}
        </PriceRow>
        {BigInt(invoice.receivedMinor) > 0n ? (
          <>
            <PriceRow amount={money(invoice.receivedMinor)} second>
              {message('invoice.received')}
            </PriceRow>
            <PriceRow amount={money(balanceMinor)} second>
              {message('invoice.balance')}
            </PriceRow>
          </>
        ) : null}
      </Band>
      <Band>
        {invoice.voided ? (
          <p>{message('invoice.voided')}</p>
        ) : BigInt(balanceMinor) <= 0n ? (
          <p className="text-lg font-bold">✓ {message('invoice.paid')}</p>
        ) : overCeiling ? (
          <p>{message('invoice.over-ceiling', { shop: shop.name })}</p>
        ) : (
          <PayByCard
            address={`${base}/invoices/${id}/checkout`}
            label={`${message('invoice.pay-card')}: ${formatMoney(balanceMinor, settings)}`}
            otherwise={message('invoice.how-else', { shop: shop.name })}
          />
        )}
        <p className="mt-5 flex flex-wrap gap-x-6">
          <a href={base} className="inline-flex min-h-touch items-center underline">
            {message('invoice.to-job')}
          </a>
          {invoice.hasPdf ? (
            <a href={`${base}/documents/${id}`} className="inline-flex min-h-touch items-center underline">
              PDF
            </a>
          ) : null}
        </p>
      </Band>
    </main>
  );
}
