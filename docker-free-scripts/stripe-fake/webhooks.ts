/**
 * Sends events signed as the service signs them, until they are accepted: at least once, in no promised order.
 * Tests turn the knobs of WebhookMode to see that repeats and another order change nothing.
 */
import Stripe from 'stripe';
import type { FakeConfig } from './config';
import type { Store, StoredEvent } from './store';

export interface WebhookMode {
  /** How many times each event is sent. */
  repeat: number;
  /** The last event of an action goes first. */
  shuffle: boolean;
  delayMs: number;
  /** Nothing is sent until it is released. */
  hold: boolean;
}

export const PLAIN: WebhookMode = { repeat: 1, shuffle: false, delayMs: 0, hold: false };

const LONGEST_WAIT_MS = 60_000;
const MOST_ATTEMPTS = 30;
const ANSWER_MS = 15_000;

/** Any key will do: signing needs only the endpoint's secret. */
const signer = new Stripe('sk_test_signer');

export class Webhooks {
  mode: WebhookMode = PLAIN;
  private waiting: StoredEvent[] = [];
  private timers = new Set<NodeJS.Timeout>();
  private sending = new Set<Promise<void>>();
  private readonly closing = new AbortController();

  constructor(
    private readonly config: FakeConfig,
    private readonly store: Store,
  ) {}

  /** What was not accepted before a restart is sent again. */
  resume(): void {
    for (const stored of this.store.events)
      if (stored.nextAt !== null)
        this.later(() => this.send(stored), Math.max(0, stored.nextAt - Date.now()));
  }

  /** Events of one action are gathered, so that their order can be turned round. */
  queue(stored: StoredEvent): void {
    this.waiting.push(stored);
    if (!this.mode.hold && this.waiting.length === 1) this.later(() => this.flush(), this.mode.delayMs);
  }

  /** @returns how many events are sent now */
  release(): number {
    this.mode = { ...this.mode, hold: false };
    const count = this.waiting.length;
    this.flush();
    return count;
  }

  resend(stored: StoredEvent): Promise<void> {
    return this.track(this.deliver(stored));
  }

  async close(): Promise<void> {
    this.closing.abort();
    for (const timer of this.timers) clearTimeout(timer);
    await Promise.allSettled(this.sending);
  }

  private flush(): void {
    if (this.mode.hold) return;
    const batch = this.mode.shuffle ? this.waiting.reverse() : this.waiting;
    this.waiting = [];
    const all = Array.from({ length: Math.max(1, this.mode.repeat) }, () => batch).flat();
    void this.track(
      (async () => {
        for (const stored of all) await this.deliver(stored);
      })(),
    );
  }

  private send(stored: StoredEvent): void {
    void this.track(this.deliver(stored));
  }

  private async deliver(stored: StoredEvent): Promise<void> {
    const url = this.config.webhookUrl;
    if (this.closing.signal.aborted) return;
    if (!url) {
      stored.nextAt = null;
      return;
    }
    const status = await this.post(url, JSON.stringify(stored.event));
    // Cut off by our own end: the next start sends it.
    if (this.closing.signal.aborted) return;
    stored.attempts.push({ at: Date.now(), status });
    const accepted = status >= 200 && status < 300;
    const wait = Math.min(this.config.retryMs * 2 ** (stored.attempts.length - 1), LONGEST_WAIT_MS);
    const again = !accepted && stored.nextAt !== null && stored.attempts.length < MOST_ATTEMPTS;
    stored.nextAt = again ? Date.now() + wait : null;
    this.store.save();
    if (again) this.later(() => this.send(stored), wait);
  }

  /** @returns the HTTP status, 0 when nobody answered */
  private async post(url: string, payload: string): Promise<number> {
    const signature = signer.webhooks.generateTestHeaderString({
      payload,
      secret: this.config.webhookSecret,
    });
    try {
      const answer = await fetch(url, {
        method: 'POST',
        body: payload,
        headers: { 'content-type': 'application/json; charset=utf-8', 'stripe-signature': signature },
        redirect: 'manual',
        signal: AbortSignal.any([this.closing.signal, AbortSignal.timeout(ANSWER_MS)]),
      });
      await answer.arrayBuffer();
      return answer.status;
    } catch {
      return 0;
    }
  }

  private later(work: () => void, ms: number): void {
    if (this.closing.signal.aborted) return;
    const timer = setTimeout(() => {
      this.timers.delete(timer);
      work();
    }, ms);
    this.timers.add(timer);
  }

  private track(work: Promise<void>): Promise<void> {
    this.sending.add(work);
    return work.finally(() => this.sending.delete(work));
  }
}
