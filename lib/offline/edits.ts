/** Edits on the device: shown at once, queued as events, coalesced while they have not been sent. */
import { leftBehind, note } from './journal';
import { changesBetween, withChanges } from './patch';
import type { Entity } from './protocol';
import type { OfflineStore, QueuedEvent } from './store';
import { notKept } from './trouble';

interface Edit {
  scope: string;
  collection: string;
  id: string;
  data: Record<string, unknown>;
  /** What the screen showed when the edit was made: only what differs from it is written. Left out for a new one. */
  base?: Record<string, unknown>;
  archived?: boolean;
}

const now = () => new Date().toISOString();

function editedData(
  { data, base }: Edit,
  stored: Record<string, unknown> | undefined,
): Record<string, unknown> {
  if (!base || !stored) return data;
  const changes = changesBetween(base, data);
  const merged = changes ? withChanges(stored, changes) : stored;
  // What the server alone writes lies in the store too, and is not sent back to it: an edit names all of its fields.
  return Object.fromEntries(Object.entries(merged).filter(([key]) => key in data));
}

/** Applies an edit to the local copy and queues it. Typing on changes the event that still waits. */
export async function putEntity(store: OfflineStore, edit: Edit): Promise<void> {
  const strike = note(store.name, { edit });
  await notKept(writeEdit(store, edit));
  strike();
}

const begunFrom = (stored: Record<string, unknown> | undefined, data: Record<string, unknown>) =>
  stored ? Object.fromEntries(Object.entries(stored).filter(([key]) => key in data)) : null;

async function writeEdit(store: OfflineStore, edit: Edit): Promise<void> {
  const { scope, collection, id, archived = false } = edit;
  const kind = `${collection}.${archived ? 'archive' : 'put'}`;
  await store.transaction('rw', store.entities, store.queue, async () => {
    const before = await store.entities.get([scope, collection, id]);
    const data = editedData(edit, before?.data);
    await store.entities.put({
      scope,
      collection,
      id,
      data,
      archived,
      dirty: 1,
      version: before?.version ?? 0,
    });
    const queued = await store.queue.where({ scope, entityId: id }).sortBy('seq');
    const last = queued.at(-1);
    // What is on its way is not touched; a refused one is replaced by the mended edit; a choice is about what stands now.
    if (last?.seq !== undefined && last.state !== 'sending') {
      const mended = last.state === 'refused' ? { id: crypto.randomUUID(), state: 'pending' as const } : {};
      await store.queue.update(last.seq, { kind, body: data, at: now(), ...mended });
      return;
    }
    await store.queue.add({
      id: crypto.randomUUID(),
      scope,
      collection,
      kind,
      entityId: id,
      body: data,
      baseVersion: null,
      base: begunFrom(before?.data, data),
      at: now(),
      state: 'pending',
    });
  });
}

/** Queues something that happened (a tick, a reading): never coalesced, never changed. */
export async function addHappening(
  store: OfflineStore,
  happening: { scope: string; kind: string; body: Record<string, unknown> },
): Promise<string> {
  const id = crypto.randomUUID();
  const event: QueuedEvent = {
    id,
    scope: happening.scope,
    collection: 'happening',
    kind: happening.kind,
    entityId: id,
    body: happening.body,
    baseVersion: null,
    at: now(),
    state: 'pending',
  };
  const strike = note(store.name, { event });
  await notKept(store.queue.add(event));
  strike();
  return id;
}

/** Writes what a tab that was closed in the middle of it had typed last. The same twice has the effect of once. */
export async function writeLeftBehind(store: OfflineStore): Promise<void> {
  await leftBehind(store.name, async (noted) => {
    const { edit, event } = noted as { edit?: Edit; event?: QueuedEvent };
    if (edit) await writeEdit(store, edit);
    if (event && (await store.queue.where('id').equals(event.id).count()) === 0) await store.queue.add(event);
  });
}

/** Stores an entity as the server gave it, unless an edit of ours still waits on it. */
export async function writeServerEntity(store: OfflineStore, scope: string, entity: Entity): Promise<void> {
  const waiting = await store.queue.where({ scope, entityId: entity.id }).count();
  if (waiting > 0) {
    await store.entities.update([scope, entity.collection, entity.id], { version: entity.version });
    return;
  }
  await store.entities.put({ ...entity, scope, dirty: 0 });
}

/** A fresh snapshot from the server: what is edited here keeps its edit, what is gone there goes. */
export async function writeSnapshot(store: OfflineStore, scope: string, entities: Entity[]): Promise<void> {
  await store.transaction('rw', store.entities, store.queue, async () => {
    const known = new Set(entities.map((entity) => `${entity.collection}/${entity.id}`));
    const waiting = new Set((await store.queue.where({ scope }).toArray()).map((event) => event.entityId));
    const local = await store.entities.where({ scope }).toArray();
    const gone = local.filter((one) => !waiting.has(one.id) && !known.has(`${one.collection}/${one.id}`));
    await store.entities.bulkDelete(gone.map((one) => [one.scope, one.collection, one.id]));
    // A version that others raised meanwhile must not hide a conflict: an edited entity keeps its base.
    const versions = new Map(local.map((one) => [`${one.collection}/${one.id}`, one.version]));
    const older = ({ collection, id, version }: Entity) =>
      version < (versions.get(`${collection}/${id}`) ?? 0);
    await store.entities.bulkPut(
      entities
        .filter((entity) => !waiting.has(entity.id) && !older(entity))
        .map((entity) => ({ ...entity, scope, dirty: 0 as const })),
    );
  });
}

/** Names the snapshot that lies here, so that the server need not send the same again. */
export const tagKey = (scope: string) => `tag:${scope}`;

/** The next snapshot comes whole: what lies here is not what came with the last one. */
export const forgetTag = (store: OfflineStore, scope: string): Promise<void> =>
  store.meta.delete(tagKey(scope));
