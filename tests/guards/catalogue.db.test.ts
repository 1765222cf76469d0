/** Walks PostgreSQL's catalogue: a shop table without its policy, a key that could reach into another shop, a grant too many. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import pg from 'pg';

let client: pg.Client;
beforeAll(async () => {
  client = new pg.Client({ connectionString: process.env.DATABASE_URL_MIGRATOR });
  await client.connect();
});
afterAll(() => client.end());

const rows = async <R extends pg.QueryResultRow>(sql: string): Promise<R[]> =>
  (await client.query<R>(sql)).rows;

/** Tables that belong to no shop, each with its reason. */
const NOT_OF_A_SHOP = new Map([
  ['people', 'a person may work for several shops; reached by definer functions only'],
  ['credentials', 'of a person, by row security'],
  ['sessions', 'of a person, by row security'],
  ['password_resets', 'of a person, by row security'],
  ['rate_limits', 'attempts by e-mail and address, before a shop is known'],
  ['schema_migrations', 'the migrations that ran'],
]);

const TABLES = `select c.oid, c.relname as name, c.relrowsecurity as enabled, c.relforcerowsecurity as forced
  from pg_class c where c.relnamespace = 'public'::regnamespace and c.relkind in ('r', 'p')`;

async function shopTables(): Promise<{ name: string; enabled: boolean; forced: boolean }[]> {
  return (await rows<{ name: string; enabled: boolean; forced: boolean }>(TABLES)).filter(
    (table) => !NOT_OF_A_SHOP.has(table.name),
  );
}

