/**
 * Ground: shops and the people in them, sessions, customers, audit, idempotency, outbox, counters, files.
 * The roles (migrator, web, worker, definer) are made by the database script: they are of the server.
 */
import type { Migration } from '@/lib/platform/db';
import { appendOnly, createShopTable, definerFunction, protectPersonTable, sql } from './support/tables';

export const up: Migration = async ({ context }) => {
  await sql(
    context,
    `
    revoke create on schema public from public;
    grant usage on schema public to web, worker, definer;

    create function refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception '% is append-only: % refused', tg_table_name, tg_op using errcode = 'insufficient_privilege';
    end $$;

    create table shops (
      id uuid primary key default gen_random_uuid(),
      name text not null check (length(name) between 1 and 120),
      licence_number text not null default '',
      email text not null default '',
      phone text not null default '',
      address text not null default '',
      basis text not null default 'us' check (basis in ('us', 'iec')),
      basis_edition text not null default 'NEC 2023',
      units text not null default 'us' check (units in ('us', 'metric')),
      currency char(3) not null default 'USD',
      locale text not null default 'en-US',
      time_zone text not null default 'America/New_York',
      paper text not null default 'letter' check (paper in ('letter', 'a4')),
      tax_rounding text not null default 'document' check (tax_rounding in ('line', 'document')),
      tax_name text not null default 'Sales tax',
      tax_rate_pct numeric(9,6) not null default 0,
      deposit_pct numeric(9,6) not null default 30,
      markup_pct numeric(9,6) not null default 35,
      labour_rate numeric(18,6) not null default 85,
      quote_valid_days integer not null default 30 check (quote_valid_days between 1 and 365),
      card_ceiling_minor bigint not null default 1000000,
      bench_work boolean not null default false,
      stripe_account text,
      version integer not null default 1,
      created_at timestamptz not null default now()
    );
    alter table shops enable row level security;
    alter table shops force row level security;
    create policy shops_of_shop on shops using (id = nullif(current_setting('app.shop_id', true), '')::uuid)
      with check (id = nullif(current_setting('app.shop_id', true), '')::uuid);
    revoke all on shops from public;
    grant select, update on shops to web, worker;

    create table people (
      id uuid primary key default gen_random_uuid(),
      email text not null check (email = lower(email)),
      created_at timestamptz not null default now(),
      unique (email)
    );
    revoke all on people from public;

    create table credentials (
      person_id uuid primary key references people (id),
      password_hash text not null,
      changed_at timestamptz not null default now()
    );

    create table sessions (
      id uuid primary key default gen_random_uuid(),
      person_id uuid not null references people (id),
      created_at timestamptz not null default now(),
      expires_at timestamptz not null,
      ended_at timestamptz,
      user_agent text not null default ''
    );
    create index on sessions (person_id);

    create table password_resets (
      id uuid primary key default gen_random_uuid(),
      person_id uuid not null references people (id),
      token_sha256 text not null unique,
      created_at timestamptz not null default now(),
      expires_at timestamptz not null,
      used_at timestamptz
    );

    -- Attempts at signing in, by e-mail and by address: rate-limiter-flexible's shape.
    create table rate_limits (
      key varchar(255) primary key,
      points integer not null default 0,
      expire bigint
    );
    revoke all on rate_limits from public;
    grant select, insert, update, delete on rate_limits to web, worker;
    `,
  );
  await protectPersonTable(context, 'credentials', 'person_id', 'select, insert, update');
  await protectPersonTable(context, 'sessions', 'person_id', 'select, insert, update');
  await protectPersonTable(context, 'password_resets', 'person_id', 'select, insert, update');

  await createShopTable(context, {
    name: 'memberships',
    columns: `
      person_id uuid not null references people (id),
      name text not null check (length(name) between 1 and 120),
      email text not null,
      roles text[] not null check (roles <@ array['owner','estimator','office','crew'] and cardinality(roles) > 0),
      licence_number text not null default '',
      mains_qualified boolean not null default false,
      phone text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      created_at timestamptz not null default now(),
      unique (shop_id, person_id)`,
    indexes: ['(person_id)'],
  });
  await createShopTable(context, {
    name: 'customers',
    columns: `
      name text not null check (length(name) between 1 and 200),
      contact_name text not null default '',
      email text not null default '',
      phone text not null default '',
      address text not null default '',
      consumer boolean not null default false,
      notes text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      created_at timestamptz not null default now()`,
    indexes: ['(shop_id, lower(name))'],
  });
  await createShopTable(context, {
    name: 'audit_events',
    columns: `
      at timestamptz not null default now(),
      membership_id uuid,
      actor text not null,
      action text not null,
      subject_type text not null,
      subject_id uuid,
      change jsonb not null default '{}'`,
    grants: 'select, insert',
    indexes: ['(shop_id, at desc)', '(shop_id, subject_type, subject_id)'],
  });
  await appendOnly(context, 'audit_events');
  await createShopTable(context, {
    name: 'idempotency_keys',
    columns: `
      scope text not null,
      key text not null check (length(key) between 8 and 200),
      request_sha256 text not null,
      response jsonb,
      created_at timestamptz not null default now(),
      unique (shop_id, scope, key)`,
  });
  await createShopTable(context, {
    name: 'outbox',
    columns: `
      kind text not null,
      payload jsonb not null default '{}',
      created_at timestamptz not null default now(),
      run_after timestamptz not null default now(),
      relayed_at timestamptz,
      done_at timestamptz,
      failed_at timestamptz,
      failure text`,
    indexes: ['(run_after) where relayed_at is null', '(shop_id, created_at)'],
  });
  await createShopTable(context, {
    name: 'counters',
    columns: `name text not null, value bigint not null default 0, unique (shop_id, name)`,
    grants: 'select, insert, update',
  });
  await createShopTable(context, {
    name: 'files',
    columns: `
      sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
      content_type text not null,
      bytes bigint not null check (bytes > 0),
      name text not null default '',
      captured_at timestamptz,
      created_at timestamptz not null default now(),
      unique (shop_id, sha256)`,
    grants: 'select, insert',
  });

  await sql(
    context,
    `
    grant select on people, sessions, memberships, shops, password_resets, outbox to definer;
    grant insert on people to definer;
    `,
  );
  await definerFunction(context, {
    name: 'person_id_by_email',
    args: 'wanted text',
    returns: 'uuid',
    body: 'select id from people where email = lower(wanted)',
    to: 'web',
  });
  await definerFunction(context, {
    name: 'person_id_by_session',
    args: 'wanted uuid',
    returns: 'uuid',
    body: 'select person_id from sessions where id = wanted and ended_at is null and expires_at > now()',
    to: 'web',
  });
  await definerFunction(context, {
    name: 'person_id_by_reset',
    args: 'wanted text',
    returns: 'uuid',
    body: 'select person_id from password_resets where token_sha256 = wanted and used_at is null and expires_at > now()',
    to: 'web',
  });
  await definerFunction(context, {
    name: 'shop_ids_by_person',
    args: 'wanted uuid',
    returns: 'setof uuid',
    body: 'select shop_id from memberships where person_id = wanted and archived_at is null',
    to: 'web, worker',
  });
  await definerFunction(context, {
    name: 'shop_ids_with_outbox',
    args: 'most integer',
    returns: 'setof uuid',
    body: 'select distinct shop_id from outbox where relayed_at is null and run_after <= now() limit most',
    to: 'worker',
  });
  await definerFunction(context, {
    name: 'person_id_for_new_email',
    args: 'wanted text',
    returns: 'uuid',
    volatility: 'volatile',
    body: `insert into people (email) values (lower(wanted)) on conflict (email) do update set email = excluded.email returning id`,
    to: 'web',
  });
  await sql(context, 'grant update on people to definer;');
};
