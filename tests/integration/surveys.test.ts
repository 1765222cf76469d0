/** A survey's events: applied once, against their version, figured again by the server; stops keep a line back. */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { circuitsForQuote } from '@/lib/circuits/queries';
import { figureCircuit } from '@/lib/circuits/schema/figure';
import { startingPoint, type TapeRun } from '@/lib/circuits/schema/electrical';
import { saveCustomer } from '@/lib/customers/commands';
import { createJob } from '@/lib/jobs/commands';
import { getJob } from '@/lib/jobs/queries';
import type { ClientEvent } from '@/lib/offline/protocol';
import { closeDatabase, withShop } from '@/lib/platform/db';
import { getSettings } from '@/lib/shops/queries';
import { applySurveyEvents, overrideFinding } from '@/lib/surveys/commands';
import { loadSurvey } from '@/lib/surveys/queries';
import { addParts, type PartIds, SurveyPen } from '@/seeders/demo';
import { makeShop, type TestShop } from '../support/shop';

let shop: TestShop;
let part: PartIds;
let jobId: string;
let pen: SurveyPen;

async function newJob(): Promise<string> {
  const { id } = await saveCustomer(shop.actors.owner, {
    name: `C ${randomUUID()}`,
    contactName: '',
    email: '',
    phone: '',
    address: '',
    consumer: false,
    notes: '',
  });
  return (await createJob(shop.actors.owner, { customerId: id, siteName: 'S', siteAddress: '', title: 'T' }))
    .id;
}

beforeAll(async () => {
  shop = await makeShop();
  part = await addParts(shop.actors.owner);
  jobId = await newJob();
  pen = new SurveyPen(shop.actors.estimator, jobId);
});
afterAll(closeDatabase);

const AREA = {
  position: 0,
  name: 'Hall',
  use: '',
  lengthMetres: 10,
  widthMetres: 6,
  heightMetres: 3,
  weeklyHours: 50,
  ambientCelsius: 20,
  environment: 'dry',
  hazards: {},
  notes: '',
};
const event = (body: object, more: Partial<ClientEvent> = {}): ClientEvent => ({
  id: randomUUID(),
  kind: 'areas.put',
  entityId: randomUUID(),
  baseVersion: null,
  body: { ...body },
  at: new Date().toISOString(),
  ...more,
});
const send = async (...events: ClientEvent[]) => applySurveyEvents(shop.actors.estimator, jobId, events);

describe('events of a survey', () => {
  it('answer 200 again for the same id and body, and 409 for another body', async () => {
    const first = event(AREA);
    const [once] = await send(first);
    const [twice] = await send(first);
    expect(once).toMatchObject({ status: 200, entity: { version: 1, data: { name: 'Hall' } } });
    expect(twice).toEqual(once);
    const [other] = await send({ ...first, body: { ...AREA, name: 'Other' } });
    expect(other).toMatchObject({ status: 409 });
  });

  it('have one effect when they come five times at once', async () => {
    const same = event({ ...AREA, name: 'At once' });
    const answers = await Promise.all(Array.from({ length: 5 }, () => send(same)));
    expect(answers.flat().map((answer) => answer.status)).toEqual([200, 200, 200, 200, 200]);
    const { entities } = await loadSurvey(shop.shopId, jobId);
    expect(entities.filter((one) => one.data['name'] === 'At once')).toHaveLength(1);
  });

  it('show what stands there when somebody else was first', async () => {
    const made = event({ ...AREA, name: 'Shared' });
    await send(made);
    const edit = (name: string) => event({ ...AREA, name }, { entityId: made.entityId, baseVersion: 1 });
    await send(edit('By A'));
    const [late] = await send(edit('By B'));
    expect(late).toMatchObject({ status: 409, current: { version: 2, data: { name: 'By A' } } });
  });

  it('are refused with the field’s path, and do not hold up the next one', async () => {
    const [bad, good] = await send(
      event({ ...AREA, weeklyHours: 200 }),
      event({ ...AREA, name: 'After it' }),
    );
    expect(bad).toMatchObject({ status: 422, issues: [{ path: 'weeklyHours' }] });
    expect(good).toMatchObject({ status: 200 });
    const [kind] = await send(event(AREA, { kind: 'shops.put' }));
    expect(kind).toMatchObject({ status: 422, issues: [{ path: 'kind' }] });
  });

  it('can not reach into another job or another shop', async () => {
    const elsewhere = await newJob();
    const areaElsewhere = await new SurveyPen(shop.actors.estimator, elsewhere).area(
      0,
      'Elsewhere',
      [3, 3, 3],
      40,
    );
    const cove = { areaId: areaElsewhere, name: 'C', tapeMetres: 2, driverMetres: 1, notes: '' };
    expect(await send(event(cove, { kind: 'coves.put' }))).toMatchObject([
      { status: 422, issues: [{ path: 'areaId' }] },
    ]);
    const stranger = await makeShop();
    await expect(applySurveyEvents(stranger.actors.owner, jobId, [event(AREA)])).rejects.toMatchObject({
      code: 'not-found',
    });
  });
});

