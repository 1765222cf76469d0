import { servePdf } from '@/lib/documents/pdf-response';
import { customerRoute } from '@/lib/links/request';

/** What was sent to a customer, and nothing else of the job: a wiring sheet is not theirs. */
export const GET = customerRoute<{ link: string; document: string }>({
  name: 'links.document',
  run: ({ visit, params }) =>
    servePdf(
      visit.shopId,
      params.document,
      (pdf) => pdf.jobId === visit.jobId && (pdf.kind === 'quote' || pdf.kind === 'invoice'),
    ),
});
