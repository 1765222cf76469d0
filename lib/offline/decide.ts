/** What a person decides: whose change stands where both changed one entry, and what becomes of what was refused. */
import { forgetTag, writeServerEntity } from './edits';
import { merged, nothingLeft } from './merge';
import type { Entity } from './protocol';
import type { OfflineStore, QueuedEvent } from './store';

/** The edit as it stands now, on top of what the server has: it goes out as another event. */
export async function putOnTop(
  store: OfflineStore,
  event: QueuedEvent,
  current: Entity,
  body: Record<string, unknown>,
): Promise<void> {
  if (event.seq === undefined) return;
  const key: [string, string, string] = [event.scope, event.collection, event.entityId];
  const local = await store.entities.get(key);
  const data = { ...(local?.data ?? current.data), ...body };
  await store.entities.update(key, { version: current.version, data });
  await store.queue.update(event.seq, {
    id: crypto.randomUUID(),
    state: 'pending',
    baseVersion: null,
    body,
    base: Object.fromEntries(Object.entries(current.data).filter(([field]) => field in body)),
  });
}

async function choose(store: OfflineStore, shown: QueuedEvent, winner: 'mine' | 'theirs'): Promise<void> {
  await store.transaction('rw', store.entities, store.queue, store.meta, async () => {
    const event = shown.seq === undefined ? undefined : await store.queue.get(shown.seq);
    // Decided in another tab meanwhile.
    if (event?.state !== 'conflict' || !event.current) return;
    const { current } = event;
    // Whose entry it is decides about its being there at all: theirs may be that it is gone, mine that it goes.
    const kept = { ...event, body: merged(event, current, winner) };
    const theirsAlone = winner === 'theirs' && (event.kind.endsWith('.archive') || current.archived);
    if (!theirsAlone && !nothingLeft(kept, current)) return putOnTop(store, event, current, kept.body);
    await store.queue.where({ scope: event.scope, entityId: event.entityId }).delete();
    await writeServerEntity(store, event.scope, current);
    await forgetTag(store, event.scope);
  });
}

/** Where both changed a field mine goes on top of theirs; what only they changed stays. */
export const keepMine = (store: OfflineStore, event: QueuedEvent) => choose(store, event, 'mine');

/** Where both changed a field theirs stays; what only I changed is sent. */
export const takeTheirs = (store: OfflineStore, event: QueuedEvent) => choose(store, event, 'theirs');

/** A refused edit or happening goes out again, as it is: what it lacked may be there by now. */
export async function tryAgain(store: OfflineStore, event: QueuedEvent): Promise<void> {
  if (event.seq === undefined) return;
  await store.queue.update(event.seq, { id: crypto.randomUUID(), state: 'pending', baseVersion: null });
}

/** A refused one is given up: what stood there before it stands again, a new entry goes. */
export async function dropMine(store: OfflineStore, event: QueuedEvent): Promise<void> {
  await store.transaction('rw', store.entities, store.queue, store.meta, async () => {
    await store.queue.where({ scope: event.scope, entityId: event.entityId }).delete();
    const key: [string, string, string] = [event.scope, event.collection, event.entityId];
    const local = await store.entities.get(key);
    if (local && local.version > 0 && event.base)
      await store.entities.put({
        ...local,
        data: { ...local.data, ...event.base },
        archived: false,
        dirty: 0,
      });
    else if (local && local.version === 0) await store.entities.delete(key);
    // The server's own copy comes whole with the next snapshot.
    await forgetTag(store, event.scope);
  });
}
