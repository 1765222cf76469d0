import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrate } from '../../docker-free-scripts/migrate';

const url = process.env.DATABASE_URL_MIGRATOR ?? '';
/** A schema of this file's own: the search path of its address makes all names resolve there. */
const SCHEMA = 'migrate_test';
const own = `${url}?options=${encodeURIComponent(`-c search_path=${SCHEMA}`)}`;
const folder = mkdtempSync(join(resolve('.data-test'), 'migrations-'));
const options = { folder, table: 'migrate_test_done' };
const client = new pg.Client({ connectionString: url });

const migration = (name: string, ...statements: string[]) =>
  writeFileSync(
    join(folder, name),
    `export const up = async ({ context }) => {
      for (const statement of ${JSON.stringify(statements)}) await context.sequelize.query(statement, { raw: true });
    };`,
  );

async function tables(): Promise<string[]> {
  const sql = 'select table_name from information_schema.tables where table_schema = $1 order by 1';
  const { rows } = await client.query<{ table_name: string }>(sql, [SCHEMA]);
  return rows.map((row) => row.table_name);
}

beforeAll(async () => {
  await client.connect();
  await client.query(`create schema ${SCHEMA}`);
});
afterAll(async () => {
  await client.query(`drop schema ${SCHEMA} cascade`);
  await client.end();
  rmSync(folder, { recursive: true, force: true });
});

describe('migrating', () => {
  it('of the application’s own migrations has nothing left to do', async () => {
    expect(await migrate(url)).toEqual([]);
  });

  it('runs each once, in order', async () => {
    migration('0001-a.ts', 'create table a (id int)');
    migration('0002-b.ts', 'alter table a rename to b');
    expect(await migrate(own, options)).toEqual(['0001-a.ts', '0002-b.ts']);
    expect(await migrate(own, options)).toEqual([]);
    expect(await tables()).toEqual(['b', 'migrate_test_done']);
  });

  it('leaves nothing of one that fails, and goes on from there once it is mended', async () => {
    migration('0003-c.ts', 'create table c (id int)', 'create table b (id int)');
    await expect(migrate(own, options)).rejects.toThrow(/0003-c\.ts.*already exists/s);
    expect(await tables()).toEqual(['b', 'migrate_test_done']);
    // Under another name, since this process has loaded the first one.
    rmSync(join(folder, '0003-c.ts'));
    migration('0003-d.ts', 'create table d (id int)');
    expect(await migrate(own, options)).toEqual(['0003-d.ts']);
    expect(await tables()).toEqual(['b', 'd', 'migrate_test_done']);
  });

  it('takes turns when two machines migrate at once', async () => {
    migration('0004-e.ts', 'create table e (id int)', 'select pg_sleep(0.3)');
    const ran = await Promise.all([migrate(own, options), migrate(own, options)]);
    expect(ran.flat()).toEqual(['0004-e.ts']);
    expect(await tables()).toContain('e');
  });
});
