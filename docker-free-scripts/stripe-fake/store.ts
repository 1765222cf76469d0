/** What the stand-in knows, kept in one JSON file so that it outlives a restart. No card number is ever in it. */
import { mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type Stripe from 'stripe';

/** How somebody pays: what may be kept of it. */
export interface Method {
  type: 'card' | 'us_bank_account';
  last4: string;
  name: string;
}

export interface StoredSession {
  session: Stripe.Checkout.Session;
  items: Stripe.LineItem[];
  intent: { description: string | null; metadata: Record<string, string>; receiptEmail: string | null };
  /** A card that waits for its authentication step. */
  pending: Method | null;
  /** '' for the platform's own. */
  account: string;
}

export interface StoredAnswer {
  fingerprint: string;
  status: number;
  body: unknown;
  at: number;
}

export interface AccountState {
  sessions: Record<string, StoredSession>;
  intents: Record<string, Stripe.PaymentIntent>;
  charges: Record<string, Stripe.Charge>;
  refunds: Record<string, Stripe.Refund>;
  answers: Record<string, StoredAnswer>;
}

export interface StoredEvent {
  account: string;
  event: Stripe.Event;
  attempts: { at: number; status: number }[];
  /** When it is to be sent next (ms); null once it was accepted or given up. */
  nextAt: number | null;
}

interface State {
  version: 1;
  accounts: Record<string, AccountState>;
  events: StoredEvent[];
}

const DAY_MS = 86_400_000;

function load(file: string | null): State {
  try {
    if (file) return JSON.parse(readFileSync(file, 'utf8')) as State;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ENOENT')
      throw new Error(`${file} can not be read; remove it to start the card stand-in afresh.`, {
        cause: error,
      });
  }
  return { version: 1, accounts: {}, events: [] };
}

export class Store {
  private readonly file: string | null;
  private readonly state: State;

  constructor(folder: string | undefined) {
    if (folder) mkdirSync(folder, { recursive: true, mode: 0o700 });
    this.file = folder ? join(folder, 'state.json') : null;
    this.state = load(this.file);
  }

  account(id: string): AccountState {
    return (this.state.accounts[id] ??= { sessions: {}, intents: {}, charges: {}, refunds: {}, answers: {} });
  }

  get events(): StoredEvent[] {
    return this.state.events;
  }

  /** The pay page's address holds no account: session ids are unique over all of them. */
  findSession(id: string): StoredSession | undefined {
    for (const account of Object.values(this.state.accounts))
      if (Object.hasOwn(account.sessions, id)) return account.sessions[id];
    return undefined;
  }

  allSessions(): StoredSession[] {
    return Object.values(this.state.accounts).flatMap((account) => Object.values(account.sessions));
  }

  /** Called before an answer leaves: whoever was told something finds it again after a kill. */
  save(): void {
    if (!this.file) return;
    for (const account of Object.values(this.state.accounts))
      for (const [key, answer] of Object.entries(account.answers))
        if (Date.now() - answer.at > DAY_MS) delete account.answers[key];
    writeFileSync(`${this.file}.new`, JSON.stringify(this.state), { mode: 0o600 });
    renameSync(`${this.file}.new`, this.file);
  }
}
