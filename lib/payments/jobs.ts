/** Receipts: one for each payment. */
import { render } from '@react-email/render';
import { createElement } from 'react';
import { PaidOnVoidMail } from '@/emails/paid-on-void';
import { ReceiptMail } from '@/emails/receipt';
import { getInvoice, invoiceContent, linkOfInvoice } from '@/lib/invoices/queries';
import { balanceOf } from '@/lib/invoices/schema';
import { linkUrl } from '@/lib/links/queries';
import { message } from '@/lib/messages';
import { select, withShop } from '@/lib/platform/db';
import { env } from '@/lib/platform/env';
import { notFound } from '@/lib/platform/http/errors';
import { sendMail } from '@/lib/platform/mail';
import type { Handler } from '@/lib/platform/queue/worker';
import { formatMoney } from '@/lib/units';
import { closePagesOf } from './commands';

interface Paid {
  invoiceId: string;
  amountMinor: string;
  receivedOn: string;
}

async function load(shopId: string, paymentId: string) {
  return withShop(shopId, async () => {
    const rows = await select<Paid>(
      `select invoice_id as "invoiceId", amount_minor::text as "amountMinor", received_on::text as "receivedOn"
       from payments where id = $1`,
      [paymentId],
    );
    const paid = rows[0];
    if (!paid) throw notFound('This payment');
    const invoice = await getInvoice(paid.invoiceId);
    const link = await linkOfInvoice(invoice);
    return { paid, invoice, link, content: await invoiceContent(invoice.id) };
  });
}

const receipt: Handler = async (item) => {
  const { paid, invoice, link, content } = await load(item.shopId, item.payload['paymentId'] ?? '');
  // A job without a link has no address to write to: the office gave the receipt by hand.
  if (!link) return;
  const body = createElement(ReceiptMail, {
    content,
    amountMinor: paid.amountMinor,
    receivedOn: paid.receivedOn,
    balanceMinor: String(balanceOf(invoice)),
    link: linkUrl(link),
  });
  await sendMail({
    id: item.id,
    to: link.contactEmail,
    fromName: content.shop.name,
    replyTo: content.shop.email || undefined,
    subject: message('mail.receipt.subject', {
      amount: formatMoney(paid.amountMinor, content.settings),
      number: content.number,
      shop: content.shop.name,
    }),
    html: await render(body),
    text: await render(body, { plainText: true }),
  });
};

const onVoid: Handler = async (item) => {
  const { paid, invoice, content } = await load(item.shopId, item.payload['paymentId'] ?? '');
  if (!content.shop.email) return;
  const amount = formatMoney(paid.amountMinor, content.settings);
  const body = createElement(PaidOnVoidMail, {
    content,
    amount,
    customer: content.customer.name,
    link: `${env().APP_URL.replace(/\/$/, '')}/s/${item.shopId}/jobs/${invoice.jobId}/money`,
  });
  await sendMail({
    id: item.id,
    to: content.shop.email,
    fromName: content.shop.name,
    subject: message('mail.paid-on-void.subject', { amount, number: content.number }),
    html: await render(body),
    text: await render(body, { plainText: true }),
  });
};

const closePages: Handler = (item) => closePagesOf(item.shopId, item.payload['invoiceId'] ?? '');

export const paymentHandlers: [string, Handler][] = [
  ['payment.receipt', receipt],
  ['payment.on-void', onVoid],
  ['payment.close-pages', closePages],
];