describe('circuits', () => {
  const run = (feed: TapeRun['feed'], runMetres: number) => ({
    tape: part('TP-24-144').datasheet as TapeRun['tape'],
    runMetres,
    driverMetres: 3,
    feed,
    driver: { volts: 24, watts: 200, classTwo: false },
  });

  it('are figured again by the server, to the same figures as the browser’s', async () => {
    const area = await pen.area(5, 'Counter', [5, 4, 3], 60);
    const electrical = { ...startingPoint('tape-run', 'us'), ...run('both', 5) };
    const id = await pen.circuit(area, 'tape-run', 'Run', electrical, {
      tape: part('TP-24-144').id,
      driver: part('DR-24-200').id,
    });
    const { entities } = await loadSurvey(shop.shopId, jobId);
    const stored = entities.find((one) => one.id === id);
    const settings = await withShop(shop.shopId, () => getSettings(shop.shopId));
    const browser = figureCircuit('tape-run', electrical, settings);
    expect(browser.ok && browser.answer).toEqual(stored?.data['answer']);
    expect(stored?.data['openStops']).toBe(0);
    expect(stored?.data['choices']).toMatchObject({
      parts: expect.arrayContaining([{ partId: part('TP-24-144').id, quantity: '5' }]),
    });
  });

  it('with a stop count as open until a licensed person lets it stand', async () => {
    const area = await pen.area(6, 'Long cove', [12, 4, 3], 60);
    const id = await pen.circuit(area, 'tape-run', 'Too long', run('start', 11), {});
    const stops = async () =>
      (await withShop(shop.shopId, () => circuitsForQuote(jobId))).find((one) => one.id === id)?.openStops;
    expect(await stops()).toBeGreaterThan(0);
    const { entities } = await loadSurvey(shop.shopId, jobId);
    const answer = entities.find((one) => one.id === id)?.data['answer'] as {
      findings: { code: string; severity: string; hard: boolean }[];
    };
    const soft = answer.findings.filter((one) => one.severity === 'stop' && !one.hard);
    const input = (code: string) => ({
      jobId,
      subjectType: 'circuit' as const,
      subjectId: id,
      code,
      reason: 'Dim by wish of the customer.',
    });
    await expect(overrideFinding(shop.actors.estimator, input(soft[0]!.code))).rejects.toMatchObject({
      code: 'not-allowed',
    });
    for (const { code } of soft) await overrideFinding(shop.actors.owner, input(code));
    expect(await stops()).toBe(answer.findings.filter((one) => one.severity === 'stop' && one.hard).length);
  });

  it('of bench work are refused where the shop has not switched it on', async () => {
    const plain = await makeShop({ benchWork: false });
    const { id } = await saveCustomer(plain.actors.owner, {
      name: 'B',
      contactName: '',
      email: '',
      phone: '',
      address: '',
      consumer: false,
      notes: '',
    });
    const job = (
      await createJob(plain.actors.owner, { customerId: id, siteName: 'S', siteAddress: '', title: 'T' })
    ).id;
    const hand = new SurveyPen(plain.actors.owner, job);
    const area = await hand.area(0, 'Cabin', [3, 2, 2], 10);
    await expect(hand.circuit(area, 'resistor-array', 'Array', {}, {})).rejects.toThrow(
      /Bench work is switched off/,
    );
  });

  it('tell the job’s facts', async () => {
    const { facts } = await withShop(shop.shopId, () => getJob(jobId));
    expect(facts.openStops).toBeGreaterThanOrEqual(0);
    expect(facts.surveyDone).toBe(false);
  });
});

describe('a snapshot for the phone', () => {
  it('holds no cost and no price', async () => {
    expect(JSON.stringify(await loadSurvey(shop.shopId, jobId))).not.toMatch(/cost|price|markup|minor/i);
  });
});
