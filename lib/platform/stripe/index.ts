/** Card and bank payments through the card service's own SDK. Card numbers never reach this application. */
import type Stripe from 'stripe';
import { insideTransaction } from '@/lib/platform/db';
import { env, required } from '@/lib/platform/env';
import { type Checkout, type NewCheckout, sessionParams, toCheckout } from './checkout';
import { paymentClient, type PaymentConfig } from './client';
import { toPaymentError } from './errors';
import { type NewRefund, type Refund, refundParams, toRefund } from './refund';
import { type PaymentNotice, verifyNotice } from './webhook';

export type { Checkout, CheckoutState, NewCheckout, PaymentMethod } from './checkout';
export type { PaymentConfig } from './client';
export { type PaymentErrorKind, PaymentServiceError } from './errors';
export type { NewRefund, Refund } from './refund';
export type { PaymentNotice } from './webhook';

type Account = string | null | undefined;

/** What the service refuses is thrown as a PaymentServiceError, whose message may be shown. */
export interface PaymentService {
  createCheckoutSession(input: NewCheckout): Promise<Checkout>;
  fetchCheckoutSession(id: string, account?: Account): Promise<Checkout>;
  /** One that is over already stays as it is: what comes back says how it ended. */
  expireCheckoutSession(id: string, account?: Account): Promise<Checkout>;
  createRefund(input: NewRefund): Promise<Refund>;
  fetchRefund(id: string, account?: Account): Promise<Refund>;
  verifyWebhook(rawBody: string | Buffer, signature: string | null | undefined): PaymentNotice;
}

const onAccount = (account: Account): Stripe.RequestOptions => (account ? { stripeAccount: account } : {});

async function ask<T>(work: () => Promise<T>): Promise<T> {
  if (insideTransaction()) throw new Error('The card service is never called inside a transaction.');
  try {
    return await work();
  } catch (error) {
    throw toPaymentError(error);
  }
}

export function createPaymentService(config: PaymentConfig): PaymentService {
  const client = paymentClient(config);
  const { sessions } = client.checkout;
  const expand = { expand: ['payment_intent'] };

  const fetchCheckoutSession = (id: string, account?: Account) =>
    ask(async () => toCheckout(await sessions.retrieve(id, expand, onAccount(account))));

  return {
    fetchCheckoutSession,
    createCheckoutSession: (input) =>
      ask(async () => {
        const options = { ...onAccount(input.account), idempotencyKey: input.idempotencyKey };
        return toCheckout(await sessions.create(sessionParams(input), options));
      }),
    expireCheckoutSession: async (id, account) => {
      // Paid in this moment is not an error: look first, and look again when it was refused.
      const before = await fetchCheckoutSession(id, account);
      if (before.state !== 'open') return before;
      try {
        return toCheckout(await sessions.expire(id, {}, onAccount(account)));
      } catch (error) {
        const after = await fetchCheckoutSession(id, account);
        if (after.state === 'open') throw toPaymentError(error);
        return after;
      }
    },
    createRefund: (input) =>
      ask(async () => {
        const options = { ...onAccount(input.account), idempotencyKey: input.idempotencyKey };
        return toRefund(await client.refunds.create(refundParams(input), options));
      }),
    fetchRefund: (id, account) =>
      ask(async () => toRefund(await client.refunds.retrieve(id, {}, onAccount(account)))),
    verifyWebhook: (rawBody, signature) => verifyNotice(client, config.webhookSecret, rawBody, signature),
  };
}

let service: PaymentService | undefined;

/** The service that the environment names. */
export function paymentService(): PaymentService {
  service ??= createPaymentService({
    secretKey: required('STRIPE_SECRET_KEY'),
    webhookSecret: required('STRIPE_WEBHOOK_SECRET'),
    apiBase: env().STRIPE_API_BASE,
  });
  return service;
}