describe('catalogue', () => {
  it('knows the tables that are of no shop', async () => {
    const names = (await rows<{ name: string }>(TABLES)).map((table) => table.name);
    expect(names).toEqual(expect.arrayContaining([...NOT_OF_A_SHOP.keys()]));
  });

  it('has forced row security with a policy on every shop table', async () => {
    const tables = await shopTables();
    expect(tables.length).toBeGreaterThan(25);
    expect(tables.filter((table) => !table.enabled || !table.forced)).toEqual([]);
    const policies = await rows<{ tablename: string; qual: string; with_check: string }>(
      `select tablename, qual, with_check from pg_policies where schemaname = 'public'`,
    );
    for (const { name } of tables) {
      const policy = policies.find((one) => one.tablename === name);
      const column = name === 'shops' ? 'id' : 'shop_id';
      const pattern = new RegExp(
        `^\\(${column} = \\(NULLIF\\(current_setting\\('app.shop_id'::text, true\\), ''::text\\)\\)::uuid\\)$`,
      );
      expect(policy?.qual, name).toMatch(pattern);
      expect(policy?.with_check, name).toMatch(pattern);
    }
  });

  it('begins every primary key of a shop table with the shop', async () => {
    const keys = await rows<{ name: string; columns: string[] }>(
      `select c.relname as name, array_agg(a.attname::text order by k.ordinality) as columns
       from pg_constraint p join pg_class c on c.oid = p.conrelid and c.relnamespace = 'public'::regnamespace
       cross join lateral unnest(p.conkey) with ordinality k(attnum, ordinality)
       join pg_attribute a on a.attrelid = c.oid and a.attnum = k.attnum
       where p.contype = 'p' group by c.relname`,
    );
    for (const { name } of await shopTables()) {
      if (name === 'shops') continue;
      expect(keys.find((key) => key.name === name)?.columns, name).toEqual(['shop_id', 'id']);
    }
  });

  it('makes every key between shop tables carry the shop', async () => {
    const keys = await rows<{ from: string; to: string; columns: string[] }>(
      `select f.relname as from, t.relname as to, array_agg(a.attname::text order by k.ordinality) as columns
       from pg_constraint p join pg_class f on f.oid = p.conrelid join pg_class t on t.oid = p.confrelid
       cross join lateral unnest(p.conkey) with ordinality k(attnum, ordinality)
       join pg_attribute a on a.attrelid = f.oid and a.attnum = k.attnum
       where p.contype = 'f' and f.relnamespace = 'public'::regnamespace group by p.oid, f.relname, t.relname`,
    );
    const between = keys.filter(({ to }) => to !== 'shops' && !NOT_OF_A_SHOP.has(to));
    expect(between.length).toBeGreaterThan(30);
    expect(between.filter((key) => key.columns[0] !== 'shop_id')).toEqual([]);
  });

  it('gives the roles no more than they need', async () => {
    const roles = await rows<{
      rolname: string;
      rolsuper: boolean;
      rolbypassrls: boolean;
      rolcanlogin: boolean;
    }>(
      `select rolname, rolsuper, rolbypassrls, rolcanlogin from pg_roles where rolname in ('web', 'worker', 'migrator', 'definer')`,
    );
    const of = (name: string) => roles.find((role) => role.rolname === name);
    for (const name of ['web', 'worker'])
      expect(of(name)).toMatchObject({ rolsuper: false, rolbypassrls: false });
    expect(of('definer')).toMatchObject({ rolsuper: false, rolcanlogin: false });
    const owned = await rows(
      `select tablename from pg_tables where schemaname = 'public' and tableowner in ('web', 'worker')`,
    );
    expect(owned).toEqual([]);
    const hidden = await rows(
      `select table_name from information_schema.table_privileges where grantee in ('web', 'worker', 'PUBLIC')
         and table_schema = 'public' and table_name in ('people', 'schema_migrations')`,
    );
    expect(hidden).toEqual([]);
    const everybody = await rows(
      `select table_name from information_schema.table_privileges where grantee = 'PUBLIC' and table_schema = 'public'`,
    );
    expect(everybody).toEqual([]);
  });

  it('keeps what is published append-only, by trigger and by grant', async () => {
    const published = [
      'documents',
      'document_events',
      'acceptances',
      'payments',
      'payment_events',
      'sheet_events',
      'client_events',
      'job_closings',
      'audit_events',
    ];
    const granted = await rows<{ table_name: string }>(
      `select table_name from information_schema.table_privileges where grantee in ('web', 'worker')
         and privilege_type in ('UPDATE', 'DELETE', 'TRUNCATE')`,
    );
    const triggers = await rows<{ name: string; count: number }>(
      `select c.relname as name, count(*)::int as count from pg_trigger t join pg_class c on c.oid = t.tgrelid
       join pg_proc f on f.oid = t.tgfoid where f.proname = 'refuse_change' group by c.relname`,
    );
    for (const name of published) {
      expect(
        granted.map((grant) => grant.table_name),
        name,
      ).not.toContain(name);
      expect(triggers.find((trigger) => trigger.name === name)?.count, name).toBe(2);
    }
  });

  it('pins the definer functions: owner, search path, and who may call', async () => {
    const functions = await rows<{
      name: string;
      owner: string;
      config: string[] | null;
      acl: string | null;
      returns: string;
    }>(
      `select p.proname as name, r.rolname as owner, p.proconfig as config, p.proacl::text as acl,
         format_type(p.prorettype, null) as returns
       from pg_proc p join pg_roles r on r.oid = p.proowner
       where p.pronamespace = 'public'::regnamespace and p.prosecdef`,
    );
    expect(functions.length).toBeGreaterThan(8);
    for (const one of functions) {
      expect(one.owner, one.name).toBe('definer');
      expect(one.config?.join(), one.name).toContain('search_path=pg_catalog, public, pg_temp');
      expect(one.acl, one.name).not.toMatch(/(^|[{,])=X/);
      expect(one.returns, one.name).toBe('uuid');
    }
  });

  it('has no view that would run with its owner’s rights', async () => {
    const views = await rows(
      `select c.relname from pg_class c where c.relkind = 'v' and c.relnamespace = 'public'::regnamespace
         and not coalesce(c.reloptions::text like '%security_invoker=true%', false)`,
    );
    expect(views).toEqual([]);
  });

  it('keeps the queue from the web', async () => {
    const grants = await rows(
      `select table_name from information_schema.table_privileges where table_schema = 'pgboss' and grantee in ('web', 'PUBLIC')`,
    );
    expect(grants).toEqual([]);
  });
});
