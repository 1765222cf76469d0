/** Two shops: the one can't see, change or guess at the other; and the rightful person still gets in. */
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { loadActor } from '@/lib/access/actor';
import { saveCustomer } from '@/lib/customers/commands';
import { findCustomer, listCustomers } from '@/lib/customers/queries';
import { createJob } from '@/lib/jobs/commands';
import { closeDatabase, run, select, withShop } from '@/lib/platform/db';
import { toAppError } from '@/lib/platform/http/errors';
import { makeShop, type TestShop } from '../support/shop';

const CUSTOMER = { contactName: '', email: '', phone: '', address: '', consumer: false, notes: '' };
let here: TestShop;
let there: TestShop;
let theirs: string;

beforeAll(async () => {
  here = await makeShop();
  there = await makeShop();
  theirs = (await saveCustomer(there.actors.owner, { ...CUSTOMER, name: 'Theirs' })).id;
  const customer = await saveCustomer(here.actors.owner, { ...CUSTOMER, name: 'Ours' });
  await createJob(here.actors.owner, {
    customerId: customer.id,
    siteName: 'Site',
    siteAddress: '',
    title: 'Ours',
  });
});
afterAll(closeDatabase);

const message = (error: unknown) => toAppError(error).message;

describe('two shops', () => {
  it('sees no row of another shop in any table, without any where-clause', async () => {
    const tables = await withShop(here.shopId, () =>
      select<{ name: string }>(
        `select table_name as name from information_schema.columns where table_schema = 'public' and column_name = 'shop_id'`,
      ),
    );
    expect(tables.length).toBeGreaterThan(25);
    for (const { name } of tables) {
      const readable = await withShop(here.shopId, () =>
        select<{ n: string }>(`select count(*) as n from ${name} where shop_id <> $1`, [here.shopId]),
      ).catch((e: unknown) => String(e));
      // customer_links grants single columns: `count(*)` on shop_id is within them.
      expect(readable, name).toEqual([{ n: '0' }]);
    }
    expect((await withShop(here.shopId, listCustomers)).map((row) => row.name)).toEqual(['Ours']);
    expect((await withShop(there.shopId, listCustomers)).map((row) => row.name)).toEqual(['Theirs']);
  });

  it('sees nothing at all outside a shop', async () => {
    expect(await select('select id from customers')).toEqual([]);
    expect(await select('select id from shops')).toEqual([]);
  });

  it('can not read, change or delete by id what is another shop’s', async () => {
    await withShop(here.shopId, async () => {
      expect(await findCustomer(theirs)).toBeNull();
      expect(
        await run('update customers set name = $2 where id = $1 returning id', [theirs, 'Mine now']),
      ).toEqual([]);
      expect(await run('delete from customers where id = $1 returning id', [theirs])).toEqual([]);
    });
    expect((await withShop(there.shopId, () => findCustomer(theirs)))?.name).toBe('Theirs');
  });

  it('can not write into another shop, nor hang a row on one of theirs', async () => {
    const foreign = withShop(here.shopId, () =>
      run(`insert into customers (shop_id, name) values ($1, 'x') returning id`, [there.shopId]),
    );
    await expect(foreign).rejects.toThrow(/row-level security/);
    const hung = withShop(here.shopId, () =>
      run(`insert into sites (shop_id, customer_id, name) values ($1, $2, 'x') returning id`, [
        here.shopId,
        theirs,
      ]),
    );
    await expect(hung).rejects.toThrow(/foreign key/);
  });

  it('answers a foreign id as one that does not exist, without its name', async () => {
    const change = saveCustomer(here.actors.owner, { ...CUSTOMER, id: theirs, baseVersion: 1, name: 'Mine' });
    const text = await change.then(() => 'saved', message);
    expect(text).toBe('This customer was not found in this shop.');
    const job = createJob(here.actors.owner, {
      customerId: theirs,
      siteName: 's',
      siteAddress: '',
      title: 't',
    });
    expect(await job.then(() => 'made', message)).toBe('This customer is not in the shop.');
    // The same id in one's own shop is free: a duplicate-key error would tell that it exists elsewhere.
    expect((await saveCustomer(here.actors.owner, { ...CUSTOMER, id: theirs, name: 'Same id' })).id).toBe(
      theirs,
    );
  });

  it('never mixes forty shops’ worth of work at once', async () => {
    const work = Array.from({ length: 40 }, (_, index) => (index % 2 === 0 ? here : there));
    const seen = await Promise.all(
      work.map((shop) =>
        withShop(shop.shopId, async () => {
          await select('select pg_sleep(0.01)');
          return select<{ id: string }>('select id from shops');
        }),
      ),
    );
    expect(seen.map((rows) => rows.map((row) => row.id))).toEqual(work.map((shop) => [shop.shopId]));
  });

  it('refuses to reach from one shop’s transaction into another', async () => {
    await expect(withShop(here.shopId, () => withShop(there.shopId, async () => 1))).rejects.toThrow(
      /one shop/i,
    );
  });

  it('knows a person only in the shops they are in', async () => {
    const { personId } = here.actors.estimator;
    const signedIn = { sessionId: 's', personId };
    expect((await loadActor(signedIn, here.shopId))?.roles).toEqual(['estimator']);
    expect(await loadActor(signedIn, there.shopId)).toBeNull();
  });

  it('keeps people and keys from the web role', async () => {
    const client = new pg.Client({ connectionString: process.env.DATABASE_URL_WEB });
    await client.connect();
    await expect(client.query('select email from people')).rejects.toThrow(/permission denied/);
    await expect(client.query('select token_sha256 from customer_links')).rejects.toThrow(
      /permission denied/,
    );
    expect((await client.query('select password_hash from credentials')).rows).toEqual([]);
    expect((await client.query('select id from sessions')).rows).toEqual([]);
    await client.end();
  });
});
