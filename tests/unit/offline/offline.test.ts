/** The queue on the device: nothing is lost, nothing is sent twice, conflicts wait for a person. */
import 'fake-indexeddb/auto';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { keepMine, takeTheirs } from '@/lib/offline/decide';
import { addHappening, putEntity, writeLeftBehind, writeSnapshot } from '@/lib/offline/edits';
import type { ClientEvent, Entity, EventAnswer } from '@/lib/offline/protocol';
import { OfflineStore, wipeOffline } from '@/lib/offline/store';
import { sendAll, sendBatch } from '@/lib/offline/sync';

const scope = 'job-1';
const id = '11111111-1111-4111-8111-111111111111';
let store: OfflineStore;
let count = 0;

beforeEach(() => {
  store = new OfflineStore('shop', `person-${count++}`);
});

const edit = (name: string) => putEntity(store, { scope, collection: 'areas', id, data: { name } });

/** A server in memory that keeps versions and answers a repeated id as the first time. */
function server() {
  const entities = new Map<string, Entity>();
  const answered = new Map<string, EventAnswer>();
  const requests: ClientEvent[] = [];
  const answer = (event: ClientEvent): EventAnswer => {
    const before = answered.get(event.id);
    if (before) return before;
    const current = entities.get(event.entityId);
    if (current && current.version !== event.baseVersion)
      return { id: event.id, status: 409, message: 'changed', current };
    if (event.body['name'] === '')
      return {
        id: event.id,
        status: 422,
        message: 'no name',
        issues: [{ path: 'name', message: 'no name' }],
      };
    const entity: Entity = {
      collection: 'areas',
      id: event.entityId,
      version: (current?.version ?? 0) + 1,
      archived: false,
      data: event.body,
    };
    entities.set(entity.id, entity);
    const done: EventAnswer = { id: event.id, status: 200, entity };
    answered.set(event.id, done);
    return done;
  };
  const fetcher = (loseAnswer = false) =>
    (async (_: unknown, init?: RequestInit) => {
      const { events } = JSON.parse(String(init?.body)) as { events: ClientEvent[] };
      requests.push(...events);
      const answers = events.map(answer);
      if (loseAnswer) throw new TypeError('network');
      return new Response(JSON.stringify({ answers }));
    }) as typeof fetch;
  return { entities, requests, fetcher };
}

describe('offline queue', () => {
  it('coalesces typing into one event and sends it once', async () => {
    const remote = server();
    await edit('B');
    await edit('Ba');
    await edit('Bakery');
    expect(await sendAll(store, scope, '/e', remote.fetcher())).toBe('nothing');
    expect(remote.requests.map((event) => event.body)).toEqual([{ name: 'Bakery' }]);
    expect(await store.queue.count()).toBe(0);
    expect(await store.entities.get([scope, 'areas', id])).toMatchObject({
      version: 1,
      dirty: 0,
      data: { name: 'Bakery' },
    });
  });

  it('keeps everything without a network, and an answer lost on the way is asked for again under the same id', async () => {
    const remote = server();
    await edit('One');
    expect(await sendBatch(store, scope, '/e', remote.fetcher(true))).toBe('offline');
    await edit('Two'); // typed while the first is in doubt: a second event
    expect(await store.queue.count()).toBe(2);
    await sendAll(store, scope, '/e', remote.fetcher());
    expect(remote.requests.map((event) => event.body['name'])).toEqual(['One', 'One', 'Two']);
    expect(new Set(remote.requests.map((event) => event.id)).size).toBe(2);
    expect(remote.entities.get(id)).toMatchObject({ version: 2, data: { name: 'Two' } });
  });

  it('a change by somebody else waits for a choice: keep mine', async () => {
    const remote = server();
    await edit('Mine');
    await sendAll(store, scope, '/e', remote.fetcher());
    remote.entities.set(id, {
      collection: 'areas',
      id,
      version: 2,
      archived: false,
      data: { name: 'Theirs' },
    });
    await edit('Mine again');
    await sendAll(store, scope, '/e', remote.fetcher());
    const [event] = await store.queue.toArray();
    expect(event).toMatchObject({ state: 'conflict', current: { data: { name: 'Theirs' } } });
    await keepMine(store, event!);
    await sendAll(store, scope, '/e', remote.fetcher());
    expect(remote.entities.get(id)).toMatchObject({ version: 3, data: { name: 'Mine again' } });
  });

  it('or take theirs', async () => {
    const remote = server();
    remote.entities.set(id, {
      collection: 'areas',
      id,
      version: 5,
      archived: false,
      data: { name: 'Theirs' },
    });
    await edit('Mine');
    await sendAll(store, scope, '/e', remote.fetcher());
    const [event] = await store.queue.toArray();
    await takeTheirs(store, event!);
    expect(await store.queue.count()).toBe(0);
    expect(await store.entities.get([scope, 'areas', id])).toMatchObject({
      version: 5,
      data: { name: 'Theirs' },
    });
  });

  it('a refused edit is kept with its reason and goes out again once mended', async () => {
    const remote = server();
    await edit('');
    await sendAll(store, scope, '/e', remote.fetcher());
    expect((await store.queue.toArray())[0]).toMatchObject({ state: 'refused', issues: [{ path: 'name' }] });
    await edit('Named');
    await sendAll(store, scope, '/e', remote.fetcher());
    expect(remote.entities.get(id)?.data).toEqual({ name: 'Named' });
  });

  it('a snapshot never overwrites what is typed here', async () => {
    await edit('Typed here');
    await writeSnapshot(store, scope, [
      { collection: 'areas', id, version: 9, archived: false, data: { name: 'Old' } },
    ]);
    expect((await store.entities.get([scope, 'areas', id]))?.data).toEqual({ name: 'Typed here' });
  });

  it('happenings keep their order and are never merged', async () => {
    await addHappening(store, { scope, kind: 'tick', body: { step: 'a' } });
    await addHappening(store, { scope, kind: 'untick', body: { step: 'a' } });
    expect((await store.queue.orderBy('seq').toArray()).map((event) => event.kind)).toEqual([
      'tick',
      'untick',
    ]);
  });

  it('signing out wipes a clean store and keeps one with unsent work', async () => {
    await store.open();
    await edit('Unsent');
    expect(await wipeOffline()).toBe(false);
    expect(await wipeOffline(true)).toBe(true);
  });
});

