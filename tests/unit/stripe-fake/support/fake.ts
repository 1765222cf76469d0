/** A stand-in of the test's own on a free port, with somebody to receive its webhooks. */
import { createServer, type IncomingHttpHeaders, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import Stripe from 'stripe';
import { afterEach, vi } from 'vitest';
import type { FakeConfig } from '../../../../docker-free-scripts/stripe-fake/config';
import { type RunningFake, startStripeFake } from '../../../../docker-free-scripts/stripe-fake/server';

export const SECRET_KEY = 'sk_test_ofthistest';
export const WEBHOOK_SECRET = 'whsec_ofthistest';
export const ACCOUNT = 'acct_fernhollow01';

const closers: (() => Promise<void>)[] = [];

afterEach(async () => {
  for (const close of closers.splice(0).reverse()) await close();
});

export interface Received {
  body: string;
  headers: IncomingHttpHeaders;
  event: Stripe.Event;
}

export interface Receiver {
  url: string;
  received: Received[];
  types(): string[];
  /** What it answers. */
  status: number;
  until(count: number): Promise<Received[]>;
}

export async function startReceiver(): Promise<Receiver> {
  const received: Received[] = [];
  const receiver: Receiver = {
    url: '',
    received,
    status: 200,
    types: () => received.map(({ event }) => event.type),
    until: async (count) => {
      await vi.waitFor(
        () => {
          if (received.length < count) throw new Error(`${received.length} of ${count} notices came`);
        },
        { timeout: 8_000, interval: 10 },
      );
      return received;
    },
  };
  const server: Server = createServer((request, response) => {
    const chunks: Buffer[] = [];
    request.on('data', (chunk: Buffer) => chunks.push(chunk));
    request.on('end', () => {
      const body = Buffer.concat(chunks).toString('utf8');
      received.push({ body, headers: request.headers, event: JSON.parse(body) as Stripe.Event });
      response.writeHead(receiver.status).end();
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  receiver.url = `http://127.0.0.1:${(server.address() as AddressInfo).port}/webhook`;
  closers.push(async () => {
    server.closeAllConnections();
    await new Promise((resolve) => server.close(resolve));
  });
  return receiver;
}

export async function startFake(config: Partial<FakeConfig> = {}): Promise<RunningFake> {
  const plain = { port: 0, secretKey: SECRET_KEY, webhookSecret: WEBHOOK_SECRET, retryMs: 20 };
  const fake = await startStripeFake({ ...plain, ...config });
  closers.push(() => fake.close());
  return fake;
}

/** The real SDK. */
export function sdk(url: string, key = SECRET_KEY, config: Stripe.StripeConfig = {}): Stripe {
  const { hostname, port } = new URL(url);
  const local = { host: hostname, port, protocol: 'http', telemetry: false } as const;
  return new Stripe(key, { ...local, maxNetworkRetries: 0, ...config });
}

export const sessionParams = (
  change: Partial<Stripe.Checkout.SessionCreateParams> = {},
): Stripe.Checkout.SessionCreateParams => ({
  mode: 'payment',
  line_items: [
    {
      quantity: 1,
      price_data: {
        currency: 'usd',
        unit_amount: 123_456,
        product_data: { name: 'Deposit, invoice 1042' },
      },
    },
  ],
  allowed_payment_method_types: ['card'],
  customer_email: 'bakery@example.com',
  success_url: 'http://127.0.0.1:9/back?session={CHECKOUT_SESSION_ID}',
  cancel_url: 'http://127.0.0.1:9/cancelled',
  metadata: { payment: 'p-1' },
  payment_intent_data: { metadata: { payment: 'p-1' } },
  ...change,
});

export const GOOD_CARD = {
  number: '4242 4242 4242 4242',
  expiry: '04 / 39',
  cvc: '123',
  name: 'Ada Holder',
};

export interface Page {
  status: number;
  location: string | null;
  html: string;
}

/** Sends the pay page's form as a browser without scripts does. */
export async function submit(url: string, fields: Record<string, string>): Promise<Page> {
  const answer = await fetch(url, { method: 'POST', body: new URLSearchParams(fields), redirect: 'manual' });
  return { status: answer.status, location: answer.headers.get('location'), html: await answer.text() };
}

export async function open(url: string): Promise<Page> {
  const answer = await fetch(url, { redirect: 'manual' });
  return { status: answer.status, location: answer.headers.get('location'), html: await answer.text() };
}

export async function control<T = Record<string, unknown>>(
  fakeUrl: string,
  name: string,
  body?: object,
): Promise<T> {
  const init = { method: 'POST', headers: { 'content-type': 'application/json' } };
  const answer = await fetch(
    `${fakeUrl}/_control/${name}`,
    body ? { ...init, body: JSON.stringify(body) } : {},
  );
  return (await answer.json()) as T;
}

/** What the SDK threw. */
export async function thrown(work: Promise<unknown>): Promise<Stripe.errors.StripeError> {
  try {
    await work;
  } catch (error) {
    return error as Stripe.errors.StripeError;
  }
  throw new Error('nothing was thrown');
}
