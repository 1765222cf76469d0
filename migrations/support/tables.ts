/**
 * What every shop table gets, in the migration that makes it: the composite key, forced row-level security and
 * its grants. Landed migrations depend on what these functions print: add new functions, never change these.
 */
import type { QueryInterface } from 'sequelize';

/** `select current shop` as policies compare it: a pooled connection reports '' after use, hence nullif. */
const CURRENT_SHOP = `nullif(current_setting('app.shop_id', true), '')::uuid`;
const CURRENT_PERSON = `nullif(current_setting('app.person_id', true), '')::uuid`;

export async function sql(context: QueryInterface, statements: string): Promise<void> {
  await context.sequelize.query(statements, { raw: true });
}

export interface ShopTable {
  name: string;
  /** Columns and constraints beyond `shop_id` and `id`. */
  columns: string;
  /** What web and worker may do; append-only tables leave out update and delete. */
  grants?: string;
  indexes?: string[];
}

/** CREATE TABLE with `PRIMARY KEY (shop_id, id)`, policy and grants. */
export async function createShopTable(context: QueryInterface, table: ShopTable): Promise<void> {
  const { name, columns, grants = 'select, insert, update, delete', indexes = [] } = table;
  await sql(
    context,
    `
    create table ${name} (
      shop_id uuid not null references shops (id),
      id uuid not null default gen_random_uuid(),
      ${columns.trim().replace(/,\s*$/, '')},
      primary key (shop_id, id)
    );
    ${indexes.map((index) => `create index on ${name} ${index};`).join('\n')}
    alter table ${name} enable row level security;
    alter table ${name} force row level security;
    create policy ${name}_of_shop on ${name} using (shop_id = ${CURRENT_SHOP}) with check (shop_id = ${CURRENT_SHOP});
    revoke all on ${name} from public;
    grant ${grants} on ${name} to web, worker;
    `,
  );
}

/** A table whose rows belong to one person and are seen only inside `withPerson`. */
export async function protectPersonTable(
  context: QueryInterface,
  name: string,
  column: string,
  grants: string,
) {
  await sql(
    context,
    `
    alter table ${name} enable row level security;
    alter table ${name} force row level security;
    create policy ${name}_of_person on ${name} using (${column} = ${CURRENT_PERSON}) with check (${column} = ${CURRENT_PERSON});
    revoke all on ${name} from public;
    grant ${grants} on ${name} to web;
    `,
  );
}

/** UPDATE, DELETE and TRUNCATE are refused by trigger as well as by grant: what is published stays. */
export async function appendOnly(context: QueryInterface, name: string): Promise<void> {
  await sql(
    context,
    `
    revoke update, delete, truncate on ${name} from web, worker;
    create trigger ${name}_rows_stay before update or delete on ${name} for each row execute function refuse_change();
    create trigger ${name}_table_stays before truncate on ${name} for each statement execute function refuse_change();
    `,
  );
}

/**
 * A function that runs as `definer` (who may create in the schema only while it becomes the owner): fixed search_path, EXECUTE taken from PUBLIC and given to those named.
 * `signature` is `name(arguments)`.
 */
export async function definerFunction(
  context: QueryInterface,
  options: { name: string; args: string; returns: string; body: string; to: string; volatility?: string },
): Promise<void> {
  const { name, args, returns, body, to, volatility = 'stable' } = options;
  const types = args
    .split(',')
    .map((arg) => arg.trim().split(/\s+/).slice(1).join(' '))
    .filter(Boolean)
    .join(', ');
  await sql(
    context,
    `
    grant create on schema public to definer;
    create function ${name}(${args}) returns ${returns} language sql ${volatility} security definer
      set search_path = pg_catalog, public, pg_temp as $definer$ ${body} $definer$;
    alter function ${name}(${types}) owner to definer;
    revoke all on function ${name}(${types}) from public;
    grant execute on function ${name}(${types}) to ${to};
    revoke create on schema public from definer;
    `,
  );
}