describe('a tab that is closed in the middle of a word', () => {
  /** As browsers have it: written before the call returns, its keys enumerable. */
  const fakeStorage = () => {
    const kept: Record<string, string> = {};
    const hidden = { enumerable: false };
    return Object.defineProperties(kept, {
      setItem: { ...hidden, value: (key: string, value: string) => void (kept[key] = value) },
      getItem: { ...hidden, value: (key: string) => kept[key] ?? null },
      removeItem: { ...hidden, value: (key: string) => void delete kept[key] },
    });
  };
  const noted = (of: object) => Object.keys(of).filter((key) => key.startsWith('lampwright-journal-'));

  it('leaves notes of what the store did not get to; the next tab writes them, in order, and strikes them out', async () => {
    const kept = fakeStorage();
    vi.stubGlobal('localStorage', kept);
    await edit('Sto');
    expect(noted(kept)).toEqual([]);
    // Two more keys, and the tab is gone before either write: what it had noted stays, under its own name.
    const before = await store.entities.get([scope, 'areas', id]);
    const late = (name: string, at: number) =>
      ((kept as Record<string, string>)[`lampwright-journal-${store.name}|a-closed-tab|${at}|000000000`] =
        JSON.stringify({ edit: { scope, collection: 'areas', id, data: { name }, base: before?.data } }));
    late('Stor', 2_000_000_000_001);
    late('Store', 2_000_000_000_002);
    await writeLeftBehind(store);
    expect((await store.entities.get([scope, 'areas', id]))?.data).toEqual({ name: 'Store' });
    expect(await store.queue.count()).toBe(1);
    expect(noted(kept)).toEqual([]);
    vi.unstubAllGlobals();
  });

  it('never writes a tick twice', async () => {
    const kept = fakeStorage();
    vi.stubGlobal('localStorage', kept);
    const tick = await addHappening(store, { scope, kind: 'tick', body: { step: 's1' } });
    const queued = await store.queue.where('id').equals(tick).first();
    (kept as Record<string, string>)[`lampwright-journal-${store.name}|a-closed-tab|1|0`] = JSON.stringify({
      event: { ...queued, seq: undefined },
    });
    await writeLeftBehind(store);
    expect(await store.queue.count()).toBe(1);
    vi.unstubAllGlobals();
  });
});

describe('edits of what a screen showed a moment ago', () => {
  it('never undo a field that was typed in between', async () => {
    const shown = { name: 'Area 1', size: null, electrical: { ballast: 'unknown', dimmer: 'none' } };
    const put = (data: Record<string, unknown>, base?: Record<string, unknown>) =>
      putEntity(store, { scope, collection: 'areas', id, data, ...(base ? { base } : {}) });
    await put(shown);
    // Three edits from one and the same render.
    await put({ ...shown, name: 'Back room' }, shown);
    await put({ ...shown, size: 9 }, shown);
    await put({ ...shown, electrical: { ...shown.electrical, ballast: 'magnetic' } }, shown);
    expect((await store.entities.get([scope, 'areas', id]))?.data).toEqual({
      name: 'Back room',
      size: 9,
      electrical: { ballast: 'magnetic', dimmer: 'none' },
    });
    expect(await store.queue.count()).toBe(1);
    expect((await store.queue.toArray())[0]?.body['name']).toBe('Back room');
  });

  it('take out a key that the edit took out', async () => {
    const shown = { roles: { tape: 'a', driver: 'b' } };
    await putEntity(store, { scope, collection: 'circuits', id, data: shown });
    await putEntity(store, {
      scope,
      collection: 'circuits',
      id,
      data: { roles: { tape: 'a' } },
      base: shown,
    });
    expect((await store.entities.get([scope, 'circuits', id]))?.data).toEqual({ roles: { tape: 'a' } });
  });

  it('do not send back what the server alone writes', async () => {
    await store.entities.put({
      scope,
      collection: 'areas',
      id,
      version: 3,
      archived: false,
      dirty: 0,
      data: { name: 'A', answer: { figured: 1 } },
    });
    await putEntity(store, { scope, collection: 'areas', id, data: { name: 'B' }, base: { name: 'A' } });
    expect((await store.queue.toArray())[0]?.body).toEqual({ name: 'B' });
  });
});
