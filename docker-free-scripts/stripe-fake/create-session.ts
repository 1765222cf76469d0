/** POST /v1/checkout/sessions: one-off payments on the hosted page, prices given with the request. */
import type Stripe from 'stripe';
import { badParam, missingParam } from './errors';
import type { Fake } from './fake';
import { newId, nowSeconds } from './ids';
import { newSession, type SessionInput } from './objects';
import type { Params } from './params';
import type { Method, StoredSession } from './store';

const HALF_HOUR = 1_800;
const DAY = 86_400;
const LARGEST_AMOUNT = 99_999_999;
const METHODS: readonly Method['type'][] = ['card', 'us_bank_account'];
const EMAIL = /^[^\s@]+@[^\s@]+\.[^\s@]+$/;

function currencyOf(params: Params): string {
  const currency = params.needText('currency').toLowerCase();
  if (!/^[a-z]{3}$/.test(currency))
    throw badParam('line_items[0][price_data][currency]', `Invalid currency: ${currency}`);
  return currency;
}

function lineItem(params: Params): Stripe.LineItem {
  const quantity = params.needInteger('quantity');
  const price = params.needGroup('price_data');
  const currency = currencyOf(price);
  const unit = price.needInteger('unit_amount');
  const product = price.needGroup('product_data');
  const name = product.needText('name');
  product.text('description');
  for (const each of [product, price, params]) each.end();
  if (quantity < 1 || unit < 0)
    throw badParam('line_items', 'Each line has a quantity of at least 1 and no negative amount.');
  const amount = unit * quantity;
  return {
    id: newId('li'),
    object: 'item',
    adjustable_quantity: null,
    amount_discount: 0,
    amount_subtotal: amount,
    amount_tax: 0,
    amount_total: amount,
    currency,
    description: name,
    metadata: {},
    price: null,
    quantity,
  };
}

function totalOf(items: Stripe.LineItem[]): { amount: number; currency: string } {
  const currency = items[0]?.currency;
  if (currency === undefined) throw missingParam('line_items');
  if (items.some((item) => item.currency !== currency))
    throw badParam('line_items', 'All lines of a session are in one currency.');
  const amount = items.reduce((sum, item) => sum + item.amount_total, 0);
  // The service's least charge is about half a dollar; https://docs.stripe.com/currencies#minimum-and-maximum-charge-amounts
  if (amount < 50)
    throw badParam('line_items', "The Checkout Session's total amount is too small.", 'amount_too_small');
  if (amount > LARGEST_AMOUNT)
    throw badParam('line_items', "The Checkout Session's total amount is too large.", 'amount_too_large');
  return { amount, currency };
}

/** The service works out what suits the currency; `allowed_payment_method_types` narrows that down. */
function methodsOf(params: Params, currency: string): Pick<SessionInput, 'methods' | 'allowed'> {
  const allowed = params.texts('allowed_payment_method_types');
  const suits = METHODS.filter((method) => method === 'card' || currency === 'usd');
  const methods = allowed.length > 0 ? suits.filter((method) => allowed.includes(method)) : suits;
  if (methods.length === 0)
    throw badParam(
      'allowed_payment_method_types',
      `No payment method of ${allowed.join(', ')} can be offered in ${currency}; the stand-in knows ${METHODS.join(', ')}.`,
    );
  return { methods, allowed: allowed.length > 0 ? allowed : null };
}

function expiryOf(params: Params): number {
  const now = nowSeconds();
  const at = params.integer('expires_at');
  if (at === undefined) return now + DAY;
  // A minute to spare: the caller's clock and the way here.
  if (at < now + HALF_HOUR - 60)
    throw badParam('expires_at', 'The `expires_at` timestamp must be at least 30 minutes from now.');
  if (at > now + DAY + 60)
    throw badParam('expires_at', 'The `expires_at` timestamp must be less than 24 hours from now.');
  return at;
}

function addressOf(params: Params, key: string): string | undefined {
  const text = params.text(key);
  if (text === undefined || /^https?:\/\/[^\s]+$/.test(text)) return text;
  throw badParam(key, 'Not a valid URL', 'url_invalid');
}

function emailOf(params: Params): string | null {
  const email = params.text('customer_email', 512) ?? null;
  if (email !== null && !EMAIL.test(email))
    throw badParam('customer_email', `Invalid email address: ${email}`, 'email_invalid');
  return email;
}

function intentData(params: Params): StoredSession['intent'] {
  const group = params.group('payment_intent_data');
  const data = {
    description: group?.text('description', 1_000) ?? null,
    metadata: group?.metadata() ?? {},
    receiptEmail: group?.text('receipt_email') ?? null,
  };
  group?.end();
  return data;
}

export function createSession(fake: Fake, account: string, params: Params): StoredSession {
  if (!params.oneOf('mode', ['payment'])) throw missingParam('mode');
  params.oneOf('ui_mode', ['hosted_page']);
  const items = params.groups('line_items').map(lineItem);
  const { amount, currency } = totalOf(items);
  const successUrl = addressOf(params, 'success_url');
  if (successUrl === undefined) throw missingParam('success_url');
  const input = {
    account,
    amount,
    currency,
    successUrl,
    cancelUrl: addressOf(params, 'cancel_url') ?? null,
    customerEmail: emailOf(params),
    clientReferenceId: params.text('client_reference_id', 200) ?? null,
    metadata: params.metadata(),
    ...methodsOf(params, currency),
    expiresAt: expiryOf(params),
    payUrl: (id: string) => `${fake.config.publicUrl ?? fake.url}/pay/${id}`,
  };
  const intent = intentData(params);
  params.end();
  const session = newSession(input);
  const stored = { session, items, intent, pending: null, account };
  fake.store.account(account).sessions[session.id] = stored;
  return stored;
}
