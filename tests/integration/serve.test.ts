import pg from 'pg';
import { afterAll, expect, it } from 'vitest';
import { holdsDemoPeople } from '../../docker-free-scripts/serve.mjs';

const web = process.env.DATABASE_URL_WEB ?? '';
const migrator = new pg.Client({ connectionString: process.env.DATABASE_URL_MIGRATOR });
const EMAIL = 'owner@fernhollow.example.com';

afterAll(async () => {
  await migrator.query('delete from people where email = $1', [EMAIL]);
  await migrator.end();
});

it('the production server sees, with the rights it has, whether the demo was put into its database', async () => {
  await migrator.connect();
  expect(await holdsDemoPeople(web)).toBe(false);
  await migrator.query('insert into people (email) values ($1)', [EMAIL]);
  expect(await holdsDemoPeople(web)).toBe(true);
});
