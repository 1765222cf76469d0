/** The API paths in use, each a function from parameters to an object. */
import { type Fake, NO_REQUEST, type Request } from './fake';
import { badAccount, badState, noSuch, unknownPath } from './errors';
import { createSession } from './create-session';
import { expanded } from './expand';
import { newAccount } from './objects';
import type { Params } from './params';
import { expire } from './payments';
import { createRefund } from './refunds';
import type { StoredSession } from './store';
import { nowSeconds } from './ids';

export interface Call {
  fake: Fake;
  account: string;
  id: string;
  params: Params;
  request: Request;
}

type Work = (call: Call) => object;

/** A session ends by itself when its time is over, whoever looks. */
export function expireDue(fake: Fake): void {
  const due = fake.store
    .allSessions()
    .filter(({ session }) => session.status === 'open' && session.expires_at <= nowSeconds());
  for (const stored of due) expire(fake, stored, NO_REQUEST);
  if (due.length > 0) fake.store.save();
}

function find<T>(collection: Record<string, T>, id: string, what: string): T {
  const found = Object.hasOwn(collection, id) ? collection[id] : undefined;
  if (found === undefined) throw noSuch(what, id);
  return found;
}

const sessionOf = ({ fake, account, id }: Call): StoredSession =>
  find(fake.store.account(account).sessions, id, 'checkout.session');

function expireByRequest(call: Call): object {
  const stored = sessionOf(call);
  if (stored.session.status !== 'open')
    throw badState(
      `Only Checkout Sessions with a status in ["open"] can be expired. This Checkout Session has a status of \`${stored.session.status}\`.`,
      'resource_unexpected_state',
    );
  expire(call.fake, stored, call.request);
  return stored.session;
}

function eventOf({ fake, account, id }: Call): object {
  const stored = fake.store.events.find((one) => one.account === account && one.event.id === id);
  if (!stored) throw noSuch('event', id);
  return { ...stored.event, pending_webhooks: stored.nextAt === null ? 0 : 1 };
}

function accountOf({ account, id }: Call): object {
  if (id && account && id !== account) throw badAccount(id);
  return newAccount(id || account || 'acct_standinplatform');
}

const ROUTES: readonly [method: string, path: RegExp, work: Work][] = [
  [
    'POST',
    /^\/v1\/checkout\/sessions$/,
    (call) => createSession(call.fake, call.account, call.params).session,
  ],
  ['GET', /^\/v1\/checkout\/sessions\/(\w+)$/, (call) => sessionOf(call).session],
  ['POST', /^\/v1\/checkout\/sessions\/(\w+)\/expire$/, expireByRequest],
  [
    'GET',
    /^\/v1\/payment_intents\/(\w+)$/,
    ({ fake, account, id }) => find(fake.store.account(account).intents, id, 'payment_intent'),
  ],
  [
    'POST',
    /^\/v1\/refunds$/,
    ({ fake, account, params, request }) => createRefund(fake, account, params, request),
  ],
  [
    'GET',
    /^\/v1\/refunds\/(\w+)$/,
    ({ fake, account, id }) => find(fake.store.account(account).refunds, id, 'refund'),
  ],
  ['GET', /^\/v1\/events\/(\w+)$/, eventOf],
  ['GET', /^\/v1\/account$/, accountOf],
  ['GET', /^\/v1\/accounts\/(acct_\w+)$/, accountOf],
];

/** @throws {ApiError} */
export function callApi(method: string, path: string, call: Omit<Call, 'id'>): object {
  for (const [verb, pattern, work] of ROUTES) {
    const match = verb === method && pattern.exec(path);
    if (!match) continue;
    expireDue(call.fake);
    const paths = call.params.texts('expand');
    const object = work({ ...call, id: match[1] ?? '' });
    call.params.end();
    return expanded(object, paths, call.fake.store.account(call.account));
  }
  throw unknownPath(method, path);
}
