/** Visits, what the crew did on a released wiring sheet, photos, and the close of a job. */
import type { Migration } from '@/lib/platform/db';
import { appendOnly, createShopTable } from './support/tables';

export const up: Migration = async ({ context }) => {
  await createShopTable(context, {
    name: 'visits',
    columns: `
      job_id uuid not null,
      starts_at timestamp not null,
      ends_at timestamp not null,
      time_zone text not null,
      notes text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      check (ends_at > starts_at),
      foreign key (shop_id, job_id) references jobs (shop_id, id)`,
    indexes: ['(shop_id, starts_at)', '(shop_id, job_id)'],
  });
  await createShopTable(context, {
    name: 'visit_crew',
    columns: `
      visit_id uuid not null,
      membership_id uuid not null,
      unique (shop_id, visit_id, membership_id),
      foreign key (shop_id, visit_id) references visits (shop_id, id) on delete cascade,
      foreign key (shop_id, membership_id) references memberships (shop_id, id)`,
    indexes: ['(shop_id, membership_id)'],
  });
  // What happened on a sheet, with client-made ids. Never changed: a correction is another event.
  await createShopTable(context, {
    name: 'sheet_events',
    columns: `
      sheet_id uuid not null,
      membership_id uuid not null,
      person_name text not null,
      protocol integer not null,
      kind text not null check (kind in ('acknowledge', 'dead-proved', 'tick', 'untick', 'reading', 'note', 'photo', 'different', 'sign-off')),
      target text not null default '',
      body jsonb not null default '{}',
      body_sha256 text not null,
      answer jsonb not null default '{}',
      at timestamptz not null,
      received_at timestamptz not null default now(),
      foreign key (shop_id, sheet_id) references documents (shop_id, id),
      foreign key (shop_id, membership_id) references memberships (shop_id, id)`,
    grants: 'select, insert',
    indexes: ['(shop_id, sheet_id, at)'],
  });
  await appendOnly(context, 'sheet_events');
  await createShopTable(context, {
    name: 'photos',
    columns: `
      job_id uuid not null,
      subject_type text not null check (subject_type in ('area', 'existing-luminaire', 'circuit', 'sheet', 'job')),
      subject_id uuid not null,
      file_sha256 text not null,
      caption text not null default '',
      captured_at timestamptz,
      membership_id uuid,
      created_at timestamptz not null default now(),
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, file_sha256) references files (shop_id, sha256)`,
    indexes: ['(shop_id, job_id)', '(shop_id, subject_type, subject_id)'],
  });
  await createShopTable(context, {
    name: 'job_closings',
    columns: `
      job_id uuid not null,
      membership_id uuid not null,
      note text not null default '',
      at timestamptz not null default now(),
      unique (shop_id, job_id),
      foreign key (shop_id, job_id) references jobs (shop_id, id)`,
    grants: 'select, insert',
  });
  await appendOnly(context, 'job_closings');
};
