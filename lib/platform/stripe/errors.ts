/** What the card service said, in three kinds and in words that may be shown. Details go to the log alone. */
import Stripe from 'stripe';
import { AppError } from '@/lib/platform/http/errors';
import { log } from '@/lib/platform/log';

/** declined: another card may do; unavailable: later may do; invalid: the same request never will. */
export type PaymentErrorKind = 'declined' | 'unavailable' | 'invalid';

export class PaymentServiceError extends AppError {
  constructor(
    readonly kind: PaymentErrorKind,
    message: string,
  ) {
    super(kind === 'unavailable' ? 'unavailable' : 'invalid-input', message);
  }
}

const BY_CODE: Record<string, string> = {
  amount_too_small: 'The amount is smaller than what can be paid by card.',
  amount_too_large: 'The amount is larger than what can be paid by card.',
  email_invalid: "The customer's e-mail address is not accepted by the card service.",
  resource_missing: 'The card service does not know this payment.',
  charge_already_refunded: 'This payment was refunded already.',
  payment_intent_unexpected_state: 'Nothing was received with this payment that could be refunded.',
};

const REFUSED = 'The card service did not accept the request. Nothing was charged.';
const DOWN = 'The card service can not be reached. Nothing was charged; try again in a minute.';
const SET_UP =
  "The card service refuses the shop's account. Nothing was charged; the owner has to check the card settings.";
const REUSED = 'This payment was already begun with other figures. Load the page again and start over.';

function translate(error: Stripe.errors.StripeError): PaymentServiceError {
  const { errors } = Stripe;
  if (error instanceof errors.StripeCardError) return new PaymentServiceError('declined', error.message);
  if (error instanceof errors.StripeIdempotencyError) return new PaymentServiceError('invalid', REUSED);
  if (error instanceof errors.StripeAuthenticationError || error instanceof errors.StripePermissionError)
    return new PaymentServiceError('invalid', SET_UP);
  if (error instanceof errors.StripeInvalidRequestError)
    return new PaymentServiceError('invalid', BY_CODE[error.code ?? ''] ?? REFUSED);
  return new PaymentServiceError('unavailable', DOWN);
}

/** Maps what the SDK threw. Anything else is a fault of ours and passes through as it is. */
export function toPaymentError(error: unknown): unknown {
  if (!(error instanceof Stripe.errors.StripeError)) return error;
  const { type, code, param, statusCode, requestId, message } = error;
  const mapped = translate(error);
  log().warn(
    { type, code, param, statusCode, requestId, reason: message, kind: mapped.kind },
    'card service',
  );
  return mapped;
}
