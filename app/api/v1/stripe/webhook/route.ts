import { answer, readBytes } from '@/lib/access/route';
import { handleNotice } from '@/lib/payments/commands';
import { log } from '@/lib/platform/log';
import { paymentService } from '@/lib/platform/stripe';

/** Signed notices of the card service. Anything but success answers 500, so that the notice comes again. */
export function POST(request: Request): Promise<Response> {
  return answer('stripe.webhook', async () => {
    const raw = Buffer.from(await readBytes(request, 512 * 1024));
    const service = paymentService();
    let notice;
    try {
      notice = service.verifyWebhook(raw, request.headers.get('stripe-signature'));
    } catch {
      return Response.json({ error: 'The signature does not fit.' }, { status: 400 });
    }
    try {
      await handleNotice(notice);
    } catch (error) {
      const { eventId, type } = notice;
      log().error({ eventId, type, error: String(error) }, 'a notice of the card service was not taken');
      return Response.json({ error: 'Not taken; send it again.' }, { status: 500 });
    }
    return Response.json({ received: true });
  });
}
