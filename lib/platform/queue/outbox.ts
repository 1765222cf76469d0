/** The outbox: a row written in the command's transaction; the worker relays it to the queue. */
import { currentShopId, run } from '@/lib/platform/db';

/** Payloads hold ids and parameters only: what is sent is rendered when it is sent. */
export async function enqueue(
  kind: string,
  payload: Record<string, string | number | null>,
  runAfter?: Date,
): Promise<string> {
  const rows = await run<{ id: string }>(
    `insert into outbox (shop_id, kind, payload, run_after) values ($1, $2, $3, coalesce($4, now())) returning id`,
    [currentShopId(), kind, JSON.stringify(payload), runAfter?.toISOString() ?? null],
  );
  const row = rows[0];
  if (!row) throw new Error('The outbox row was not written.');
  return row.id;
}
