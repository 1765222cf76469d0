/** Serves the PDF that was made when the document was frozen, after a check. */
import { isId } from '@/lib/access/actor';
import { withShop } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import { getFile } from '@/lib/platform/storage';
import { pdfOf } from './queries';

type Pdf = Awaited<ReturnType<typeof pdfOf>>;

/** @throws {AppError} `not-found` for a document of another shop, another job or a kind the asker may not read. */
export async function servePdf(
  shopId: string,
  documentId: string,
  allowed: (pdf: Pdf) => boolean,
): Promise<Response> {
  if (!isId(documentId)) throw notFound('This document');
  const pdf = await withShop(shopId, () => pdfOf(documentId));
  if (!allowed(pdf)) throw notFound('This document');
  const bytes = await getFile(shopId, pdf.sha256);
  return new Response(new Uint8Array(bytes), {
    headers: {
      'content-type': 'application/pdf',
      'content-disposition': `inline; filename="${pdf.fileName}"`,
      'content-length': String(bytes.byteLength),
      'cache-control': 'no-store',
      'x-content-type-options': 'nosniff',
    },
  });
}
