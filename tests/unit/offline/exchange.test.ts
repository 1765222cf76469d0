/** Phones and a server in memory: what two of them do to one survey, what is refused, and what a lost answer leaves. */
import 'fake-indexeddb/auto';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { dropMine, keepMine, takeTheirs, tryAgain } from '@/lib/offline/decide';
import { addHappening, putEntity } from '@/lib/offline/edits';
import { exchange, syncedKey } from '@/lib/offline/keep';
import type { ClientEvent, Entity, EventAnswer } from '@/lib/offline/protocol';
import { OfflineStore, type QueuedEvent } from '@/lib/offline/store';
import { isTroubled } from '@/lib/offline/trouble';

const scope = 'job';
const addresses = { snapshotUrl: '/snapshot', eventsUrl: '/events' };
const AREA = '11111111-1111-4111-8111-111111111111';
const LAMP = '22222222-2222-4222-8222-222222222222';
const FRESH = { name: 'Bay', use: '', width: 4 };
let phones = 0;

/** Keeps versions, answers a repeat as the first time, refuses an empty name and an area that it does not know. */
class Server {
  readonly entities = new Map<string, Entity>();
  readonly applied: string[] = [];
  readonly requests: { path: string; ids: string[] }[] = [];
  private readonly answers = new Map<string, EventAnswer>();
  down = false;
  status: number | null = null;
  loseAnswers = false;
  poison: string | null = null;

  private refuse = (event: ClientEvent, path: string): EventAnswer => ({
    id: event.id,
    status: 422,
    message: 'Some fields need another look.',
    issues: [{ path, message: 'is wrong' }],
  });

  private apply(event: ClientEvent): EventAnswer {
    const known = this.answers.get(event.id);
    if (known) return known;
    const current = this.entities.get(event.entityId);
    if (current && current.version !== event.baseVersion)
      return { id: event.id, status: 409, message: 'changed', current: structuredClone(current) };
    if (event.body['name'] === '') return this.refuse(event, 'name');
    const area = event.body['areaId'];
    if (typeof area === 'string' && !this.entities.has(area)) return this.refuse(event, 'areaId');
    const [collection = '', verb] = event.kind.split('.');
    const entity: Entity = {
      collection,
      id: event.entityId,
      version: (current?.version ?? 0) + 1,
      archived: verb === 'archive',
      data: structuredClone(event.body),
    };
    this.entities.set(entity.id, entity);
    this.applied.push(event.id);
    const answer: EventAnswer = { id: event.id, status: 200, entity };
    this.answers.set(event.id, answer);
    return structuredClone(answer);
  }

  readonly fetcher = (async (path: string, init: RequestInit = {}) => {
    if (this.down) throw new TypeError('no network');
    if (this.status) return new Response('{}', { status: this.status });
    if (init.method !== 'POST') return this.snapshot(new Headers(init.headers));
    const { events } = JSON.parse(String(init.body)) as { events: ClientEvent[] };
    this.requests.push({ path, ids: events.map(({ id }) => id) });
    if (events.some(({ entityId }) => entityId === this.poison)) return new Response('', { status: 500 });
    const answers = events.map((event) => this.apply(event));
    if (this.loseAnswers) throw new TypeError('lost on the way');
    return new Response(JSON.stringify({ answers }));
  }) as typeof fetch;

  private snapshot(headers: Headers): Response {
    const living = [...this.entities.values()].filter(({ archived }) => !archived);
    const etag = `"${JSON.stringify(living)}"`;
    this.requests.push({ path: 'snapshot', ids: [] });
    if (headers.get('if-none-match') === etag) return new Response(null, { status: 304 });
    return new Response(JSON.stringify({ entities: living }), { headers: { etag } });
  }
}

