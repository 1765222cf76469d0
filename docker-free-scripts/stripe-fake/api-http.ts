/** The API's outer shell: key, account, idempotency, outage, headers. */
import { createHash } from 'node:crypto';
import type { IncomingHttpHeaders } from 'node:http';
import Stripe from 'stripe';
import { callApi } from './api';
import { ApiError, badAccount, badKey, keyReused, outage } from './errors';
import type { Fake } from './fake';
import { parseForm } from './form';
import { newId } from './ids';
import { Params } from './params';

export interface HttpRequest {
  method: string;
  path: string;
  query: string;
  headers: IncomingHttpHeaders;
  body: string;
}

export interface HttpAnswer {
  status: number;
  headers: Record<string, string>;
  body: string;
  /** The connection is cut instead of answering. */
  lost?: boolean;
}

const header = (request: HttpRequest, name: string): string => {
  const value = request.headers[name];
  return (Array.isArray(value) ? value[0] : value) ?? '';
};

function checkKey(fake: Fake, request: HttpRequest): void {
  const key = /^Bearer (\S+)$/.exec(header(request, 'authorization'))?.[1];
  if (!key) throw badKey('You did not provide an API key.');
  const accepted = fake.config.secretKey ? key === fake.config.secretKey : /^(sk|rk)_test_\w+$/.test(key);
  if (!accepted) throw badKey(`Invalid API Key provided: ${key.slice(0, 8)}***${key.slice(-4)}`);
}

/** SDKs name the shop's account in one of two headers. '' is the platform's own. */
function accountOf(request: HttpRequest): string {
  const account = header(request, 'stripe-account') || header(request, 'stripe-context');
  if (account !== '' && !/^acct_\w{4,}$/.test(account)) throw badAccount(account);
  return account;
}

/** An outage with a count ends by itself. */
function outageNow(fake: Fake): Fake['outage'] {
  const now = fake.outage;
  if (now && --now.times <= 0) fake.outage = null;
  return now;
}

interface Result {
  status: number;
  body: unknown;
  replayed?: boolean;
}

const fingerprintOf = (request: HttpRequest) =>
  createHash('sha256').update(`${request.method} ${request.path}\n${request.body}`).digest('hex');

function work(fake: Fake, request: HttpRequest, id: string, account: string): Result {
  const form = parseForm(request.method === 'GET' ? request.query : request.body);
  const idempotencyKey = header(request, 'idempotency-key') || null;
  const call = { fake, account, params: new Params(form), request: { id, idempotencyKey } };
  return { status: 200, body: structuredClone(callApi(request.method, request.path, call)) };
}

/** The same key with the same body gets the first answer again: https://docs.stripe.com/api/idempotent_requests */
function once(fake: Fake, request: HttpRequest, id: string, account: string): Result {
  const key = header(request, 'idempotency-key');
  if (request.method !== 'POST' || key === '') return work(fake, request, id, account);
  const { answers } = fake.store.account(account);
  const fingerprint = fingerprintOf(request);
  const known = Object.hasOwn(answers, key) ? answers[key] : undefined;
  if (known && known.fingerprint !== fingerprint) throw keyReused(key);
  if (known) return { status: known.status, body: known.body, replayed: true };
  // A refusal is not kept: nothing was done, and the caller may mend the request.
  const result = work(fake, request, id, account);
  answers[key] = { fingerprint, status: result.status, body: result.body, at: Date.now() };
  return result;
}

function attempt(fake: Fake, request: HttpRequest, id: string): Result & { lost?: boolean } {
  try {
    const trouble = outageNow(fake);
    if (trouble && !trouble.afterWork) throw outage();
    checkKey(fake, request);
    const result = once(fake, request, id, accountOf(request));
    fake.store.save();
    return trouble ? { ...result, lost: true } : result;
  } catch (error) {
    if (error instanceof ApiError) return { status: error.status, body: { error: error.body } };
    throw error;
  }
}

export function answerApi(fake: Fake, request: HttpRequest): HttpAnswer {
  const id = newId('req', 14);
  const { status, body, replayed, lost } = attempt(fake, request, id);
  const key = header(request, 'idempotency-key');
  return {
    status,
    body: JSON.stringify(body, null, 2),
    headers: {
      'content-type': 'application/json',
      'request-id': id,
      'stripe-version': header(request, 'stripe-version') || Stripe.API_VERSION,
      ...(key ? { 'idempotency-key': key } : {}),
      ...(replayed ? { 'idempotent-replayed': 'true' } : {}),
    },
    ...(lost ? { lost } : {}),
  };
}
