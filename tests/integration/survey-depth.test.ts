/** The survey in depth: details with their bounds, readings of light, utility accounts, and types that the shop keeps. */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { saveCustomer } from '@/lib/customers/commands';
import { createJob } from '@/lib/jobs/commands';
import type { ClientEvent, EventAnswer } from '@/lib/offline/protocol';
import { closeDatabase } from '@/lib/platform/db';
import { applySurveyEvents } from '@/lib/surveys/commands';
import { loadSurvey } from '@/lib/surveys/queries';
import { NO_AREA_DETAILS, NO_LUMINAIRE_DETAILS } from '@/lib/surveys/schema/details';
import { makeShop, type TestShop } from '../support/shop';

let shop: TestShop;
let jobId: string;
let areaId: string;

async function newJob(of: TestShop): Promise<string> {
  const { id } = await saveCustomer(of.actors.owner, {
    name: `C ${randomUUID()}`,
    contactName: '',
    email: '',
    phone: '',
    address: '',
    consumer: false,
    notes: '',
  });
  const job = { customerId: id, siteName: 'S', siteAddress: '', title: 'T' };
  return (await createJob(of.actors.owner, job)).id;
}

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

async function put(kind: string, body: object, more: Partial<ClientEvent> = {}): Promise<EventAnswer> {
  const [answer] = await applySurveyEvents(shop.actors.estimator, jobId, [
    {
      id: randomUUID(),
      kind: `${kind}.put`,
      entityId: randomUUID(),
      baseVersion: null,
      body: { ...body },
      at: new Date().toISOString(),
      ...more,
    },
  ]);
  if (!answer) throw new Error('no answer');
  return answer;
}
const paths = (answer: EventAnswer) => [answer.status, (answer.issues ?? []).map(({ path }) => path)];

beforeAll(async () => {
  shop = await makeShop();
  jobId = await newJob(shop);
  areaId = (await put('areas', AREA)).entity?.id ?? '';
});
afterAll(closeDatabase);

describe('details of an area', () => {
  it('are unknown, not missing, where an older phone does not send them', async () => {
    const answer = await put('areas', { ...AREA, name: 'From an older phone' });
    expect(answer).toMatchObject({ status: 200, entity: { data: { details: NO_AREA_DETAILS } } });
  });

  it('come back as they were sent, in the next snapshot too', async () => {
    const details = {
      ...NO_AREA_DETAILS,
      mountingMetres: 2.7,
      wallReflectance: 0.5,
      plenum: 'yes',
      access: 'ladder',
      panel: 'LP-2',
      dayHours: [9, 9, 9, 9, 9, 5, 0],
      weeksPerYear: 50,
    };
    const answer = await put('areas', { ...AREA, details });
    const { entities } = await loadSurvey(shop.shopId, jobId);
    expect(entities.find((one) => one.id === answer.entity?.id)?.data['details']).toEqual(details);
  });

  it.each([
    [{ details: { ...NO_AREA_DETAILS, floorReflectance: 1.2 } }, 'details.floorReflectance'],
    [{ details: { ...NO_AREA_DETAILS, mountingMetres: -1 } }, 'details.mountingMetres'],
    [{ details: { ...NO_AREA_DETAILS, dayHours: [25, 0, 0, 0, 0, 0, 0] } }, 'details.dayHours.0'],
    [{ details: { ...NO_AREA_DETAILS, dayHours: [8, 8] } }, 'details.dayHours'],
    // 168 h in 53 weeks would be 8,904 h: a year has 8,760.
    [{ weeklyHours: 168, details: { ...NO_AREA_DETAILS, weeksPerYear: 53 } }, 'details.weeksPerYear'],
    [{ details: { ...NO_AREA_DETAILS, ceiling: 'sky' } }, 'details.ceiling'],
  ])('%j is refused at %s', async (change, path) => {
    expect(paths(await put('areas', { ...AREA, ...change }))).toEqual([422, [path]]);
  });

  it('168 hours in 52 weeks are within a year', async () => {
    const details = { ...NO_AREA_DETAILS, weeksPerYear: 52 };
    expect((await put('areas', { ...AREA, weeklyHours: 168, details })).status).toBe(200);
  });
});

