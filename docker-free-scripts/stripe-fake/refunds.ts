/** POST /v1/refunds */
import type Stripe from 'stripe';
import { badParam, badState, missingParam, noSuch } from './errors';
import { emit, type Fake, type Request } from './fake';
import { newRefund } from './objects';
import type { Params } from './params';

const REASONS = ['duplicate', 'fraudulent', 'requested_by_customer'] as const;

function chargeOf(fake: Fake, account: string, params: Params): Stripe.Charge {
  const { charges, intents } = fake.store.account(account);
  const chargeId = params.text('charge');
  const intentId = params.text('payment_intent');
  if (chargeId !== undefined) {
    const charge = charges[chargeId];
    if (!charge) throw noSuch('charge', chargeId, 'charge');
    return charge;
  }
  if (intentId === undefined) throw missingParam('payment_intent');
  const intent = intents[intentId];
  if (!intent) throw noSuch('payment_intent', intentId, 'payment_intent');
  const charge = charges[intent.latest_charge as string];
  if (!charge || charge.status !== 'succeeded')
    throw badState(
      `This PaymentIntent (${intentId}) does not have a successful charge to refund.`,
      'payment_intent_unexpected_state',
    );
  return charge;
}

export function createRefund(fake: Fake, account: string, params: Params, request: Request): Stripe.Refund {
  const charge = chargeOf(fake, account, params);
  const left = charge.amount_captured - charge.amount_refunded;
  const amount = params.integer('amount') ?? left;
  const reason = params.oneOf('reason', REASONS) ?? null;
  const metadata = params.metadata();
  params.end();
  if (left === 0) throw badState(`Charge ${charge.id} has already been refunded.`, 'charge_already_refunded');
  if (amount < 1) throw badParam('amount', 'Invalid positive integer', 'parameter_invalid_integer');
  if (amount > left)
    throw badParam(
      'amount',
      `Refund amount (${amount}) is greater than unrefunded amount on charge (${left})`,
    );
  const refund = newRefund(charge, amount, reason, metadata);
  fake.store.account(account).refunds[refund.id] = refund;
  charge.amount_refunded += amount;
  charge.refunded = charge.amount_refunded === charge.amount_captured;
  emit(fake, account, 'charge.refunded', charge, request);
  return refund;
}
