/** Payments: what we asked the card service for, what it told us, and what was received. */
import type { Migration } from '@/lib/platform/db';
import { appendOnly, createShopTable, definerFunction, sql } from './support/tables';

export const up: Migration = async ({ context }) => {
  // One row for each time a customer is sent to the card page. Return addresses hold only this id.
  await createShopTable(context, {
    name: 'payment_sessions',
    columns: `
      invoice_id uuid not null,
      account text not null default '',
      checkout_id text,
      url text,
      amount_minor bigint not null check (amount_minor > 0),
      currency char(3) not null,
      state text not null default 'open' check (state in ('open', 'paid', 'pending', 'expired', 'failed')),
      created_at timestamptz not null default now(),
      checked_at timestamptz,
      unique (shop_id, account, checkout_id),
      foreign key (shop_id, invoice_id) references documents (shop_id, id)`,
    grants: 'select, insert, update',
    indexes: ['(shop_id, invoice_id)'],
  });
  await createShopTable(context, {
    name: 'payments',
    columns: `
      invoice_id uuid not null,
      payment_session_id uuid,
      method text not null check (method in ('card', 'bank-debit', 'cheque', 'cash', 'transfer')),
      account text not null default '',
      external_id text,
      amount_minor bigint not null check (amount_minor <> 0),
      currency char(3) not null,
      received_on date not null,
      reference text not null default '',
      recorded_by uuid,
      at timestamptz not null default now(),
      unique (shop_id, account, external_id),
      foreign key (shop_id, invoice_id) references documents (shop_id, id),
      foreign key (shop_id, payment_session_id) references payment_sessions (shop_id, id)`,
    grants: 'select, insert',
    indexes: ['(shop_id, invoice_id)', '(shop_id, payment_session_id)'],
  });
  await appendOnly(context, 'payments');
  await createShopTable(context, {
    name: 'payment_events',
    columns: `
      account text not null default '',
      event_id text not null,
      type text not null,
      object_id text not null,
      received_at timestamptz not null default now(),
      unique (shop_id, account, event_id)`,
    grants: 'select, insert',
  });
  await appendOnly(context, 'payment_events');
  await sql(context, 'grant select on payment_sessions to definer;');
  await definerFunction(context, {
    name: 'shop_id_by_checkout',
    args: 'wanted_account text, wanted_checkout text',
    returns: 'uuid',
    body: 'select shop_id from payment_sessions where account = wanted_account and checkout_id = wanted_checkout',
    to: 'web, worker',
  });
  await definerFunction(context, {
    name: 'shop_id_by_payment_session',
    args: 'wanted uuid',
    returns: 'uuid',
    body: 'select shop_id from payment_sessions where id = wanted',
    to: 'web',
  });
};
