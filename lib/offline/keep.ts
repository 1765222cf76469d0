/** One exchange with the server: what is queued goes out, then what others did comes in. */
import type { Entity } from './protocol';
import { tagKey, writeSnapshot } from './edits';
import type { OfflineStore } from './store';
import { outcomeOf, PATIENCE_MS, sendAll, type SyncOutcome } from './sync';

export interface Addresses {
  snapshotUrl: string;
  eventsUrl: string;
}

export const syncedKey = (scope: string) => `synced:${scope}`;
export const extraKey = (scope: string) => `extra:${scope}`;

/** A tab that sleeps with the turn in its hand must not keep the others from sending. */
const TURN_MS = 45_000;
const turns = new Map<string, Promise<unknown>>();

/**
 * One exchange at a time, over all tabs: a snapshot that was asked for before an edit was sent must not be written after
 * it. Where a turn does not come the work is done all the same: the server tells repeats apart.
 */
async function inTurn<T>(name: string, work: () => Promise<T>): Promise<T> {
  const locks = typeof navigator === 'undefined' ? undefined : navigator.locks;
  if (locks) {
    let begun = false;
    const begin = () => {
      begun = true;
      return work();
    };
    try {
      return await locks.request(name, { signal: AbortSignal.timeout(TURN_MS) }, begin);
    } catch (error) {
      if (begun) throw error;
      return work();
    }
  }
  const before = turns.get(name) ?? Promise.resolve();
  const mine = before.then(work, work);
  turns.set(
    name,
    mine.catch(() => undefined),
  );
  return mine;
}

async function pull(
  store: OfflineStore,
  scope: string,
  url: string,
  fetcher: typeof fetch,
): Promise<SyncOutcome> {
  const known = (await store.meta.get(tagKey(scope)))?.value;
  const headers: HeadersInit = typeof known === 'string' ? { 'if-none-match': known } : {};
  let response: Response;
  let body: { entities: Entity[] };
  try {
    response = await fetcher(url, { headers, signal: AbortSignal.timeout(PATIENCE_MS) });
    if (response.status === 304) return 'nothing';
    const outcome = outcomeOf(response.status);
    if (outcome) return outcome === 'stumbled' ? 'failed' : outcome;
    body = (await response.json()) as { entities: Entity[] };
    if (!Array.isArray(body.entities)) return 'offline';
  } catch {
    return 'offline';
  }
  const { entities, ...extra } = body;
  await store.transaction('rw', store.entities, store.queue, store.meta, async () => {
    await writeSnapshot(store, scope, entities);
    await store.meta.put({ key: extraKey(scope), value: extra });
    const tag = response.headers.get('etag');
    const waiting = await store.queue.where({ scope }).count();
    // What waits here was left as it is: the same snapshot is needed again once it has gone.
    if (tag && waiting === 0) await store.meta.put({ key: tagKey(scope), value: tag });
    else await store.meta.delete(tagKey(scope));
  });
  return 'nothing';
}

/** @returns `nothing` where all is sent and, if asked for, what others did has come in */
export const exchange = (
  store: OfflineStore,
  scope: string,
  { snapshotUrl, eventsUrl }: Addresses,
  options: { pull: boolean; fetcher?: typeof fetch },
): Promise<SyncOutcome> =>
  inTurn(`${store.name}|${scope}`, async () => {
    const fetcher = options.fetcher ?? fetch;
    const unsent = await store.queue.where({ scope }).count();
    let outcome = await sendAll(store, scope, eventsUrl, fetcher);
    if (outcome === 'nothing' && options.pull) outcome = await pull(store, scope, snapshotUrl, fetcher);
    if (outcome === 'nothing' && (options.pull || unsent > 0))
      await store.meta.put({ key: syncedKey(scope), value: new Date().toISOString() });
    return outcome;
  });
