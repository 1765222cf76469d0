/** The SDK's client, for the real service or for the stand-in on loopback. */
import Stripe from 'stripe';

export interface PaymentConfig {
  secretKey: string;
  webhookSecret: string;
  /** The stand-in's address; without it, the real service. */
  apiBase?: string | undefined;
  timeoutMs?: number | undefined;
}

/** The version that this code was written against; the SDK's types know no other. */
const API_VERSION = '2026-10-28.endive';
const TIMEOUT_MS = 15_000;

function addressOf(apiBase: string | undefined): Stripe.StripeConfig {
  if (!apiBase) return {};
  const { hostname, port, protocol } = new URL(apiBase);
  const plain = protocol === 'http:';
  return { host: hostname, port: port || (plain ? 80 : 443), protocol: plain ? 'http' : 'https' };
}

export function paymentClient({ secretKey, apiBase, timeoutMs = TIMEOUT_MS }: PaymentConfig): Stripe {
  return new Stripe(secretKey, {
    ...addressOf(apiBase),
    apiVersion: API_VERSION,
    maxNetworkRetries: 2,
    timeout: timeoutMs,
    telemetry: false,
  });
}
