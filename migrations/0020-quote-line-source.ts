/** A sourced line keeps its source's own words, so that an edited description is told from an outdated one. */
import type { Migration } from '@/lib/platform/db';
import { sql } from './support/tables';

export const up: Migration = async ({ context }) => {
  await sql(context, `alter table quote_lines add column source_description text not null default '';`);
};
