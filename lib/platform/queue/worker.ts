/** Relays outbox rows to pg-boss and runs their handlers. Only the worker process imports this. */
import PgBoss from 'pg-boss';
import type { Transaction } from 'sequelize';
import { currentTransaction, run, withShop } from '@/lib/platform/db';
import { shopIdsWithOutbox } from '@/lib/platform/db/definer';
import { required } from '@/lib/platform/env';
import { log } from '@/lib/platform/log';

const QUEUE = 'outbox';

export interface OutboxJob {
  shopId: string;
  outboxId: string;
}

export interface OutboxItem {
  shopId: string;
  id: string;
  kind: string;
  payload: Record<string, string>;
}

/** A handler runs outside any transaction and opens its own; it may be called again for the same item. */
export type Handler = (item: OutboxItem) => Promise<void>;

interface RawConnection {
  query(text: string, values: unknown[]): Promise<{ rows: unknown[]; rowCount: number }>;
}

/** pg-boss speaks through the transaction's own connection, so that job and mark commit together. */
function throughTransaction(transaction: Transaction): PgBoss.Db {
  const { connection } = transaction as Transaction & { connection: RawConnection };
  return { executeSql: (text: string, values: unknown[]) => connection.query(text, values) } as PgBoss.Db;
}

async function relayShop(boss: PgBoss, shopId: string): Promise<number> {
  return withShop(shopId, async () => {
    const rows = await run<{ id: string }>(
      `select id from outbox where relayed_at is null and run_after <= now()
       order by created_at limit 50 for update skip locked`,
    );
    for (const row of rows) {
      const data: OutboxJob = { shopId, outboxId: row.id };
      await boss.send(QUEUE, data, { db: throughTransaction(currentTransaction()) });
      await run('update outbox set relayed_at = now() where id = $1', [row.id]);
    }
    return rows.length;
  });
}

/** Moves everything that is due into the queue; returns how many. */
export async function relayOutbox(boss: PgBoss): Promise<number> {
  let moved = 0;
  for (const shopId of await shopIdsWithOutbox(100)) moved += await relayShop(boss, shopId);
  return moved;
}

async function load(job: OutboxJob): Promise<OutboxItem | null> {
  return withShop(job.shopId, async () => {
    const rows = await run<{
      id: string;
      kind: string;
      payload: Record<string, string>;
      done_at: Date | null;
    }>('select id, kind, payload, done_at from outbox where id = $1', [job.outboxId]);
    const row = rows[0];
    return !row || row.done_at
      ? null
      : { shopId: job.shopId, id: row.id, kind: row.kind, payload: row.payload };
  });
}

export async function handleJob(job: OutboxJob, handlers: ReadonlyMap<string, Handler>): Promise<void> {
  const item = await load(job);
  if (!item) return;
  const handler = handlers.get(item.kind);
  if (!handler) throw new Error(`No handler for outbox kind ${item.kind}.`);
  try {
    await handler(item);
    await withShop(item.shopId, () =>
      run('update outbox set done_at = now(), failure = null where id = $1', [item.id]),
    );
  } catch (error) {
    await withShop(item.shopId, () =>
      run('update outbox set failed_at = now(), failure = $2 where id = $1', [
        item.id,
        String(error).slice(0, 500),
      ]),
    );
    throw error;
  }
}

export async function startWorker(
  handlers: ReadonlyMap<string, Handler>,
): Promise<{ stop: () => Promise<void> }> {
  const boss = new PgBoss({
    connectionString: required('DATABASE_URL_WORKER'),
    schema: 'pgboss',
    migrate: false,
    schedule: false,
    max: 4,
  });
  boss.on('error', (error) => log().error({ error: String(error) }, 'queue'));
  await boss.start();
  await boss.work<OutboxJob>(QUEUE, { pollingIntervalSeconds: 0.5, batchSize: 5 }, async (jobs) => {
    // One failure must not keep its neighbours from running; the batch is then tried again, and what is done is skipped.
    const failures: unknown[] = [];
    for (const job of jobs)
      await handleJob(job.data, handlers).catch((error: unknown) => failures.push(error));
    if (failures.length > 0) throw failures[0];
  });
  let running = true;
  const loop = (async () => {
    while (running) {
      const moved = await relayOutbox(boss).catch((error: unknown) => {
        log().error({ error: String(error) }, 'relay');
        return 0;
      });
      if (moved === 0) await new Promise((resolve) => setTimeout(resolve, 300));
    }
  })();
  return {
    stop: async () => {
      running = false;
      await loop;
      await boss.stop({ graceful: true, timeout: 10_000 });
    },
  };
}
