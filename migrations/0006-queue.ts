/** The worker's queue: pg-boss's own schema, made here so that neither web nor worker may change its shape. */
import PgBoss from 'pg-boss';
import type { Migration } from '@/lib/platform/db';
import { sql } from './support/tables';

export const up: Migration = async ({ context }) => {
  // pg-boss prints its own transaction; this migration's statements stand alone.
  await sql(context, PgBoss.getConstructionPlans('pgboss'));
  await sql(
    context,
    `
    select pgboss.create_queue('outbox', '{"policy":"standard","retryLimit":12,"retryDelay":5,"retryBackoff":true,"expireInSeconds":120}');
    revoke all on schema pgboss from public;
    grant usage on schema pgboss to worker;
    grant select, insert, update, delete on all tables in schema pgboss to worker;
    grant execute on all functions in schema pgboss to worker;
    `,
  );
};
