/** New objects with every property that the SDK's types require. */
import Stripe from 'stripe';
import { newId, nowSeconds } from './ids';
import type { Method, StoredSession } from './store';

export interface SessionInput {
  account: string;
  amount: number;
  currency: string;
  successUrl: string;
  cancelUrl: string | null;
  customerEmail: string | null;
  clientReferenceId: string | null;
  metadata: Record<string, string>;
  methods: Method['type'][];
  allowed: string[] | null;
  expiresAt: number;
  payUrl: (id: string) => string;
}

export function newSession(input: SessionInput): Stripe.Checkout.Session {
  const id = newId('cs_test', 40);
  return {
    id,
    object: 'checkout.session',
    adaptive_pricing: { enabled: false },
    after_expiration: null,
    allow_promotion_codes: null,
    allowed_payment_method_types: input.allowed,
    amount_subtotal: input.amount,
    amount_total: input.amount,
    automatic_tax: { enabled: false, liability: null, provider: null, status: null },
    billing_address_collection: null,
    cancel_url: input.cancelUrl,
    client_reference_id: input.clientReferenceId,
    client_secret: null,
    collected_information: null,
    consent: null,
    consent_collection: null,
    created: nowSeconds(),
    currency: input.currency,
    currency_conversion: null,
    custom_fields: [],
    custom_text: {
      after_submit: null,
      shipping_address: null,
      submit: null,
      terms_of_service_acceptance: null,
    },
    customer: null,
    customer_account: null,
    customer_creation: 'if_required',
    customer_details: null,
    customer_email: input.customerEmail,
    discounts: [],
    expires_at: input.expiresAt,
    integration_identifier: null,
    invoice: null,
    invoice_creation: null,
    livemode: false,
    locale: null,
    managed_payments: null,
    metadata: input.metadata,
    mode: 'payment',
    origin_context: null,
    payment_intent: null,
    payment_link: null,
    payment_method_collection: 'if_required',
    payment_method_configuration_details: null,
    payment_method_options: {},
    payment_method_types: input.methods,
    payment_status: 'unpaid',
    permissions: null,
    recovered_from: null,
    saved_payment_method_options: null,
    setup_intent: null,
    shipping_address_collection: null,
    shipping_cost: null,
    shipping_options: [],
    status: 'open',
    submit_type: null,
    subscription: null,
    success_url: input.successUrl,
    total_details: { amount_discount: 0, amount_shipping: 0, amount_tax: 0 },
    ui_mode: 'hosted_page',
    url: input.payUrl(id),
    wallet_options: null,
  };
}

/** The service makes the intent when somebody first tries to pay, not with the session. */
export function newIntent({ session, intent }: StoredSession): Stripe.PaymentIntent {
  const id = newId('pi');
  return {
    id,
    object: 'payment_intent',
    allowed_payment_method_types: session.allowed_payment_method_types,
    amount: session.amount_total ?? 0,
    amount_capturable: 0,
    amount_received: 0,
    application: null,
    application_fee_amount: null,
    automatic_payment_methods: null,
    canceled_at: null,
    cancellation_reason: null,
    capture_method: 'automatic_async',
    client_secret: `${id}_secret_${newId('x', 12).slice(2)}`,
    confirmation_method: 'automatic',
    created: nowSeconds(),
    currency: session.currency ?? 'usd',
    customer: null,
    customer_account: null,
    description: intent.description,
    excluded_payment_method_types: null,
    last_payment_error: null,
    latest_charge: null,
    livemode: false,
    managed_payments: null,
    metadata: intent.metadata,
    next_action: null,
    on_behalf_of: null,
    payment_method: null,
    payment_method_configuration_details: null,
    payment_method_options: {},
    payment_method_types: session.payment_method_types,
    payment_record: null,
    processing: null,
    receipt_email: intent.receiptEmail,
    review: null,
    setup_future_usage: null,
    shipping: null,
    source: null,
    statement_descriptor: null,
    statement_descriptor_suffix: null,
    status: 'requires_payment_method',
    transfer_data: null,
    transfer_group: null,
  };
}

export type ChargeStatus = 'succeeded' | 'pending' | 'failed';

export function newCharge(
  intent: Stripe.PaymentIntent,
  method: Method,
  status: ChargeStatus,
  email: string | null,
): Stripe.Charge {
  return {
    id: newId(method.type === 'card' ? 'ch' : 'py'),
    object: 'charge',
    amount: intent.amount,
    amount_captured: status === 'succeeded' ? intent.amount : 0,
    amount_refunded: 0,
    application: null,
    application_fee: null,
    application_fee_amount: null,
    balance_transaction: null,
    billing_details: { address: null, email, name: method.name, phone: null, tax_id: null },
    calculated_statement_descriptor: null,
    captured: status === 'succeeded',
    created: nowSeconds(),
    currency: intent.currency,
    customer: null,
    description: intent.description,
    disputed: false,
    failure_balance_transaction: null,
    failure_code: null,
    failure_message: null,
    fraud_details: null,
    livemode: false,
    metadata: intent.metadata,
    on_behalf_of: null,
    outcome: null,
    paid: status === 'succeeded',
    payment_intent: intent.id,
    payment_method: null,
    payment_method_details: { type: method.type },
    receipt_email: intent.receipt_email,
    receipt_number: null,
    receipt_url: null,
    refunded: false,
    review: null,
    shipping: null,
    source: null,
    source_transfer: null,
    statement_descriptor: null,
    statement_descriptor_suffix: null,
    status,
    transfer_data: null,
    transfer_group: null,
  };
}

export function newRefund(
  charge: Stripe.Charge,
  amount: number,
  reason: Stripe.Refund.Reason | null,
  metadata: Record<string, string>,
): Stripe.Refund {
  return {
    id: newId('re'),
    object: 'refund',
    amount,
    balance_transaction: null,
    charge: charge.id,
    created: nowSeconds(),
    currency: charge.currency,
    customer: null,
    customer_account: null,
    metadata,
    payment_intent: charge.payment_intent as string,
    payment_method: null,
    reason,
    receipt_number: null,
    source_transfer_reversal: null,
    status: 'succeeded',
    transfer_reversal: null,
  };
}

export function newAccount(id: string): Stripe.Account {
  return {
    id,
    object: 'account',
    business_type: 'company',
    capabilities: { card_payments: 'active', transfers: 'active' },
    charges_enabled: true,
    country: 'US',
    created: nowSeconds(),
    default_currency: 'usd',
    details_submitted: true,
    email: null,
    metadata: {},
    payouts_enabled: true,
    type: 'standard',
  };
}

/** `object` is copied: an event tells how things stood when it happened. */
export function newEvent(
  type: string,
  object: object,
  account: string,
  request: { id: string | null; idempotency_key: string | null },
): Stripe.Event {
  return {
    id: newId('evt'),
    object: 'event',
    ...(account ? { account } : {}),
    api_version: Stripe.API_VERSION,
    created: nowSeconds(),
    data: { object: structuredClone(object) },
    livemode: false,
    pending_webhooks: 1,
    request,
    type,
  } as Stripe.Event;
}
