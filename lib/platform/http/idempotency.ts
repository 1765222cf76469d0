/**
 * `Idempotency-Key` on writes: the first request's answer is stored in the transaction that did the work, a
 * repeat gets that answer again, and the same key with another body is a conflict.
 */
import { currentShopId, run } from '@/lib/platform/db';
import { AppError } from './errors';
import { canonical, sha256 } from './hash';

interface KeyRow {
  request_sha256: string;
  response: { value: unknown } | null;
}

/** Must run inside `withShop`. A concurrent repeat waits on the unique key until the first has committed. */
export async function idempotent<T>(
  key: string | null | undefined,
  scope: string,
  request: unknown,
  work: () => Promise<T>,
): Promise<T> {
  if (!key) return work();
  if (key.length < 8 || key.length > 200)
    throw new AppError('invalid-input', 'Idempotency-Key must have 8 to 200 characters.', [
      { path: 'Idempotency-Key', message: 'must have 8 to 200 characters' },
    ]);
  const requestHash = sha256(canonical(request ?? null));
  const claimed = await run<{ id: string }>(
    `insert into idempotency_keys (shop_id, scope, key, request_sha256) values ($1, $2, $3, $4)
     on conflict (shop_id, scope, key) do nothing returning id`,
    [currentShopId(), scope, key, requestHash],
  );
  if (claimed.length === 0) return replay<T>(scope, key, requestHash);
  const value = await work();
  await run('update idempotency_keys set response = $3 where scope = $1 and key = $2', [
    scope,
    key,
    JSON.stringify({ value: value ?? null }),
  ]);
  return value;
}

async function replay<T>(scope: string, key: string, requestHash: string): Promise<T> {
  const rows = await run<KeyRow>(
    'select request_sha256, response from idempotency_keys where scope = $1 and key = $2',
    [scope, key],
  );
  const row = rows[0];
  if (!row || row.request_sha256 !== requestHash)
    throw new AppError('conflict', 'This Idempotency-Key was used for another request.');
  return row.response?.value as T;
}