class Phone {
  readonly store = new OfflineStore('shop', `phone-${phones++}`);
  constructor(private readonly server: Server) {}
  sync = (pull = true) => exchange(this.store, scope, addresses, { pull, fetcher: this.server.fetcher });
  entity = (id = AREA) => this.store.entities.get([scope, 'areas', id]);
  queue = () => this.store.queue.orderBy('seq').toArray();
  add = (data: object, id = AREA, collection = 'areas') =>
    putEntity(this.store, { scope, collection, id, data: { ...data } });
  /** As a screen does: what it shows, and that with a change. */
  async change(change: object, id = AREA): Promise<void> {
    const shown = { ...(await this.entity(id))?.data };
    await putEntity(this.store, {
      scope,
      collection: 'areas',
      id,
      data: { ...shown, ...change },
      base: shown,
    });
  }
  async archive(): Promise<void> {
    const data = { ...(await this.entity())?.data };
    await putEntity(this.store, { scope, collection: 'areas', id: AREA, data, base: data, archived: true });
  }
  async waiting(): Promise<QueuedEvent> {
    const [event] = await this.queue();
    if (!event) throw new Error('Nothing waits.');
    return event;
  }
}

let server: Server;
let a: Phone;
let b: Phone;

beforeEach(async () => {
  server = new Server();
  [a, b] = [new Phone(server), new Phone(server)];
  await a.add(FRESH);
  await a.sync();
  await b.sync();
});

describe('two phones on one survey', () => {
  it('see each other’s areas', async () => {
    await b.add({ ...FRESH, name: 'Store' }, LAMP);
    await b.sync();
    await a.sync();
    expect((await a.entity(LAMP))?.data['name']).toBe('Store');
  });

  it('both changed, each another field: both stand, without a question', async () => {
    await a.change({ use: 'Storage' });
    await b.change({ width: 5 });
    await b.sync();
    expect(await a.sync()).toBe('nothing');
    expect(server.entities.get(AREA)?.data).toEqual({ name: 'Bay', use: 'Storage', width: 5 });
    expect((await a.entity())?.data).toEqual({ name: 'Bay', use: 'Storage', width: 5 });
    expect(await a.queue()).toEqual([]);
  });

  it.each([
    ['mine', keepMine, 'Storage'],
    ['theirs', takeTheirs, 'Parking'],
  ] as const)(
    'both changed one field: %s stands on both, and what else either changed is kept',
    async (_, choose, use) => {
      await a.change({ use: 'Storage', name: 'Bay 1' });
      await b.change({ use: 'Parking', width: 5 });
      await b.sync();
      await a.sync();
      const event = await a.waiting();
      expect(event).toMatchObject({ state: 'conflict', current: { data: { use: 'Parking' } } });
      // Until it is decided, the screen goes on showing what was typed here.
      expect((await a.entity())?.data['use']).toBe('Storage');
      await choose(a.store, event);
      expect(await a.sync()).toBe('nothing');
      await b.sync();
      const wanted = { name: 'Bay 1', use, width: 5 };
      expect(server.entities.get(AREA)?.data).toEqual(wanted);
      expect((await a.entity())?.data).toEqual(wanted);
      expect((await b.entity())?.data).toEqual(wanted);
    },
  );

  it('what is typed while a choice waits is part of mine', async () => {
    await a.change({ use: 'Storage' });
    await b.change({ use: 'Parking' });
    await b.sync();
    await a.sync();
    await a.change({ name: 'Typed meanwhile' });
    await a.sync();
    expect(await a.queue()).toHaveLength(1);
    await keepMine(a.store, await a.waiting());
    await a.sync();
    expect(server.entities.get(AREA)?.data).toEqual({ name: 'Typed meanwhile', use: 'Storage', width: 4 });
  });

  it('a third change while the choice waits is a new choice, not a loss', async () => {
    await a.change({ use: 'Storage' });
    await b.change({ use: 'Parking' });
    await b.sync();
    await a.sync();
    await b.change({ use: 'Washing' });
    await b.sync();
    await keepMine(a.store, await a.waiting());
    await a.sync();
    expect(await a.waiting()).toMatchObject({ state: 'conflict', current: { data: { use: 'Washing' } } });
  });

  it.each([
    ['mine', keepMine, false],
    ['theirs', takeTheirs, true],
  ] as const)('one took it out, the other changed it: a choice; %s', async (_, choose, archived) => {
    await b.archive();
    await b.sync();
    await a.change({ use: 'Storage' });
    await a.sync();
    await choose(a.store, await a.waiting());
    await a.sync();
    expect(server.entities.get(AREA)?.archived).toBe(archived);
    expect((await a.entity())?.archived ?? true).toBe(archived);
    expect(await a.queue()).toEqual([]);
  });

  it('both took it out: nothing to choose', async () => {
    await a.archive();
    await b.archive();
    await b.sync();
    expect(await a.sync()).toBe('nothing');
    expect(await a.queue()).toEqual([]);
  });
});

