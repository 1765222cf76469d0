/** What a job's saving is figured with: one set of assumptions a job, each with its source. */
import type { Migration } from '@/lib/platform/db';
import { createShopTable } from './support/tables';

export const up: Migration = async ({ context }) => {
  await createShopTable(context, {
    name: 'saving_plans',
    columns: `
      job_id uuid not null,
      assumptions jsonb not null,
      version integer not null default 1,
      updated_at timestamptz not null default now(),
      unique (shop_id, job_id),
      foreign key (shop_id, job_id) references jobs (shop_id, id)`,
  });
};
