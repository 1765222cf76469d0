import { answer, readBytes } from '@/lib/access/route';
import { handleNotice } from '@/lib/payments/commands';
import { paymentService } from '@/lib/platform/stripe';

/** Signed notices of the card service. Anything but success answers 500, so that the notice comes again. */
export function POST(request: Request): Promise<Response> {
  return answer('stripe.webhook', async () => {
    const raw = Buffer.from(await readBytes(request, 512 * 1024));
    let notice;
    try {
      notice = paymentService().verifyWebhook(raw, request.headers.get('stripe-signature'));
    } catch {
      return Response.json({ error: 'The signature does not fit.' }, { status: 400 });
    }
    try {
      await handleNotice(notice);
    } catch {
      return Response.json({ error: 'Not taken; send it again.' }, { status: 500 });
    }
    return Response.json({ received: true });
  });
}
