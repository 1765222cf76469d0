/** Refunds in our own terms. */
import type Stripe from 'stripe';
import { minorUnits } from './checkout';

export interface NewRefund {
  account?: string | null | undefined;
  paymentIntentId: string;
  /** Minor units; without it, all that is left. */
  amountMinor?: number | bigint | undefined;
  metadata?: Record<string, string> | undefined;
  idempotencyKey: string;
}

export interface Refund {
  id: string;
  state: 'pending' | 'done' | 'failed';
  amountMinor: number;
  currency: string;
  paymentIntentId: string | null;
}

export function refundParams(input: NewRefund): Stripe.RefundCreateParams {
  return {
    payment_intent: input.paymentIntentId,
    reason: 'requested_by_customer',
    metadata: input.metadata ?? {},
    ...(input.amountMinor === undefined ? {} : { amount: minorUnits(input.amountMinor) }),
  };
}

function stateOf(status: string | null): Refund['state'] {
  if (status === 'succeeded') return 'done';
  return status === 'failed' || status === 'canceled' ? 'failed' : 'pending';
}

export function toRefund(refund: Stripe.Refund): Refund {
  const intent = refund.payment_intent;
  return {
    id: refund.id,
    state: stateOf(refund.status),
    amountMinor: refund.amount,
    currency: refund.currency.toUpperCase(),
    paymentIntentId: typeof intent === 'string' ? intent : (intent?.id ?? null),
  };
}