describe('what the server refuses', () => {
  it('is kept with its field, and goes on being typed on: the mended edit is sent, not the refused one', async () => {
    await a.change({ name: '' });
    await a.sync();
    expect(await a.waiting()).toMatchObject({ state: 'refused', issues: [{ path: 'name' }] });
    await a.change({ name: 'Bay 2' });
    expect(await a.sync()).toBe('nothing');
    expect(server.entities.get(AREA)?.data['name']).toBe('Bay 2');
  });

  it('and what was typed on while it was on its way is not held up behind it', async () => {
    await a.change({ name: '' });
    server.loseAnswers = true;
    await a.sync();
    await a.change({ name: 'Bay 3' });
    server.loseAnswers = false;
    expect(await a.queue()).toHaveLength(2);
    expect(await a.sync()).toBe('nothing');
    expect(server.entities.get(AREA)?.data['name']).toBe('Bay 3');
    expect(await a.queue()).toEqual([]);
  });

  it('goes again by itself once what it belongs to has arrived', async () => {
    const hall = '33333333-3333-4333-8333-333333333333';
    await a.add({ ...FRESH, name: '' }, hall);
    await a.add({ name: 'Lamp', areaId: hall }, LAMP, 'luminaires');
    await a.sync();
    expect((await a.queue()).map(({ state }) => state)).toEqual(['refused', 'refused']);
    await a.change({ name: 'Hall' }, hall);
    expect(await a.sync()).toBe('nothing');
    expect(server.entities.has(LAMP)).toBe(true);
  });

  it('can be tried again as it is, or given up: then what stood there stands again', async () => {
    await a.change({ name: '' });
    await a.sync();
    await tryAgain(a.store, await a.waiting());
    await a.sync();
    expect((await a.waiting()).state).toBe('refused');
    await dropMine(a.store, await a.waiting());
    expect((await a.entity())?.data).toEqual(FRESH);
    expect(await a.sync()).toBe('nothing');
    expect((await a.entity())?.data).toEqual(FRESH);
  });

  it('a new entry that is given up is gone', async () => {
    await a.add({ ...FRESH, name: '' }, LAMP);
    await a.sync();
    await dropMine(a.store, await a.waiting());
    expect(await a.entity(LAMP)).toBeUndefined();
  });
});

