/** One counter row per shop and name, taken inside the transaction that uses the number: gapless under concurrency. */
import { currentShopId, run } from './index';

/** The next number; the first of a shop follows `startAfter`. Others wait until this transaction ends. */
export async function nextNumber(name: string, startAfter = 0): Promise<string> {
  const rows = await run<{ value: string }>(
    `insert into counters (shop_id, name, value) values ($1, $2, $3::bigint + 1)
     on conflict (shop_id, name) do update set value = counters.value + 1 returning value::text`,
    [currentShopId(), name, startAfter],
  );
  const value = rows[0]?.value;
  if (value === undefined) throw new Error('The counter gave no number.');
  return value;
}
