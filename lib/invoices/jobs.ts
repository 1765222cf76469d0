/** After an invoice is issued: its PDF, made once and recorded on the frozen row, then the mail with it. */
import { renderToBuffer } from '@react-pdf/renderer';
import { render } from '@react-email/render';
import { createElement } from 'react';
import { registerFonts } from '@/components/pdf/fonts';
import { InvoicePdf } from '@/components/pdf/invoice-pdf';
import { InvoiceIssuedMail } from '@/emails/invoice-issued';
import { recordDocumentEvent, storePdf } from '@/lib/documents/commands';
import { pdfOf } from '@/lib/documents/queries';
import { findLink, linkUrl } from '@/lib/links/queries';
import { message } from '@/lib/messages';
import { run, withShop } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import { sendMail } from '@/lib/platform/mail';
import type { Handler } from '@/lib/platform/queue/worker';
import { getFile } from '@/lib/platform/storage';
import { getInvoice, invoiceContent } from './queries';
import type { InvoiceContent } from './schema';

async function makePdf(shopId: string, documentId: string, content: InvoiceContent): Promise<void> {
  registerFonts();
  const bytes = await renderToBuffer(
    createElement(InvoicePdf, { content }) as Parameters<typeof renderToBuffer>[0],
  );
  const stored = await storePdf(shopId, bytes);
  await withShop(shopId, async () => {
    await run(
      `insert into files (shop_id, sha256, content_type, bytes) values ($1, $2, 'application/pdf', $3)
       on conflict (shop_id, sha256) do nothing returning id`,
      [shopId, stored.sha256, stored.bytes],
    );
    await recordDocumentEvent(documentId, 'pdf', { sha256: stored.sha256 });
  });
}

const hasPdf = (shopId: string, documentId: string) =>
  withShop(shopId, () => pdfOf(documentId)).then(
    () => true,
    () => false,
  );

const issued: Handler = async (item) => {
  const { documentId = '', linkId = '' } = item.payload;
  const content = await withShop(item.shopId, () => invoiceContent(documentId));
  if (!(await hasPdf(item.shopId, documentId))) await makePdf(item.shopId, documentId, content);
  const { pdf, link, voided } = await withShop(item.shopId, async () => ({
    pdf: await pdfOf(documentId),
    link: linkId === '' ? null : await findLink(linkId),
    voided: (await getInvoice(documentId)).voided,
  }));
  // Voided before its mail went out: nobody is asked to pay it.
  if (voided || linkId === '') return;
  if (!link) throw notFound('The link of this mail');
  const body = createElement(InvoiceIssuedMail, { content, link: linkUrl(link) });
  await sendMail({
    id: item.id,
    to: link.contactEmail,
    fromName: content.shop.name,
    replyTo: content.shop.email || undefined,
    subject: message('mail.invoice.subject', {
      number: content.number,
      shop: content.shop.name,
      title: content.title,
    }),
    html: await render(body),
    text: await render(body, { plainText: true }),
    attachments: [
      {
        filename: pdf.fileName,
        content: Buffer.from(await getFile(item.shopId, pdf.sha256)),
        contentType: 'application/pdf',
      },
    ],
  });
};

export const invoiceHandlers: [string, Handler][] = [['invoice.issued', issued]];
