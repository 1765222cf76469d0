/** Sends what is queued, in order, once; keeps it when there is no network; stops an entity at its conflict. */
import { type ClientEvent, type EventAnswer, MAX_EVENTS, PROTOCOL } from './protocol';
import type { OfflineStore, QueuedEvent } from './store';
import { writeServerEntity } from './edits';

export type SyncOutcome = 'sent' | 'nothing' | 'offline' | 'signed-out' | 'outdated' | 'failed';

type Fetch = typeof fetch;

/** The next events that may go: one per entity, none behind a conflict or refusal of the same entity. */
async function nextBatch(store: OfflineStore, scope: string): Promise<QueuedEvent[]> {
  const all = await store.queue.where({ scope }).sortBy('seq');
  const seen = new Set<string>();
  const batch: QueuedEvent[] = [];
  for (const event of all) {
    if (seen.has(event.entityId)) continue;
    seen.add(event.entityId);
    if (event.state === 'pending' || event.state === 'sending') batch.push(event);
    if (batch.length === MAX_EVENTS) break;
  }
  return batch;
}

/** Marks the batch as on its way and fixes each event's base version, so that a repeat is the same request. */
async function markSending(store: OfflineStore, batch: QueuedEvent[]): Promise<ClientEvent[]> {
  return store.transaction('rw', store.queue, store.entities, async () => {
    const events: ClientEvent[] = [];
    for (const { seq } of batch) {
      const event = seq === undefined ? undefined : await store.queue.get(seq);
      if (!event || seq === undefined) continue;
      const entity = await store.entities.get([event.scope, event.collection, event.entityId]);
      const baseVersion = event.state === 'sending' ? event.baseVersion : (entity?.version ?? 0) || null;
      await store.queue.update(seq, { state: 'sending', baseVersion });
      events.push({
        id: event.id,
        kind: event.kind,
        entityId: event.entityId,
        baseVersion,
        body: event.body,
        at: event.at,
      });
    }
    return events;
  });
}

async function takeAnswer(store: OfflineStore, scope: string, answer: EventAnswer): Promise<void> {
  await store.transaction('rw', store.queue, store.entities, async () => {
    const event = await store.queue.where('id').equals(answer.id).first();
    if (event?.seq === undefined) return;
    if (answer.status === 200) {
      await store.queue.delete(event.seq);
      if (answer.entity) await writeServerEntity(store, scope, answer.entity);
      return;
    }
    const conflict = answer.status === 409 && answer.current !== undefined;
    await store.queue.update(event.seq, {
      state: conflict ? 'conflict' : 'refused',
      message: answer.message ?? 'The server did not take this.',
      issues: answer.issues ?? [],
      ...(answer.current ? { current: answer.current } : {}),
    });
  });
}

/** Sends one batch. What was sent and not answered is sent again next time under the same ids. */
export async function sendBatch(
  store: OfflineStore,
  scope: string,
  url: string,
  fetcher: Fetch = fetch,
): Promise<SyncOutcome> {
  const batch = await nextBatch(store, scope);
  if (batch.length === 0) return 'nothing';
  const events = await markSending(store, batch);
  let response: Response;
  try {
    response = await fetcher(url, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ protocol: PROTOCOL, events }),
    });
  } catch {
    return 'offline';
  }
  if (response.status === 401 || response.status === 403) return 'signed-out';
  if (response.status === 422) return 'outdated';
  if (!response.ok) return 'failed';
  const { answers } = (await response.json()) as { answers: EventAnswer[] };
  for (const answer of answers) await takeAnswer(store, scope, answer);
  return 'sent';
}

/** Sends until nothing is left or something stops it. */
export async function sendAll(
  store: OfflineStore,
  scope: string,
  url: string,
  fetcher?: Fetch,
): Promise<SyncOutcome> {
  for (;;) {
    const outcome = await sendBatch(store, scope, url, fetcher);
    if (outcome !== 'sent') return outcome;
  }
}