describe('a server that is gone, signed out of, or in trouble', () => {
  it.each([
    [401, 'signed-out'],
    [403, 'not-allowed'],
    [404, 'not-allowed'],
    [422, 'outdated'],
    [503, 'failed'],
    [500, 'failed'],
  ] as const)('%i to all: says %s, keeps all, and sends it once when it is over', async (status, said) => {
    await a.change({ use: 'Storage' });
    await a.add({ ...FRESH, name: 'Store' }, LAMP);
    server.status = status;
    expect(await a.sync()).toBe(said);
    expect(await a.queue()).toHaveLength(2);
    server.status = null;
    const before = server.applied.length;
    expect(await a.sync()).toBe('nothing');
    expect(server.applied.length - before).toBe(2);
    expect(server.entities.get(AREA)).toMatchObject({ version: 2, data: { use: 'Storage' } });
  });

  it('a page that answers in the server’s place (hotel network) is no answer', async () => {
    await a.change({ use: 'Storage' });
    const hotel = (async () => new Response('<html>Welcome</html>')) as unknown as typeof fetch;
    expect(await exchange(a.store, scope, addresses, { pull: true, fetcher: hotel })).toBe('offline');
    expect(await a.queue()).toHaveLength(1);
  });

  it('without a network, is told even if nothing is to be sent', async () => {
    server.down = true;
    expect(await a.sync()).toBe('offline');
  });

  it('one edit that the server falls over does not hold up the others', async () => {
    server.poison = AREA;
    await a.change({ use: 'Storage' });
    await a.add({ ...FRESH, name: 'Store' }, LAMP);
    expect(await a.sync()).toBe('failed');
    expect(server.entities.has(LAMP)).toBe(true);
    expect((await a.queue()).map(({ entityId }) => entityId)).toEqual([AREA]);
    server.poison = null;
    expect(await a.sync()).toBe('nothing');
  });

  it('what happened on a sheet keeps its order: nothing overtakes the one that the server falls over', async () => {
    const first = await addHappening(a.store, { scope, kind: 'dead-proved', body: {} });
    await addHappening(a.store, { scope, kind: 'tick', body: {} });
    server.poison = first;
    expect(await a.sync()).toBe('failed');
    expect(await a.queue()).toHaveLength(2);
    server.poison = null;
    await a.sync();
    expect([...server.entities.keys()].slice(-2)[0]).toBe(first);
  });

  it('many edits go in the order in which they were made, none twice, though every other answer is lost', async () => {
    const ids = Array.from(
      { length: 120 },
      (_, n) => `44444444-4444-4444-8444-${String(n).padStart(12, '0')}`,
    );
    for (const [n, id] of ids.entries()) await a.add({ ...FRESH, name: `Area ${n}` }, id);
    const before = server.applied.length;
    const queued = (await a.queue()).map(({ id }) => id);
    for (let attempt = 0; attempt < 20 && (await a.queue()).length > 0; attempt++) {
      server.loseAnswers = attempt % 2 === 0;
      await a.sync(false);
    }
    expect(server.applied.slice(before)).toEqual(queued);
  });
});

describe('what comes in', () => {
  it('is not fetched again where nothing changed, and whole where an edit of ours had waited', async () => {
    await a.sync();
    const put = vi.spyOn(a.store.entities, 'bulkPut');
    await a.sync();
    expect(put).not.toHaveBeenCalled();
    await b.change({ use: 'Parking' });
    await b.sync();
    await a.sync();
    expect((await a.entity())?.data['use']).toBe('Parking');
  });

  it('says when device and server last had the same: not when a send failed', async () => {
    const at = async () => (await a.store.meta.get(syncedKey(scope)))?.value;
    const first = String(await at());
    expect(Date.parse(first)).not.toBeNaN();
    server.down = true;
    await a.change({ use: 'Storage' });
    await a.sync();
    expect(await at()).toBe(first);
  });

  it('a snapshot asked for before an edit was sent never undoes it: exchanges take turns', async () => {
    let release = () => {};
    let asked = () => {};
    const onItsWay = new Promise<void>((resolve) => (asked = resolve));
    const slow: typeof fetch = async (input, init) => {
      const response = await server.fetcher(input, init);
      if (init?.method === 'POST') return response;
      asked();
      await new Promise<void>((resolve) => (release = resolve));
      return response;
    };
    await b.change({ width: 9 });
    await b.sync();
    const pulling = exchange(a.store, scope, addresses, { pull: true, fetcher: slow });
    await onItsWay;
    await a.add({ ...FRESH, name: 'Typed while it was on its way' }, LAMP);
    const sending = a.sync(false);
    // Time enough to overtake, if it could.
    await Promise.race([sending, new Promise((resolve) => setTimeout(resolve, 50))]);
    release();
    await Promise.all([pulling, sending]);
    expect((await a.entity(LAMP))?.data['name']).toBe('Typed while it was on its way');
    expect(server.entities.has(LAMP)).toBe(true);
  });
});

it('a device that keeps nothing more says so, until it does again', async () => {
  const full = vi.spyOn(a.store.entities, 'put').mockRejectedValueOnce(new Error('QuotaExceededError'));
  await expect(a.change({ use: 'Storage' })).rejects.toThrow();
  expect(isTroubled()).toBe(true);
  full.mockRestore();
  await a.change({ use: 'Storage' });
  expect(isTroubled()).toBe(false);
});
