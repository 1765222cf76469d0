/** Checkout sessions in our own terms. */
import type Stripe from 'stripe';

/** `pending`: a bank debit is on its way; `failed`: it came back. */
export type CheckoutState = 'open' | 'paid' | 'pending' | 'failed' | 'expired';

export type PaymentMethod = 'card' | 'bank-debit';

export interface Checkout {
  id: string;
  state: CheckoutState;
  /** Where the customer pays; only while it is open. */
  url: string | null;
  /** Minor units of `currency`. */
  amountMinor: number;
  /** Three capital letters. */
  currency: string;
  paymentIntentId: string | null;
  metadata: Record<string, string>;
  expiresAt: Date;
}

export interface NewCheckout {
  /** The shop's connected account; without it, the platform's own. */
  account?: string | null | undefined;
  /** Minor units of `currency`. */
  amountMinor: number | bigint;
  currency: string;
  /** What the customer reads on the card page. */
  description: string;
  customerEmail?: string | null | undefined;
  successUrl: string;
  cancelUrl: string;
  /** Kept on the session, the payment and its charge. */
  metadata: Record<string, string>;
  /** At least half an hour, at most a day from now. */
  expiresAt: Date;
  /** The same key never makes a second session. */
  idempotencyKey: string;
  methods?: readonly PaymentMethod[] | undefined;
}

const METHOD_NAMES = { card: 'card', 'bank-debit': 'us_bank_account' } as const;

/** @throws {RangeError} for an amount that is no positive whole number of minor units */
export function minorUnits(amount: number | bigint): number {
  const value = Number(amount);
  if (!Number.isSafeInteger(value) || value < 1)
    throw new RangeError(`An amount to pay is a positive whole number of minor units, not ${amount}.`);
  return value;
}

export function sessionParams(input: NewCheckout): Stripe.Checkout.SessionCreateParams {
  const { metadata, description } = input;
  return {
    mode: 'payment',
    line_items: [
      {
        quantity: 1,
        price_data: {
          currency: input.currency.toLowerCase(),
          unit_amount: minorUnits(input.amountMinor),
          product_data: { name: description },
        },
      },
    ],
    allowed_payment_method_types: (input.methods ?? ['card']).map((method) => METHOD_NAMES[method]),
    payment_intent_data: { description, metadata },
    metadata,
    success_url: input.successUrl,
    cancel_url: input.cancelUrl,
    expires_at: Math.floor(input.expiresAt.getTime() / 1_000),
    ...(input.customerEmail ? { customer_email: input.customerEmail } : {}),
  };
}

function stateOf(session: Stripe.Checkout.Session): CheckoutState {
  if (session.status === 'expired') return 'expired';
  if (session.status !== 'complete') return 'open';
  if (session.payment_status !== 'unpaid') return 'paid';
  const intent = session.payment_intent;
  const status = typeof intent === 'object' ? intent?.status : undefined;
  return status === 'requires_payment_method' || status === 'canceled' ? 'failed' : 'pending';
}

/** @param session with `payment_intent` expanded where the difference of pending and failed matters */
export function toCheckout(session: Stripe.Checkout.Session): Checkout {
  const intent = session.payment_intent;
  return {
    id: session.id,
    state: stateOf(session),
    url: session.url,
    amountMinor: session.amount_total ?? 0,
    currency: (session.currency ?? '').toUpperCase(),
    paymentIntentId: typeof intent === 'string' ? intent : (intent?.id ?? null),
    metadata: session.metadata ?? {},
    expiresAt: new Date(session.expires_at * 1_000),
  };
}
