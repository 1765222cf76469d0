import { customerRoute } from '@/lib/links/request';
import { findContact } from '@/lib/links/queries';
import { startCheckout } from '@/lib/payments/commands';

/** Opens the card page for an invoice of the link's own job; the browser goes there by itself. */
export const POST = customerRoute<{ link: string; invoice: string }>({
  name: 'payments.checkout',
  write: true,
  run: async ({ visit, params }) =>
    Response.json(
      await startCheckout(
        visit.shopId,
        visit.jobId,
        params.invoice,
        await findContact(visit.shopId, visit.linkId),
      ),
    ),
});
