/** Jobs, their survey, change lines and circuits, parts and prices, and the events that phones send. */
import type { Migration } from '@/lib/platform/db';
import { appendOnly, createShopTable } from './support/tables';

export const up: Migration = async ({ context }) => {
  await createShopTable(context, {
    name: 'sites',
    columns: `
      customer_id uuid not null,
      name text not null check (length(name) between 1 and 200),
      address text not null default '',
      building_year integer check (building_year between 1700 and 2200),
      version integer not null default 1,
      archived_at timestamptz,
      created_at timestamptz not null default now(),
      foreign key (shop_id, customer_id) references customers (shop_id, id)`,
    indexes: ['(shop_id, customer_id)'],
  });
  await createShopTable(context, {
    name: 'jobs',
    columns: `
      number bigint not null,
      customer_id uuid not null,
      site_id uuid not null,
      title text not null check (length(title) between 1 and 200),
      stage text not null default 'survey' check (stage in ('survey', 'quote', 'install', 'closeout', 'closed')),
      survey_done_at timestamptz,
      parked_until date,
      parked_reason text not null default '',
      not_going_ahead_at timestamptz,
      not_going_ahead_reason text not null default '',
      deposit_rule text not null default 'percent' check (deposit_rule in ('percent', 'none', 'terms')),
      version integer not null default 1,
      archived_at timestamptz,
      created_at timestamptz not null default now(),
      unique (shop_id, number),
      foreign key (shop_id, customer_id) references customers (shop_id, id),
      foreign key (shop_id, site_id) references sites (shop_id, id)`,
    indexes: ['(shop_id, stage, number desc)', '(shop_id, customer_id)', '(shop_id, site_id)'],
  });
  await createShopTable(context, {
    name: 'areas',
    columns: `
      job_id uuid not null,
      position integer not null default 0,
      name text not null check (length(name) between 1 and 120),
      use text not null default '',
      length_metres numeric(14,4) check (length_metres > 0),
      width_metres numeric(14,4) check (width_metres > 0),
      height_metres numeric(14,4) check (height_metres > 0),
      weekly_hours numeric(14,4) check (weekly_hours between 0 and 168),
      ambient_celsius numeric(14,4),
      environment text not null default 'dry' check (environment in ('dry', 'damp', 'wet')),
      hazards jsonb not null default '{}',
      notes text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id)`,
    indexes: ['(shop_id, job_id)'],
  });
  await createShopTable(context, {
    name: 'existing_luminaires',
    columns: `
      job_id uuid not null,
      area_id uuid not null,
      luminaire_type text not null check (length(luminaire_type) between 1 and 120),
      quantity numeric(14,4) not null check (quantity >= 0),
      count_confidence text not null default 'counted' check (count_confidence in ('counted', 'estimated')),
      watts numeric(14,4) not null check (watts >= 0),
      watts_source text not null default 'typical' check (watts_source in ('nameplate', 'measured', 'datasheet', 'typical')),
      supply_volts numeric(14,4) check (supply_volts > 0),
      electrical jsonb not null default '{}',
      notes text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, area_id) references areas (shop_id, id)`,
    indexes: ['(shop_id, job_id)', '(shop_id, area_id)'],
  });
  await createShopTable(context, {
    name: 'coves',
    columns: `
      job_id uuid not null,
      area_id uuid not null,
      name text not null check (length(name) between 1 and 120),
      tape_metres numeric(14,4) not null check (tape_metres > 0),
      driver_metres numeric(14,4) not null check (driver_metres >= 0),
      notes text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, area_id) references areas (shop_id, id)`,
    indexes: ['(shop_id, job_id)', '(shop_id, area_id)'],
  });
  await createShopTable(context, {
    name: 'parts',
    columns: `
      sku text not null check (length(sku) between 1 and 80),
      kind text not null check (kind in ('luminaire', 'lamp', 'kit', 'tape', 'driver', 'cable', 'resistor', 'led', 'channel', 'connector', 'label', 'other')),
      name text not null check (length(name) between 1 and 200),
      datasheet jsonb not null default '{}',
      listed boolean not null default true,
      unit text not null default 'each' check (unit in ('each', 'metre')),
      pack_size numeric(14,4) not null default 1 check (pack_size > 0),
      labour_hours numeric(14,4) not null default 0 check (labour_hours >= 0),
      version integer not null default 1,
      archived_at timestamptz,
      created_at timestamptz not null default now(),
      unique (shop_id, sku)`,
    indexes: ['(shop_id, kind)'],
  });
  await createShopTable(context, {
    name: 'part_prices',
    columns: `
      part_id uuid not null,
      unit_cost numeric(18,6) not null check (unit_cost >= 0),
      currency char(3) not null,
      valid_from timestamptz not null default now(),
      foreign key (shop_id, part_id) references parts (shop_id, id)`,
    grants: 'select, insert',
    indexes: ['(shop_id, part_id, valid_from desc)'],
  });
  await createShopTable(context, {
    name: 'circuits',
    columns: `
      job_id uuid not null,
      area_id uuid not null,
      cove_id uuid,
      kind text not null check (kind in ('branch-circuit', 'tape-run', 'resistor-array')),
      name text not null check (length(name) between 1 and 120),
      electrical jsonb not null,
      choices jsonb not null default '{}',
      engine_input jsonb,
      answer jsonb,
      answered_at timestamptz,
      open_stops integer not null default 0 check (open_stops >= 0),
      version integer not null default 1,
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, area_id) references areas (shop_id, id),
      foreign key (shop_id, cove_id) references coves (shop_id, id)`,
    indexes: ['(shop_id, job_id)', '(shop_id, area_id)', '(shop_id, cove_id)'],
  });
  await createShopTable(context, {
    name: 'change_lines',
    columns: `
      job_id uuid not null,
      area_id uuid not null,
      existing_luminaire_id uuid,
      circuit_id uuid,
      position integer not null default 0,
      action text not null check (action in ('leave', 'relamp', 'bypass', 'external-driver', 'listed-kit', 'new-luminaire', 'add', 'remove', 'relocate')),
      old_quantity numeric(14,4) not null default 0 check (old_quantity >= 0),
      new_part_id uuid,
      new_type text not null default '',
      new_quantity numeric(14,4) not null default 0 check (new_quantity >= 0),
      new_watts numeric(14,4) check (new_watts >= 0),
      electrical jsonb not null default '{}',
      engine_input jsonb,
      answer jsonb,
      answered_at timestamptz,
      open_stops integer not null default 0 check (open_stops >= 0),
      notes text not null default '',
      version integer not null default 1,
      archived_at timestamptz,
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, area_id) references areas (shop_id, id),
      foreign key (shop_id, existing_luminaire_id) references existing_luminaires (shop_id, id),
      foreign key (shop_id, circuit_id) references circuits (shop_id, id),
      foreign key (shop_id, new_part_id) references parts (shop_id, id)`,
    indexes: ['(shop_id, job_id)', '(shop_id, area_id)', '(shop_id, circuit_id)', '(shop_id, new_part_id)'],
  });
  await createShopTable(context, {
    name: 'finding_overrides',
    columns: `
      job_id uuid not null,
      subject_type text not null check (subject_type in ('change-line', 'circuit')),
      subject_id uuid not null,
      code text not null,
      reason text not null check (length(reason) between 3 and 2000),
      membership_id uuid not null,
      person_name text not null,
      licence_number text not null check (length(licence_number) > 0),
      at timestamptz not null default now(),
      unique (shop_id, subject_type, subject_id, code),
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, membership_id) references memberships (shop_id, id)`,
    grants: 'select, insert, delete',
  });
  // What phones sent: the same id with the same body answers the same again, another body is a conflict.
  await createShopTable(context, {
    name: 'client_events',
    columns: `
      job_id uuid not null,
      membership_id uuid not null,
      protocol integer not null,
      kind text not null,
      entity_id uuid not null,
      body_sha256 text not null,
      answer jsonb not null,
      at timestamptz not null,
      received_at timestamptz not null default now(),
      foreign key (shop_id, job_id) references jobs (shop_id, id),
      foreign key (shop_id, membership_id) references memberships (shop_id, id)`,
    grants: 'select, insert',
    indexes: ['(shop_id, job_id, received_at)'],
  });
  await appendOnly(context, 'client_events');
};
