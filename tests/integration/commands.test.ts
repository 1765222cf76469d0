/** What every command keeps: its audit event, one effect per Idempotency-Key, versions, the stage that follows. */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { command } from '@/lib/access/command';
import { saveCustomer } from '@/lib/customers/commands';
import { createJob, markSurveyDone } from '@/lib/jobs/commands';
import { factsOfJobs } from '@/lib/jobs/facts';
import { getJob } from '@/lib/jobs/queries';
import { stageOf } from '@/lib/jobs/stage';
import { changeMember, removeMember } from '@/lib/people/commands';
import { closeDatabase, run, select, withShop } from '@/lib/platform/db';
import { nextNumber } from '@/lib/platform/db/counter';
import { AppError } from '@/lib/platform/http/errors';
import { idempotent } from '@/lib/platform/http/idempotency';
import { enqueue } from '@/lib/platform/queue/outbox';
import { makeShop, type TestShop } from '../support/shop';

const CUSTOMER = {
  contactName: 'Ada',
  email: 'ada@example.com',
  phone: '',
  address: '',
  consumer: false,
  notes: '',
};
let shop: TestShop;
beforeAll(async () => {
  shop = await makeShop();
});
afterAll(closeDatabase);

const inShop = <T>(work: () => Promise<T>) => withShop(shop.shopId, work);

describe('the command wrapper', () => {
  it('demands an audit event, and undoes the work without one', async () => {
    const silent = command(shop.actors.owner, () =>
      run(`insert into customers (shop_id, name) values ($1, 'Silent') returning id`, [shop.shopId]),
    );
    await expect(silent).rejects.toThrow(/audit event/);
    expect(await inShop(() => select(`select id from customers where name = 'Silent'`))).toEqual([]);
  });

  it('keeps personal fields by name and keyed hash, and only what changed', async () => {
    const { id } = await saveCustomer(shop.actors.owner, { ...CUSTOMER, name: 'Audit Ltd' });
    await saveCustomer(shop.actors.owner, {
      ...CUSTOMER,
      id,
      baseVersion: 1,
      name: 'Audit Ltd',
      notes: 'Rings twice',
    });
    const rows = await inShop(() =>
      select<{ action: string; change: Record<string, unknown> }>(
        'select action, change from audit_events where subject_id = $1 order by at',
        [id],
      ),
    );
    expect(rows.map((row) => row.action)).toEqual(['customer.created', 'customer.changed']);
    expect(JSON.stringify(rows)).not.toMatch(/Audit Ltd|ada@example|Ada/);
    expect(rows[1]?.change).toEqual({ before: { notes: '' }, after: { notes: 'Rings twice' } });
  });

  it('refuses to change or delete the trail', async () => {
    await expect(
      inShop(() => run('update audit_events set action = $1 returning id', ['x'])),
    ).rejects.toThrow(/permission denied|append-only/);
    await expect(inShop(() => run('delete from audit_events returning id'))).rejects.toThrow(
      /permission denied|append-only/,
    );
  });

  it('leaves no outbox row behind a rollback', async () => {
    const marker = randomUUID();
    const failing = inShop(async () => {
      await enqueue('test.kind', { marker });
      throw new Error('undo');
    });
    await expect(failing).rejects.toThrow('undo');
    expect(
      await inShop(() => select(`select id from outbox where payload ->> 'marker' = $1`, [marker])),
    ).toEqual([]);
  });
});

describe('Idempotency-Key', () => {
  const count = async (name: string) =>
    (await inShop(() => select('select id from customers where name = $1', [name]))).length;
  const make = (key: string, name: string) =>
    inShop(() =>
      idempotent(key, 'test', { name }, () => saveCustomer(shop.actors.owner, { ...CUSTOMER, name })),
    );

  it('answers a repeat with the first answer', async () => {
    const key = randomUUID();
    expect(await make(key, 'Once')).toEqual(await make(key, 'Once'));
    expect(await count('Once')).toBe(1);
  });

  it('has one effect for ten presses at once', async () => {
    const key = randomUUID();
    const answers = await Promise.all(Array.from({ length: 10 }, () => make(key, 'At once')));
    expect(new Set(answers.map((answer) => answer.id)).size).toBe(1);
    expect(await count('At once')).toBe(1);
  });

  it('refuses the same key for another request', async () => {
    const key = randomUUID();
    await make(key, 'First');
    await expect(make(key, 'Second')).rejects.toMatchObject({ code: 'conflict' });
  });

  it('frees the key when the work fails', async () => {
    const key = randomUUID();
    const failing = inShop(() =>
      idempotent(key, 'test', { name: 'Later' }, () => Promise.reject(new AppError('gone', 'no'))),
    );
    await expect(failing).rejects.toThrow('no');
    await make(key, 'Later');
    expect(await count('Later')).toBe(1);
  });
});

describe('edits carry their base version', () => {
  it('shows the second one what stands there now', async () => {
    const { id } = await saveCustomer(shop.actors.owner, { ...CUSTOMER, name: 'Two tabs' });
    await saveCustomer(shop.actors.office, { ...CUSTOMER, id, baseVersion: 1, name: 'From the office' });
    const second = saveCustomer(shop.actors.owner, {
      ...CUSTOMER,
      id,
      baseVersion: 1,
      name: 'From the owner',
    });
    await expect(second).rejects.toMatchObject({
      code: 'conflict',
      current: { name: 'From the office', version: 2 },
    });
  });
});

describe('people', () => {
  it('keep at least one owner', async () => {
    const { owner } = shop.actors;
    await expect(removeMember(owner, { id: owner.membershipId })).rejects.toMatchObject({
      issues: [{ path: 'roles' }],
    });
    const demote = {
      id: owner.membershipId,
      baseVersion: 1,
      name: 'x',
      roles: ['crew' as const],
      licenceNumber: '',
      mainsQualified: false,
    };
    await expect(changeMember(owner, demote)).rejects.toMatchObject({ issues: [{ path: 'roles' }] });
  });
});

describe('counters', () => {
  it('give fifty numbers at once without a gap, and none to a rollback', async () => {
    const take = (fail: boolean) =>
      inShop(async () => {
        const value = await nextNumber('test', 500);
        if (fail) throw new Error('undo');
        return Number(value);
      }).catch(() => null);
    const taken = await Promise.all(Array.from({ length: 60 }, (_, index) => take(index % 6 === 0)));
    const numbers = taken.filter((value) => value !== null).sort((a, b) => a - b);
    expect(numbers).toEqual(Array.from({ length: 50 }, (_, index) => 501 + index));
  });
});

describe('a job’s stage', () => {
  it('follows from its facts, and the stored one is the computed one', async () => {
    const { id: customerId } = await saveCustomer(shop.actors.owner, { ...CUSTOMER, name: 'Stage' });
    const { id } = await createJob(shop.actors.estimator, {
      customerId,
      siteName: 'S',
      siteAddress: '',
      title: 'T',
    });
    const stageNow = () =>
      inShop(async () => {
        const facts = (await factsOfJobs([id])).get(id);
        return { stored: (await getJob(id)).stage, computed: facts ? stageOf(facts) : null };
      });
    expect(await stageNow()).toEqual({ stored: 'survey', computed: 'survey' });
    await markSurveyDone(shop.actors.estimator, { jobId: id, done: true });
    expect(await stageNow()).toEqual({ stored: 'quote', computed: 'quote' });
    await markSurveyDone(shop.actors.estimator, { jobId: id, done: false });
    expect(await stageNow()).toEqual({ stored: 'survey', computed: 'survey' });
  });
});
