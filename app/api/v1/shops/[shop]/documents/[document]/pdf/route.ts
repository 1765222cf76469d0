import { shopRoute } from '@/lib/access/route';
import { servePdf } from '@/lib/documents/pdf-response';

/** Quotes and invoices. Wiring sheets have a route of their own: they are read by crew. */
export const GET = shopRoute<{ shop: string; document: string }>({
  name: 'documents.pdf',
  permission: 'price:see',
  run: ({ actor, params }) =>
    servePdf(actor.shopId, params.document, (pdf) => pdf.kind === 'quote' || pdf.kind === 'invoice'),
});
