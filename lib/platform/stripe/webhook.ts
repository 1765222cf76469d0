/** A signed notice of the card service, checked and cut down to what tells us what to fetch again. */
import Stripe from 'stripe';
import { PaymentServiceError } from './errors';

export interface PaymentNotice {
  eventId: string;
  type: string;
  /** The connected account, '' for the platform's own: the form in which it is stored. */
  account: string;
  objectId: string;
  /** Set when the notice is about a checkout session. */
  checkoutId: string | null;
  paymentIntentId: string | null;
  metadata: Record<string, string>;
}

interface NoticeObject {
  id?: string;
  object?: string;
  payment_intent?: string | { id: string } | null;
  metadata?: Record<string, string> | null;
}

function intentOf(object: NoticeObject): string | null {
  if (object.object === 'payment_intent') return object.id ?? null;
  return typeof object.payment_intent === 'object'
    ? (object.payment_intent?.id ?? null)
    : (object.payment_intent ?? null);
}

function toNotice(event: Stripe.Event): PaymentNotice {
  const object = event.data.object as NoticeObject;
  return {
    eventId: event.id,
    type: event.type,
    account: event.account ?? '',
    objectId: object.id ?? '',
    checkoutId: object.object === 'checkout.session' ? (object.id ?? null) : null,
    paymentIntentId: intentOf(object),
    metadata: object.metadata ?? {},
  };
}

/**
 * @param rawBody the request's body as it came: parsed and written again, its signature no longer fits
 * @throws {PaymentServiceError} `invalid` when the signature does not fit or is older than five minutes
 */
export function verifyNotice(
  client: Stripe,
  secret: string,
  rawBody: string | Buffer,
  signature: string | null | undefined,
): PaymentNotice {
  let event: Stripe.Event;
  try {
    event = client.webhooks.constructEvent(rawBody, signature ?? '', secret);
  } catch {
    throw new PaymentServiceError('invalid', 'The signature of this notice does not fit.');
  }
  return toNotice(event);
}