describe('light that was measured', () => {
  const reading = () => ({
    areaId,
    place: 'By the till',
    lux: 312.5,
    taken: 'before',
    daylight: 'none',
    meter: 'Lux meter 7, serial 0042',
    calibratedOn: '2026-03-01',
    readAt: '2026-11-30T18:00:00.000Z',
    notes: '',
  });

  it('keeps point, figure, meter and when, to the letter', async () => {
    const sent = reading();
    const answer = await put('readings', sent);
    expect(answer).toMatchObject({ status: 200, entity: { data: sent } });
    const { entities } = await loadSurvey(shop.shopId, jobId);
    expect(entities.find((one) => one.id === answer.entity?.id)?.data).toEqual(sent);
  });

  it('a point may be marked before it is read', async () => {
    expect(await put('readings', { ...reading(), lux: null })).toMatchObject({
      entity: { data: { lux: null } },
    });
  });

  it.each([
    ['lux', -1],
    ['place', ' '],
    ['calibratedOn', '30/11/2026'],
    ['readAt', 'yesterday'],
    ['areaId', randomUUID()],
  ])('refuses %s: %s', async (field, value) => {
    expect(paths(await put('readings', { ...reading(), [field]: value }))).toEqual([422, [field]]);
  });
});

describe('utility accounts', () => {
  const account = {
    utility: 'Tarn Power',
    accountNumber: '88-1',
    rateSchedule: 'GS-2',
    energyRate: 0.1425,
    blended: false,
    demandRate: 14.2,
    bills: [
      { from: '2026-09-01', to: '2026-09-30', kilowattHours: 5120, demandKilowatts: 18.4, amount: 812.33 },
    ],
    notes: '',
  };

  it('keep rates and bills', async () => {
    expect(await put('utility-accounts', account)).toMatchObject({ status: 200, entity: { data: account } });
  });

  it('refuse a bill that ends before it begins, at its field', async () => {
    const [bill] = account.bills;
    const answer = await put('utility-accounts', {
      ...account,
      bills: [bill, { ...bill, to: '2026-08-01' }],
    });
    expect(paths(answer)).toEqual([422, ['bills.1.to']]);
  });
});

describe('types that the shop keeps', () => {
  const type = {
    name: 'Sandwich bar strip, 3 lamps',
    watts: 71,
    wattsSource: 'measured',
    ballast: 'magnetic',
  };

  it('are offered in every job of the shop, and mended from any; never in another shop', async () => {
    const kept = await put('luminaire-types', type);
    expect(kept.status).toBe(200);
    const other = await newJob(shop);
    const seen = (await loadSurvey(shop.shopId, other)).entities.find((one) => one.id === kept.entity?.id);
    expect(seen).toMatchObject({ collection: 'luminaire-types', version: 1, data: type });
    const [mended] = await applySurveyEvents(shop.actors.owner, other, [
      {
        id: randomUUID(),
        kind: 'luminaire-types.put',
        entityId: kept.entity?.id ?? '',
        baseVersion: 1,
        body: { ...type, watts: 74 },
        at: new Date().toISOString(),
      },
    ]);
    expect(mended).toMatchObject({ status: 200, entity: { version: 2, data: { watts: 74 } } });
    const stranger = await makeShop();
    const theirs = await loadSurvey(stranger.shopId, await newJob(stranger));
    expect(theirs.entities.filter((one) => one.collection === 'luminaire-types')).toEqual([]);
  });
});

it('every count of a type is kept, the last one standing', async () => {
  const luminaire = {
    areaId,
    luminaireType: 'Batten',
    quantity: 31,
    countConfidence: 'counted',
    watts: 58,
    wattsSource: 'nameplate',
    supplyVolts: 120,
    electrical: {
      lampType: '',
      ballast: 'unknown',
      lampholder: 'unknown',
      dimmer: 'unknown',
      emergency: 'unknown',
      breakerAmps: null,
    },
    details: {
      ...NO_LUMINAIRE_DETAILS,
      lampsOut: 3,
      recounts: [
        { quantity: 29, at: '2026-11-30T10:00:00.000Z' },
        { quantity: 31, at: '2026-11-30T10:05:00.000Z' },
      ],
    },
    notes: '',
  };
  expect(await put('luminaires', luminaire)).toMatchObject({ status: 200, entity: { data: luminaire } });
  const wrong = { ...luminaire, details: { ...luminaire.details, lampsOut: 1.5 } };
  expect(paths(await put('luminaires', wrong))).toEqual([422, ['details.lampsOut']]);
});
