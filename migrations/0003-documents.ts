/** Draft quotes, and what is published: frozen documents, what happens to them, links and acceptances. */
import type { Migration } from '@/lib/platform/db';
import { appendOnly, createShopTable, definerFunction, sql } from './support/tables';

export const up: Migration = async ({ context }) => {
  // A frozen document: canonical JSON as text, its SHA-256, and the hash of the PDF made then.
  await createShopTable(context, {
    name: 'documents',
    columns: `
      job_id uuid not null,
      kind text not null check (kind in ('quote', 'invoice', 'wiring-sheet')),
      number text not null,
      revision integer not null default 1,
      title text not null default '',
      canonical text not null,
      sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
      pdf_sha256 text,
      amount_minor bigint,
      currency char(3),
      due_on date,
      valid_until date,
      created_at timestamptz not null default now(),
      created_by uuid,
      unique (shop_id, kind, number, revision),
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, pdf_sha256) references files (shop_id, sha256)`,
    grants: 'select, insert',
    indexes: ['(shop_id, job_id, kind, revision desc)'],
  });
  await appendOnly(context, 'documents');
  await createShopTable(context, {
    name: 'document_events',
    columns: `
      document_id uuid not null,
      kind text not null,
      at timestamptz not null default now(),
      membership_id uuid,
      detail jsonb not null default '{}',
      foreign key (shop_id, document_id) references documents (shop_id, id)`,
    grants: 'select, insert',
    indexes: ['(shop_id, document_id, at)', '(shop_id, kind, at)'],
  });
  await appendOnly(context, 'document_events');
  await createShopTable(context, {
    name: 'quote_drafts',
    columns: `
      job_id uuid not null,
      deposit_pct numeric(9,6) not null default 30 check (deposit_pct between 0 and 100),
      discount_pct numeric(9,6) not null default 0 check (discount_pct between 0 and 100),
      overhead_pct numeric(9,6) not null default 0 check (overhead_pct between 0 and 1000),
      contingency_pct numeric(9,6) not null default 0 check (contingency_pct between 0 and 1000),
      tax_name text not null default 'Sales tax',
      tax_rate_pct numeric(9,6) not null default 0 check (tax_rate_pct between 0 and 100),
      valid_days integer not null default 30 check (valid_days between 1 and 365),
      scope_note text not null default '',
      exclusions text not null default '',
      prices_at timestamptz not null default now(),
      version integer not null default 1,
      unique (shop_id, job_id),
      foreign key (shop_id, job_id) references jobs (shop_id, id)`,
  });
  await createShopTable(context, {
    name: 'quote_lines',
    columns: `
      draft_id uuid not null,
      position integer not null default 0,
      source text not null check (source in ('change-line', 'circuit', 'typed')),
      source_id uuid,
      source_sha256 text,
      area_name text not null default '',
      description text not null check (length(description) between 1 and 500),
      quantity numeric(14,4) not null check (quantity >= 0),
      unit_cost numeric(18,6) not null check (unit_cost >= 0),
      unit_labour_hours numeric(14,4) not null default 0 check (unit_labour_hours >= 0),
      labour_rate numeric(18,6) not null default 0 check (labour_rate >= 0),
      markup_pct numeric(9,6) not null default 0,
      taxable boolean not null default true,
      optional boolean not null default false,
      chosen boolean not null default true,
      version integer not null default 1,
      foreign key (shop_id, draft_id) references quote_drafts (shop_id, id)`,
    indexes: ['(shop_id, draft_id, position)'],
  });
  await createShopTable(context, {
    name: 'customer_links',
    columns: `
      job_id uuid not null,
      contact_email text not null,
      token_version integer not null default 1,
      token_sha256 text not null unique,
      created_at timestamptz not null default now(),
      revoked_at timestamptz,
      expires_at timestamptz,
      unique (shop_id, job_id, contact_email),
      foreign key (shop_id, job_id) references jobs (shop_id, id)`,
    // web has no direct SELECT on keys: the token's hash is reached only by the definer function below.
    grants: 'insert',
    indexes: ['(shop_id, job_id)'],
  });
  await sql(
    context,
    `
    grant select (shop_id, id, job_id, contact_email, token_version, created_at, revoked_at, expires_at),
          update (revoked_at, expires_at, token_version, token_sha256) on customer_links to web, worker;
    grant select on customer_links to definer;
    `,
  );
  await definerFunction(context, {
    name: 'shop_id_by_link',
    args: 'wanted text',
    returns: 'uuid',
    body: `select shop_id from customer_links where token_sha256 = wanted and revoked_at is null
             and (expires_at is null or expires_at > now())`,
    to: 'web',
  });
  await definerFunction(context, {
    name: 'link_id_by_token',
    args: 'wanted text',
    returns: 'uuid',
    body: `select id from customer_links where token_sha256 = wanted and revoked_at is null
             and (expires_at is null or expires_at > now())`,
    to: 'web',
  });
  // One acceptance a revision: whoever loses the race gets a clear conflict.
  await createShopTable(context, {
    name: 'acceptances',
    columns: `
      document_id uuid not null,
      method text not null check (method in ('typed', 'office')),
      name text not null check (length(name) between 1 and 200),
      choices jsonb not null default '[]',
      total_minor bigint not null,
      currency char(3) not null,
      shown_text text not null,
      canonical text not null,
      sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
      address text not null default '',
      user_agent text not null default '',
      at timestamptz not null default now(),
      recorded_by uuid,
      unique (shop_id, document_id),
      foreign key (shop_id, document_id) references documents (shop_id, id)`,
    grants: 'select, insert',
  });
  await appendOnly(context, 'acceptances');
};
