/** What can happen to a session. Each step is one synchronous turn: two clicks at once can't pay twice. */
import type Stripe from 'stripe';
import { type Refusal } from './cards';
import { emit, type Fake, type NO_REQUEST, type Request } from './fake';
import { nowSeconds } from './ids';
import { newCharge, newIntent } from './objects';
import type { Method, StoredSession } from './store';

function intentOf(fake: Fake, stored: StoredSession): Stripe.PaymentIntent {
  const { intents } = fake.store.account(stored.account);
  const known = typeof stored.session.payment_intent === 'string' && intents[stored.session.payment_intent];
  if (known) return known;
  const intent = newIntent(stored);
  intents[intent.id] = intent;
  stored.session.payment_intent = intent.id;
  return intent;
}

function chargeOf(
  fake: Fake,
  stored: StoredSession,
  method: Method,
  status: 'succeeded' | 'pending' | 'failed',
) {
  const intent = intentOf(fake, stored);
  const charge = newCharge(intent, method, status, stored.session.customer_email);
  fake.store.account(stored.account).charges[charge.id] = charge;
  intent.latest_charge = charge.id;
  intent.next_action = null;
  stored.pending = null;
  return { intent, charge };
}

function complete({ session }: StoredSession, method: Method): void {
  session.status = 'complete';
  session.url = null;
  session.customer_details = {
    address: null,
    business_name: null,
    email: session.customer_email,
    individual_name: null,
    name: method.name,
    phone: null,
    tax_exempt: 'none',
    tax_ids: [],
  };
}

function markPaid(fake: Fake, stored: StoredSession, intent: Stripe.PaymentIntent): void {
  intent.status = 'succeeded';
  intent.amount_received = intent.amount;
  intent.last_payment_error = null;
  stored.session.payment_status = 'paid';
  emit(fake, stored.account, 'payment_intent.succeeded', intent);
}

function markFailed(fake: Fake, stored: StoredSession, intent: Stripe.PaymentIntent, refusal: Refusal): void {
  intent.status = 'requires_payment_method';
  intent.next_action = null;
  intent.last_payment_error = {
    type: 'card_error',
    code: refusal.code,
    decline_code: refusal.declineCode,
    message: refusal.message,
  };
  emit(fake, stored.account, 'payment_intent.payment_failed', intent);
}

export function pay(fake: Fake, stored: StoredSession, method: Method): void {
  const { intent } = chargeOf(fake, stored, method, 'succeeded');
  complete(stored, method);
  markPaid(fake, stored, intent);
  emit(fake, stored.account, 'checkout.session.completed', stored.session);
}

export function decline(fake: Fake, stored: StoredSession, method: Method, refusal: Refusal): void {
  const { intent, charge } = chargeOf(fake, stored, method, 'failed');
  charge.failure_code = refusal.code;
  charge.failure_message = refusal.message;
  markFailed(fake, stored, intent, refusal);
}

export function challenge(fake: Fake, stored: StoredSession, method: Method): void {
  const intent = intentOf(fake, stored);
  intent.status = 'requires_action';
  intent.next_action = {
    type: 'redirect_to_url',
    redirect_to_url: { url: `${stored.session.url}/confirm`, return_url: stored.session.success_url },
  };
  stored.pending = method;
}

/** The session is done, the money is still on its way. */
export function beginDebit(fake: Fake, stored: StoredSession, method: Method): void {
  const { intent } = chargeOf(fake, stored, method, 'pending');
  intent.status = 'processing';
  complete(stored, method);
  emit(fake, stored.account, 'checkout.session.completed', stored.session);
}

/** @returns false when no debit of this session is on its way */
export function settleDebit(fake: Fake, stored: StoredSession, refusal: Refusal | null): boolean {
  const { session, account } = stored;
  const intent = intentOf(fake, stored);
  const charge = fake.store.account(account).charges[intent.latest_charge as string];
  if (intent.status !== 'processing' || !charge) return false;
  charge.status = refusal ? 'failed' : 'succeeded';
  charge.paid = charge.captured = !refusal;
  charge.amount_captured = refusal ? 0 : charge.amount;
  if (refusal) {
    charge.failure_code = refusal.code;
    charge.failure_message = refusal.message;
    markFailed(fake, stored, intent, refusal);
    emit(fake, account, 'checkout.session.async_payment_failed', session);
  } else {
    markPaid(fake, stored, intent);
    emit(fake, account, 'checkout.session.async_payment_succeeded', session);
  }
  return true;
}

export function expire(fake: Fake, stored: StoredSession, request: Request | typeof NO_REQUEST): void {
  stored.session.status = 'expired';
  stored.session.url = null;
  stored.pending = null;
  if (stored.session.payment_intent) {
    const intent = intentOf(fake, stored);
    intent.status = 'canceled';
    intent.next_action = null;
    intent.canceled_at = nowSeconds();
    intent.cancellation_reason = 'expired';
  }
  emit(fake, stored.account, 'checkout.session.expired', stored.session, request);
}
