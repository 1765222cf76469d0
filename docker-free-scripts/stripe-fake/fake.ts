/** What the parts of the stand-in share. */
import type { FakeConfig } from './config';
import { newEvent } from './objects';
import type { Store } from './store';
import type { Webhooks } from './webhooks';

export interface Request {
  id: string;
  idempotencyKey: string | null;
}

/** What happened on the pay page or by time was asked for by no API request. */
export const NO_REQUEST = { id: null, idempotencyKey: null };

export interface Outage {
  /** How many more requests; Infinity until it is switched off. */
  times: number;
  /** The work is done, but its answer is lost on the way. */
  afterWork: boolean;
}

export interface Fake {
  config: FakeConfig;
  store: Store;
  webhooks: Webhooks;
  /** The stand-in's own address, known once it listens. */
  url: string;
  outage: Outage | null;
}

/** Keeps an event and has it sent. */
export function emit(
  fake: Fake,
  account: string,
  type: string,
  object: object,
  request: Request | typeof NO_REQUEST = NO_REQUEST,
): void {
  const event = newEvent(type, object, account, { id: request.id, idempotency_key: request.idempotencyKey });
  const stored = { account, event, attempts: [], nextAt: Date.now() };
  fake.store.events.push(stored);
  fake.webhooks.queue(stored);
}
