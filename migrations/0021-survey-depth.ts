/** The survey in depth: details of areas and luminaires, light that was measured, utility accounts, types of one's own. */
import type { Migration } from '@/lib/platform/db';
import { createShopTable, sql } from './support/tables';

export const up: Migration = async ({ context }) => {
  await sql(context, `alter table areas add column details jsonb not null default '{}'`);
  await sql(context, `alter table existing_luminaires add column details jsonb not null default '{}'`);
  await createShopTable(context, {
    name: 'illuminance_readings',
    columns: `
      job_id uuid not null,
      area_id uuid not null,
      place text not null check (length(place) between 1 and 120),
      lux numeric(14,4) check (lux >= 0),
      taken text not null check (taken in ('before', 'after')),
      daylight text not null default 'unknown' check (daylight in ('none', 'some', 'unknown')),
      meter text not null default '',
      calibrated_on date,
      read_at timestamptz not null,
      notes text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, area_id) references areas (shop_id, id)`,
    indexes: ['(shop_id, job_id)', '(shop_id, area_id)'],
  });
  await createShopTable(context, {
    name: 'utility_accounts',
    columns: `
      job_id uuid not null,
      utility text not null check (length(utility) between 1 and 120),
      account_number text not null default '',
      rate_schedule text not null default '',
      energy_rate numeric(18,6) check (energy_rate >= 0),
      blended boolean not null default false,
      demand_rate numeric(18,6) check (demand_rate >= 0),
      bills jsonb not null default '[]',
      notes text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id)`,
    indexes: ['(shop_id, job_id)'],
  });
  // Kept from the job where a type was first met; every job of the shop is offered it.
  await createShopTable(context, {
    name: 'luminaire_types',
    columns: `
      job_id uuid not null,
      name text not null check (length(name) between 1 and 120),
      watts numeric(14,4) not null check (watts >= 0),
      watts_source text not null check (watts_source in ('nameplate', 'measured', 'datasheet', 'typical')),
      ballast text not null,
      version integer not null default 1,
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id)`,
    indexes: ['(shop_id, job_id)'],
  });
};
