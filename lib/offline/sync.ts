/** Sends what is queued, in order, once; keeps it when there is no network; stops an entity at its conflict. */
import { putOnTop } from './decide';
import { writeServerEntity } from './edits';
import { asAWhole, clashesOf, merged, nothingLeft } from './merge';
import { type ClientEvent, type EventAnswer, MAX_EVENTS, PROTOCOL } from './protocol';
import type { OfflineStore, QueuedEvent } from './store';

/** `stumbled`: the server fell over this very request; `failed`: it is in trouble as a whole. */
export type SyncOutcome =
  'sent' | 'nothing' | 'offline' | 'signed-out' | 'not-allowed' | 'outdated' | 'failed' | 'stumbled';

type Fetch = typeof fetch;

/** A network that swallows requests is taken for none. */
export const PATIENCE_MS = 30_000;
/** One request's events; the server takes more, a weak signal may not. */
const MAX_CHARACTERS = 200_000;

/** How the sending goes on: one by one after a stumble, and without what the server fell over alone. */
export interface Pass {
  most: number;
  skip: Set<string>;
}

const wholePass = (): Pass => ({ most: MAX_EVENTS, skip: new Set() });

/** The next events that may go: one per entity, none behind a conflict or refusal of the same entity. */
async function nextBatch(store: OfflineStore, scope: string, { most, skip }: Pass): Promise<QueuedEvent[]> {
  const all = await store.queue.where({ scope }).sortBy('seq');
  const seen = new Set<string>();
  const batch: QueuedEvent[] = [];
  let characters = 0;
  for (const event of all) {
    if (seen.has(event.entityId)) continue;
    seen.add(event.entityId);
    if ((event.state !== 'pending' && event.state !== 'sending') || skip.has(event.id)) continue;
    characters += JSON.stringify(event.body).length;
    if (batch.length > 0 && characters > MAX_CHARACTERS) break;
    batch.push(event);
    if (batch.length >= most) break;
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

/** What was typed on top of an event that the server did not apply is one edit with it. */
async function withLaterEdit(store: OfflineStore, event: QueuedEvent): Promise<[QueuedEvent, boolean]> {
  const queued = await store.queue.where({ scope: event.scope, entityId: event.entityId }).sortBy('seq');
  const later = queued.filter(({ seq }) => (seq ?? 0) > (event.seq ?? 0));
  const last = later.at(-1);
  if (!last || event.seq === undefined) return [event, false];
  const { kind, body, at } = last;
  await store.queue.bulkDelete(later.flatMap(({ seq }) => (seq === undefined ? [] : [seq])));
  await store.queue.update(event.seq, { kind, body, at });
  return [{ ...event, kind, body, at }, true];
}

async function takeConflict(store: OfflineStore, told: QueuedEvent, answer: EventAnswer): Promise<void> {
  const { current } = answer;
  if (!current || told.seq === undefined) return;
  const [event] = await withLaterEdit(store, told);
  if (nothingLeft(event, current)) {
    await store.queue.delete(told.seq);
    await writeServerEntity(store, event.scope, current);
  } else if (!asAWhole(event, current) && clashesOf(event, current).length === 0)
    // Each changed other fields: both stand, and there is nothing to choose.
    await putOnTop(store, event, current, merged(event, current, 'mine'));
  else
    await store.queue.update(told.seq, {
      state: 'conflict',
      message: answer.message ?? 'Somebody else changed this meanwhile.',
      current,
    });
}

async function takeRefusal(store: OfflineStore, told: QueuedEvent, answer: EventAnswer): Promise<void> {
  if (told.seq === undefined) return;
  const [, mended] = await withLaterEdit(store, told);
  if (mended) {
    await store.queue.update(told.seq, { id: crypto.randomUUID(), state: 'pending', baseVersion: null });
    return;
  }
  await store.queue.update(told.seq, {
    state: 'refused',
    message: answer.message ?? 'The server did not take this.',
    issues: answer.issues ?? [],
  });
}

/** What was refused because it belongs to something that had not arrived goes again now that it has. */
async function wake(store: OfflineStore, scope: string, arrived: string): Promise<void> {
  const held = await store.queue.where({ scope }).toArray();
  for (const { seq, state, body } of held)
    if (seq !== undefined && state === 'refused' && Object.values(body).includes(arrived))
      await store.queue.update(seq, { id: crypto.randomUUID(), state: 'pending', baseVersion: null });
}

async function takeAnswer(store: OfflineStore, scope: string, answer: EventAnswer): Promise<void> {
  await store.transaction('rw', store.queue, store.entities, async () => {
    const event = await store.queue.where('id').equals(answer.id).first();
    if (event?.seq === undefined) return;
    if (answer.status === 200) {
      await store.queue.delete(event.seq);
      if (answer.entity) await writeServerEntity(store, scope, answer.entity);
      await wake(store, scope, event.entityId);
    } else if (answer.status === 409 && answer.current) await takeConflict(store, event, answer);
    else await takeRefusal(store, event, answer);
  });
}

/** What an answer of the server as a whole means, before its content is read. */
export function outcomeOf(status: number): SyncOutcome | null {
  if (status === 401) return 'signed-out';
  if (status === 403 || status === 404) return 'not-allowed';
  if (status === 422) return 'outdated';
  if (status === 500 || status === 413) return 'stumbled';
  return status >= 200 && status < 400 ? null : 'failed';
}

/** Sends one batch. What was sent and not answered is sent again next time under the same ids. */
export async function sendBatch(
  store: OfflineStore,
  scope: string,
  url: string,
  fetcher: Fetch = fetch,
  pass: Pass = wholePass(),
): Promise<SyncOutcome> {
  const batch = await nextBatch(store, scope, pass);
  if (batch.length === 0) return 'nothing';
  const events = await markSending(store, batch);
  let answers: EventAnswer[];
  try {
    const response = await fetcher(url, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ protocol: PROTOCOL, events }),
      signal: AbortSignal.timeout(PATIENCE_MS),
    });
    const outcome = outcomeOf(response.status);
    if (outcome === 'stumbled') stumbleOver(batch, pass);
    if (outcome) return outcome;
    ({ answers } = (await response.json()) as { answers: EventAnswer[] });
    if (!Array.isArray(answers)) return 'offline';
  } catch {
    // No network, or one that answers in the server's place: nothing is known, all is asked again.
    return 'offline';
  }
  for (const answer of answers) await takeAnswer(store, scope, answer);
  return 'sent';
}

/**
 * One edit that the server falls over must not hold up the others: each goes alone, and that one waits. What happened
 * on a sheet keeps its order: there, what comes after it waits too.
 */
function stumbleOver(batch: QueuedEvent[], pass: Pass): void {
  const [only] = batch;
  if (batch.length === 1 && only && only.collection !== 'happening') pass.skip.add(only.id);
  pass.most = 1;
}

/** So many in one go: then it is the server, not the edit. */
const MAX_STUMBLES = 3;

/** Sends until nothing is left or something stops it. */
export async function sendAll(
  store: OfflineStore,
  scope: string,
  url: string,
  fetcher?: Fetch,
): Promise<SyncOutcome> {
  const pass = wholePass();
  for (;;) {
    const alone = pass.most === 1;
    const skipped = pass.skip.size;
    const outcome = await sendBatch(store, scope, url, fetcher, pass);
    if (outcome === 'stumbled') {
      const stuck = alone && pass.skip.size === skipped;
      if (stuck || pass.skip.size >= MAX_STUMBLES) return 'failed';
    } else if (outcome === 'nothing') return skipped > 0 ? 'failed' : 'nothing';
    else if (outcome !== 'sent') return outcome;
  }
}
